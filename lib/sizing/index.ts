export { findSizes, type FrontierPoint, type SearchProgress } from "./find-sizes";
export type { Evaluate, Objective, SizeRange, SizingProblem } from "./problem";
export type { Checkpoint } from "./runs";
