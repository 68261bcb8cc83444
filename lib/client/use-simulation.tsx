"use client";

import { createContext, use, useEffect, useState, type ReactNode } from "react";
import { createSimulationClient } from "./pool";
import type { SimulationClient } from "./simulation-client";

const SimulationContext = createContext<SimulationClient | null>(null);

/** Owns the page's one simulation client; its workers end with it. */
export function SimulationProvider({ client, children }: { client?: SimulationClient; children: ReactNode }) {
  const [own] = useState(() => client ?? createLazyClient());
  useEffect(() => () => own.close(), [own]);
  return <SimulationContext value={own}>{children}</SimulationContext>;
}

export function useSimulation(): SimulationClient {
  const client = use(SimulationContext);
  if (!client) throw new Error("useSimulation outside SimulationProvider");
  return client;
}

/** Puts off counting the cores to the first use, since the server renders this too. */
function createLazyClient(): SimulationClient {
  let client: SimulationClient | null = null;
  const get = (): SimulationClient => (client ??= createSimulationClient());
  return {
    get nWorkers() {
      return get().nWorkers;
    },
    run: (...args) => get().run(...args),
    runMany: (...args) => get().runMany(...args),
    stockNeeds: (...args) => get().stockNeeds(...args),
    lowestLevels: (...args) => get().lowestLevels(...args),
    traceWeek: (...args) => get().traceWeek(...args),
    close: () => client?.close(),
  };
}
