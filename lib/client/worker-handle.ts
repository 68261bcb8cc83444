import { releaseProxy, wrap, type Remote } from "comlink";
import type { SimulationApi } from "@/workers/simulation-api";

/** One running worker as the pool sees it; tests put others in its place. */
export type WorkerHandle = {
  api: Remote<SimulationApi>;
  /** Told once if the script does not load or the worker breaks down outside a call. */
  onFailure(report: (message: string) => void): void;
  stop(): void;
};

export function startBrowserWorker(): WorkerHandle {
  const worker = new Worker(new URL("../../workers/simulation.worker.ts", import.meta.url), {
    type: "module",
    name: "simulation",
  });
  const api = wrap<SimulationApi>(worker);
  return {
    api,
    onFailure(report) {
      worker.onerror = (event) => report(event.message || "its program could not be loaded");
      worker.onmessageerror = () => report("its answer could not be read");
    },
    stop() {
      api[releaseProxy]();
      worker.terminate();
    },
  };
}
