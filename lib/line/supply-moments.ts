import { meanOf, sdOf } from "./distribution-mean";
import { meanUsesAWeek } from "./mean-use";
import type { Buffer, Line, Replenishment, Supplier } from "./types";

/** Purchased buffers in document order, with their suppliers in link order. */
export function purchasedOf(line: Line): { buffer: Buffer; replenishment: Replenishment; suppliers: Supplier[] }[] {
  const nodes = new Map(line.nodes.map((node) => [node.id, node]));
  return line.nodes.flatMap((node) => {
    if (node.kind !== "buffer" || node.replenishment === null) return [];
    const suppliers = line.links.flatMap(({ from, to }) => {
      const feeder = nodes.get(from);
      return to === node.id && feeder?.kind === "supplier" ? [feeder] : [];
    });
    return [{ buffer: node, replenishment: node.replenishment, suppliers }];
  });
}

/**
 * Mean and standard deviation of a buffer's use a working day, in units; a week's variance is spread over its days.
 * Demand is carried upstream through quantities and mean scrap, customer by customer, since two parts of one product vary
 * together; customers and weeks are taken as independent.
 * @returns Not finite where a demand has no moments.
 */
export function usesADay(line: Line): (bufferId: string) => { mean: number; sd: number } {
  const { daysPerWeek } = line.calendar;
  const customers = line.nodes.flatMap((node) => (node.kind === "customer" ? [node] : []));
  const perUnit = customers.map((customer) =>
    meanUsesAWeek({
      ...line,
      nodes: line.nodes.map((node) =>
        node.kind === "customer"
          ? { ...node, weeklyDemand: { type: "fixed", value: node === customer ? 1 : 0 } }
          : node,
      ),
    }),
  );
  return (bufferId) => {
    let [mean, variance] = [0, 0];
    customers.forEach(({ weeklyDemand }, i) => {
      const part = perUnit[i](bufferId) ?? 0;
      // Times no share of it, demand without moments is none; and a line draws none below 0.
      if (part === 0) return;
      mean += part * Math.max(0, meanOf(weeklyDemand) ?? NaN);
      variance += (part * (sdOf(weeklyDemand) ?? NaN)) ** 2;
    });
    return { mean: mean / daysPerWeek, sd: Math.sqrt(variance / daysPerWeek) };
  };
}

/**
 * Mean and standard deviation of the lead time with lateness, in working days: over a buffer's suppliers a mixture by
 * their shares, and of each a mixture of deliveries on time and others.
 * @returns Null where a lateness has no moments or there is no share.
 */
export function leadTimeOf(suppliers: readonly Supplier[]): { mean: number; sd: number } | null {
  const all = suppliers.reduce((sum, { share }) => sum + share, 0);
  if (!(all > 0)) return null;
  const modes = suppliers.flatMap(({ leadTimeDays, lateness, onTimeShare, share }) => {
    const quoted = quotedDays(leadTimeDays);
    const onTime = { weight: (share / all) * onTimeShare, mean: quoted, sd: 0 };
    const late = (meanOf(lateness) ?? NaN) + quoted;
    return [onTime, { weight: (share / all) * (1 - onTimeShare), mean: late, sd: sdOf(lateness) ?? NaN }];
  });
  const drawn = modes.filter(({ weight }) => weight > 0);
  const mean = drawn.reduce((sum, mode) => sum + mode.weight * mode.mean, 0);
  const variance = drawn.reduce((sum, mode) => sum + mode.weight * (mode.sd ** 2 + (mode.mean - mean) ** 2), 0);
  return Number.isFinite(mean + variance) ? { mean, sd: Math.sqrt(variance) } : null;
}

/** Days that a delivery takes as quoted; a delivery is never there on the day of its order. */
export const quotedDays = (leadTimeDays: number): number => Math.max(1, Math.floor(leadTimeDays + 0.5));
