export { decodeResult, encodeResult } from "./codec";
export { engineVersion } from "./engine";
export { judgeRuns, judgeWarmup, type RunsVerdict, type WarmupVerdict } from "./judge";
export { lowestLevels, type LowestLevels } from "./lowest-levels";
export { mergeRuns } from "./merge";
export { arePaired, pairedDifference, pairedDifferences, type PairedDifferences } from "./paired";
export { levelPercentile, percentile } from "./percentile";
export { simulate } from "./simulate";
export type * from "./types";
