/** What Forebay refuses before any work starts. */
export const limits = {
  nodes: 500,
  links: 1_000,
  ticksPerWeek: 20_000,
  /** Counts stay below this. */
  count: 2 ** 30,
  /** Money of one unit, hour or week; beyond it sums lose their cents. */
  money: 1e12,
  /** Carrying cost a year as a share of value. */
  carryingRate: 100,
  /** replications x (weeks + warm-up weeks). */
  replicationWeeks: 1_000_000,
  documentBytes: 2 * 1024 * 1024,
  /** Shorter work than this on a unit would let a tick make units without end. */
  cycleMinutes: 1e-9,
  cycleCv: 1_000,
  textLength: 200,
  empiricalValues: 20_000,
} as const;

const whole = new Intl.NumberFormat("en-GB");

/** A number in a refusal: thousands parted by a narrow no-break space. */
export function sayCount(value: number): string {
  return whole.format(value).replaceAll(",", "\u202f");
}

/**
 * Why these run options are refused, or null.
 * @returns A sentence that names the limit.
 */
export function refuseOptions(options: { replications: number; weeks: number; warmupWeeks: number }): string | null {
  const { replications, weeks, warmupWeeks } = options;
  const total = replications * (weeks + warmupWeeks);
  if (!(total <= limits.replicationWeeks))
    return `${sayCount(replications)} replications of ${sayCount(weeks)} weeks and ${sayCount(warmupWeeks)} warm-up weeks are ${sayCount(total)} weeks to simulate; the limit is ${sayCount(limits.replicationWeeks)}.`;
  return null;
}
