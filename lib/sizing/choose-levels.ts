import { type Curve, shareAt } from "./curve";

/** One buffer to be placed: its curve, what the objective rises by a level, where it stands and how far it may go. */
export type Choice = { curve: Curve; cost: number; from: number; lowest: number; highest: number };

/** Change of the share of bad weeks when buffers go to other levels, as their curves have it. */
export function changeAt(choices: readonly Choice[], levels: readonly number[]): number {
  return choices.reduce((sum, { curve, from }, i) => sum + shareAt(curve, levels[i]) - shareAt(curve, from), 0);
}

/**
 * The levels of least objective at which the share of bad weeks rises by at most `room`.
 * @param room - Share of weeks; negative: it has to fall by so much. Where it cannot, the levels of least risk.
 * @returns `price`: what the objective would fall by if one more share of weeks could be bad.
 * @remarks A Lagrange multiplier for the room, H. Everett, Operations Research 11 (1963) 399-417: at a price each buffer
 * is placed on its own, and marginal risk per money comes out alike for all.
 */
export function chooseLevels(choices: readonly Choice[], room: number): { levels: number[]; price: number } {
  const levelsAt = (price: number): number[] => choices.map((choice) => placeAt(choice, price));
  const fits = (price: number): boolean => changeAt(choices, levelsAt(price)) <= room;
  let low = 0;
  let high = 1;
  while (!fits(high) && high < 1e15) high *= 4;
  for (let i = 0; i < 60; i++) {
    const price = (low + high) / 2;
    if (fits(price)) high = price;
    else low = price;
  }
  return { levels: levelsAt(high), price: high };
}

/** The level at which what one more would cost first exceeds what the risk it saves is worth. */
function placeAt({ curve, cost, lowest, highest }: Choice, price: number): number {
  if (cost <= 0) return highest;
  const even = (curve.a - Math.log(cost / (curve.k * price))) / curve.k;
  if (!(even > lowest)) return lowest;
  const low = Math.min(highest, Math.floor(even));
  const high = Math.min(highest, low + 1);
  const merit = (level: number): number => cost * level + price * shareAt(curve, level);
  return merit(high) < merit(low) ? high : low;
}
