import fc from "fast-check";
import { expect, it } from "vitest";
import type { Line } from "@/lib/line/types";
import { stationColumn, supplierColumn } from "@/lib/simulation/columns";
import { compileModel } from "@/lib/simulation/compile";
import { createLevelTally } from "@/lib/simulation/level-tally";
import { amt, amtStride, buf, bufStride, sta, staStride } from "@/lib/simulation/model";
import { createRecorder, runReplication, runStretch, type RunStretch } from "@/lib/simulation/replication";
import { createState, type State } from "@/lib/simulation/state";
import { countFinished } from "@/lib/simulation/station-draws";
import { arbitraryLine } from "@/tests/helpers/line-arbitrary";
import { options, settings } from "./settings";

const whole = { ...options, replications: 1, weeks: 5, warmupWeeks: 0 };

/** Runs one replication tick by tick and looks at the state after each tick and each week. */
function watch(
  line: Line,
  afterTick: (s: State) => void,
  afterWeek?: (s: State, demand: Int32Array, week: number) => void,
) {
  const state = createState(compileModel(line), whole.seed);
  const recorder = createRecorder(state.model, whole, createLevelTally);
  const byTick: RunStretch = (s, n) => {
    for (let t = 0; t < n; t++) {
      runStretch(s, 1);
      afterTick(s);
    }
  };
  runReplication(state, whole, 0, 0, recorder, byTick, (week) => afterWeek?.(state, recorder.demand, week));
  return { state, recorder };
}

const levelOf = (s: State, b: number) => s.buffers[b * bufStride + buf.level];

/** Units that have come into a buffer since the start, and those that stations took out of it. */
function flowOf(s: State, b: number): { into: number; taken: number } {
  const { model, row, stations, inputs } = s;
  let into = -s.onOrder[b] * (model.buffers[b].isPurchased ? 1 : 0);
  let taken = 0;
  for (const supplier of model.buffers[b].suppliers) {
    const at = model.columns.suppliers[supplier];
    into += row[at + supplierColumn.ordered] - row[at + supplierColumn.refused] - row[at + supplierColumn.rejected];
  }
  model.stations.forEach((_, k) => {
    const at = k * staStride;
    const finished = countFinished(s, at);
    if (stations[at + sta.out] === b * bufStride) into += finished - s.amounts[k * amtStride + amt.scrapped];
    const started = finished + (s.amounts[k * amtStride + amt.left] > 0 ? 1 : 0);
    for (let i = stations[at + sta.inputs]; i < stations[at + sta.inputsEnd]; i += 2) {
      if (inputs[i] === b * bufStride) taken += started * inputs[i + 1];
    }
  });
  return { into, taken };
}

it("no level falls below 0, and level and reserved places never exceed a buffer's places", () => {
  fc.assert(
    fc.property(arbitraryLine, (line) => {
      watch(line, (s) => {
        s.model.buffers.forEach(({ isPurchased, size }, b) => {
          const level = levelOf(s, b);
          expect(level).toBeGreaterThanOrEqual(0);
          if (isPurchased) return;
          const nReserved = s.model.stations.filter(
            (_, k) => s.stations[k * staStride + sta.out] === b * bufStride && s.amounts[k * amtStride + amt.left] > 0,
          ).length;
          expect(level + nReserved).toBeLessThanOrEqual(size);
          expect(s.buffers[b * bufStride + buf.free]).toBe(size - level - nReserved);
        });
      });
    }),
    settings(60),
  );
});

it("units are conserved: what a buffer holds is what came in less what stations and customers took", () => {
  fc.assert(
    fc.property(arbitraryLine, (line) => {
      const { model } = createState(compileModel(line), whole.seed);
      const start = model.buffers.map(({ startLevel }) => startLevel);
      const shippedSince = (s: State, b: number) => {
        const { into, taken } = flowOf(s, b);
        return start[b] + into - taken - levelOf(s, b);
      };
      const before = model.buffers.map(() => 0);
      watch(
        line,
        (s) =>
          model.buffers.forEach(({ group }, b) => {
            const shipped = shippedSince(s, b);
            if (group === -1) expect(shipped).toBe(0);
            else expect(shipped).toBeGreaterThanOrEqual(before[b]);
            before[b] = shipped;
          }),
        (s, demand, week) =>
          model.groups.forEach(({ buffer, customers }) => {
            const b = buffer / bufStride;
            let due = 0;
            for (const c of customers) {
              for (let w = 0; w <= week; w++) due += demand[w * model.customers.length + c];
              due -= s.owedOld[c];
            }
            const isAllBackorder = [...customers].every((c) => !model.customers[c].isLost);
            // Lost demand is cancelled at the week's end, so only an upper bound is left.
            if (isAllBackorder) expect(shippedSince(s, b)).toBe(due);
            else expect(shippedSince(s, b)).toBeLessThanOrEqual(due);
          }),
      );
    }),
    settings(60),
  );
});

it("a stretch gives the same counts whether it is run at once or tick by tick", () => {
  fc.assert(
    fc.property(arbitraryLine, (line) => {
      const { state, recorder } = watch(line, () => undefined);
      const again = createState(compileModel(line), whole.seed);
      const atOnce = createRecorder(again.model, whole, createLevelTally);
      runReplication(again, whole, 0, 0, atOnce, runStretch);
      expect(atOnce.demand).toEqual(recorder.demand);
      expect(atOnce.onTime).toEqual(recorder.onTime);
      again.model.buffers.forEach((_, b) => expect(levelOf(again, b)).toBe(levelOf(state, b)));
      expect(again.streams).toEqual(state.streams);
      const { stations, buffers } = again.model.columns;
      for (const column of stations)
        expect(atOnce.sums[column + stationColumn.good]).toBe(recorder.sums[column + stationColumn.good]);
      for (const column of buffers) expect(atOnce.sums[column]).toBeCloseTo(recorder.sums[column], 6);
    }),
    settings(60),
  );
});
