import { describe, expect, it } from "vitest";
import { nextInt32, nextUniform } from "@/lib/random/sfc32";
import { createSeedKey, createStreamKey, seedStream } from "@/lib/random/streams";

describe("nextInt32", () => {
  it("follows the published recurrence", () => {
    // From (1, 2, 3, counter 1) after 15 rounds; computed by an independent C rendering of sfc32 (PractRand, Doty-Humphrey).
    const states = Int32Array.of(1, 2, 3, 1);
    for (let i = 0; i < 15; i++) nextInt32(states, 0);
    const drawn = Array.from({ length: 6 }, () => nextInt32(states, 0) >>> 0);
    expect(drawn).toEqual([3987121759, 92551270, 1122162139, 24194941, 3548292025, 428635494]);
  });
});

describe("nextUniform", () => {
  it("stays inside (0, 1), with the mean and variance of a uniform", () => {
    const states = Int32Array.of(5, 6, 7, 1);
    const n = 200_000;
    let sum = 0;
    let squares = 0;
    for (let i = 0; i < n; i++) {
      const u = nextUniform(states, 0);
      expect(u > 0 && u < 1).toBe(true);
      sum += u;
      squares += u * u;
    }
    const standardError = Math.sqrt(1 / 12 / n);
    expect(Math.abs(sum / n - 0.5)).toBeLessThan(4 * standardError);
    expect(Math.abs(squares / n - 1 / 3)).toBeLessThan(4 * Math.sqrt(4 / 45 / n));
  });
});

describe("seedStream", () => {
  const first = (seed: string, node: string, purpose: "work" | "scrap", replication: number) => {
    const states = new Int32Array(4);
    seedStream(states, 0, createStreamKey(createSeedKey(seed), node, purpose), replication);
    return nextInt32(states, 0);
  };

  it("gives another stream for another seed, node, purpose or replication, and the same for the same", () => {
    const drawn = [
      first("1", "a", "work", 0),
      first("2", "a", "work", 0),
      first("1", "b", "work", 0),
      first("1", "a", "scrap", 0),
      first("1", "a", "work", 1),
    ];
    expect(new Set(drawn).size).toBe(drawn.length);
    expect(first("1", "a", "work", 0)).toBe(drawn[0]);
  });

  it("spreads the first draws of many nodes and replications evenly", () => {
    const counts = new Array<number>(16).fill(0);
    for (let node = 0; node < 40; node++) {
      for (let r = 0; r < 200; r++) counts[first("1", `n${node}`, "work", r) >>> 28]++;
    }
    const expected = (40 * 200) / 16;
    const chiSquare = counts.reduce((sum, count) => sum + (count - expected) ** 2 / expected, 0);
    // 99.99 % point of chi-square with 15 degrees of freedom: 44.3 (common tables).
    expect(chiSquare).toBeLessThan(44.3);
  });
});
