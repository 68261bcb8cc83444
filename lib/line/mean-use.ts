import { meanOf } from "./distribution-mean";
import type { DraftLine } from "./types";

/**
 * Mean units a working day that a buffer's takers draw in the long run: customers' mean demand, carried upstream
 * through quantities and scrap. What the plant would plan on averages.
 * @returns Null where a number on the way is missing, or nothing draws on the buffer.
 */
export function meanUseADay(document: DraftLine, bufferId: string): number | null {
  const days = document.calendar.daysPerWeek;
  const use = meanUseAWeek(document, bufferId, new Set());
  return use === null || !days ? null : use / days;
}

/** As `meanUseADay`, for a week. */
export function meanUseAWeek(
  document: DraftLine,
  bufferId: string,
  passed: ReadonlySet<string> = new Set(),
): number | null {
  if (passed.has(bufferId)) return null;
  const inner = new Set(passed).add(bufferId);
  const takers = document.links.filter((link) => link.from === bufferId);
  if (takers.length === 0) return null;
  let total = 0;
  for (const link of takers) {
    const node = document.nodes.find((other) => other.id === link.to);
    if (node?.kind === "customer") {
      const mean = meanOf(node.weeklyDemand);
      if (mean === null) return null;
      total += Math.max(0, mean);
    } else if (node?.kind === "station") {
      const output = document.links.find((other) => other.from === node.id);
      const good = output ? meanUseAWeek(document, output.to, inner) : null;
      const scrap = node.scrapRate ?? 0;
      if (good === null || scrap >= 1) return null;
      total += (shareOfFeeder(document, output!.to) * good * (link.quantity ?? 1)) / (1 - scrap);
    }
  }
  return total;
}

/** Several stations that fill one buffer are taken to share its use equally. */
function shareOfFeeder(document: DraftLine, bufferId: string): number {
  return 1 / Math.max(1, document.links.filter((link) => link.to === bufferId).length);
}
