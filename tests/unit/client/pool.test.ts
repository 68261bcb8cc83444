import { afterEach, describe, expect, it } from "vitest";
import { sizeBlock } from "@/lib/client/block-job";
import { createSimulationClient } from "@/lib/client/pool";
import type { SimulationClient } from "@/lib/client/simulation-client";
import example from "@/lib/line/example.json";
import type { Line } from "@/lib/line/types";
import { lowestLevels, simulate, type RunOptions, type RunResult } from "@/lib/simulation";
import { traceWeek } from "@/lib/simulation/trace";
import { withSize } from "@/lib/sizing/with-size";
import type { Answer } from "@/workers/simulation-api";
import { createFakeCrew, type FakeCrew } from "./fake-workers";

const line = example as unknown as Line;
const options: RunOptions = { seed: "1", replications: 24, weeks: 8, warmupWeeks: 2, targetFillRate: 0.95 };
const pause = (ms: number) => new Promise((resolve) => setTimeout(resolve, ms));
const never = () => new Promise<never>(() => undefined);

let open: SimulationClient[] = [];
afterEach(() => {
  open.forEach((client) => client.close());
  open = [];
});

function createClient(crew: FakeCrew, nWorkers = 2): SimulationClient {
  const client = createSimulationClient({ nWorkers, startWorker: crew.startWorker });
  open.push(client);
  return client;
}

describe("sizeBlock", () => {
  it("starts with one replication and then fills about 25 ms", () => {
    expect(sizeBlock(null, 200, 2)).toBe(1);
    expect(sizeBlock(5, 200, 2)).toBe(5);
    expect(sizeBlock(80, 200, 2)).toBe(1);
  });

  it("makes the last blocks smaller so that all workers finish together", () => {
    expect(sizeBlock(0.1, 200, 4)).toBe(25);
    expect(sizeBlock(0.1, 3, 4)).toBe(1);
  });
});

describe("createSimulationClient", () => {
  it.each([1, 2, 5])("gives the same bits as one uncut run with %i workers", async (nWorkers) => {
    const result = await createClient(createFakeCrew(), nWorkers).run(line, options);
    expect(result).toEqual(simulate(line, options));
  });

  it("gives the same bits when blocks finish out of order", async () => {
    const crew = createFakeCrew((api, nth) => ({
      ...api,
      async simulate(part: RunOptions) {
        if (nth === 0) await pause(30);
        return api.simulate(part);
      },
    }));
    expect(await createClient(crew, 3).run(line, options)).toEqual(simulate(line, options));
  });

  it.each([1, 3])("runs many lines whole, each as it would be alone, with %i workers", async (nWorkers) => {
    const lines = [600, 900, 1200, 1500, 1800].map((size) => withSize(line, "lam", size));
    const results = await createClient(createFakeCrew(), nWorkers).runMany(lines, options);
    expect(results).toEqual(lines.map((one) => simulate(one, options)));
    expect(await createClient(createFakeCrew()).runMany([], options)).toEqual([]);
  });

  it("keeps the order of many lines when they finish out of order", async () => {
    const crew = createFakeCrew((api, nth) => ({
      ...api,
      async simulate(part: RunOptions) {
        if (nth === 0) await pause(60);
        return api.simulate(part);
      },
    }));
    const lines = [600, 1800].map((size) => withSize(line, "lam", size));
    const results = await createClient(crew).runMany(lines, options);
    expect(results).toEqual(lines.map((one) => simulate(one, options)));
    expect(results[0]).not.toEqual(results[1]);
  });

  it("fails all of many lines where one cannot run, and ends them when cancelled", async () => {
    const broken = { ...line, nodes: line.nodes.filter(({ kind }) => kind !== "customer") };
    await expect(createClient(createFakeCrew()).runMany([line, broken, line], options)).rejects.toThrow();
    const abort = new AbortController();
    const running = createClient(createFakeCrew(() => ({ simulate: never }) as never)).runMany([line, line], options, {
      signal: abort.signal,
    });
    abort.abort();
    await expect(running).rejects.toThrow("cancelled");
  });

  it("runs the replications from firstReplication on", async () => {
    const later = { ...options, replications: 5, firstReplication: 7 };
    expect(await createClient(createFakeCrew()).run(line, later)).toEqual(simulate(line, later));
  });

  it("puts the lowest levels of all blocks in the order of the replications", async () => {
    const buffer = line.nodes.find(({ kind }) => kind === "buffer")!.id;
    const found = await createClient(createFakeCrew(), 3).lowestLevels(line, options, buffer);
    expect(found).toEqual(lowestLevels(line, options, buffer));
  });

  it("traces one week in one worker, and says what cannot be traced", async () => {
    const crew = createFakeCrew();
    const client = createClient(crew, 3);
    expect(await client.traceWeek(line, options, 7, 3)).toEqual(traceWeek(line, options, 7, 3));
    expect(crew.nStarted).toBe(1);
    await expect(client.traceWeek(line, options, 24, 3)).rejects.toThrow("replication must be");
  });

  it("tells progress with merged partial results, and less than ten times a second", async () => {
    let clock = 0;
    const told: { replications: number; total: number; partial: RunResult | null; at: number }[] = [];
    const client = createSimulationClient({
      nWorkers: 2,
      startWorker: createFakeCrew().startWorker,
      now: () => (clock += 15),
    });
    open.push(client);
    await client.run(
      line,
      { ...options, replications: 60 },
      {
        onProgress: (done) => told.push({ ...done, at: clock }),
      },
    );
    expect(told.length).toBeGreaterThan(1);
    expect(told.every(({ total }) => total === 60)).toBe(true);
    told.slice(1).forEach(({ at, replications }, i) => {
      expect(at - told[i].at).toBeGreaterThanOrEqual(100);
      expect(replications).toBeGreaterThan(told[i].replications);
    });
    const partial = told.findLast((done) => done.partial)?.partial;
    expect(partial?.options.replications).toBeLessThan(60);
    expect(partial?.summary.p10.value).toBeGreaterThan(0);
  });

  it("says nothing after a cancel, and runs the next line on the same workers", async () => {
    const crew = createFakeCrew();
    const client = createClient(crew);
    const abort = new AbortController();
    let isCancelled = false;
    let nLate = 0;
    const long = client.run(
      line,
      { ...options, replications: 2_000, weeks: 50 },
      {
        signal: abort.signal,
        onProgress: () => (isCancelled ? nLate++ : undefined),
      },
    );
    const ended = expect(long).rejects.toMatchObject({ name: "AbortError" });
    await pause(60);
    isCancelled = true;
    abort.abort();
    await ended;
    expect(await client.run(line, options)).toEqual(simulate(line, options));
    await pause(150);
    expect({ nLate, nStarted: crew.nStarted, nStopped: crew.nStopped }).toEqual({ nLate: 0, nStarted: 2, nStopped: 0 });
  });

  it("refuses a run that was cancelled before it began", async () => {
    const crew = createFakeCrew();
    await expect(createClient(crew).run(line, options, { signal: AbortSignal.abort() })).rejects.toMatchObject({
      name: "AbortError",
    });
    expect(crew.nStarted).toBe(0);
  });

  it("replaces a worker that does not come back a second after the cancel", async () => {
    let hangs = true;
    const crew = createFakeCrew((api) => ({
      ...api,
      simulate: (part: RunOptions) => (hangs ? never() : api.simulate(part)),
    }));
    const client = createClient(crew);
    const abort = new AbortController();
    const hung = expect(client.run(line, options, { signal: abort.signal })).rejects.toMatchObject({
      name: "AbortError",
    });
    await pause(20);
    abort.abort();
    await hung;
    hangs = false;
    expect(await client.run(line, options)).toEqual(simulate(line, options));
    expect({ nStarted: crew.nStarted, nStopped: crew.nStopped }).toEqual({ nStarted: 4, nStopped: 2 });
  });

  it("ends the run of a worker that breaks down, and starts another for the next", async () => {
    let isFirst = true;
    const crew = createFakeCrew((api) => ({
      ...api,
      simulate: (part: RunOptions) => (isFirst ? never() : api.simulate(part)),
    }));
    const client = createClient(crew, 1);
    const broken = expect(client.run(line, options)).rejects.toThrow(/worker of this page failed: out of memory/);
    await pause(20);
    isFirst = false;
    crew.breakDown("out of memory");
    await broken;
    expect(await client.run(line, options)).toEqual(simulate(line, options));
  });

  it("starts another worker for one that never takes its line, and gives up the second time", async () => {
    let nDead = 1;
    const crew = createFakeCrew((api, nth) => (nth < nDead ? { ...api, load: never } : api));
    const settings = { nWorkers: 1, startWorker: crew.startWorker, startLimitMs: 20 };
    const client = createSimulationClient(settings);
    open.push(client);
    expect(await client.run(line, options)).toEqual(simulate(line, options));
    expect([crew.nStarted, crew.nStopped]).toEqual([2, 1]);
    nDead = Infinity;
    const other = createSimulationClient(settings);
    open.push(other);
    await expect(other.run(line, options)).rejects.toThrow(/worker of this page failed: it did not start/);
    expect([crew.nStarted, crew.nStopped]).toEqual([4, 3]);
  });

  it("ends the run when a worker cannot be started at all", async () => {
    const client = createSimulationClient({
      nWorkers: 2,
      startWorker() {
        throw new Error("workers are blocked here");
      },
    });
    await expect(client.run(line, options)).rejects.toThrow(/workers are blocked here/);
  });

  it("ends the run when the program in a worker throws", async () => {
    const crew = createFakeCrew((api) => ({
      ...api,
      simulate() {
        throw new TypeError("cannot read it");
      },
    }));
    await expect(createClient(crew).run(line, options)).rejects.toThrow(/cannot read it/);
  });

  it("hands on what the core refuses as it is said there", async () => {
    const refuse = (): Answer<RunResult> => ({
      ok: false,
      code: "invalid",
      message: "an order would exceed 2^30 units",
    });
    const client = createClient(createFakeCrew((api) => ({ ...api, simulate: refuse })));
    await expect(client.run(line, options)).rejects.toMatchObject({
      code: "invalid",
      message: "an order would exceed 2^30 units",
    });
    await expect(client.run(line, { ...options, weeks: 0 })).rejects.toThrow(/weeks must be a whole number/);
  });

  it("lets a full run go before a live one", async () => {
    const order: string[] = [];
    const crew = createFakeCrew((api) => ({
      ...api,
      simulate(part: RunOptions) {
        order.push(part.seed);
        return api.simulate(part);
      },
    }));
    const client = createClient(crew, 1);
    const live = client.run(line, { ...options, seed: "live", replications: 4 }, { priority: "live" });
    const full = client.run(line, { ...options, seed: "full", replications: 4 });
    await Promise.all([live, full]);
    expect(order[0]).toBe("live");
    expect(order.lastIndexOf("full")).toBeLessThan(order.indexOf("live", 1));
  });

  it("rejects what is pending when it is closed, and can be used again", async () => {
    const client = createClient(createFakeCrew());
    const pending = expect(client.run(line, options)).rejects.toMatchObject({ name: "AbortError" });
    client.close();
    await pending;
    expect(await client.run(line, options)).toEqual(simulate(line, options));
  });
});
