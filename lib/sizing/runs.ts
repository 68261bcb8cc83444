import { digestLine } from "@/lib/line";
import { engineVersion } from "@/lib/simulation";
import type { RunResult } from "@/lib/simulation/types";
import { type Evaluate, type Levels, lineWith, type SizingProblem } from "./problem";
import { codeWeeks } from "./week-rates";

/** What the search needs to know of one run of one set of sizes. */
export type Reading = {
  levels: Levels;
  /** Of the objective: money, or money a year. */
  value: number;
  risk: number;
  /** See `codeWeeks`. */
  codes: Uint8Array;
  /** P10 of each buffer's level on hand, units. */
  lows: number[];
};

/** Readings made so far, as plain JSON: a search started again with it asks for none of them twice. */
export type Checkpoint = { format: "forebay.sizing/1"; problem: string; readings: Record<string, StoredReading> };
type StoredReading = { value: number; risk: number; codes: string; lows: number[] };

/** Weeks of some replications of one seed phrase. */
export type Sample = { seed: string; replications: number; firstReplication: number };

/** What each step of a search works with. */
export type Search = {
  problem: SizingProblem;
  runs: Runs;
  tops: Levels;
  /** All weeks of the search, and the part of them that screening looks at. */
  whole: Sample;
  part: Sample;
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
  if (resume && (resume.format !== "forebay.sizing/1" || resume.problem !== name))
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
      const { value, risk, codes, lows } = reading;
      stored[keyOf(levels, sample)] = { value, risk, codes: toBase64(codes), lows };
    });
    onBatch();
    return found;
  }

  function recall(levels: Levels, sample: Sample): Reading | null {
    const own = ofSample(sample);
    const known = own.get(levels.join());
    const kept = stored[keyOf(levels, sample)];
    if (known || !kept) return known ?? null;
    const reading = { ...kept, levels, codes: fromBase64(kept.codes) };
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
    checkpoint: () => ({ format: "forebay.sizing/1", problem: name, readings: { ...stored } }),
  };
}

function readResult(problem: SizingProblem, levels: Levels, result: RunResult): Reading {
  const { moneyTiedUp, costPerYear, risk } = result.summary;
  return {
    levels,
    value: problem.objective === "moneyTiedUp" ? moneyTiedUp.value : costPerYear.total.value,
    risk: risk.value,
    codes: codeWeeks(result, problem.targetFillRate),
    lows: problem.buffers.map(({ id }) => result.buffers[id].p10),
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

function toBase64(bytes: Uint8Array): string {
  let text = "";
  for (let i = 0; i < bytes.length; i += 0x8000) text += String.fromCharCode(...bytes.subarray(i, i + 0x8000));
  return btoa(text);
}

function fromBase64(text: string): Uint8Array {
  return Uint8Array.from(atob(text), (char) => char.charCodeAt(0));
}
