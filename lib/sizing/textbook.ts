import { limits } from "@/lib/line/limits";
import { leadTimeOf, purchasedOf, quotedDays, usesADay } from "@/lib/line/supply-moments";
import type { Line, Replenishment, Supplier } from "@/lib/line/types";
import { normalQuantile } from "@/lib/random/normal";

/** What goes into a textbook size, all in units and working days. */
export type TextbookSize =
  | {
      id: string;
      applies: true;
      /** Mean use a day, and its standard deviation. */
      meanUse: number;
      sdUse: number;
      /** Days to cover: lead time with mean lateness, and `reviewDays`; and the standard deviation of the lead time. */
      leadDays: number;
      sdLeadDays: number;
      /** The review period in `leadDays`: that of an order-up-to level, 0 for a reorder point. */
      reviewDays: number;
      z: number;
      /** Mean use over `leadDays`. */
      cycleStock: number;
      safetyStock: number;
      /** Order-up-to level or reorder point: `cycleStock` and `safetyStock`, rounded up to whole units. */
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
 * Review period that a size has to cover. What is ordered up to a level has to last until the order of the next review is
 * there: lead time and one review period. The texts' reorder point is watched all the time and covers the lead time.
 */
const reviewCovered = ({ rule, reviewDays }: Replenishment): number => (rule === "orderUpTo" ? reviewDays : 0);

/**
 * The textbook size of every purchased buffer, each on its own.
 * @param line - Valid.
 * @param acceptedRisk - 0..1, both ends out: z is the standard normal quantile of 1 - acceptedRisk.
 * @throws RangeError where acceptedRisk is outside.
 */
export function textbookSizes(line: Line, acceptedRisk: number): TextbookSize[] {
  if (!(acceptedRisk > 0 && acceptedRisk < 1))
    throw new RangeError(`acceptedRisk must be above 0 and below 1, got ${acceptedRisk}`);
  const z = normalQuantile(1 - acceptedRisk, acceptedRisk);
  const use = usesADay(line);
  return purchasedOf(line).map(({ buffer: { id }, replenishment, suppliers }): TextbookSize => {
    const refuse = (reason: string): TextbookSize => ({ id, applies: false, reason });
    const { mean: meanUse, sd: sdUse } = use(id);
    if (!Number.isFinite(meanUse + sdUse)) return refuse("demand for it has no mean and standard deviation");
    if (meanUse <= 0) return refuse("nothing that customers order draws on it");
    const lead = leadTimeOf(suppliers);
    if (lead === null) return refuse("its lateness has no mean and standard deviation");
    if (lead.mean < 0) return refuse("its deliveries are on average early by more than the lead time");
    const reviewDays = reviewCovered(replenishment);
    const leadDays = lead.mean + reviewDays;
    const cycleStock = meanUse * leadDays;
    const stock = safetyStock(z, leadDays, meanUse, sdUse, lead.sd);
    const size = Math.max(1, Math.ceil(cycleStock + stock - 1e-9));
    if (size >= limits.count) return refuse("it comes to more units than a line can count");
    const days = { leadDays, sdLeadDays: lead.sd, reviewDays };
    return { id, applies: true, meanUse, sdUse, ...days, z, cycleStock, safetyStock: stock, size };
  });
}

/**
 * What a plan on averages would hold of every purchased buffer: mean use over the quoted lead time and, for an order-up-to
 * level, the review period; nothing for lateness or spread; units by buffer id. Buffers that stations feed are left as
 * they are, so are those that no demand draws on. Common practice, not a method.
 */
export function averageSizes(line: Line): Record<string, number> {
  const use = usesADay(line);
  return Object.fromEntries(
    purchasedOf(line).flatMap(({ buffer, replenishment, suppliers }) => {
      const { mean } = use(buffer.id);
      const shares = suppliers.reduce((sum, { share }) => sum + share, 0);
      const quoted = suppliers.reduce((sum, { share, leadTimeDays }) => sum + share * quotedDays(leadTimeDays), 0);
      const units = Math.floor(mean * (quoted / shares + reviewCovered(replenishment)) + 0.5);
      return mean > 0 && units < limits.count ? [[buffer.id, Math.max(1, units)]] : [];
    }),
  );
}

/** What the formula takes for granted, in plain sentences. */
export const textbookAssumptions = [
  "Use and lead time are normal, and one day’s use says nothing about the next, nor one week’s or one customer’s about another.",
  "The spread of a week’s demand is spread evenly over its days.",
  "An order-up-to level covers lead time and review period; a reorder point covers the lead time alone, as if stock were watched all the time.",
  "Each part is sized on its own; that a station needs several parts at the same time is left out.",
  "The line takes whatever is demanded at once, with its mean scrap: no stoppages, no cycle times, no stock further down.",
  "Orders and deliveries are of any size; nothing is rejected, refused or held up by a disruption, and sizes are not scaled up for it.",
] as const;

/** Why the need in this line may differ from the formula, for one purchased buffer, in a few words each. */
export function differencesFrom(line: Line, bufferId: string): string[] {
  const found = purchasedOf(line).find(({ buffer }) => buffer.id === bufferId);
  if (!found) return [];
  const { suppliers, replenishment } = found;
  const takers = line.links.filter(({ from }) => from === bufferId).map(({ to }) => to);
  const nOther = new Set(
    line.links.filter(({ from, to }) => takers.includes(to) && from !== bufferId).map((l) => l.from),
  );
  const has = (test: (supplier: Supplier) => boolean) => suppliers.some(test);
  return [
    has(({ disruption }) => disruption !== null) && "its supplier is disrupted at times",
    has(({ correlation, lateness }) => correlation > 0 && lateness !== null) && "late deliveries follow one another",
    has((supplier) => varies(supplier) && !isNormal(supplier)) && "its lead time does not follow the normal curve",
    has(({ rejectRate, lotRejectRate }) => rejectRate > 0 || lotRejectRate > 0) && "units or lots are rejected",
    replenishment.rule === "reorderPoint" &&
      `its stock is looked at ${replenishment.reviewDays === 1 ? "once a day" : `every ${replenishment.reviewDays} days`}, and by then may be below the point`,
    replenishment.orderMultiple > 1 && "orders are rounded up to multiples",
    replenishment.minimumOrder > 0 && "orders have a minimum",
    nOther.size > 0 && `its stations need ${nOther.size === 1 ? "another part" : `${nOther.size} other parts`} as well`,
    line.nodes.some(({ id, kind }) => kind === "station" && takers.includes(id)) &&
      "the stations even out demand, and stock further down covers for it",
  ].filter((reason) => reason !== false);
}

const varies = (supplier: Supplier): boolean => (leadTimeOf([{ ...supplier, share: 1 }])?.sd ?? 1) > 0;
const isNormal = ({ lateness, onTimeShare }: Supplier): boolean => lateness?.type === "normal" && onTimeShare === 0;
