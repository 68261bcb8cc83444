import { saveDraft } from "@/db/queries/drafts";
import { readJson } from "@/lib/auth/read-body";
import { answerError, answerJson, runRoute } from "@/lib/auth/run-route";
import { AppError } from "@/lib/errors";
import { draftBytes, SaveDraftInput } from "@/lib/schema/line-inputs";
import { parseInput } from "@/lib/schema/parse-input";

type Props = { params: Promise<{ id: string }> };

/** Saves the draft on top of the revision it was made from; 409 with the current draft when that is not the latest. */
export async function PUT(request: Request, { params }: Props) {
  const { id } = await params;
  return runRoute(request, { right: "edit", row: { kind: "scenario", id } }, async (ctx) => {
    const input = parseInput(SaveDraftInput, await readJson(request, draftBytes));
    const answer = await saveDraft(ctx, id, input);
    if (!answer.saved) {
      const { current, differs } = answer;
      const message = `${current.updatedBy} has saved this draft since you opened it.`;
      return answerError(new AppError("stale", message), { current, differs });
    }
    const { revision, updatedAt, updatedBy } = answer;
    return answerJson({ revision, updatedAt, updatedBy });
  });
}
