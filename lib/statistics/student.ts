/** t(0.975, df) for df 1..19, to 15 digits; a table, so that intervals have the same bits everywhere. */
const quantiles975 = [
  12.7062047361747, 4.302652729749464, 3.18244630528371, 2.776445105197794, 2.570581835636316, 2.44691185114497,
  2.364624251592785, 2.306004135204167, 2.262157162798206, 2.228138851986275, 2.20098516009164, 2.178812829667229,
  2.160368656462793, 2.144786687917804, 2.131449545559776, 2.119905299221255, 2.109815577833317, 2.100922040241038,
  2.09302405440831,
];

/**
 * 97.5th percentile of Student's t.
 * @param df - Whole, 1..19: as many as 20 sections leave.
 * @throws RangeError outside.
 */
export function t975(df: number): number {
  const value = quantiles975[df - 1];
  if (value === undefined) throw new RangeError(`df must be a whole number from 1 to 19, got ${df}`);
  return value;
}
