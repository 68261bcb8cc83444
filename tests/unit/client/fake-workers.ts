import { expose, wrap } from "comlink";
import { createSimulationApi, type SimulationApi } from "@/workers/simulation-api";
import type { WorkerHandle } from "@/lib/client/worker-handle";

export type FakeCrew = {
  startWorker(): WorkerHandle;
  nStarted: number;
  nStopped: number;
  /** Breaks the newest worker as an uncaught error would. */
  breakDown(message: string): void;
};

/** Workers on the far side of a message channel: the same messages, copies and transfers, on one thread. */
export function createFakeCrew(alter: (api: SimulationApi, nth: number) => object = (api) => api): FakeCrew {
  let report: ((message: string) => void) | null = null;
  const crew: FakeCrew = {
    nStarted: 0,
    nStopped: 0,
    breakDown: (message) => report?.(message),
    startWorker() {
      const { port1, port2 } = new MessageChannel();
      expose(
        alter(
          createSimulationApi(() => performance.now()),
          crew.nStarted++,
        ),
        port1,
      );
      return {
        api: wrap<SimulationApi>(port2),
        onFailure: (tell) => (report = tell),
        stop() {
          crew.nStopped++;
          port1.close();
          port2.close();
        },
      };
    },
  };
  return crew;
}
