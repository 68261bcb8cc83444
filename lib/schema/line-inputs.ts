import { z } from "zod";
import { draftLimits, DraftLineInput, LayoutInput, NotesInput } from "@/lib/line/draft-schema";
import { limits } from "@/lib/line/limits";
import { ScenarioOptions, sweepUnits } from "./lines";

/** Of lines and scenarios: what a register can show. */
const nameLength = 120;
const id = z.string().min(1).max(80);
const name = z
  .string()
  .trim()
  .min(1, "Give it a name.")
  .max(nameLength, `A name may have at most ${nameLength} characters.`);

/** Bytes of JSON that a line document and the whole of a draft may take. */
export const documentBytes = limits.documentBytes;
export const draftBytes = limits.documentBytes + 1_000_000;
/** Bytes of an encoded result. */
export const resultBytes = 8_000_000;

/** `from`: "empty", "example", or the text of an exported file. */
export const CreateLineInput = z.object({ name, from: z.string().max(draftBytes) });
export type CreateLineInput = z.infer<typeof CreateLineInput>;

export const LineRef = z.object({ lineId: id });
export type LineRef = z.infer<typeof LineRef>;
export const RenameLineInput = z.object({ lineId: id, name });
export type RenameLineInput = z.infer<typeof RenameLineInput>;

export const SaveDraftInput = z.object({
  revision: z.int().min(1),
  document: DraftLineInput,
  layout: LayoutInput,
  notes: NotesInput,
  options: ScenarioOptions,
});
export type SaveDraftInput = z.infer<typeof SaveDraftInput>;

export const ScenarioRef = z.object({ scenarioId: id });
export type ScenarioRef = z.infer<typeof ScenarioRef>;
export const RenameScenarioInput = z.object({ scenarioId: id, name });
export type RenameScenarioInput = z.infer<typeof RenameScenarioInput>;
export const KeepVersionInput = z.object({ scenarioId: id, revision: z.int().min(1) });
export type KeepVersionInput = z.infer<typeof KeepVersionInput>;

export const SaveAsScenarioInput = z.object({
  lineId: id,
  fromScenarioId: id,
  name,
  document: DraftLineInput.optional(),
  options: ScenarioOptions.optional(),
  layout: LayoutInput.optional(),
  notes: NotesInput.optional(),
});
export type SaveAsScenarioInput = z.infer<typeof SaveAsScenarioInput>;

const figure = z.object({ value: z.number(), halfWidth: z.number().min(0).nullable(), bound: z.number().optional() });
const value = z.number().min(-1e15).max(1e15);

export const SweepInput = z.object({
  bufferId: z.string().min(1).max(limits.textLength),
  bufferName: z.string().max(draftLimits.nameLength),
  quantity: z.string().max(limits.textLength).optional(),
  unit: z.enum(sweepUnits),
  currentSize: value,
  rows: z
    .array(
      z.object({
        size: value,
        gain: figure.nullable(),
        p05: figure,
        p10: figure,
        p50: figure,
        atRisk: figure,
        risk: figure,
        moneyTiedUp: figure,
        costPerYear: figure,
      }),
    )
    .min(1)
    .max(60, "A shared comparison may have at most 60 sizes."),
});

export const CreateShareInput = z
  .object({
    kind: z.enum(["version", "comparison"]),
    versionIds: z.array(id).min(1, "Name a version.").max(8, "A link may show at most 8 versions."),
    sweep: SweepInput.optional(),
    days: z.int().min(1, "At least 1 day.").max(365, "At most 365 days.").default(30),
  })
  .refine(({ versionIds }) => new Set(versionIds).size === versionIds.length, {
    path: ["versionIds"],
    message: "The same version is named twice.",
  })
  .refine(({ kind, versionIds, sweep }) => kind !== "version" || (versionIds.length === 1 && !sweep), {
    path: ["versionIds"],
    message: "A link to one version names exactly one and no sizes.",
  })
  .refine(({ kind, versionIds, sweep }) => kind !== "comparison" || versionIds.length > 1 || sweep, {
    path: ["versionIds"],
    message: "A comparison needs two versions or a range of sizes.",
  });
export type CreateShareInput = z.infer<typeof CreateShareInput>;

export const ShareRef = z.object({ shareId: id });
export type ShareRef = z.infer<typeof ShareRef>;
