import { listShares } from "@/db/queries/shares";
import { answerJson, runRoute } from "@/lib/auth/run-route";

type Props = { params: Promise<{ lineId: string }> };

export async function GET(request: Request, { params }: Props) {
  const { lineId } = await params;
  const row = { kind: "line", id: lineId } as const;
  return runRoute(request, { right: "read", row }, async (ctx) => answerJson(await listShares(ctx, lineId)));
}
