import { never } from "@/lib/random/gaps";
import { buf, sta } from "./model";
import type { State } from "./state";

/**
 * Brings the purchased parts that a station alone takes up to date, and counts the kits of them that it can start
 * until one of their levels reaches 0 or falls below its size, or one is missing.
 * @param at - Of the station in `State.stations`.
 * @param t - Tick of the stretch in which the last kit was taken.
 * @remarks Between two calls `kits` is counted down instead, one number whatever the number of parts.
 */
export function turnKits(s: State, at: number, t: number): void {
  const { buffers, inputs, stations } = s;
  const used = stations[at + sta.kitsFrom] - stations[at + sta.kits];
  let kits = never;
  for (let i = stations[at + sta.kit]; i < stations[at + sta.kitEnd]; i += 2) {
    const b = inputs[i];
    const quantity = inputs[i + 1];
    const level = buffers[b + buf.level] - used * quantity;
    const before = buffers[b + buf.free];
    const free = before + used * quantity;
    buffers[b + buf.level] = level;
    buffers[b + buf.free] = free;
    if (used > 0 && level === 0) buffers[b + buf.emptySince] = t;
    if (before < 0 && free >= 0) buffers[b + buf.full] += t - buffers[b + buf.fullSince];
    kits = Math.min(kits, Math.floor(level / quantity));
    if (free < 0) kits = Math.min(kits, Math.ceil(-free / quantity));
  }
  stations[at + sta.kits] = kits;
  stations[at + sta.kitsFrom] = kits;
}
