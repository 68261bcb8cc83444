import { formatCount, formatPercent } from "@/lib/format";
import { meanOf, sdOf } from "@/lib/line/distribution-mean";
import type { DraftLine, DraftNode } from "@/lib/line/types";
import type { RunResult } from "@/lib/simulation/types";

/** What a run says of one node, as far as the sheet draws it; null before the first run. */
export type NodeReading = {
  levels: { p10: number; p50: number; p90: number } | null;
  dry: number | null;
  shares: { working: number; short: number; noRoom: number; stopped: number } | null;
  /** Hours a week that a station waits for each input, by buffer id. */
  waits: Record<string, number>;
};

const nothing: NodeReading = { levels: null, dry: null, shares: null, waits: {} };

export function readingOf(document: DraftLine, node: DraftNode, result: RunResult | null): NodeReading {
  if (!result) return nothing;
  if (node.kind === "buffer") {
    const reading = result.buffers[node.id];
    if (!reading) return nothing;
    return { ...nothing, levels: { p10: reading.p10, p50: reading.p50, p90: reading.p90 }, dry: reading.empty.value };
  }
  if (node.kind !== "station") return nothing;
  const reading = result.stations[node.id];
  if (!reading) return nothing;
  const hours = (document.calendar.hoursPerDay ?? 0) * (document.calendar.daysPerWeek ?? 0);
  return {
    ...nothing,
    shares: {
      working: reading.working.value,
      short: reading.starved.value,
      noRoom: reading.blocked.value,
      stopped: reading.down.value,
    },
    waits: Object.fromEntries(Object.entries(reading.starvedBy).map(([id, figure]) => [id, figure.value * hours])),
  };
}

const or = (value: number | null, say: (value: number) => string) => (value === null ? "?" : say(value));

/** The second line of a plate: what characterises the node in a few words; "?" stands for what is missing. */
export function factsOf(node: DraftNode): string {
  switch (node.kind) {
    case "supplier":
      return `${or(node.leadTimeDays, formatCount)} d lead, ${or(node.onTimeShare, (share) => formatPercent(1 - share, 0))} late`;
    case "station": {
      const scrap = node.scrapRate ? `, scrap ${formatPercent(node.scrapRate)}` : "";
      const places = node.parallel !== null && node.parallel > 1 ? `, ${node.parallel} places` : "";
      return `${or(node.cycleMinutes, (minutes) => formatCount(minutes))} min${scrap}${places}`;
    }
    case "customer": {
      const sd = sdOf(node.weeklyDemand);
      const spread = sd ? ` ±\u202f${formatCount(Math.round(sd))}` : "";
      return `${or(meanOf(node.weeklyDemand), (mean) => formatCount(Math.round(mean)))} a week${spread}`;
    }
    case "buffer":
      return `${node.replenishment ? (node.replenishment.rule === "orderUpTo" ? "order up to" : "reorder at") : "room for"} ${or(node.size, formatCount)}`;
  }
}

const kinds = { supplier: "supplier", station: "station", customer: "customer" } as const;

/** A node in words for those who do not see the sheet. */
export function describeNode(node: DraftNode, reading: NodeReading, fault?: string): string {
  const kind =
    node.kind === "buffer" ? (node.replenishment ? "purchased buffer" : "buffer between stations") : kinds[node.kind];
  const dry = reading.dry === null ? "" : `, dry ${formatPercent(reading.dry)}`;
  const working = reading.shares ? `, working ${formatPercent(reading.shares.working)}` : "";
  return `${node.name}, ${kind}, ${factsOf(node)}${dry}${working}${fault ? `. Fault: ${fault}` : ""}`;
}
