export { suggestBounds, refuseRange } from "./bounds";
export { findSizes, type FrontierPoint, type SearchProgress } from "./find-sizes";
export { type Evaluate, type Objective, placesOf, type SizeRange, type SizingProblem, withSizes } from "./problem";
export type { Checkpoint } from "./runs";
