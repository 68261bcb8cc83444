import { describe, expect, it } from "vitest";
import { nextBinomial } from "@/lib/random/binomial";
import { lnFailure, nextGap, nextLognormalTicks } from "@/lib/random/gaps";
import { fillWork, getWorkTable } from "@/lib/random/work-table";

const n = 100_000;
const assertWithin = (value: number, expected: number, tolerance: number) =>
  expect(Math.abs(value - expected)).toBeLessThan(tolerance);

function moments(draw: () => number): { mean: number; variance: number } {
  let sum = 0;
  let squares = 0;
  for (let i = 0; i < n; i++) {
    const x = draw();
    sum += x;
    squares += x * x;
  }
  return { mean: sum / n, variance: squares / n - (sum / n) ** 2 };
}

describe("nextGap", () => {
  it("is geometric from 1", () => {
    const states = Int32Array.of(11, 12, 13, 1);
    const { mean, variance } = moments(() => nextGap(states, 0, lnFailure(0.03)));
    assertWithin(mean, 1 / 0.03, 4 * Math.sqrt(0.97 / 0.0009 / n));
    // Fourth central moment of a geometric, about 9 variances squared.
    assertWithin(variance, 0.97 / 0.0009, 4 * (0.97 / 0.0009) * Math.sqrt(8.1 / n));
    expect(nextGap(states, 0, lnFailure(1))).toBe(1);
  });
});

describe("nextLognormalTicks", () => {
  it("has the mean and cv asked for, beyond the rounding", () => {
    const states = Int32Array.of(21, 22, 23, 1);
    const { mean, variance } = moments(() => nextLognormalTicks(states, 0, 400, 0.8));
    assertWithin(mean, 400, 4 * 400 * 0.8 * Math.sqrt(1 / n));
    assertWithin(Math.sqrt(variance) / 400, 0.8, 0.03);
  });
});

describe("nextBinomial", () => {
  it.each([
    [20, 0.3],
    [1000, 0.004],
    [500, 0.5],
    [100_000, 0.02],
  ])("of %d at %d has a binomial's mean and variance", (trials, p) => {
    const states = Int32Array.of(31, 32, 33, 1);
    const { mean, variance } = moments(() => nextBinomial(states, 0, trials, p));
    const expected = trials * p * (1 - p);
    assertWithin(mean, trials * p, 4 * Math.sqrt(expected / n));
    assertWithin(variance, expected, 4 * expected * Math.sqrt((2 + 1 / expected) / n));
  });
});

describe("fillWork", () => {
  it.each([0.1, 0.3, 1])("of cv %d has a gamma's mean, sd and skewness 2 cv", (cv) => {
    const states = Int32Array.of(41, 42, 43, 1);
    const out = new Float64Array(400_000);
    fillWork(getWorkTable(cv), states, 0, 1, 0, out.length, out);
    const mean = out.reduce((sum, x) => sum + x, 0) / out.length;
    const central = (k: number) => out.reduce((sum, x) => sum + (x - mean) ** k, 0) / out.length;
    const sd = Math.sqrt(central(2));
    assertWithin(mean, 1, (4 * cv) / Math.sqrt(out.length) + 5e-5);
    assertWithin(sd / cv, 1, 4 * Math.sqrt((2 + 6 * cv * cv) / 4 / out.length) + 3e-4);
    assertWithin(central(3) / sd ** 3 / (2 * cv), 1, 0.2);
  });
});
