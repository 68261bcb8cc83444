import type { Reading } from "./runs";
import { isBad, rateOf } from "./week-rates";

/** One buffer some steps up or down, as a run over the same weeks shows it. */
export type Move = {
  b: number;
  by: number;
  /** What the objective falls by; negative where it rises. */
  gain: number;
  /** Weeks that turn bad, and bad ones that turn good. */
  lost: number[];
  won: number[];
};

/** Parts of the way to a neighbour at which a buffer may stop. */
const parts = [1, 2 / 3, 1 / 3];

/**
 * Moves of one buffer from one set of sizes towards another that differs in this buffer alone: all the way and parts of
 * it. Where on the way a week turns is read off its two fill rates.
 */
export function describeMoves(from: Reading, to: Reading, b: number, targetFillRate: number): Move[] {
  const way = to.levels[b] - from.levels[b];
  const turns: { w: number; at: number }[] = [];
  for (let w = 0; w < from.codes.length; w++) {
    if (isBad(from.codes[w]) === isBad(to.codes[w]) || from.codes[w] === 0 || to.codes[w] === 0) continue;
    const [start, end] = [rateOf(from.codes[w], targetFillRate), rateOf(to.codes[w], targetFillRate)];
    turns.push({ w, at: (targetFillRate - start) / (end - start) });
  }
  return [...new Set(parts.map((part) => Math.trunc(way * part)))]
    .filter((by) => by !== 0)
    .map((by) => {
      const part = by / way;
      const turned = turns.filter(({ at }) => at <= part).map(({ w }) => w);
      return {
        b,
        by,
        gain: (from.value - to.value) * part,
        lost: turned.filter((w) => !isBad(from.codes[w])),
        won: turned.filter((w) => isBad(from.codes[w])),
      };
    });
}

/** Moves of different buffers, and by how many weeks more are bad with them. */
export type Combination = { moves: Move[]; change: number };

/**
 * Puts moves of different buffers together so that the objective falls and no more weeks turn bad than there is room for.
 * @param slack - Further weeks that may turn bad; negative: so many have to turn good first.
 * @returns `joint`: ever longer lists of moves; `single`: the best moves and pairs of moves on their own, best first;
 * `price`: what a lost week is worth at the balance.
 * @remarks Effects are taken as those of the single moves: a week is lost by any one and won by any one.
 */
export function combineMoves(
  moves: readonly Move[],
  nWeeks: number,
  slack: number,
): { joint: Combination[]; single: Combination[]; price: number } {
  const chosen: Move[] = [];
  const joint: Combination[] = [];
  const tally = createTally(nWeeks);
  let change = 0;
  const take = (move: Move) => {
    change += tally.change([move]);
    tally.add(move);
    chosen.push(move);
  };
  const open = () => moves.filter(({ b }) => chosen.every((move) => move.b !== b));
  const single = listOptions(moves, tally, slack).sort((one, other) => other.gain - one.gain);
  const { set, price } = balance(moves, tally, slack);
  set.forEach(take);
  if (chosen.length > 0) joint.push({ moves: [...chosen], change });
  // What balancing leaves of the room, since moves are not endlessly small.
  for (;;) {
    const best = pickMost(listOptions(open(), tally, slack - change), ({ gain }) => gain);
    if (!best) return { joint, single, price };
    best.moves.forEach(take);
    joint.push({ moves: [...chosen], change });
  }
}

/**
 * The move of each buffer, or none, that is worth most when a lost week has a price; the lowest price at which all of
 * them together lose no more weeks than there is room for.
 * @remarks A Lagrange multiplier for the room: H. Everett, Operations Research 11 (1963) 399-417.
 */
function balance(
  moves: readonly Move[],
  tally: ReturnType<typeof createTally>,
  slack: number,
): { set: Move[]; price: number } {
  const buffers = [...new Set(moves.map(({ b }) => b))].map((b) => moves.filter((move) => move.b === b));
  const worthOf = (move: Move, price: number) => move.gain - price * (move.lost.length - move.won.length);
  const choose = (price: number): Move[] =>
    buffers.flatMap((own) => {
      const best = pickMost(own, (move) => worthOf(move, price));
      return best && worthOf(best, price) > 0 ? [best] : [];
    });
  const fits = (set: readonly Move[]) => tally.change(set) <= slack;
  const free = choose(0);
  if (fits(free)) return { set: free, price: 0 };
  let low = 0;
  let high = Math.max(1e-9, ...moves.map(({ gain }) => Math.abs(gain)));
  if (!fits(choose(high))) return { set: slack < 0 ? choose(high) : [], price: high };
  for (let i = 0; i < 40; i++) {
    const price = (low + high) / 2;
    if (fits(choose(price))) high = price;
    else low = price;
  }
  return { set: choose(high), price: high };
}

type Option = Combination & { gain: number };

/** Moves, and pairs of one up and one down, that lower the objective and lose no more weeks than are left. */
function listOptions(free: readonly Move[], tally: ReturnType<typeof createTally>, left: number): Option[] {
  const options: Option[] = [];
  const offer = (moves: Move[]) => {
    const gain = moves.reduce((sum, move) => sum + move.gain, 0);
    if (!(gain > 0)) return;
    const change = tally.change(moves);
    if (change <= left) options.push({ moves, change, gain });
  };
  free.forEach((move, i) => {
    offer([move]);
    for (const other of free.slice(i + 1)) if (other.b !== move.b && move.by * other.by < 0) offer([move, other]);
  });
  return options;
}

function pickMost<T>(items: readonly T[], worth: (item: T) => number): T | null {
  let best: T | null = null;
  let most = -Infinity;
  for (const item of items) {
    const value = worth(item);
    if (best === null || value > most) [best, most] = [item, value];
  }
  return best;
}

/** How many chosen moves lose and win each week. */
function createTally(nWeeks: number) {
  const nLost = new Int16Array(nWeeks);
  const nWon = new Int16Array(nWeeks);
  const isLost = (w: number) => nLost[w] > 0;
  const add = ({ lost, won }: Move, by = 1) => {
    for (const w of lost) nLost[w] += by;
    for (const w of won) nWon[w] += by;
  };
  /** Bad weeks more (or less) once the moves join those taken. */
  const change = (moves: readonly Move[]): number => {
    let n = 0;
    for (const move of moves) {
      for (const w of move.lost) if (!isLost(w)) n++;
      for (const w of move.won) if (nWon[w] === 0) n--;
      add(move);
    }
    for (const move of moves) add(move, -1);
    return n;
  };
  return { add: (move: Move) => add(move), change };
}
