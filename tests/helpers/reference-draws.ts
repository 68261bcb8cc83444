import jstat from "jstat";
import seedrandom from "seedrandom";
import type { Distribution } from "@/lib/line/types";

/** Quantile of a distribution by the plainest means: closed forms, sums of probabilities, jstat. */
export function quantileOf(d: Distribution, p: number): number {
  const normal = () => jstat.normal.inv(p, 0, 1);
  switch (d.type) {
    case "fixed":
      return d.value;
    case "normal":
      return d.mean + d.sd * normal();
    case "lognormal": {
      const variance = Math.log(1 + (d.sd / d.mean) ** 2);
      return Math.exp(Math.log(d.mean) - variance / 2 + Math.sqrt(variance) * normal());
    }
    case "gamma":
      return d.sd === 0 ? d.mean : jstat.gamma.inv(p, (d.mean / d.sd) ** 2, d.sd ** 2 / d.mean);
    case "weibull":
      return d.scale * (-Math.log(1 - p)) ** (1 / d.shape);
    case "exponential":
      return -d.mean * Math.log(1 - p);
    case "uniform":
      return d.min + p * (d.max - d.min);
    case "triangular": {
      const { min, mode, max } = d;
      return p < (mode - min) / (max - min)
        ? min + Math.sqrt(p * (max - min) * (mode - min))
        : max - Math.sqrt((1 - p) * (max - min) * (max - mode));
    }
    case "poisson":
      return sumUp(p, Math.exp(-d.mean), (k) => d.mean / k);
    case "negativeBinomial": {
      const [success, r] = [d.mean / d.sd ** 2, d.mean ** 2 / (d.sd ** 2 - d.mean)];
      return sumUp(p, success ** r, (k) => ((k + r - 1) / k) * (1 - success));
    }
    case "empirical":
      return d.values[Math.min(d.values.length - 1, Math.floor(p * d.values.length))];
  }
}

/** Least k whose cumulated probability reaches p; `ratio(k)` is P(k) / P(k - 1). */
function sumUp(p: number, first: number, ratio: (k: number) => number): number {
  let [k, term, sum] = [0, first, first];
  while (sum < p && k < 1e5) {
    k++;
    term *= ratio(k);
    sum += term;
  }
  return k;
}

export type Draws = ReturnType<typeof createDraws>;

/** One plain stream for everything. */
export function createDraws(seed: string) {
  const uniform = seedrandom(seed);
  const open = () => uniform() || 0.5;
  return {
    chance: (probability: number) => uniform() < probability,
    /** Trials until the first success, by trying. */
    geometric(mean: number): number {
      let n = 1;
      while (mean > 1 && uniform() >= 1 / mean) n++;
      return n;
    },
    lognormal: (mean: number, cv: number) =>
      cv === 0 ? mean : quantileOf({ type: "lognormal", mean, sd: cv * mean }, open()),
    gammaWork: (cv: number) => (cv === 0 ? 1 : quantileOf({ type: "gamma", mean: 1, sd: cv }, open())),
    /** The next uniform of a series whose normal scores are a first-order autoregression. */
    next(series: { score: number | null }, correlation: number): number {
      const fresh = jstat.normal.inv(open(), 0, 1);
      series.score =
        series.score === null ? fresh : correlation * series.score + Math.sqrt(1 - correlation ** 2) * fresh;
      return jstat.normal.cdf(series.score, 0, 1);
    },
  };
}
