import { z } from "zod";
import { limits } from "./limits";
import type { DraftLine, Layout, Note } from "./types";

/** Most of what a draft may hold; a draft may be larger than what can run by nothing. */
export const draftLimits = {
  nodes: limits.nodes,
  links: limits.links,
  values: limits.empiricalValues,
  nameLength: limits.textLength,
  notes: 200,
  noteLength: 2_000,
};

const amount = z.number().nullable();
const id = z.string().min(1).max(limits.textLength);
const name = z.string().max(draftLimits.nameLength);

const Distribution = z.discriminatedUnion("type", [
  z.object({ type: z.literal("fixed"), value: amount }),
  z.object({ type: z.literal("normal"), mean: amount, sd: amount }),
  z.object({ type: z.literal("lognormal"), mean: amount, sd: amount }),
  z.object({ type: z.literal("gamma"), mean: amount, sd: amount }),
  z.object({ type: z.literal("weibull"), shape: amount, scale: amount }),
  z.object({ type: z.literal("exponential"), mean: amount }),
  z.object({ type: z.literal("uniform"), min: amount, max: amount }),
  z.object({ type: z.literal("triangular"), min: amount, mode: amount, max: amount }),
  z.object({ type: z.literal("poisson"), mean: amount }),
  z.object({ type: z.literal("negativeBinomial"), mean: amount, sd: amount }),
  z.object({ type: z.literal("empirical"), values: z.array(amount).max(draftLimits.values) }),
]);

const Supplier = z.object({
  kind: z.literal("supplier"),
  id,
  name,
  leadTimeDays: amount,
  lateness: Distribution.nullable(),
  onTimeShare: amount,
  correlation: amount,
  keepsSequence: z.boolean(),
  disruption: z.object({ meanDaysBetween: amount, meanDaysLasting: amount }).nullable(),
  rejectRate: amount,
  lotRejectRate: amount,
  share: amount,
});

const Replenishment = z.object({
  rule: z.enum(["orderUpTo", "reorderPoint"]),
  reviewDays: amount,
  lot: amount,
  minimumOrder: amount,
  orderMultiple: amount,
});

const Buffer = z.object({
  kind: z.literal("buffer"),
  id,
  name,
  size: amount,
  startLevel: amount,
  unitValue: amount,
  replenishment: Replenishment.nullable(),
});

const Stoppages = z.discriminatedUnion("pattern", [
  z.object({ pattern: z.literal("perTick"), upProbability: amount }),
  z.object({
    pattern: z.literal("upDown"),
    meanUpHours: amount,
    meanDownHours: amount,
    downCv: amount,
    clock: z.enum(["running", "always"]),
  }),
]);

const Station = z.object({
  kind: z.literal("station"),
  id,
  name,
  cycleMinutes: amount,
  cycleCv: amount,
  parallel: amount,
  scrapRate: amount,
  stoppages: Stoppages.nullable(),
});

const Customer = z.object({
  kind: z.literal("customer"),
  id,
  name,
  weeklyDemand: Distribution,
  correlation: amount,
  callOff: z.enum(["daily", "weekly"]),
  unmet: z.enum(["backorder", "lost"]),
  lateFine: amount,
});

/** The shape of a line being drawn, any number of which may be missing. Whether it runs is for `parseLine` to say. */
export const DraftLineInput = z.object({
  format: z.literal("forebay.line/1"),
  name,
  calendar: z.object({ tickMinutes: amount, hoursPerDay: amount, daysPerWeek: amount, weeksPerYear: amount }),
  money: z.object({ currency: z.string().max(10), carryingRate: amount }),
  overtime: z.object({ backlogTrigger: amount, hoursPerWeek: amount, costPerHour: amount }).nullable(),
  nodes: z
    .array(z.discriminatedUnion("kind", [Supplier, Buffer, Station, Customer]))
    .max(draftLimits.nodes, `A line may have at most ${draftLimits.nodes} nodes.`),
  links: z
    .array(z.object({ from: id, to: id, quantity: amount.optional() }))
    .max(draftLimits.links, `A line may have at most ${draftLimits.links} links.`),
}) satisfies z.ZodType<DraftLine>;

const place = z.number().min(-1e6).max(1e6);

export const LayoutInput = z.object({
  positions: z
    .record(id, z.object({ x: place, y: place }))
    .refine((positions) => Object.keys(positions).length <= 2 * draftLimits.nodes, "Too many positions."),
}) satisfies z.ZodType<Layout>;

export const NoteInput = z.object({
  id,
  x: place,
  y: place,
  text: z.string().max(draftLimits.noteLength, `A note may have at most ${draftLimits.noteLength} characters.`),
  author: z.string().max(200),
  at: z.iso.datetime({ offset: true }),
}) satisfies z.ZodType<Note>;

export const NotesInput = z
  .array(NoteInput)
  .max(draftLimits.notes, `A line may have at most ${draftLimits.notes} notes.`);
