import { getAuth } from "@/lib/auth/instance";
import { answerErrors } from "@/lib/auth/run-route";
import { requireSameOrigin } from "@/lib/auth/same-origin";
import { AppError } from "@/lib/errors";

/** What the pages use. The library serves much more, also for members and workspaces, past our table of rights. */
const open = ["sign-in/email", "sign-up/email", "sign-out"];

export async function POST(request: Request, { params }: { params: Promise<{ all: string[] }> }) {
  return answerErrors(async () => {
    const path = (await params).all.join("/");
    if (!open.includes(path)) throw new AppError("not-found", "There is no such address.");
    requireSameOrigin(request);
    return (await getAuth()).handler(request);
  });
}
