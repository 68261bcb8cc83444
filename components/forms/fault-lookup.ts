import type { Fault } from "@/lib/line/types";

/** The first fault of a field, or of anything within it; a node's id and the field's dotted path. */
export function faultOf(faults: readonly Fault[], node: string | undefined, path: string): string | undefined {
  return faults.find((fault) => fault.node === node && fault.path === path)?.message;
}
