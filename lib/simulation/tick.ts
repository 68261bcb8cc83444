import { findCause } from "./causes";
import { amt, amtStride, buf, sta, staStride } from "./model";
import { serveCustomers } from "./serve-customers";
import type { State } from "./state";
import { drawScrapGap, drawUpTicks, refillWork, stopStation } from "./station-draws";

/** Work left on a unit, or of a tick, that counts as none. */
const nothing = 1e-9;

/**
 * Runs the ticks of one stretch: customers, then stations downstream first; model.md, 2.4.
 * @param n - Ticks; the stretch's first is 0.
 * @remarks Levels are not added up tick by tick: changes are weighted with the tick they fell in, see `closeStretch`.
 */
export function runTicks(s: State, n: number): void {
  const { stations, amounts, buffers, inputs, work } = s;
  const end = stations.length;
  const watched = s.watched;
  for (let t = 0; t < n; t++) {
    if (s.owedTotal > 0) serveCustomers(s, t);
    for (let at = 0, am = 0; at < end; at += staStride, am += amtStride) {
      if (stations[at + sta.down] !== 0) {
        spendDownTick(s, at, am, t);
        continue;
      }
      const speed = amounts[am + amt.speed];
      const out = stations[at + sta.out];
      let spare = speed;
      let left = amounts[am + amt.left];
      for (;;) {
        if (left === 0) {
          const from = stations[at + sta.inputs];
          const to = stations[at + sta.inputsEnd];
          let i = from;
          while (i < to && buffers[inputs[i]] >= inputs[i + 1]) i += 2;
          if (i < to) {
            loseToInput(s, at, i, spare, t);
            break;
          }
          const free = buffers[out + buf.free] - 1;
          if (free < 0) {
            amounts[am + amt.blocked] += spare;
            break;
          }
          buffers[out + buf.free] = free;
          if (free === 0) buffers[out + buf.fullSince] = t;
          for (i = from; i < to; i += 2) {
            const input = inputs[i];
            const quantity = inputs[i + 1];
            const level = buffers[input] - quantity;
            const before = buffers[input + buf.free];
            const after = before + quantity;
            buffers[input] = level;
            buffers[input + buf.free] = after;
            if (level === 0) buffers[input + buf.emptySince] = t;
            if (before <= 0 && after > 0) buffers[input + buf.full] += t - buffers[input + buf.fullSince];
          }
          amounts[am + amt.startArea] += t;
          let next = stations[at + sta.next];
          left = work[next++];
          if (next === stations[at + sta.end]) next = refillWork(s, at);
          stations[at + sta.next] = next;
        }
        if (left - spare > nothing) {
          left -= spare;
          spare = 0;
          break;
        }
        spare -= left;
        left = 0;
        const gap = stations[at + sta.scrap] - 1;
        if (gap === 0) scrapUnit(s, at, am, t);
        else {
          stations[at + sta.scrap] = gap;
          const level = buffers[out];
          if (level === 0) buffers[out + buf.empty] += t - buffers[out + buf.emptySince];
          buffers[out] = level + 1;
          amounts[am + amt.goodArea] += t;
        }
        if (spare <= nothing) break;
      }
      amounts[am + amt.left] = left;
      if (spare < speed || stations[at + sta.always] === 1) {
        const up = stations[at + sta.up] - 1;
        stations[at + sta.up] = up;
        if (up === 0) stopStation(s, at);
      }
    }
    if (watched >= 0 && buffers[watched] < s.lowest) s.lowest = buffers[watched];
  }
}

function spendDownTick(s: State, at: number, am: number, t: number): void {
  const { stations } = s;
  s.amounts[am + amt.down] += 1;
  stations[at + sta.lostTick] = t;
  stations[at + sta.lostBy] = -1;
  if (stations[at + sta.isCharged] === 1) s.causes[stations[at + sta.cause]] += 1;
  const down = stations[at + sta.down] - 1;
  stations[at + sta.down] = down;
  if (down === 0) stations[at + sta.up] = drawUpTicks(s, at);
}

/** The rest of a tick is lost because the input at pair `i` lacks units. */
function loseToInput(s: State, at: number, i: number, spare: number, t: number): void {
  const { stations } = s;
  const input = s.inputs[i];
  const ticks = spare / s.amounts[(at / staStride) * amtStride + amt.speed];
  s.starved[i >> 1] += ticks;
  stations[at + sta.lostTick] = t;
  stations[at + sta.lostBy] = input;
  if (stations[at + sta.isCharged] === 1) s.causes[findCause(s, input, t)] += ticks;
}

/** A finished unit is scrap: its place is free again. Where nothing is scrapped the counter merely begins anew. */
function scrapUnit(s: State, at: number, am: number, t: number): void {
  const { amounts, buffers, stations } = s;
  const out = stations[at + sta.out];
  const gap = drawScrapGap(s, at);
  stations[at + sta.scrap] = gap;
  amounts[am + amt.gaps] += gap;
  if (s.model.stations[at / staStride].scrapRate === 0) {
    if (buffers[out] === 0) buffers[out + buf.empty] += t - buffers[out + buf.emptySince];
    buffers[out] += 1;
    amounts[am + amt.goodArea] += t;
    return;
  }
  amounts[am + amt.scrapped] += 1;
  const free = buffers[out + buf.free] + 1;
  buffers[out + buf.free] = free;
  if (free === 1) buffers[out + buf.full] += t - buffers[out + buf.fullSince];
}
