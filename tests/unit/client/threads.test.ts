import path from "node:path";
import { Worker } from "node:worker_threads";
import { wrap } from "comlink";
import nodeEndpoint from "comlink/dist/umd/node-adapter.js";
import { build } from "vite";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { createSimulationClient } from "@/lib/client/pool";
import type { SimulationClient } from "@/lib/client/simulation-client";
import type { WorkerHandle } from "@/lib/client/worker-handle";
import example from "@/lib/line/example.json";
import type { Line } from "@/lib/line/types";
import { simulate, type RunOptions } from "@/lib/simulation";
import type { SimulationApi } from "@/workers/simulation-api";

const line = example as unknown as Line;
const options: RunOptions = { seed: "1", replications: 24, weeks: 8, warmupWeeks: 2, targetFillRate: 0.95 };

let program = "";
let client: SimulationClient;
const threads: Worker[] = [];

function startThread(): WorkerHandle {
  const thread = new Worker(program, { eval: true });
  threads.push(thread);
  return {
    api: wrap<SimulationApi>(nodeEndpoint(thread)),
    onFailure(report) {
      thread.removeAllListeners("error");
      thread.on("error", (error) => report(error.message));
    },
    stop: () => void thread.terminate(),
  };
}

beforeAll(async () => {
  const root = path.resolve(import.meta.dirname, "../../..");
  const output = await build({
    root,
    configFile: false,
    logLevel: "silent",
    resolve: { alias: { "@": root } },
    ssr: { noExternal: true },
    build: {
      ssr: path.join(import.meta.dirname, "node-worker.ts"),
      write: false,
      rollupOptions: { output: { format: "cjs" } },
    },
  });
  const [{ output: chunks }] = [output].flat() as { output: { type: string; code?: string }[] }[];
  program = chunks.find(({ type }) => type === "chunk")?.code ?? "";
  client = createSimulationClient({ nWorkers: 2, startWorker: startThread });
});
afterAll(() => client.close());

describe("createSimulationClient on threads", () => {
  it("gives the same bits as one uncut run", async () => {
    expect(await client.run(line, options)).toEqual(simulate(line, options));
    expect(threads).toHaveLength(2);
  });

  it("replaces threads that are caught in an endless loop", async () => {
    const abort = new AbortController();
    const hung = client.run(line, { ...options, seed: "hang" }, { signal: abort.signal });
    const ended = expect(hung).rejects.toMatchObject({ name: "AbortError" });
    setTimeout(() => abort.abort(), 100);
    await ended;
    expect(await client.run(line, options)).toEqual(simulate(line, options));
    expect(threads).toHaveLength(4);
  });
});
