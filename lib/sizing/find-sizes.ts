import type { RunResult } from "@/lib/simulation/types";
import { composeSizes } from "./compose";
import { enumerateSets, isSmall } from "./enumerate";
import { improveSizes, isBetter } from "./improve";
import { measureNeeds, type Needs } from "./needs";
import { checkProblem, type Evaluate, type Levels, sizesOf, type SizingProblem, topLevels } from "./problem";
import { type Checkpoint, createRuns, type Reading, type Runs, type Sample, type Search } from "./runs";
import { countBad, countDue } from "./week-rates";

/** The set of sizes found for one accepted risk. */
export type FrontierPoint = {
  acceptedRisk: number;
  sizes: Record<string, number>;
  /** Over the weeks that the set was chosen on. */
  searched: RunResult;
  /** Over weeks that the search has not seen, seed phrase `${seed}/unseen`. */
  confirmed: RunResult;
  /** Whether the confirmed risk is at most the accepted one. */
  reached: boolean;
};

export type SearchProgress = {
  /** Lines run so far. */
  evaluations: number;
  /** The cheapest set so far that keeps to the risk now looked at, over the search's weeks. */
  best: null | { acceptedRisk: number; sizes: Record<string, number>; risk: number; value: number };
  /** Points of the frontier that are done. */
  frontier: readonly FrontierPoint[];
  checkpoint: Checkpoint;
};

/** Screening looks at this part of the replications, but at no fewer than `fewest`. */
const screened = 1 / 4;
const fewest = 20;
/** Runs of all replications spent on looking round for one accepted risk, and on mending a set that was not confirmed. */
const mostEffort = 40;
const mendingEffort = 25;
/** Sets put to the unseen weeks at most for one accepted risk. */
const mostConfirmed = 3;

/**
 * Finds the cheapest set of buffer sizes for each accepted risk, and confirms it on weeks that the search has not seen.
 * @param evaluate - Runs lines; everything about a run is in its arguments.
 * @param onProgress - Told after each batch of runs.
 * @param options - `signal` ends the search with its reason; `resume` goes on from a checkpoint of the same problem.
 * @returns Points in the order of `acceptedRisks`. Where no set in range keeps to a risk, its point is the cheapest found
 * that does about as well as the largest sizes, and `reached` is false.
 * @throws RangeError on a problem that cannot be searched.
 * @remarks Sample average approximation on common random numbers (A. J. Kleywegt, A. Shapiro and T. Homem-de-Mello,
 * SIAM Journal on Optimization 12 (2002) 479-502): weekly needs of each buffer, marginal analysis over them
 * (`composeSizes`), neighbourhood search (`improveSizes`); few sets are run through one by one. A set that fails on
 * unseen weeks is searched again at a risk lower by what it was off, so that the unseen weeks are looked at up to three
 * times.
 */
export async function findSizes(
  problem: SizingProblem,
  evaluate: Evaluate,
  onProgress?: (progress: SearchProgress) => void,
  { signal, resume }: { signal?: AbortSignal; resume?: Checkpoint } = {},
): Promise<{ frontier: FrontierPoint[]; evaluations: number }> {
  checkProblem(problem);
  const { replications, seed } = problem;
  const whole: Sample = { seed, replications, firstReplication: 0 };
  const unseen: Sample = { ...whole, seed: `${seed}/unseen` };
  const part: Sample = {
    ...whole,
    replications: Math.min(replications, Math.max(fewest, Math.ceil(replications * screened))),
  };
  const frontier: FrontierPoint[] = [];
  let acceptedRisk = problem.acceptedRisks[0];
  const describeBest = (): SearchProgress["best"] => {
    const sound = runs.known(whole).filter(({ risk }) => risk <= acceptedRisk);
    if (sound.length === 0) return null;
    const { levels, risk, value } = sound.reduce((best, other) => (other.value < best.value ? other : best));
    return { acceptedRisk, sizes: sizesOf(problem, levels), risk, value };
  };
  const report = () =>
    onProgress?.({
      evaluations: runs.evaluations(),
      best: describeBest(),
      frontier: [...frontier],
      checkpoint: runs.checkpoint(),
    });
  const runs: Runs = createRuns(problem, evaluate, report, signal, resume);
  const search: Search = { problem, runs, tops: topLevels(problem), whole, part };

  const [ample] = await runs.read([search.tops], whole);
  const needs = isSmall(search) ? null : await measureNeeds(search);
  for (acceptedRisk of problem.acceptedRisks) {
    let accepted = Math.max(acceptedRisk, ample.risk);
    const start = needs ? await composeStart(search, needs, accepted) : await enumerateSets(search, accepted);
    let found = await improveSizes(search, start, accepted, mostEffort);
    let confirmed = await runs.resultOf(found.levels, unseen);
    for (let i = 1; i < mostConfirmed && !reaches(confirmed, acceptedRisk) && ample.risk < acceptedRisk; i++) {
      accepted = Math.max(ample.risk, found.risk - (confirmed.summary.risk.value - acceptedRisk) - 1e-9);
      const next = await improveSizes(search, found, accepted, mendingEffort);
      if (next.levels === found.levels) break;
      found = next;
      confirmed = await runs.resultOf(found.levels, unseen);
    }
    frontier.push({
      acceptedRisk,
      sizes: sizesOf(problem, found.levels),
      searched: await runs.resultOf(found.levels, whole),
      confirmed,
      reached: reaches(confirmed, acceptedRisk),
    });
    report();
  }
  return { frontier, evaluations: runs.evaluations() };
}

const reaches = (result: RunResult, acceptedRisk: number): boolean => result.summary.risk.value <= acceptedRisk;

/** The cheapest of the sets composed from the weeks' needs that keeps to the accepted risk, over all weeks. */
async function composeStart({ runs, whole }: Search, needs: Needs, accepted: number): Promise<Reading> {
  const nDue = countDue(needs.ample.codes);
  const most = Math.max(0, Math.floor(accepted * nDue) - countBad(needs.ample.codes));
  const compose = (share: number): Levels => composeSizes(needs, Math.floor(share * most));
  // A set just past the risk is soon mended, and may be far cheaper than the next one within it.
  const near = accepted * 1.1;
  let [low, high] = [0, 1];
  let best: Reading | null = null;
  for (const shares of [
    [1, 0.75, 0.5, 0.25, 0],
    [0.75, 0.5, 0.25],
  ]) {
    const asked = shares.map((share) => low + share * (high - low));
    const readings = await runs.read(asked.map(compose), whole);
    for (const reading of readings) if (!best || isBetter(reading, best, near)) best = reading;
    const first = readings.findIndex(({ risk }) => risk <= near);
    if (first <= 0) break;
    [low, high] = [asked[first], asked[first - 1]];
  }
  return best!;
}
