import { lnFailure, nextGap, nextLognormalTicks, never } from "@/lib/random/gaps";
import { nextUniform, wordsPerStream } from "@/lib/random/sfc32";
import { fillWork } from "@/lib/random/work-table";
import { amt, amtStride, blockLength, sta, staStride } from "./model";
import type { State } from "./state";

/** Draws with which a replication starts: first disruptions, rejects, work, scrap and up-times. */
export function drawFirstGaps(s: State): void {
  s.model.suppliers.forEach((supplier, i) => {
    const { disruption, rejectRate, streams } = supplier;
    s.disruptionGaps[i] = disruption
      ? nextGap(s.streams, streams.disruption * wordsPerStream, disruption.begins)
      : Infinity;
    s.rejectGaps[i] =
      rejectRate > 0 ? nextGap(s.streams, streams.reject * wordsPerStream, lnFailure(rejectRate)) : Infinity;
  });
  s.model.stations.forEach((station, i) => {
    const at = i * staStride;
    refillWork(s, at);
    s.stations[at + sta.scrapAt] = s.stations[at + sta.next] + drawScrapGap(s, at);
    const { stoppages } = station;
    const stream = station.streams.stoppage * wordsPerStream;
    const startsDown = stoppages && stoppages.startsDown > 0 && nextUniform(s.streams, stream) < stoppages.startsDown;
    s.stations[at + sta.lastUp] = startsDown ? -1 : drawUpTicks(s, at) - 1;
  });
}

/** Draws the station's next block of work and returns the index of its first amount. */
export function refillWork(s: State, at: number): number {
  const station = s.model.stations[at / staStride];
  const from = s.stations[at + sta.end] - blockLength;
  if (station.table) {
    const stream = station.streams.work * wordsPerStream;
    fillWork(station.table, s.streams, stream, station.work, from, blockLength, s.reals);
  }
  return from;
}

/** Turns to the next block of work. */
export function turnBlock(s: State, at: number): number {
  s.amounts[(at / staStride) * amtStride + amt.startedBefore] += blockLength;
  const hasScrap = s.model.stations[at / staStride].scrap !== null;
  s.stations[at + sta.scrapAt] = hasScrap ? s.stations[at + sta.scrapAt] - blockLength : never;
  return refillWork(s, at);
}

/** Units until the next one that is scrap, itself included. */
export function drawScrapGap(s: State, at: number): number {
  const { scrap, streams } = s.model.stations[at / staStride];
  return scrap === null ? never : nextGap(s.streams, streams.scrap * wordsPerStream, scrap);
}

export function drawUpTicks(s: State, at: number): number {
  const { stoppages, streams } = s.model.stations[at / staStride];
  return stoppages ? nextGap(s.streams, streams.stoppage * wordsPerStream, stoppages.upEnds) : never;
}

/** At least 1; 0 where the station never stops. */
export function drawDownTicks(s: State, at: number): number {
  const { stoppages, streams } = s.model.stations[at / staStride];
  if (!stoppages) return 0;
  const stream = streams.stoppage * wordsPerStream;
  return "ends" in stoppages.down
    ? nextGap(s.streams, stream, stoppages.down.ends)
    : nextLognormalTicks(s.streams, stream, stoppages.down.mean, stoppages.down.cv);
}

/** Units finished since `clearCounts`, scrap included: those started less the one in work. */
export function countFinished(s: State, at: number): number {
  const am = (at / staStride) * amtStride;
  return s.amounts[am + amt.startedBefore] + s.stations[at + sta.next] - (s.amounts[am + amt.left] === 0 ? 0 : 1);
}
