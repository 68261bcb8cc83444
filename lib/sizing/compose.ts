import type { Levels } from "./problem";
import type { Needs } from "./needs";
import { isBad } from "./week-rates";

/**
 * Composes a set of sizes from what the weeks need of each buffer: from the top down, always the step that saves most
 * for each further bad week, until so many are bad.
 * @param nBad - Weeks of the needs' sample that may be bad beside those bad at the top.
 * @remarks Marginal analysis: B. Fox, Discrete optimization via marginal analysis, Management Science 13 (1966)
 * 210-216. A week counts as bad once any one of its needs is not met.
 */
export function composeSizes({ ample, byBuffer }: Needs, nBad: number): Levels {
  const levels = byBuffer.map(({ top }) => top);
  const isSpent = Uint8Array.from(ample.codes, (code) => (isBad(code) ? 1 : 0));
  const orders = byBuffer.map(({ levels: needed }) =>
    Int32Array.from(needed.keys())
      .filter((w) => needed[w] > 0)
      .sort((v, w) => needed[w] - needed[v]),
  );
  let left = nBad;
  for (;;) {
    let best: { b: number; level: number; added: number; price: number } | null = null;
    byBuffer.forEach((need, b) => {
      const found = bestStep(need, orders[b], levels[b], isSpent, left);
      if (found && (!best || found.price < best.price)) best = { b, ...found };
    });
    if (best === null) return levels;
    const { b, level, added } = best as { b: number; level: number; added: number };
    const needed = byBuffer[b].levels;
    for (const w of orders[b]) if (needed[w] > level) isSpent[w] = 1;
    levels[b] = level;
    left -= added;
  }
}

/** The cheapest step down of one buffer in bad weeks for each unit of money saved. */
function bestStep(
  { floor, levels: needed, savings }: Needs["byBuffer"][number],
  order: Int32Array,
  from: number,
  isSpent: Uint8Array,
  left: number,
): { level: number; added: number; price: number } | null {
  let best: { level: number; added: number; price: number } | null = null;
  let added = 0;
  let i = 0;
  while (i < order.length && needed[order[i]] > from) i++;
  for (let level = from - 1; level >= floor; level--) {
    for (; i < order.length && needed[order[i]] > level; i++) if (isSpent[order[i]] === 0) added++;
    if (added > left) break;
    const saved = savings[level - floor] - savings[from - floor];
    if (!(saved > 0)) continue;
    const price = added / saved;
    if (!best || price < best.price || (price === best.price && price === 0)) best = { level, added, price };
  }
  return best;
}
