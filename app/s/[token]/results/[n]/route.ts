import { connection } from "next/server";
import { getDb } from "@/db/client";
import { findSharedResult } from "@/db/queries/shares";
import { answerBytes, answerErrors } from "@/lib/auth/run-route";
import { AppError } from "@/lib/errors";

type Props = { params: Promise<{ token: string; n: string }> };

const privately = { "Referrer-Policy": "no-referrer", "X-Robots-Tag": "noindex, nofollow" };

/** Encoded result of the n-th version of a link, from 0. The token is the right; a closed link gives nothing. */
export async function GET(_request: Request, { params }: Props) {
  await connection();
  const { token, n } = await params;
  return answerErrors(async () => {
    const found = /^\d{1,2}$/.test(n) ? await findSharedResult(await getDb(), token, Number(n)) : null;
    if (found && "gone" in found) {
      if (found.gone === "unknown") throw new AppError("not-found", "This link does not exist.");
      throw new AppError("expired", found.gone === "revoked" ? "This link was revoked." : "This link has expired.");
    }
    if (!found) throw new AppError("not-found", "This link has no such result.");
    return answerBytes(found, privately);
  });
}
