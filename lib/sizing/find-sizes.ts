import type { RunResult } from "@/lib/simulation/types";
import { enumerateSets, isSmall } from "./enumerate";
import { findFirstSet } from "./first-sets";
import { beginKnowledge, improveSizes } from "./improve";
import { checkProblem, type Evaluate, placesOf, sizesOf, type SizingProblem, topLevels } from "./problem";
import { type Checkpoint, createRuns, type Runs, type Sample, type Search } from "./runs";

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
  /** How far the search has come, 0..1: an estimate, since nobody knows beforehand how many looks it takes. */
  share: number;
  /** The cheapest set so far that keeps to the risk now looked at, over the search's weeks. */
  best: null | { acceptedRisk: number; sizes: Record<string, number>; risk: number; value: number };
  /** Points of the frontier that are done. */
  frontier: readonly FrontierPoint[];
  checkpoint: Checkpoint;
};

/** Parts of the replications that moves are looked at over and that first sets are sorted by, and the fewest of each. */
const lookedAt = { share: 1 / 4, fewest: 20 };
const sortedBy = { share: 1 / 16, fewest: 10 };
/** Runs of all replications spent on improving one set, and on mending one that was not confirmed. */
const mostEffort = 28;
const mendingEffort = 8;
/** Sets put to the unseen weeks at most for one accepted risk. */
const mostConfirmed = 3;
/** What one accepted risk takes in runs of all replications, about; only for saying how far a search has come. */
const usualEffort = 44;

/**
 * Finds the cheapest set of buffer sizes for each accepted risk, and confirms it on weeks that the search has not seen.
 * @param evaluate - Runs lines; everything about a run is in its arguments.
 * @param onProgress - Told after each batch of runs.
 * @param options - `signal` ends the search with its reason; `resume` goes on from a checkpoint of the same problem.
 * @returns Points in the order of `acceptedRisks`. Where no set in range keeps to a risk, its point is the cheapest found
 * that does about as well as the largest sizes, and `reached` is false.
 * @throws RangeError on a problem that cannot be searched.
 * @remarks Sample average approximation on common random numbers (A. J. Kleywegt, A. Shapiro and T. Homem-de-Mello,
 * SIAM Journal on Optimization 12 (2002) 479-502): a first set from low levels and halvings (`findFirstSet`), then
 * response curves and marginal risk for money (`improveSizes`); few sets are run through one by one. A set that fails on
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
  const partOf = ({ share, fewest }: { share: number; fewest: number }): Sample => ({
    ...whole,
    replications: Math.min(replications, Math.max(fewest, Math.ceil(replications * share))),
  });
  const frontier: FrontierPoint[] = [];
  let acceptedRisk = problem.acceptedRisks[0];
  const describeBest = (): SearchProgress["best"] => {
    const sound = runs.known(whole).filter(({ risk }) => risk <= acceptedRisk);
    if (sound.length === 0) return null;
    const { levels, risk, value } = sound.reduce((best, other) => (other.value < best.value ? other : best));
    return { acceptedRisk, sizes: sizesOf(problem, levels), risk, value };
  };
  let begun = 0;
  const shareDone = () => {
    const own = Math.min(0.98, (runs.effort() - begun) / usualEffort);
    return Math.min(1, (frontier.length + own) / problem.acceptedRisks.length);
  };
  const report = () =>
    onProgress?.({
      evaluations: runs.evaluations(),
      share: shareDone(),
      best: describeBest(),
      frontier: [...frontier],
      checkpoint: runs.checkpoint(),
    });
  const runs: Runs = createRuns(problem, evaluate, report, signal, resume);
  const search: Search = {
    problem,
    places: placesOf(
      problem.line,
      problem.buffers.map(({ id }) => id),
    ),
    runs,
    tops: topLevels(problem),
    whole,
    part: partOf(lookedAt),
    few: partOf(sortedBy),
  };

  const [ample] = await runs.read([search.tops], whole);
  const knowledge = beginKnowledge(search, ample);
  for (acceptedRisk of problem.acceptedRisks) {
    begun = runs.effort();
    let accepted = Math.max(acceptedRisk, ample.risk);
    const start = await (isSmall(search) ? enumerateSets(search, accepted) : findFirstSet(search, ample, accepted));
    let found = await improveSizes(search, start, accepted, mostEffort, knowledge);
    let confirmed = await runs.resultOf(found.levels, unseen);
    for (let i = 1; i < mostConfirmed && !reaches(confirmed, acceptedRisk) && ample.risk < acceptedRisk; i++) {
      accepted = Math.max(ample.risk, found.risk - (confirmed.summary.risk.value - acceptedRisk) - 1e-9);
      const next = await improveSizes(search, found, accepted, mendingEffort, knowledge);
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
