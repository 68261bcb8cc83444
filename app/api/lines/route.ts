import { listLines } from "@/db/queries/lines";
import { answerJson, runRoute } from "@/lib/auth/run-route";

export async function GET(request: Request) {
  return runRoute(request, { right: "read" }, async (ctx) => answerJson(await listLines(ctx)));
}
