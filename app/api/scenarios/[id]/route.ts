import { getScenario } from "@/db/queries/scenarios";
import { answerJson, runRoute } from "@/lib/auth/run-route";

type Props = { params: Promise<{ id: string }> };

export async function GET(request: Request, { params }: Props) {
  const { id } = await params;
  const row = { kind: "scenario", id } as const;
  return runRoute(request, { right: "read", row }, async (ctx) => answerJson(await getScenario(ctx, id)));
}
