import { meanOf } from "./distribution-mean";
import type { DraftLine, DraftNode } from "./types";

/**
 * Mean units a working day that a buffer's takers draw in the long run: customers' mean demand, carried upstream
 * through quantities and scrap. What the plant would plan on averages.
 * @returns Null where a number on the way is missing, or nothing draws on the buffer.
 */
export function meanUseADay(document: DraftLine, bufferId: string): number | null {
  const days = document.calendar.daysPerWeek;
  const use = meanUsesAWeek(document)(bufferId);
  return use === null || !days ? null : use / days;
}

/**
 * As `meanUseADay`, for a week and for any buffer: each is worked out once, so the effort grows with the links and
 * not with the ways through the line. Null too where a circle of links lies downstream.
 */
export function meanUsesAWeek(document: DraftLine): (bufferId: string) => number | null {
  const byId = new Map(document.nodes.map((node) => [node.id, node]));
  const outgoing = new Map<string, DraftLine["links"]>();
  const nFeeders = new Map<string, number>();
  for (const link of document.links) {
    outgoing.set(link.from, [...(outgoing.get(link.from) ?? []), link]);
    nFeeders.set(link.to, (nFeeders.get(link.to) ?? 0) + 1);
  }
  const known = new Map<string, number | null>();

  function weeklyUse(bufferId: string): number | null {
    const found = known.get(bufferId);
    if (found !== undefined) return found;
    known.set(bufferId, null);
    const use = sumOf(outgoing.get(bufferId) ?? []);
    known.set(bufferId, use);
    return use;
  }

  function sumOf(takers: DraftLine["links"]): number | null {
    if (takers.length === 0) return null;
    let total = 0;
    for (const { to, quantity } of takers) {
      const drawn = drawnBy(byId.get(to), quantity ?? 1);
      if (drawn === null) return null;
      total += drawn;
    }
    return total;
  }

  /** Several stations that fill one buffer are taken to share its use equally. */
  function drawnBy(node: DraftNode | undefined, quantity: number): number | null {
    if (node?.kind === "customer") {
      const mean = meanOf(node.weeklyDemand);
      return mean === null ? null : Math.max(0, mean);
    }
    if (node?.kind !== "station") return 0;
    const output = outgoing.get(node.id)?.[0];
    const good = output ? weeklyUse(output.to) : null;
    const scrap = node.scrapRate ?? 0;
    if (!output || good === null || scrap >= 1) return null;
    return (good * quantity) / Math.max(1, nFeeders.get(output.to) ?? 1) / (1 - scrap);
  }

  return weeklyUse;
}
