import { and, eq } from "drizzle-orm";
import { isDeepStrictEqual } from "node:util";
import { AppError } from "@/lib/errors";
import { differences } from "@/lib/line/diff";
import type { SaveDraftInput } from "@/lib/schema/line-inputs";
import type { Draft } from "@/lib/schema/lines";
import type { Ctx } from "../context";
import { scenario, user } from "../schema";
import { examineContent } from "./content";
import { findFit } from "./result-fit";
import { isScenario, toDraft, touchLine } from "./scenarios";

export type SavedDraft = Pick<Draft, "revision" | "updatedAt" | "updatedBy">;
export type DraftAnswer = ({ saved: true } & SavedDraft) | { saved: false; current: Draft; differs: string[] };

const optionNames: Record<keyof Draft["options"], string> = {
  replications: "replications",
  weeks: "weeks",
  warmupWeeks: "warm-up weeks",
  targetFillRate: "target fill rate",
  acceptedRisk: "accepted risk",
  seed: "seed phrase",
};

/** What differs between the draft as it is and another one, in words, theirs first. */
function describeDifferences(current: Draft, wanted: SaveDraftInput): string[] {
  const words = differences(current.document, wanted.document).map(({ text }) => text);
  for (const [key, label] of Object.entries(optionNames) as [keyof Draft["options"], string][]) {
    if (current.options[key] === wanted.options[key]) continue;
    words.push(`Run options: ${label} ${current.options[key]} → ${wanted.options[key]}`);
  }
  if (!isDeepStrictEqual(current.layout, wanted.layout)) words.push("Places on the sheet");
  if (!isDeepStrictEqual(current.notes, wanted.notes)) words.push("Notes");
  return words;
}

/**
 * Saves the shared draft on top of `revision`, all or nothing.
 * @returns With `saved` false, the draft that was saved in between; nothing is changed then. The very draft that is there
 * already counts as saved, so that a save whose answer was lost can be sent again.
 * @throws AppError not-found, too-large
 */
export async function saveDraft(ctx: Ctx, scenarioId: string, input: SaveDraftInput): Promise<DraftAnswer> {
  const { revision, document, layout, notes, options } = input;
  const content = { document, layout, notes, options };
  const examined = examineContent(content);
  return ctx.db.transaction(async (tx): Promise<DraftAnswer> => {
    const [found] = await tx.select().from(scenario).where(isScenario(ctx, scenarioId)).for("update");
    if (!found) throw new AppError("not-found", "This scenario does not exist.");
    if (found.revision !== revision) {
      const [by] = await tx
        .select({ name: user.name })
        .from(user)
        .where(eq(user.id, found.updatedBy ?? ""));
      const current = toDraft(found, by?.name ?? "a former member");
      const differs = describeDifferences(current, input);
      if (differs.length > 0) return { saved: false, current, differs };
      return { saved: true, revision: current.revision, updatedAt: current.updatedAt, updatedBy: current.updatedBy };
    }
    const fit = await findFit(ctx, tx, { lineId: found.lineId, ...examined }, options.acceptedRisk);
    const updatedAt = new Date();
    await tx
      .update(scenario)
      .set({
        ...content,
        ...examined,
        revision: revision + 1,
        resultId: fit?.id ?? null,
        updatedAt,
        updatedBy: ctx.userId,
      })
      .where(and(isScenario(ctx, scenarioId), eq(scenario.revision, revision)));
    await touchLine(tx, ctx, found.lineId);
    return { saved: true, revision: revision + 1, updatedAt: updatedAt.toISOString(), updatedBy: ctx.userName };
  });
}
