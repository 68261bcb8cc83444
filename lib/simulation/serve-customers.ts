import { findCause } from "./causes";
import { buf, type Group } from "./model";
import type { State } from "./state";

/**
 * Phase 1 of a tick: customers take what they are owed; model.md, 2.4.
 * @param t - Tick of the stretch.
 */
export function serveCustomers(s: State, t: number): void {
  const { groups } = s.model;
  for (let g = 0; g < groups.length; g++) {
    if (s.groupOld[g] + s.groupNew[g] === 0) continue;
    const group = groups[g];
    const stock = s.buffers[group.buffer + buf.level];
    if (stock > 0) {
      const old = ship(s, s.owedOld, s.groupOld, g, stock);
      const units = old + (stock > old ? ship(s, s.owedNew, s.groupNew, g, stock - old) : 0);
      takeUnits(s.buffers, group.buffer, units, t);
      s.shipArea[g] += units * t;
      s.owedTotal -= units;
    }
    if (group.isPurchased && s.groupOld[g] + s.groupNew[g] > 0) chargeWaiting(s, group, t);
  }
}

/** Serves one kind of what a group is owed from `stock` > 0 and returns the units shipped. */
function ship(s: State, owed: Float64Array, groupOwed: Float64Array, g: number, stock: number): number {
  const { customers } = s.model.groups[g];
  const total = groupOwed[g];
  if (total === 0) return 0;
  if (stock >= total) {
    for (let i = 0; i < customers.length; i++) owed[customers[i]] = 0;
    groupOwed[g] = 0;
    return total;
  }
  groupOwed[g] = total - stock;
  if (customers.length === 1) owed[customers[0]] -= stock;
  else shareStock(owed, customers, total, stock, s.remainders);
  return stock;
}

/**
 * Splits a stock that falls short: shares by units owed, rounded down; what is left over goes one each to the largest
 * remainders, ties in document order.
 */
function shareStock(
  owed: Float64Array,
  customers: Int32Array,
  total: number,
  stock: number,
  remainders: Float64Array,
): void {
  let over = stock;
  for (let i = 0; i < customers.length; i++) {
    const part = stock * owed[customers[i]];
    const units = Math.floor(part / total);
    remainders[i] = part - units * total;
    owed[customers[i]] -= units;
    over -= units;
  }
  for (; over > 0; over--) {
    let best = 0;
    for (let i = 1; i < customers.length; i++) if (remainders[i] > remainders[best]) best = i;
    remainders[best] = -1;
    owed[customers[best]] -= 1;
  }
}

/** Takes units out of a buffer and keeps the empty and full times of a purchased one. */
function takeUnits(buffers: Int32Array, record: number, units: number, t: number): void {
  const level = buffers[record + buf.level] - units;
  const free = buffers[record + buf.free];
  buffers[record + buf.level] = level;
  buffers[record + buf.free] = free + units;
  if (level === 0 && units > 0) buffers[record + buf.emptySince] = t;
  if (free < 0 && free + units >= 0) buffers[record + buf.full] += t - buffers[record + buf.fullSince];
}

function chargeWaiting(s: State, group: Group, t: number): void {
  const cause = findCause(s, group.buffer, t);
  for (let i = 0; i < group.customers.length; i++) {
    const customer = group.customers[i];
    if (s.owedOld[customer] + s.owedNew[customer] > 0) s.causes[cause] += 1;
  }
}
