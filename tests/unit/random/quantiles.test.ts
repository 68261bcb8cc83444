import { describe, expect, it } from "vitest";
import { gammaQuantile, gammaTail } from "@/lib/random/gamma";
import { normalCdf, normalQuantile } from "@/lib/random/normal";
import { prepareDistribution, quantile, tailsAt, type Continuous } from "@/lib/random/distributions";
import { createWholeQuantile, wholeQuantile } from "@/lib/random/whole-quantile";

const expectClose = (value: number, reference: number, relative: number) =>
  expect(Math.abs(value - reference)).toBeLessThanOrEqual(relative * Math.abs(reference));

// Reference values: SciPy 1.17 (norm, gammaincinv, nbinom, poisson, weibull_min, triang), printed to 16 digits.
describe("normalQuantile", () => {
  it.each([
    [0.6, 0.2533471031357998],
    [0.9, 1.2815515655446004],
    [0.99, 2.326347874040841],
    [0.999, 3.0902323061678136],
    [1e-10, -6.361340902404056],
  ])("of %d", (p, z) => expectClose(normalQuantile(p), z, 1e-14));
});

describe("normalCdf", () => {
  it.each([
    [-8, 6.22096057427174e-16],
    [-20, 2.7536241186061556e-89],
    [1.5, 0.9331927987311419],
  ])("at %d", (z, p) => expectClose(normalCdf(z), p, 1e-13));
});

describe("gammaQuantile", () => {
  it.each([
    [16, 1e-6, 3.5234678390991543],
    [16, 0.5, 15.667929544317243],
    [16, 0.999, 31.243609528544237],
    [0.3, 0.01, 1.5022226552360407e-7],
    [0.3, 0.9, 0.8848107733602443],
    [2.25, 1e-4, 0.025483122167672796],
    [1000, 0.99, 1075.032832086435],
    [1e6, 0.01, 997675.1228599253],
    [5, 1 - 1e-9, 31.47272874252078],
  ])("of shape %d at %d", (shape, p, x) => expectClose(gammaQuantile(shape, p, 1 - p), x, 1e-7));

  it("is the inverse of the tails over shapes and probabilities", () => {
    for (const shape of [0.02, 0.5, 1, 3, 44, 900, 50_000]) {
      for (const p of [1e-9, 1e-3, 0.2, 0.5, 0.9, 0.9999]) {
        const x = gammaQuantile(shape, p, 1 - p);
        if (x > 1e-300) expectClose(gammaTail(shape, x, false), p, 1e-8);
      }
    }
  });
});

describe("quantile", () => {
  it("of Weibull, triangular and lognormal", () => {
    const at = (d: Continuous, p: number) => quantile(d, p, 1 - p);
    expectClose(at({ type: "weibull", shape: 1.7, scale: 12 }, 0.3), 6.543531361177273, 1e-12);
    expectClose(at({ type: "triangular", min: 0, mode: 0.4, max: 3.6 }, 0.05), 0.26832816, 1e-7);
    expectClose(at({ type: "triangular", min: 0, mode: 0.4, max: 3.6 }, 0.9), 2.52668737, 1e-8);
    expectClose(at({ type: "lognormal", mean: 2.4, sd: 2 }, 0.95), 6.087703629660083, 1e-12);
  });

  it("meets the tails of every distribution", () => {
    const all: Continuous[] = [
      { type: "normal", mean: 5, sd: 2 },
      { type: "lognormal", mean: 5, sd: 9 },
      { type: "gamma", mean: 360, sd: 55 },
      { type: "weibull", shape: 0.7, scale: 3 },
      { type: "exponential", mean: 4 },
      { type: "uniform", min: -1, max: 4 },
      { type: "triangular", min: 0, mode: 3, max: 3 },
    ];
    for (const d of all) {
      for (const p of [1e-6, 0.03, 0.5, 0.97, 1 - 1e-6]) {
        const [below, above] = tailsAt(d, quantile(d, p, 1 - p));
        expect(Math.abs(below - p)).toBeLessThan(1e-9);
        expect(Math.abs(above - (1 - p))).toBeLessThan(1e-9);
      }
    }
  });

  it("refuses parameters out of range", () => {
    expect(() => prepareDistribution({ type: "gamma", mean: 0, sd: 1 }, "x")).toThrow(RangeError);
    expect(() => prepareDistribution({ type: "negativeBinomial", mean: 9, sd: 3 }, "x")).toThrow(RangeError);
    expect(() => prepareDistribution({ type: "empirical", values: [] }, "x")).toThrow(RangeError);
  });
});

describe("wholeQuantile", () => {
  /** P(X <= k) as the table has it: the largest p at which k is still drawn. */
  const findCdf = (w: ReturnType<typeof createWholeQuantile>, k: number) => {
    let [low, high] = [0, 1];
    for (let i = 0; i < 50; i++) {
      const p = (low + high) / 2;
      if (wholeQuantile(w, p, 1 - p) <= k) low = p;
      else high = p;
    }
    return low;
  };

  it("has the distribution functions of the counts", () => {
    const negativeBinomial = createWholeQuantile({ type: "negativeBinomial", mean: 200, sd: 45 }, 0, 0);
    expectClose(findCdf(negativeBinomial, 100), 0.004248577791525737, 1e-9);
    expectClose(findCdf(negativeBinomial, 200), 0.5328616146835307, 1e-10);
    expectClose(findCdf(negativeBinomial, 320), 0.9908187870762669, 1e-10);
    const poisson = createWholeQuantile({ type: "poisson", mean: 7.5 }, 0, 0);
    expectClose(findCdf(poisson, 2), 0.020256715056664387, 1e-10);
    expectClose(findCdf(poisson, 7), 0.5246385264876054, 1e-10);
    expectClose(findCdf(createWholeQuantile({ type: "poisson", mean: 1000 }, 0, 0), 1010), 0.6318369541385921, 1e-9);
  });

  it("rounds a shifted gamma alike with and without a table, and not below its least value", () => {
    const gamma = { type: "gamma", mean: 1.2, sd: 0.8 } as const;
    for (const shift of [0, 3.3, 15]) {
      const tabled = createWholeQuantile(gamma, shift, 1);
      expect(tabled.table).not.toBeNull();
      for (let i = 0; i < 997; i++) {
        const p = (i + 0.5) / 997;
        const direct = Math.max(1, Math.floor(shift + quantile(gamma, p, 1 - p) + 0.5));
        expect(wholeQuantile(tabled, p, 1 - p)).toBe(direct);
      }
    }
  });
});
