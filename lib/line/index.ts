export { digestLine } from "./digest";
export { parseLine } from "./parse";
export type * from "./types";
