import { digestLine } from "@/lib/line";
import { engineVersion, levelPercentile } from "@/lib/simulation";
import type { RunResult } from "@/lib/simulation/types";
import { type Evaluate, type Levels, lineWith, type Place, type SizingProblem } from "./problem";
import { packBits, readBadWeeks, unpackBits, type BadWeeks } from "./week-bits";

/** What the search needs to know of one run of one set of sizes. */
export type Reading = BadWeeks & {
  levels: Levels;
  /** Of the objective: money, or money a year. */
  value: number;
  risk: number;
  /** Percentiles `lowShares` of each buffer's level on hand, units. */
  lows: number[][];
};

/** Shares of days for which low levels are read: what lies on hand in all other days can be spared. */
export const lowShares = [0.0005, 0.002, 0.008, 0.016, 0.032];

/** Readings made so far, as plain JSON: a search started again with it asks for none of them twice. */
export type Checkpoint = { format: "forebay.sizing/2"; problem: string; readings: Record<string, StoredReading> };
type StoredReading = Pick<Reading, "value" | "risk" | "nDue" | "lows"> & { bad: string };

/** Weeks of some replications of one seed phrase. */
export type Sample = { seed: string; replications: number; firstReplication: number };

/** What each step of a search works with. */
export type Search = {
  problem: SizingProblem;
  places: Place[];
  runs: Runs;
  tops: Levels;
  /** All weeks of the search, the part of them at which moves are looked at, and the few that sort out first sets. */
  whole: Sample;
  part: Sample;
  few: Sample;
};

export type Runs = {
  /** Readings of sets of sizes over one sample of weeks, in the order given; runs only those not read before. */
  read(sets: readonly Levels[], sample: Sample): Promise<Reading[]>;
  /** All readings of one sample so far. */
  known(sample: Sample): Reading[];
  /** The whole result of one set; too large to be kept of each, so that it may have to be run again. */
  resultOf(levels: Levels, sample: Sample): Promise<RunResult>;
  evaluations(): number;
  /** Runs asked for so far, known ones among them, in runs of all replications. */
  effort(): number;
  checkpoint(): Checkpoint;
};

/**
 * @param onBatch - Told after each batch of runs.
 * @throws RangeError where the checkpoint is of another problem.
 */
export function createRuns(
  problem: SizingProblem,
  evaluate: Evaluate,
  onBatch: () => void,
  signal?: AbortSignal,
  resume?: Checkpoint,
): Runs {
  const name = nameOf(problem);
  if (resume && (resume.format !== "forebay.sizing/2" || resume.problem !== name))
    throw new RangeError("the checkpoint belongs to another problem or to another engine");
  const stored: Record<string, StoredReading> = { ...resume?.readings };
  const readings = new Map<string, Map<string, Reading>>();
  const results = new Map<string, RunResult>();
  let nEvaluations = 0;
  let effort = 0;

  function ofSample(sample: Sample): Map<string, Reading> {
    const name = nameSample(sample);
    const own = readings.get(name) ?? new Map<string, Reading>();
    readings.set(name, own);
    return own;
  }

  async function run(sets: readonly Levels[], sample: Sample): Promise<RunResult[]> {
    signal?.throwIfAborted();
    const { weeks, warmupWeeks, targetFillRate } = problem;
    const options = { ...sample, weeks, warmupWeeks, targetFillRate };
    const found = await evaluate(
      sets.map((levels) => lineWith(problem, levels)),
      options,
    );
    nEvaluations += sets.length;
    sets.forEach((levels, i) => {
      const reading = readResult(problem, levels, found[i]);
      ofSample(sample).set(levels.join(), reading);
      const { value, risk, nDue, lows, bad } = reading;
      stored[keyOf(levels, sample)] = { value, risk, nDue, lows, bad: packBits(bad) };
    });
    onBatch();
    return found;
  }

  function recall(levels: Levels, sample: Sample): Reading | null {
    const own = ofSample(sample);
    const known = own.get(levels.join());
    const kept = stored[keyOf(levels, sample)];
    if (known || !kept) return known ?? null;
    const reading = { ...kept, levels, bad: unpackBits(kept.bad, sample.replications * problem.weeks) };
    own.set(levels.join(), reading);
    return reading;
  }

  return {
    async read(sets, sample) {
      // Known readings count, so that a resumed search ends where the first would have.
      effort += (sets.length * sample.replications) / problem.replications;
      const missing = new Map(sets.filter((set) => !recall(set, sample)).map((set) => [set.join(), set]));
      if (missing.size > 0) await run([...missing.values()], sample);
      return sets.map((set) => recall(set, sample)!);
    },
    known: (sample) => [...ofSample(sample).values()],
    async resultOf(levels, sample) {
      const key = keyOf(levels, sample);
      const known = results.get(key);
      if (known) return known;
      const [result] = await run([levels], sample);
      results.set(key, result);
      return result;
    },
    evaluations: () => nEvaluations,
    effort: () => effort,
    checkpoint: () => ({ format: "forebay.sizing/2", problem: name, readings: { ...stored } }),
  };
}

function readResult(problem: SizingProblem, levels: Levels, result: RunResult): Reading {
  const { moneyTiedUp, costPerYear, risk } = result.summary;
  return {
    levels,
    value: problem.objective === "moneyTiedUp" ? moneyTiedUp.value : costPerYear.total.value,
    risk: risk.value,
    ...readBadWeeks(result, problem.targetFillRate),
    lows: problem.buffers.map(({ id }) => lowShares.map((share) => levelPercentile(result, id, share))),
  };
}

const nameSample = ({ seed, replications, firstReplication }: Sample) => `${firstReplication}+${replications}|${seed}`;
const keyOf = (levels: Levels, sample: Sample): string => `${levels.join()}|${nameSample(sample)}`;

/** All that a reading depends on. */
function nameOf({ line, buffers, targetFillRate, objective, seed, weeks, warmupWeeks }: SizingProblem): string {
  return JSON.stringify([
    digestLine(line),
    engineVersion,
    buffers.map(({ id, min, step }) => [id, min, step]),
    targetFillRate,
    objective,
    seed,
    weeks,
    warmupWeeks,
  ]);
}
