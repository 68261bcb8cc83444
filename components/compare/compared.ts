import type { KeptRun } from "@/lib/client/use-kept-runs";
import type { PairedDifferences } from "@/lib/simulation";
import type { Figure } from "@/lib/simulation/types";

/** A scenario in the comparison. `atRisk`: the accepted risk's percentile, null without a run. */
export type Compared = KeptRun & { letter: string; atRisk: Figure | null; differences: PairedDifferences | null };

/** Columns of the comparison's head and rows. */
export const comparisonColumns =
  "lg:grid-cols-[minmax(0,1.1fr)_minmax(0,1.25fr)_minmax(0,.85fr)_minmax(0,.7fr)_minmax(0,.7fr)]";
