import { getResultBytes } from "@/db/queries/results";
import { answerBytes, runRoute } from "@/lib/auth/run-route";

type Props = { params: Promise<{ id: string }> };

export async function GET(request: Request, { params }: Props) {
  const { id } = await params;
  const row = { kind: "result", id } as const;
  return runRoute(request, { right: "read", row }, async (ctx) => answerBytes(await getResultBytes(ctx, id)));
}
