import { describe, expect, it } from "vitest";
import type { Line } from "@/lib/line/types";
import { simulate } from "@/lib/simulation";
import { type Checkpoint, type Evaluate, findSizes, type SearchProgress, type SizingProblem } from "@/lib/sizing";
import { withSize } from "@/lib/sizing/with-size";
import { baseStock, expect as mean, poissonLaw, sumLaw } from "@/tests/helpers/demand-law";
import {
  bernoulli,
  buffer,
  customer,
  endless,
  line,
  periodic,
  purchased,
  station,
  supplier,
} from "@/tests/helpers/small-lines";

const evaluate: Evaluate = (lines, options) => Promise.resolve(lines.map((one) => simulate(one, options)));

/** A customer who draws on a purchased buffer: Poisson 4 a period, lead 2, looked at every period. */
const store = line(
  [supplier("s", 2), purchased("store", 20), customer("c", { type: "poisson", mean: 4 })],
  [
    ["s", "store"],
    ["store", "c"],
  ],
  { calendar: periodic },
);
const storeProblem: SizingProblem = {
  line: store,
  buffers: [{ id: "store", min: 4, max: 40, step: 1 }],
  targetFillRate: 1,
  acceptedRisks: [0.1],
  objective: "moneyTiedUp",
  seed: "store",
  replications: 40,
  weeks: 500,
  warmupWeeks: 20,
};

/** Exact share of periods with demand that do not ship it in full. */
function exactRisk(size: number): number {
  const law = poissonLaw(4);
  // A period without demand has nothing to ship; what the two before it need is all that counts then.
  const idle = law[0] * mean(sumLaw(law, 2), (units) => (units <= size ? 1 : 0));
  return 1 - (baseStock(law, size, 2, 1).inFull - idle) / (1 - law[0]);
}

describe("one purchased buffer", () => {
  it("finds the exact base-stock level for each accepted risk", async () => {
    const least = (risk: number) =>
      Array.from({ length: 41 }, (_, size) => size).find((size) => exactRisk(size) <= risk)!;
    // Half way between the risks of two sizes, so that no noise of 20 000 weeks decides.
    const acceptedRisks = [11, 15, 19].map((size) => (exactRisk(size) + exactRisk(size - 1)) / 2);
    const { frontier } = await findSizes({ ...storeProblem, acceptedRisks }, evaluate);
    expect(frontier.map(({ sizes }) => sizes.store)).toEqual([11, 15, 19]);
    expect(acceptedRisks.map(least)).toEqual([11, 15, 19]);
    for (const { acceptedRisk, confirmed, reached } of frontier) {
      expect(confirmed.options.seed).toBe("store/unseen");
      expect(reached).toBe(confirmed.summary.risk.value <= acceptedRisk);
      expect(reached).toBe(true);
    }
  });

  it("says what it cannot reach, and comes as near as stock can", async () => {
    const late = {
      ...store,
      nodes: store.nodes.map((node) =>
        node.kind === "supplier" ? { ...node, disruption: { meanDaysBetween: 40, meanDaysLasting: 30 } } : node,
      ),
    };
    const { frontier } = await findSizes({ ...storeProblem, line: late, acceptedRisks: [0.01] }, evaluate);
    const [point] = frontier;
    expect(point.reached).toBe(false);
    const largest = simulate(withSize(late, "store", 40), point.searched.options).summary.risk.value;
    expect(point.searched.summary.risk.value).toBeLessThanOrEqual(largest);
  });
});

/** Four Bernoulli stations in a row, 0.9 each, with a demand that the line just meets. */
const serial: Line = line(
  [
    supplier("s", 1),
    { ...purchased("in", endless), unitValue: 0 },
    ...[1, 2, 3, 4].map((i) => station(`m${i}`, bernoulli(0.9))),
    ...[1, 2, 3].map((i) => buffer(`b${i}`, 2)),
    { ...buffer("out", 30), unitValue: 0 },
    customer("c", { type: "fixed", value: 138 }, { callOff: "daily", unmet: "lost" }),
  ],
  [
    ["s", "in"],
    ["in", "m1"],
    ["m1", "b1"],
    ["b1", "m2"],
    ["m2", "b2"],
    ["b2", "m3"],
    ["m3", "b3"],
    ["b3", "m4"],
    ["m4", "out"],
    ["out", "c"],
  ],
);
const serialProblem: SizingProblem = {
  line: serial,
  buffers: ["b1", "b2", "b3"].map((id) => ({ id, min: 1, max: 5, step: 1 })),
  targetFillRate: 0.98,
  acceptedRisks: [0.3, 0.12],
  objective: "moneyTiedUp",
  seed: "serial",
  replications: 20,
  weeks: 40,
  warmupWeeks: 2,
};

describe("a small serial line", () => {
  it("finds the cheapest of all 125 sets, as enumerated over the same weeks", async () => {
    const { replications, weeks, warmupWeeks, targetFillRate, seed } = serialProblem;
    const options = { replications, weeks, warmupWeeks, targetFillRate, seed };
    const all: { sizes: number[]; money: number; risk: number }[] = [];
    for (const a of [1, 2, 3, 4, 5])
      for (const b of [1, 2, 3, 4, 5])
        for (const c of [1, 2, 3, 4, 5]) {
          const sized = withSize(withSize(withSize(serial, "b1", a), "b2", b), "b3", c);
          const { moneyTiedUp, risk } = simulate(sized, options).summary;
          all.push({ sizes: [a, b, c], money: moneyTiedUp.value, risk: risk.value });
        }
    const { frontier, evaluations } = await findSizes(serialProblem, evaluate);
    for (const { acceptedRisk, searched } of frontier) {
      const sound = all.filter(({ risk }) => risk <= Math.max(acceptedRisk, searched.summary.risk.value));
      const cheapest = Math.min(...sound.map(({ money }) => money));
      expect(searched.summary.moneyTiedUp.value).toBe(cheapest);
    }
    expect(evaluations).toBeLessThan(2 * all.length);
  });

  it("asks less the more risk is accepted", async () => {
    const { frontier } = await findSizes(serialProblem, evaluate);
    const [loose, strict] = frontier.map(({ searched }) => searched.summary.moneyTiedUp.value);
    expect(loose).toBeLessThan(strict);
    expect(frontier.map(({ acceptedRisk }) => acceptedRisk)).toEqual(serialProblem.acceptedRisks);
  });

  it("finds sizes at which a year costs less where that is asked for", async () => {
    const priced = { ...serial, money: { currency: "EUR", carryingRate: 2 } };
    const problem = { ...serialProblem, line: priced, acceptedRisks: [0.9], objective: "costPerYear" as const };
    const [{ searched }] = (await findSizes(problem, evaluate)).frontier;
    const { options } = searched;
    const largest = ["b1", "b2", "b3"].reduce((sized, id) => withSize(sized, id, 5), priced);
    expect(searched.summary.costPerYear.total.value).toBeLessThan(
      simulate(largest, options).summary.costPerYear.total.value,
    );
  });
});

describe("going on, ending and refusing", () => {
  it("gives the same answer each time, and after being resumed runs only what is left", async () => {
    const whole = await findSizes(serialProblem, evaluate);
    let half: Checkpoint | undefined;
    const abort = new AbortController();
    const stopped = findSizes(
      serialProblem,
      evaluate,
      ({ evaluations, checkpoint }) => {
        half = JSON.parse(JSON.stringify(checkpoint)) as Checkpoint;
        if (evaluations > whole.evaluations / 2) abort.abort(new Error("enough"));
      },
      { signal: abort.signal },
    );
    await expect(stopped).rejects.toThrow("enough");
    const resumed = await findSizes(serialProblem, evaluate, undefined, { resume: half });
    expect(resumed.frontier.map(({ sizes }) => sizes)).toEqual(whole.frontier.map(({ sizes }) => sizes));
    expect(resumed.frontier.map(({ confirmed }) => confirmed)).toEqual(
      whole.frontier.map(({ confirmed }) => confirmed),
    );
    expect(resumed.evaluations).toBeLessThan(whole.evaluations * 0.6);
  });

  it("reports a set that can be used as soon as there is one, and ever better ones", async () => {
    const seen: SearchProgress[] = [];
    await findSizes({ ...serialProblem, acceptedRisks: [0.12] }, evaluate, (progress) => seen.push(progress));
    expect(seen.map(({ evaluations }) => evaluations)).toEqual(
      [...seen.map(({ evaluations }) => evaluations)].sort((a, b) => a - b),
    );
    const values = seen.flatMap(({ best }) => (best ? [best.value] : []));
    expect(values.length).toBeGreaterThan(seen.length / 2);
    expect(values).toEqual([...values].sort((a, b) => b - a));
    for (const { best } of seen) if (best) expect(best.risk).toBeLessThanOrEqual(0.12);
  });

  it("runs nothing after it is ended", async () => {
    let n = 0;
    const abort = new AbortController();
    const counted: Evaluate = (lines, options) => {
      n++;
      abort.abort();
      return evaluate(lines, options);
    };
    await expect(findSizes(serialProblem, counted, undefined, { signal: abort.signal })).rejects.toThrow();
    expect(n).toBe(1);
  });

  it("passes on what an evaluation fails with", async () => {
    await expect(findSizes(serialProblem, () => Promise.reject(new Error("a worker stopped")))).rejects.toThrow(
      "a worker stopped",
    );
  });

  it.each<[string, Partial<SizingProblem>]>([
    ["no buffers", { buffers: [] }],
    ["an unknown buffer", { buffers: [{ id: "ghost", min: 1, max: 2, step: 1 }] }],
    ["a buffer twice", { buffers: [serialProblem.buffers[0], serialProblem.buffers[0]] }],
    ["a range turned round", { buffers: [{ id: "b1", min: 5, max: 2, step: 1 }] }],
    ["a step of none", { buffers: [{ id: "b1", min: 1, max: 2, step: 0 }] }],
    ["sizes that are not whole", { buffers: [{ id: "b1", min: 1.5, max: 2, step: 1 }] }],
    ["no risk", { acceptedRisks: [] }],
    ["a risk of all weeks", { acceptedRisks: [1] }],
    ["a target of nothing", { targetFillRate: 0 }],
  ])("refuses %s", async (_, change) => {
    await expect(findSizes({ ...serialProblem, ...change }, evaluate)).rejects.toThrow(RangeError);
  });

  it("refuses a checkpoint of another problem", async () => {
    let checkpoint: Checkpoint | undefined;
    await findSizes(storeProblem, evaluate, (progress) => (checkpoint = progress.checkpoint));
    await expect(findSizes(serialProblem, evaluate, undefined, { resume: checkpoint })).rejects.toThrow(RangeError);
  });
});
