import jstat from "jstat";

/** Probabilities of 0, 1, 2, ... units. */
export type Law = readonly number[];

const tail = 1e-14;

export function poissonLaw(mean: number): Law {
  const law: number[] = [];
  for (let k = 0, p = Math.exp(-mean); k < mean || p > tail; k++, p *= mean / k) law.push(p);
  return law;
}

/** A normal quantity rounded to whole units, at least 0: how a line draws it. */
export function roundedNormalLaw(mean: number, sd: number): Law {
  const below = (x: number) => jstat.normal.cdf(x, mean, sd);
  const most = Math.ceil(mean + 8 * sd);
  return Array.from({ length: most + 1 }, (_, k) => below(k + 0.5) - (k === 0 ? 0 : below(k - 0.5)));
}

/** Law of the sum of independent quantities. */
export function addLaws(...laws: Law[]): Law {
  return laws.reduce((sum, law) => {
    const next = new Array<number>(sum.length + law.length - 1).fill(0);
    sum.forEach((p, j) => {
      if (p > tail) law.forEach((q, k) => (next[j + k] += p * q));
    });
    return next;
  });
}

/** Law of the sum of `n` independent draws. */
export const sumLaw = (law: Law, n: number): Law => addLaws([1], ...new Array<Law>(n).fill(law));

export const expect = (law: Law, value: (units: number) => number): number =>
  law.reduce((sum, p, units) => sum + p * value(units), 0);

/**
 * Exact figures of periodic review up to S with backorders: receive, order, demand; an order of period t is there in
 * period t + L. Over the L + 1 .. L + R periods since an order, stock is S less their demand.
 * @remarks P. Zipkin, Foundations of Inventory Management (2000), ch. 6.
 */
export function baseStock(law: Law, size: number, lead: number, review: number) {
  const spans = Array.from({ length: review }, (_, j) => lead + 1 + j);
  const over = (n: number) => expect(sumLaw(law, n), (units) => Math.max(0, units - size));
  const mean = expect(law, (units) => units);
  const average = (value: (n: number) => number) => spans.reduce((sum, n) => sum + value(n), 0) / review;
  const backlog = average(over);
  return {
    inFull: average((n) => expect(sumLaw(law, n), (units) => (units <= size ? 1 : 0))),
    backlog,
    onHand: average((n) => expect(sumLaw(law, n), (units) => Math.max(0, size - units))),
    fillRate: 1 - average((n) => over(n) - over(n - 1)) / mean,
  };
}
