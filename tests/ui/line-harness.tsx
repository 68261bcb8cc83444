import { render } from "@testing-library/react";
import type { ReactNode } from "react";
import { SWRConfig } from "swr";
import { vi } from "vitest";
import type { LineActions } from "@/lib/client/line-actions";
import { LineProvider } from "@/lib/client/line-provider";
import type { RunHooks, SimulationClient } from "@/lib/client/simulation-client";
import { SimulationProvider } from "@/lib/client/use-simulation";
import type { Edit } from "@/lib/line/edits";
import example from "@/lib/line/example.json";
import type { DraftLine, Line } from "@/lib/line/types";
import {
  defaultOptions,
  type Draft,
  type LineDetail,
  type ScenarioDetail,
  type ScenarioOptions,
  type VersionDetail,
} from "@/lib/schema/lines";
import type { Role } from "@/lib/schema/roles";
import { simulate, stockNeeds, type RunOptions, type RunResult } from "@/lib/simulation";

const at = "2026-11-24T14:02:00Z";
const by = "Ines Kallweit";

/** Four replications of three weeks: quick enough to run for real. */
export const smallOptions: ScenarioOptions = { ...defaultOptions, replications: 4, weeks: 3, warmupWeeks: 1 };
export const exampleDocument = example as unknown as DraftLine;

export function createDraft(changed: Partial<Draft> = {}): Draft {
  return {
    revision: 1,
    document: exampleDocument,
    layout: { positions: {} },
    notes: [],
    options: smallOptions,
    updatedAt: at,
    updatedBy: by,
    ...changed,
  };
}

export function createScenario(changed: Partial<ScenarioDetail> = {}): ScenarioDetail {
  const draft = changed.draft ?? createDraft();
  const id = changed.id ?? "s-base";
  const summary = { id: `${id}-v1`, scenarioId: id, number: 1, createdAt: at, createdBy: by, reading: null };
  const { document, layout, notes, options } = createDraft();
  const kept: VersionDetail = { ...summary, document, layout, notes, options, digest: null };
  return {
    id,
    lineId: "l-1",
    name: "As run today",
    isBase: id === "s-base",
    draft,
    kept,
    versions: [summary],
    draftReading: null,
    ...changed,
  };
}

export function createDetail(role: Role, scenarios: ScenarioDetail[]): LineDetail {
  return {
    id: "l-1",
    name: "Drive unit line",
    workspaceId: "w-1",
    workspaceName: "Larkfield Drives",
    userName: by,
    role,
    scenarios: scenarios.map(({ id, name, isBase }) => ({
      id,
      name,
      isBase,
      nVersions: 1,
      updatedAt: at,
      updatedBy: by,
      reading: null,
    })),
  };
}

type Pending = { options: RunOptions; hooks: RunHooks; finish(): void; fail(error: Error): void };

/** Runs on this thread; with `isHeld`, a run waits until the test lets it finish. */
export function createClient(isHeld: (hooks: RunHooks) => boolean = () => false) {
  const pending: Pending[] = [];
  const run = (line: Line, options: RunOptions, hooks: RunHooks = {}) =>
    new Promise<RunResult>((resolve, reject) => {
      const finish = (): void => resolve(simulate(line, options));
      hooks.signal?.addEventListener("abort", () => reject(new DOMException("cancelled", "AbortError")));
      if (isHeld(hooks)) pending.push({ options, hooks, finish, fail: reject });
      else finish();
    });
  const client: SimulationClient = {
    nWorkers: 1,
    run,
    runMany: (lines, options, hooks) => Promise.all(lines.map((line) => run(line, options, hooks))),
    stockNeeds: async (line, options) => stockNeeds(line, options),
    lowestLevels: () => Promise.reject(new Error("not asked for here")),
    traceWeek: () => Promise.reject(new Error("not asked for here")),
    close: () => undefined,
  };
  return { client, pending };
}

export const rename = (name: string): Edit => ({
  label: `Rename to ${name}`,
  apply: (state) => ({ ...state, document: { ...state.document, name } }),
});

export type Route = (init: RequestInit | undefined) => Response | Promise<Response>;

/** A server of the given routes, "PUT /api/scenarios/s-base/draft"; anything else is not found. */
export function serve(routes: Record<string, Route>) {
  const asked: { route: string; init: RequestInit | undefined }[] = [];
  vi.stubGlobal("fetch", async (url: string, init?: RequestInit) => {
    const route = `${init?.method ?? "GET"} ${url}`;
    asked.push({ route, init });
    const answer = routes[route];
    return answer
      ? answer(init)
      : Response.json({ code: "not-found", message: `${route} is not here` }, { status: 404 });
  });
  return asked;
}

/** Routes of a server that keeps the scenarios given and accepts every save. */
export function createRoutes(role: Role, scenarios: ScenarioDetail[]): Record<string, Route> {
  const routes: Record<string, Route> = { "GET /api/lines/l-1": () => Response.json(createDetail(role, scenarios)) };
  for (const scenario of scenarios) {
    let { revision } = scenario.draft;
    routes[`GET /api/scenarios/${scenario.id}`] = () => Response.json(scenario);
    routes[`PUT /api/scenarios/${scenario.id}/draft`] = () =>
      Response.json({ revision: ++revision, updatedAt: at, updatedBy: by });
    routes[`POST /api/scenarios/${scenario.id}/results`] = () => Response.json({ resultId: "r-1" });
  }
  return routes;
}

export function createActions(): { [K in keyof LineActions]: ReturnType<typeof vi.fn<LineActions[K]>> } {
  return {
    keepVersion: vi.fn(async () => ({ ok: true as const, value: null })),
    saveAsScenario: vi.fn(async () => ({ ok: true as const, value: { id: "s-new" } })),
    renameScenario: vi.fn(async () => ({ ok: true as const, value: null })),
    deleteScenario: vi.fn(async () => ({ ok: true as const, value: null })),
    markBase: vi.fn(async () => ({ ok: true as const, value: null })),
  };
}

type Settings = {
  role?: Role;
  scenarios?: ScenarioDetail[];
  client?: SimulationClient;
  actions?: LineActions;
  children: ReactNode;
};

/** Renders inside the provider of the drive unit line, with an empty cache. */
export function renderLine({ role = "engineer", scenarios, client, actions, children }: Settings) {
  const all = scenarios ?? [createScenario()];
  const cache = new Map();
  const own = client ?? createClient().client;
  const acts = actions ?? createActions();
  const again = () => (
    <SWRConfig value={{ provider: () => cache, dedupingInterval: 0, errorRetryCount: 0 }}>
      <SimulationProvider client={own}>
        <LineProvider
          detail={createDetail(role, all)}
          initial={all[0]}
          actions={acts}
          whileAway={({ error }) => <p>{error ? error.message : "Reading"}</p>}
        >
          {children}
        </LineProvider>
      </SimulationProvider>
    </SWRConfig>
  );
  return { ...render(again()), again };
}
