import { z } from "zod";
import { refuseOptions } from "@/lib/line/limits";
import type { DraftLine, Layout, Note } from "@/lib/line/types";
import type { Figure } from "@/lib/simulation/types";
import type { Role } from "./roles";

/** How a scenario is run; kept with it. Defaults: 200 x 50 weeks, 12 warm-up, target 95 %, accepted risk 10 %, seed phrase "1". */
export const ScenarioOptions = z
  .object({
    replications: z.int().min(1).max(20_000),
    weeks: z.int().min(1).max(5_000),
    warmupWeeks: z.int().min(0).max(5_000),
    targetFillRate: z.number().min(0).max(1),
    acceptedRisk: z.number().gt(0).lt(1),
    seed: z.string().min(1).max(200),
  })
  .superRefine((options, context) => {
    const message = refuseOptions(options);
    if (message) context.addIssue({ code: "custom", path: ["replications"], message });
  });
export type ScenarioOptions = z.infer<typeof ScenarioOptions>;

export const defaultOptions: ScenarioOptions = {
  replications: 200,
  weeks: 50,
  warmupWeeks: 12,
  targetFillRate: 0.95,
  acceptedRisk: 0.1,
  seed: "1",
};

/** The few figures that registers and rulers show, copied out of a whole result. `atRisk` is the percentile of the accepted risk. */
export type ReadingSummary = {
  resultId: string;
  ranAt: string;
  engine: string;
  acceptedRisk: number;
  atRisk: Figure;
  p05: Figure;
  p10: Figure;
  p50: Figure;
  risk: Figure;
  moneyTiedUp: Figure;
  costPerYear: Figure;
  weeks: number;
  /** ISO 4217 code of the line that was run. */
  currency: string;
};

export type LineSummary = {
  id: string;
  name: string;
  workspaceId: string;
  nScenarios: number;
  baseScenarioId: string;
  updatedAt: string;
  updatedBy: string;
  /** Of the base scenario's last kept version with a result; null when there is none. */
  reading: ReadingSummary | null;
  /** First faults of the base draft, in words; empty when it can run. */
  faults: string[];
};

export type ScenarioSummary = {
  id: string;
  name: string;
  isBase: boolean;
  nVersions: number;
  updatedAt: string;
  updatedBy: string;
  reading: ReadingSummary | null;
};

/** Everything the line's pages need on arrival. */
export type LineDetail = {
  id: string;
  name: string;
  workspaceId: string;
  workspaceName: string;
  role: Role;
  /** Who reads this: notes are signed with it. */
  userName: string;
  scenarios: ScenarioSummary[];
};

export type Draft = {
  revision: number;
  document: DraftLine;
  layout: Layout;
  notes: Note[];
  options: ScenarioOptions;
  updatedAt: string;
  updatedBy: string;
};

export type VersionSummary = {
  id: string;
  scenarioId: string;
  number: number;
  createdAt: string;
  createdBy: string;
  reading: ReadingSummary | null;
};

export type VersionDetail = VersionSummary & {
  document: DraftLine;
  layout: Layout;
  notes: Note[];
  options: ScenarioOptions;
  /** SHA-256 of the canonical document, hex; null while the document has faults. */
  digest: string | null;
};

export type ScenarioDetail = {
  id: string;
  lineId: string;
  name: string;
  isBase: boolean;
  draft: Draft;
  /** The last kept version: what "was 3 900" and "edits not kept" are measured against. */
  kept: VersionDetail;
  /** Newest first. */
  versions: VersionSummary[];
  /** Stored result that fits the draft's document digest and run options, if any. */
  draftReading: ReadingSummary | null;
};

/** One row of a sweep: figures at one value of the number that is varied. */
export type SweepRow = {
  /** The value: a size, or what `Sweep.quantity` names; a share where the unit is %. */
  size: number;
  /** What the accepted risk's percentile gains over the row before, a paired difference in share; null for the first. */
  gain: Figure | null;
  p05: Figure;
  p10: Figure;
  p50: Figure;
  atRisk: Figure;
  risk: Figure;
  moneyTiedUp: Figure;
  costPerYear: Figure;
};

/** One number of a line over a range. Without `quantity` it is the size of a buffer; with it, that field of any node. */
export type Sweep = {
  /** Of the node; "line" for a number of the whole line. */
  bufferId: string;
  bufferName: string;
  quantity?: string;
  unit: SweepUnit;
  currentSize: number;
  rows: SweepRow[];
};

export const sweepUnits = ["units", "%", "days", "h", "min", ""] as const;
export type SweepUnit = (typeof sweepUnits)[number];

export type ShareKind = "version" | "comparison";

export type ShareSummary = {
  id: string;
  kind: ShareKind;
  title: string;
  createdAt: string;
  createdBy: string;
  expiresAt: string;
  revokedAt: string | null;
  nViews: number;
};

/** One kept version as the shared page shows it. */
export type SharedVersion = VersionDetail & { scenarioName: string };

/** What the holder of a link may see: frozen, no ids of other rows, no member e-mail addresses. */
export type SharedPage = {
  kind: ShareKind;
  lineName: string;
  workspaceName: string;
  sharedBy: string;
  sharedAt: string;
  expiresAt: string;
  versions: SharedVersion[];
  sweep: Sweep | null;
};
