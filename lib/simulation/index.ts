export { decodeResult, encodeResult } from "./codec";
export { engineVersion } from "./engine";
export { lowestLevels, type LowestLevels } from "./lowest-levels";
export { mergeRuns } from "./merge";
export { percentile } from "./percentile";
export { simulate } from "./simulate";
export type * from "./types";
