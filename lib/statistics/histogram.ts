/** Weekly fill rates counted in bars of one point each; weeks at exactly 100 % and without demand apart. */
export type RateHistogram = { counts: number[]; nFull: number; nNoDemand: number; nWeeks: number };

/**
 * @param rates - Shares 0..1 as `RunResult.fillRates`, NaN for weeks without demand.
 * @returns `counts[i]`: weeks in [i, i + 1) percent below 100 %; `nFull`: weeks at 100 %; `nWeeks`: weeks with demand.
 */
export function countRates(rates: ArrayLike<number>): RateHistogram {
  const counts = new Array<number>(100).fill(0);
  let nFull = 0;
  let nNoDemand = 0;
  for (let i = 0; i < rates.length; i++) {
    const rate = rates[i];
    if (Number.isNaN(rate)) nNoDemand++;
    else if (rate >= 1) nFull++;
    else counts[Math.min(99, Math.max(0, Math.floor(rate * 100)))]++;
  }
  return { counts, nFull, nNoDemand, nWeeks: rates.length - nNoDemand };
}
