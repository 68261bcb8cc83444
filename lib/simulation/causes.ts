import { buf, bufStride, sta } from "./model";
import type { State } from "./state";

/**
 * Whom a shortage of a buffer is charged to; model.md, section 4, root cause.
 * @param record - Of the buffer.
 * @param t - Tick of the stretch; feeding stations have been served up to the tick before.
 * @returns Index of the cause.
 */
export function findCause(s: State, record: number, t: number): number {
  const { buffers, stations } = s;
  let b = record;
  for (;;) {
    const cause = buffers[b + buf.cause];
    if (cause >= 0) return cause;
    const feeder = buffers[b + buf.feeder];
    const cameFrom = stations[feeder + sta.lostTick] === t - 1 ? stations[feeder + sta.lostBy] : pace;
    if (cameFrom < 0) return stations[feeder + sta.cause] + (cameFrom === pace ? 1 : 0);
    b = cameFrom;
  }
}

const pace = -2;

/** Today's cause of a shortage of each purchased buffer, once deliveries are in. */
export function setPurchasedCauses(s: State): void {
  const { model } = s;
  for (let i = 0; i < model.buffers.length; i++) {
    const buffer = model.buffers[i];
    if (!buffer.isPurchased) continue;
    let cause = buffer.sizeCause;
    for (let k = buffer.suppliers.length - 1; k >= 0; k--) {
      const supplier = buffer.suppliers[k];
      if (s.orders[supplier].nextExpected <= s.day) cause = model.suppliers[supplier].cause + 1;
    }
    for (let k = buffer.suppliers.length - 1; k >= 0; k--) {
      const supplier = buffer.suppliers[k];
      if (s.isDisrupted[supplier] === 1) cause = model.suppliers[supplier].cause;
    }
    s.buffers[i * bufStride + buf.cause] = cause;
  }
}
