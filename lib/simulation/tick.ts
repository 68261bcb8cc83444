import { findCause } from "./causes";
import { turnKits } from "./kits";
import { amt, amtStride, buf, sta, staStride } from "./model";
import { serveCustomers } from "./serve-customers";
import type { State } from "./state";
import { drawDownTicks, drawScrapGap, drawUpTicks, turnBlock } from "./station-draws";

/**
 * Runs the ticks of one stretch: customers, then stations downstream first; model.md, 2.4.
 * @param n - Ticks, below 2^15; the stretch's first is 0.
 * @remarks Levels are not added up tick by tick: changes are weighted with the tick they fell in, see `closeStretch`.
 */
export function runTicks(s: State, n: number): void {
  // Literals, each checked by its type: read from the objects, the fields would cost a third of the time.
  const level: typeof buf.level = 0;
  const free: typeof buf.free = 1;
  const lastUp: typeof sta.lastUp = 1;
  const scrapAt: typeof sta.scrapAt = 2;
  const nextWork: typeof sta.next = 3;
  const endWork: typeof sta.end = 4;
  const output: typeof sta.out = 5;
  const idleStep: typeof sta.idleStep = 10;
  const outEnds: typeof sta.outEnds = 13;
  const kitsLeft: typeof sta.kits = 15;
  const firstOpen: typeof sta.open = 19;
  const endOpen: typeof sta.openEnd = 20;
  const sharesStock: typeof sta.sharesStock = 21;
  const stationWidth: typeof staStride = 22;
  const speedOf: typeof amt.speed = 0;
  const leftOf: typeof amt.left = 1;
  const startArea: typeof amt.startArea = 2;
  const goodArea: typeof amt.goodArea = 3;
  const blocked: typeof amt.blocked = 4;
  const amountWidth: typeof amtStride = 8;
  // Work left on a unit, or of a tick, that counts as none.
  const none = 1e-9;

  const { ints, reals, watched } = s;
  // `| 0` shows the compiler that the loop stays within 32 bits; without it, it counts in doubles.
  const first = s.buffers.length | 0;
  const end = (first + s.stations.length) | 0;
  for (let t = 0; t < n; t++) {
    if (s.owedTotal > 0) serveCustomers(s, t);
    for (let at = first, am = 0; at < end; at += stationWidth, am += amountWidth) {
      const out = ints[at + output];
      if (ints[at + lastUp] < t) spendDownTick(s, at - first, am, t);
      else {
        const speed = reals[am + speedOf];
        let spare = speed;
        let left = reals[am + leftOf];
        for (;;) {
          if (left === 0) {
            const kits = ints[at + kitsLeft];
            const from = ints[at + firstOpen];
            const to = ints[at + endOpen];
            let i = kits === 0 ? -1 : from;
            while (i >= 0 && i < to) i = ints[ints[i] + level] >= ints[i + 1] ? i + 2 : -1;
            if (i < 0) {
              loseToInput(s, at - first, am, spare, t);
              break;
            }
            const places = ints[out + free] - 1;
            if (places < 0) {
              reals[am + blocked] += spare;
              if (spare === speed) ints[at + lastUp] += ints[at + idleStep];
              break;
            }
            ints[out + free] = places;
            for (i = from; i < to; i += 2) {
              const input = ints[i];
              const quantity = ints[i + 1];
              ints[input + level] -= quantity;
              ints[input + free] += quantity;
            }
            ints[at + kitsLeft] = kits - 1;
            if (kits === 1) turnKits(s, at - first, t);
            if (ints[at + sharesStock] === 1) noteShared(s, at - first, t);
            reals[am + startArea] += t;
            let next = ints[at + nextWork];
            if (next === ints[at + endWork]) next = turnBlock(s, at - first);
            left = reals[next];
            ints[at + nextWork] = next + 1;
          }
          if (left - spare > none) {
            left -= spare;
            break;
          }
          spare -= left;
          left = 0;
          if (ints[at + nextWork] === ints[at + scrapAt]) scrapUnit(s, at - first, am);
          else {
            ints[out + level] += 1;
            reals[am + goodArea] += t;
          }
          if (spare <= none) break;
        }
        reals[am + leftOf] = left;
      }
      // Every taker of the output has been served, so the last of its feeders leaves it as the tick ends.
      const isEmpty = ((ints[out + level] - 1) >> 31) & 1;
      const isFull = ((ints[out + free] - 1) >> 31) & 65536;
      ints[at + outEnds] += isEmpty | isFull;
    }
    if (watched >= 0 && ints[watched] < s.lowest) s.lowest = ints[watched];
  }
}

function spendDownTick(s: State, at: number, am: number, t: number): void {
  const { stations } = s;
  if (stations[at + sta.down] === 0) stations[at + sta.down] = drawDownTicks(s, at);
  s.amounts[am + amt.down] += 1;
  stations[at + sta.lostTick] = t;
  stations[at + sta.lostBy] = -1;
  if (stations[at + sta.isCharged] === 1) s.causes[stations[at + sta.cause]] += 1;
  const down = stations[at + sta.down] - 1;
  stations[at + sta.down] = down;
  if (down === 0) stations[at + sta.lastUp] = t + drawUpTicks(s, at);
}

/** The rest of a tick is lost because an input lacks units: it is charged to the first one in link order. */
function loseToInput(s: State, at: number, am: number, spare: number, t: number): void {
  const { stations, inputs, buffers } = s;
  const speed = s.amounts[am + amt.speed];
  let i = stations[at + sta.inputs];
  while (buffers[inputs[i] + buf.level] >= inputs[i + 1]) i += 2;
  const ticks = spare / speed;
  s.starved[i >> 1] += ticks;
  stations[at + sta.lostTick] = t;
  stations[at + sta.lostBy] = inputs[i];
  if (spare === speed) stations[at + sta.lastUp] += stations[at + sta.idleStep];
  if (stations[at + sta.isCharged] === 1) s.causes[findCause(s, inputs[i], t)] += ticks;
}

/** Keeps the empty and full times of purchased parts that others take too, after a unit has been started. */
function noteShared(s: State, at: number, t: number): void {
  const { stations, ints } = s;
  for (let i = stations[at + sta.open]; i < stations[at + sta.openEnd]; i += 2) {
    const b = ints[i];
    const free = ints[b + buf.free];
    if (ints[b + buf.cause] < 0) continue;
    if (ints[b + buf.level] === 0) ints[b + buf.emptySince] = t;
    if (free >= 0 && free - ints[i + 1] < 0) ints[b + buf.full] += t - ints[b + buf.fullSince];
  }
}

/** A finished unit is scrap: its place is free again. */
function scrapUnit(s: State, at: number, am: number): void {
  s.stations[at + sta.scrapAt] += drawScrapGap(s, at);
  s.amounts[am + amt.scrapped] += 1;
  s.buffers[s.stations[at + sta.out] + buf.free] += 1;
}
