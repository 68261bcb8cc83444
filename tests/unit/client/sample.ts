import type { Snapshot } from "@/lib/client/draft-history";
import example from "@/lib/line/example.json";
import type { DraftLine } from "@/lib/line/types";
import { defaultOptions, type Draft } from "@/lib/schema/lines";

/** The drive unit line under another name, as a draft holds it. */
export function createSnapshot(name = "Drive unit line"): Snapshot {
  return {
    document: { ...(example as unknown as DraftLine), name },
    layout: { positions: {} },
    notes: [],
    options: defaultOptions,
  };
}

export function createDraft(revision: number, name?: string): Draft {
  return {
    ...createSnapshot(name),
    revision,
    updatedAt: `2026-11-24T14:0${revision % 10}:00Z`,
    updatedBy: "Ines Kallweit",
  };
}

export const nameOf = ({ document }: Pick<Snapshot, "document">): string => document.name;
