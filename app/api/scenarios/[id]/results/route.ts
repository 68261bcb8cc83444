import { storeResult } from "@/db/queries/results";
import { readBytes } from "@/lib/auth/read-body";
import { answerJson, runRoute } from "@/lib/auth/run-route";
import { AppError } from "@/lib/errors";
import { resultBytes } from "@/lib/schema/line-inputs";

type Props = { params: Promise<{ id: string }> };

/** Stores an encoded result; `x-document-digest` says of which of the scenario's documents. */
export async function POST(request: Request, { params }: Props) {
  const { id } = await params;
  return runRoute(request, { right: "edit", row: { kind: "scenario", id } }, async (ctx) => {
    const digest = request.headers.get("x-document-digest") ?? "";
    if (!/^[0-9a-f]{64}$/.test(digest)) {
      throw new AppError("invalid", "x-document-digest must be a SHA-256 digest of 64 hexadecimal digits.");
    }
    const bytes = await readBytes(request, resultBytes, "application/octet-stream");
    return answerJson(await storeResult(ctx, { scenarioId: id, digest, bytes }), 201);
  });
}
