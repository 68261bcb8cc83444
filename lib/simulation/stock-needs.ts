import type { Line } from "@/lib/line/types";
import { compileModel } from "./compile";
import { createLevelTally } from "./level-tally";
import { buf, bufStride } from "./model";
import { checkOptions } from "./options";
import { createRecorder, runReplication, runStretch } from "./replication";
import { createState } from "./state";
import type { RunOptions } from "./types";

/**
 * What was drawn down of each buffer's size at the end of each regular day of the recorded weeks: size less level, and
 * what customers that draw on it are owed on top. `needs`: replications x weeks x days x buffers, row-major; units.
 */
export type StockNeeds = {
  bufferIds: string[];
  nReplications: number;
  nWeeks: number;
  daysPerWeek: number;
  needs: Int32Array;
};

/**
 * Runs a line for what each day needs of its buffers. The size that covers a day's demand is the need of that day where
 * the buffer did not run dry; a need of the whole size says only that it was at least that.
 * @remarks The need of purchased stock under order-up-to does not depend on its size, so run it with ample sizes.
 * @throws RangeError on bad options and a line that cannot run.
 */
export function stockNeeds(line: Line, options: RunOptions): StockNeeds {
  const checked = checkOptions(options);
  const model = compileModel(line);
  const state = createState(model, checked.seed);
  const { daysPerWeek } = model;
  const nBuffers = model.buffers.length;
  const { replications, weeks, warmupWeeks, firstReplication = 0 } = checked;
  const sizes = model.shape.buffers.map(({ id }) => sizeOf(line, id));
  const needs = new Int32Array(replications * weeks * daysPerWeek * nBuffers);
  const recorder = createRecorder(model, { ...checked, replications: 1 }, createLevelTally);
  for (let row = 0; row < replications; row++) {
    let week = -warmupWeeks;
    let day = 0;
    runReplication(
      state,
      { ...checked, replications: 1 },
      firstReplication + row,
      0,
      recorder,
      (s, n) => {
        runStretch(s, n);
        // Overtime comes after the week's days and belongs to none.
        if (week >= 0 && day < daysPerWeek) {
          const at = ((row * weeks + week) * daysPerWeek + day) * nBuffers;
          for (let b = 0; b < nBuffers; b++) needs[at + b] = sizes[b] - s.buffers[b * bufStride + buf.level];
          model.groups.forEach(({ buffer }, g) => (needs[at + buffer / bufStride] += s.groupOld[g] + s.groupNew[g]));
        }
        day++;
      },
      () => {
        week++;
        day = 0;
      },
    );
  }
  return {
    bufferIds: model.shape.buffers.map(({ id }) => id),
    nReplications: replications,
    nWeeks: weeks,
    daysPerWeek,
    needs,
  };
}

function sizeOf(line: Line, id: string): number {
  const node = line.nodes.find((one) => one.id === id);
  return node?.kind === "buffer" ? node.size : 0;
}
