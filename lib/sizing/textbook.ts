import { meanOf, sdOf } from "@/lib/line/distribution-mean";
import { meanUsesAWeek } from "@/lib/line/mean-use";
import type { Buffer, Line, Supplier } from "@/lib/line/types";
import { normalQuantile } from "@/lib/random/normal";

/** What goes into a textbook size, all in units and working days. */
export type TextbookSize =
  | {
      id: string;
      applies: true;
      /** Mean use a day, and its standard deviation. */
      meanUse: number;
      sdUse: number;
      /** Lead time, review period and mean lateness together, and the standard deviation of the lead time. */
      leadDays: number;
      sdLeadDays: number;
      z: number;
      safetyStock: number;
      /** Use over the lead time and safety stock, rounded up to whole units. */
      size: number;
    }
  | { id: string; applies: false; reason: string };

/**
 * Safety stock z sqrt(L s_D^2 + D^2 s_L^2).
 * @param leadDays - L, days over which stock has to last, >= 0.
 * @param meanUse, sdUse - D and s_D, a day.
 * @param sdLeadDays - s_L.
 * @returns Units.
 * @remarks Demand of independent days and a random lead time, their sum taken as normal; e.g. S. Chopra and P. Meindl,
 * Supply Chain Management (Pearson), chapter on safety inventory.
 */
export function safetyStock(z: number, leadDays: number, meanUse: number, sdUse: number, sdLeadDays: number): number {
  return z * Math.sqrt(leadDays * sdUse * sdUse + meanUse * meanUse * sdLeadDays * sdLeadDays);
}

/**
 * The textbook size of every purchased buffer, each on its own.
 * @param acceptedRisk - 0..1, both ends out: z is the standard normal quantile of 1 - acceptedRisk.
 */
export function textbookSizes(line: Line, acceptedRisk: number): TextbookSize[] {
  const z = normalQuantile(1 - acceptedRisk);
  const use = usesADay(line);
  return purchasedOf(line).map(({ buffer, suppliers }): TextbookSize => {
    const { id } = buffer;
    const { mean, sd } = use(id);
    if (!(mean > 0)) return { id, applies: false, reason: "nothing that customers order draws on it" };
    const lead = leadTimeOf(suppliers);
    if (lead === null) return { id, applies: false, reason: "its lateness has no mean and standard deviation" };
    const leadDays = lead.mean + buffer.replenishment!.reviewDays;
    const stock = safetyStock(z, leadDays, mean, sd, lead.sd);
    const size = Math.max(1, Math.ceil(mean * leadDays + stock - 1e-9));
    return {
      id,
      applies: true,
      meanUse: mean,
      sdUse: sd,
      leadDays,
      sdLeadDays: lead.sd,
      z,
      safetyStock: stock,
      size,
    };
  });
}

/**
 * What a plan on averages would hold of every purchased buffer: mean use over the quoted lead time and the review
 * period, nothing for lateness or spread; units by buffer id. Common practice, not a method.
 */
export function averageSizes(line: Line): Record<string, number> {
  const use = usesADay(line);
  return Object.fromEntries(
    purchasedOf(line).flatMap(({ buffer, suppliers }) => {
      const { mean } = use(buffer.id);
      if (!(mean > 0)) return [];
      const quoted = suppliers.reduce((sum, { share, leadTimeDays }) => sum + share * quotedDays(leadTimeDays), 0);
      return [[buffer.id, Math.max(1, Math.round(mean * (quoted + buffer.replenishment!.reviewDays)))]];
    }),
  );
}

/** What the formula takes for granted, in plain sentences. */
export const textbookAssumptions = [
  "Use and lead time are normal, and one day’s use says nothing about the next.",
  "Each part is sized on its own; that a station needs several parts at the same time is left out.",
  "The line takes whatever is demanded at once: no stoppages, no cycle times, no stock further down.",
  "Orders and deliveries are of any size; nothing is rejected, refused or held up by a disruption.",
] as const;

/** Why the need in this line may differ from the formula, for one purchased buffer, in a few words each. */
export function differencesFrom(line: Line, bufferId: string): string[] {
  const found = purchasedOf(line).find(({ buffer }) => buffer.id === bufferId);
  if (!found) return [];
  const { suppliers, buffer } = found;
  const takers = line.links.filter(({ from }) => from === bufferId).map(({ to }) => to);
  const nOther = new Set(
    line.links.filter(({ from, to }) => takers.includes(to) && from !== bufferId).map((l) => l.from),
  );
  const has = (test: (supplier: Supplier) => boolean) => suppliers.some(test);
  return [
    has(({ disruption }) => disruption !== null) && "its supplier is disrupted at times",
    has(({ correlation, lateness }) => correlation > 0 && lateness !== null) && "late deliveries follow one another",
    has(({ onTimeShare, lateness }) => lateness !== null && onTimeShare < 1) &&
      "lateness has a longer tail than a normal one",
    has(({ rejectRate, lotRejectRate }) => rejectRate > 0 || lotRejectRate > 0) && "units or lots are rejected",
    buffer.replenishment!.orderMultiple > 1 && "orders are rounded up to multiples",
    buffer.replenishment!.minimumOrder > 0 && "orders have a minimum",
    nOther.size > 0 && `its stations need ${nOther.size === 1 ? "another part" : `${nOther.size} other parts`} as well`,
    line.nodes.some(({ id, kind }) => kind === "station" && takers.includes(id)) &&
      "the stations even out demand, and stock further down covers for it",
  ].filter((reason) => reason !== false);
}

function purchasedOf(line: Line): { buffer: Buffer; suppliers: Supplier[] }[] {
  const nodes = new Map(line.nodes.map((node) => [node.id, node]));
  return line.nodes.flatMap((node) => {
    if (node.kind !== "buffer" || node.replenishment === null) return [];
    const suppliers = line.links.flatMap(({ from, to }) => {
      const feeder = nodes.get(from);
      return to === node.id && feeder?.kind === "supplier" ? [feeder] : [];
    });
    return [{ buffer: node, suppliers }];
  });
}

/**
 * Mean and standard deviation of a buffer's use a day. Demand is carried upstream through quantities and scrap, customer
 * by customer, since two parts of one product vary together; customers are independent.
 */
function usesADay(line: Line): (bufferId: string) => { mean: number; sd: number } {
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
      mean += part * (meanOf(weeklyDemand) ?? 0);
      variance += (part * (sdOf(weeklyDemand) ?? 0)) ** 2;
    });
    return { mean: mean / daysPerWeek, sd: Math.sqrt(variance / daysPerWeek) };
  };
}

/** Lead time with lateness over all suppliers of a buffer, a mixture by their shares; working days. */
function leadTimeOf(suppliers: readonly Supplier[]): { mean: number; sd: number } | null {
  let [mean, square, shares] = [0, 0, 0];
  for (const { leadTimeDays, lateness, onTimeShare, share } of suppliers) {
    const [late, spread] = [meanOf(lateness), sdOf(lateness)];
    if (late === null || spread === null || !Number.isFinite(late + spread)) return null;
    const quoted = quotedDays(leadTimeDays);
    const own = quoted + (1 - onTimeShare) * late;
    const ownVariance = (1 - onTimeShare) * (spread * spread + late * late) - ((1 - onTimeShare) * late) ** 2;
    mean += share * own;
    square += share * (ownVariance + own * own);
    shares += share;
  }
  if (!(shares > 0)) return null;
  mean /= shares;
  return { mean, sd: Math.sqrt(Math.max(0, square / shares - mean * mean)) };
}

/** Days that a delivery takes as quoted; a delivery is never there on the day of its order. */
const quotedDays = (leadTimeDays: number): number => Math.max(1, Math.floor(leadTimeDays + 0.5));
