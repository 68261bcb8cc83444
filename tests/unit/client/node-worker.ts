import { parentPort } from "node:worker_threads";
import { expose } from "comlink";
import nodeEndpoint from "comlink/dist/umd/node-adapter.js";
import { createSimulationApi } from "@/workers/simulation-api";

/** The worker's program for threads of Node; a seed phrase "hang" never returns. */
const api = createSimulationApi(() => performance.now());
const simulate: typeof api.simulate = (options) => {
  while (options.seed === "hang") continue;
  return api.simulate(options);
};
if (!parentPort) throw new Error("this program runs in a worker thread");
expose({ ...api, simulate }, nodeEndpoint(parentPort));
