import { act, fireEvent, screen, waitFor, within } from "@testing-library/react";
import userEvent from "@testing-library/user-event";
import { expect, it } from "vitest";
import { ReadingsView } from "@/components/readings/readings-view";
import type { RunHooks, SimulationClient } from "@/lib/client/simulation-client";
import { setField } from "@/lib/line/edits";
import type { Line } from "@/lib/line/types";
import type { Role } from "@/lib/schema/roles";
import { encodeResult, lowestLevels, percentile, simulate } from "@/lib/simulation";
import {
  createClient,
  createDraft,
  createRoutes,
  createScenario,
  exampleDocument,
  renderLine,
  type Route,
  serve,
  smallOptions,
} from "./line-harness";
import { createProbe } from "./line-probe";

const { probe, Probe } = createProbe();
const options = { ...smallOptions, replications: 40, weeks: 10 };

type Settings = { role?: Role; client?: SimulationClient; scenario?: ReturnType<typeof createScenario> };

function open({ role = "engineer", client, scenario }: Settings = {}, routes: Record<string, Route> = {}) {
  const shown = scenario ?? createScenario({ draft: createDraft({ options }) });
  serve({ ...createRoutes(role, [shown]), ...routes });
  renderLine({
    role,
    client,
    scenarios: [shown],
    children: (
      <>
        <Probe />
        <ReadingsView />
      </>
    ),
  });
}

async function run() {
  act(() => probe.line.runFull());
  await waitFor(() => expect(probe.line.full?.isCurrent).toBe(true));
  return probe.line.full!.result;
}

it("offers a run where there is none, and not on a faulty line", () => {
  open();
  expect(screen.getByText("Not run yet")).toBeTruthy();
  act(() => probe.line.apply(setField("wind", "cycleMinutes", 0)));
  expect(screen.getByText("This line cannot run yet")).toBeTruthy();
  expect(screen.queryByRole("button", { name: "Run all weeks" })).toBeNull();
});

it("shows percentiles with half-widths, the mean last", async () => {
  open();
  fireEvent.click(screen.getByRole("button", { name: "Run all weeks" }));
  await waitFor(() => expect(probe.line.full?.isCurrent).toBe(true));
  const { result } = probe.line.full!;
  const table = screen.getByText("Percentiles").parentElement!;
  for (const [name, share] of [
    ["P1", 0.01],
    ["P10", 0.1],
    ["P50", 0.5],
  ] as const) {
    const row = within(table).getByRole("rowheader", { name }).closest("tr")!;
    const { value, halfWidth } = percentile(result, share);
    const [, fillRate, halfWidthText] = [...row.querySelectorAll("td")].map(({ textContent }) => textContent);
    expect(Math.abs(Number.parseFloat(fillRate!) - value * 100)).toBeLessThan(0.5001);
    expect(Number.parseFloat(halfWidthText!)).toBeCloseTo(halfWidth! * 100, 1);
  }
  const rows = within(table).getAllByRole("row");
  expect(rows[rows.length - 1].textContent).toContain("Mean");
});

it("reads everything at another accepted risk without running again", async () => {
  open();
  const result = await run();
  act(() => probe.line.setOptions({ acceptedRisk: 0.25 }));
  expect(probe.line.full?.result).toBe(result);
  const customers = screen.getByText("Customers").closest("section")!;
  expect(within(customers).getByRole("columnheader", { name: "P25" })).toBeTruthy();
  expect(customers.textContent).toContain((percentile(result, 0.25, "cus-b").value * 100).toFixed(1).split(".")[0]);
  expect(screen.getByRole("img", { name: /^Distribution of weekly fill rates: P25 at / })).toBeTruthy();
});

it("keeps the old figures in sight after an edit and says that they are old", async () => {
  open();
  await run();
  act(() => probe.line.apply(setField("stator", "size", 100)));
  expect(screen.getByText(/These are the figures from before/)).toBeTruthy();
  fireEvent.click(screen.getByRole("button", { name: "Run again" }));
  await waitFor(() => expect(screen.queryByText(/These are the figures from before/)).toBeNull());
});

it("lists root causes, hours of stations and deliveries by their names", async () => {
  open();
  const result = await run();
  const nameOf = (id: string) => exampleDocument.nodes.find((node) => node.id === id)!.name;
  expect(result.causes.length).toBeGreaterThan(0);
  expect(screen.getAllByText(new RegExp(nameOf(result.causes[0].node))).length).toBeGreaterThan(0);
  const stations = screen.getByText(/Where the stations’ hours go/).closest("section")!;
  const row = within(stations)
    .getByRole("rowheader", { name: nameOf("final") })
    .closest("tr")!;
  const hours = [...row.querySelectorAll("td")].slice(1).map(({ textContent }) => Number(textContent));
  expect(hours.reduce((a, b) => a + b)).toBeCloseTo(80, 0);
  const deliveries = screen.getByText("Deliveries as simulated").closest("section")!;
  expect(within(deliveries).getAllByRole("row")).toHaveLength(1 + Object.keys(result.suppliers).length);
});

it("draws the lowest stock when asked for, cancels, and says what failed", async () => {
  const { client } = createClient();
  let answer: (line: Line, hooks: RunHooks) => ReturnType<SimulationClient["lowestLevels"]>;
  const levels: SimulationClient["lowestLevels"] = (line, _, __, hooks = {}) => answer(line, hooks);
  open({ client: { ...client, lowestLevels: levels } });
  const result = await run();
  answer = (_, { signal }) =>
    new Promise((__, reject) => signal?.addEventListener("abort", () => reject(new DOMException("x", "AbortError"))));
  const draw = /^Draw /;
  fireEvent.click(screen.getByRole("button", { name: draw }));
  fireEvent.click(await screen.findByRole("button", { name: "Cancel" }));
  answer = () => Promise.reject(new Error("a worker stopped"));
  fireEvent.click(await screen.findByRole("button", { name: draw }));
  expect(await screen.findByText("The stock could not be worked out: a worker stopped")).toBeTruthy();
  const first = exampleDocument.nodes.find(({ kind }) => kind === "buffer")!;
  answer = async (line) => lowestLevels(line, result.options, first.id);
  fireEvent.click(screen.getByRole("button", { name: draw }));
  expect(await screen.findByRole("img", { name: new RegExp(`^Lowest weekly stock of ${first.name}`) })).toBeTruthy();
});

it("runs a kept version again and compares to the last bit", async () => {
  const kept = createScenario();
  const { acceptedRisk, ...runOptions } = smallOptions;
  const stored = simulate(exampleDocument as unknown as Line, runOptions);
  const reading = { resultId: "r-9", acceptedRisk } as NonNullable<typeof kept.kept.reading>;
  const scenario = { ...kept, kept: { ...kept.kept, reading } };
  const bytes = encodeResult(stored);
  const damaged = encodeResult({ ...stored, fillRates: stored.fillRates.map((rate, i) => (i === 2 ? 0.123 : rate)) });
  let sent = bytes;
  open({ scenario }, { "GET /api/results/r-9": () => new Response(sent.slice().buffer as ArrayBuffer) });
  await run();
  const user = userEvent.setup();
  await user.click(screen.getByRole("button", { name: "Run version 1 again" }));
  expect(await screen.findByText(/^Same figures to the last bit, in all 12 weeks/)).toBeTruthy();
  sent = damaged;
  await user.click(screen.getByRole("button", { name: "Run version 1 again" }));
  expect(await screen.findByText(/^Not the same: /)).toBeTruthy();
});

it("warns of too few runs and offers more weeks to whoever may set them", async () => {
  open({ scenario: createScenario() });
  await run();
  fireEvent.click(screen.getByRole("button", { name: "Set 48 weeks" }));
  expect(probe.line.options.replications).toBe(16);
});

it("offers a viewer no setting", async () => {
  open({ role: "viewer", scenario: createScenario() });
  await run();
  expect(screen.queryByRole("button", { name: /^Set / })).toBeNull();
});
