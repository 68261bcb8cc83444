import { normalCdf } from "@/lib/random/normal";
import { nextUniform, wordsPerStream } from "@/lib/random/sfc32";
import { normalScore, wholeQuantile } from "@/lib/random/whole-quantile";
import { supplierColumn } from "./columns";
import { buf, bufStride } from "./model";
import { addOrder } from "./orders";
import type { State } from "./state";

/** Largest order that one supplier gets at once. */
const mostUnits = 2 ** 30;

/** Reviews the purchased buffers that are due today and places their orders; model.md, 2.3, step 3. */
export function reviewBuffers(s: State): void {
  const { buffers } = s.model;
  for (let i = 0; i < buffers.length; i++) {
    if (buffers[i].isPurchased && s.day % buffers[i].reviewDays === 0) reviewBuffer(s, i);
  }
}

function reviewBuffer(s: State, i: number): void {
  const buffer = s.model.buffers[i];
  const owed = buffer.group >= 0 ? s.groupOld[buffer.group] + s.groupNew[buffer.group] : 0;
  const position = s.buffers[i * bufStride + buf.level] + s.onOrder[i] - owed;
  const below = buffer.size - position;
  const need = buffer.lot === 0 ? below : below >= 0 ? (Math.floor(below / buffer.lot) + 1) * buffer.lot : 0;
  let left = need;
  for (let k = 0; k < buffer.suppliers.length; k++) {
    const supplier = buffer.suppliers[k];
    const days = drawDays(s, supplier);
    if (left <= 0) continue;
    const isLast = k === buffer.suppliers.length - 1;
    const part = isLast ? left : Math.min(left, Math.floor(need * s.model.suppliers[supplier].share + 0.5));
    left -= part;
    if (part > 0) placeOrder(s, supplier, part, days);
  }
}

/** Days from order to arrival; drawn at every review, whether or not an order is placed. */
function drawDays(s: State, i: number): number {
  const { days, quotedDays, onTimeShare, correlation, streams } = s.model.suppliers[i];
  if (!days) return quotedDays;
  const u = nextUniform(s.streams, streams.lateness * wordsPerStream);
  let p = u;
  let q = 1 - u;
  if (correlation !== 0) {
    const z = moveScore(s.latenessScores, i, correlation, u);
    p = normalCdf(z);
    q = normalCdf(-z);
  }
  if (p < onTimeShare) return quotedDays;
  const least = 1e-300;
  return wholeQuantile(
    days,
    Math.max((p - onTimeShare) / (1 - onTimeShare), least),
    Math.max(q / (1 - onTimeShare), least),
  );
}

/**
 * One step of a stationary first-order autoregression with standard normal marginals.
 * @param scores - Last value at `i`, NaN before the first; written in place.
 * @param u - Uniform draw that drives the step.
 */
export function moveScore(scores: Float64Array, i: number, correlation: number, u: number): number {
  const fresh = normalScore(u);
  const last = scores[i];
  const z = last === last ? correlation * last + Math.sqrt(1 - correlation * correlation) * fresh : fresh;
  scores[i] = z;
  return z;
}

function placeOrder(s: State, i: number, part: number, days: number): void {
  const supplier = s.model.suppliers[i];
  const buffer = s.model.buffers[supplier.buffer];
  const atLeast = Math.max(part, buffer.minimumOrder);
  const units = Math.ceil(atLeast / buffer.orderMultiple) * buffer.orderMultiple;
  if (units > mostUnits) {
    throw new RangeError(`an order of supplier "${s.model.shape.suppliers[i].id}" would exceed ${mostUnits} units`);
  }
  const orders = s.orders[i];
  const planned = s.day + days;
  addOrder(
    orders,
    supplier.keepsSequence ? Math.max(planned, orders.lastPlanned) : planned,
    s.day + supplier.quotedDays,
    units,
  );
  s.onOrder[supplier.buffer] += units;
  const at = s.model.columns.suppliers[i];
  s.row[at + supplierColumn.orders] += 1;
  s.row[at + supplierColumn.ordered] += units;
}
