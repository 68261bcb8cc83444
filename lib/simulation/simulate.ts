import type { Line } from "@/lib/line/types";
import { compileModel } from "./compile";
import { createLevelTally, listLevels } from "./level-tally";
import { checkOptions } from "./options";
import { createRecorder, runReplication, runStretch } from "./replication";
import { createState } from "./state";
import { summarise } from "./summarise";
import type { RunOptions, RunResult } from "./types";

/**
 * Runs replications `firstReplication` .. `firstReplication + replications - 1` of a line.
 * @param line - Free of faults as `parseLine` finds them.
 * @returns A function of the line, the options and nothing else, to the last bit.
 * @throws RangeError on bad options and on a line that cannot run.
 */
export function simulate(line: Line, options: RunOptions): RunResult {
  const checked = checkOptions(options);
  const model = compileModel(line);
  const state = createState(model, checked.seed);
  const recorder = createRecorder(model, checked, createLevelTally);
  const first = checked.firstReplication ?? 0;
  const replications = Int32Array.from({ length: checked.replications }, (_, i) => first + i);
  replications.forEach((replication, row) => runReplication(state, checked, replication, row, recorder, runStretch));
  const { sums, demand, onTime, weekSums } = recorder;
  const dayLevels = recorder.dayLevels.map(listLevels);
  return summarise(checked, { shape: model.shape, replications, sums, demand, onTime, weekSums, dayLevels });
}
