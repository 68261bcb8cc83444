import { getVersion } from "@/db/queries/versions";
import { answerJson, runRoute } from "@/lib/auth/run-route";

type Props = { params: Promise<{ id: string }> };

export async function GET(request: Request, { params }: Props) {
  const { id } = await params;
  const row = { kind: "version", id } as const;
  return runRoute(request, { right: "read", row }, async (ctx) => answerJson(await getVersion(ctx, id)));
}
