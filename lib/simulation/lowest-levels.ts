import type { Line } from "@/lib/line/types";
import { compileModel } from "./compile";
import { createLevelTally } from "./level-tally";
import { buf, bufStride } from "./model";
import { checkOptions } from "./options";
import { createRecorder, runReplication, runStretch } from "./replication";
import { createState } from "./state";
import type { RunOptions } from "./types";

/** Lowest level of each week of every replication, warm-up weeks included: row-major by replication. */
export type LowestLevels = { nReplications: number; nWeeks: number; lowest: Int32Array };

/**
 * Runs a line again for the lowest level at which one buffer ended a tick in each week.
 * @throws RangeError on an unknown buffer, bad options and a line that cannot run.
 */
export function lowestLevels(line: Line, options: RunOptions, bufferId: string): LowestLevels {
  const checked = checkOptions(options);
  const model = compileModel(line);
  const buffer = model.shape.buffers.findIndex(({ id }) => id === bufferId);
  if (buffer === -1) throw new RangeError(`no buffer has the id "${bufferId}"`);
  const state = createState(model, checked.seed);
  const nWeeks = checked.warmupWeeks + checked.weeks;
  const lowest = new Int32Array(checked.replications * nWeeks);
  const recorder = createRecorder(model, { ...checked, replications: 1 }, createLevelTally);
  state.watched = buffer * bufStride + buf.level;
  for (let row = 0; row < checked.replications; row++) {
    state.lowest = 2 ** 31 - 1;
    runReplication(state, checked, (checked.firstReplication ?? 0) + row, 0, recorder, runStretch, (week) => {
      lowest[row * nWeeks + week] = state.lowest;
      state.lowest = 2 ** 31 - 1;
    });
  }
  return { nReplications: checked.replications, nWeeks, lowest };
}
