import type { Reading } from "./runs";

/** Keeping to the accepted risk comes first, then the objective. */
export function isBetter(one: Reading, other: Reading, accepted: number): boolean {
  const keeps = one.risk <= accepted;
  if (keeps !== other.risk <= accepted) return keeps;
  return keeps ? one.value < other.value : one.risk < other.risk;
}
