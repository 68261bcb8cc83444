import { fireEvent, screen, waitFor, within } from "@testing-library/react";
import { expect, it } from "vitest";
import { ScenarioRows } from "@/components/compare/scenario-rows";
import { sayDifference, worstWeeks } from "@/components/compare/say-difference";
import { ShareActionsContext } from "@/components/share/share-actions";
import type { DraftLine, Line } from "@/lib/line/types";
import type { ReadingSummary, ScenarioDetail, ScenarioOptions } from "@/lib/schema/lines";
import type { Role } from "@/lib/schema/roles";
import { encodeResult, pairedDifferences, simulate } from "@/lib/simulation";
import { withSizes } from "@/lib/sizing/problem";
import { createRoutes, createScenario, exampleDocument, renderLine, serve, smallOptions } from "./line-harness";

const options: ScenarioOptions = { ...smallOptions, replications: 12, weeks: 10 };
const { acceptedRisk: _, ...how } = options;
const line = exampleDocument as unknown as Line;
const more = withSizes(line, { fg: 220, pcb: 6000 });

/** A scenario whose kept version has a run; `own` options differ from the others' where given. */
function kept(id: string, name: string, document: Line, own: ScenarioOptions | null = options): ScenarioDetail {
  const scenario = createScenario({ id, name, isBase: id === "s-base" });
  const reading = own && ({ resultId: `r-${id}`, acceptedRisk: own.acceptedRisk } as ReadingSummary);
  return {
    ...scenario,
    kept: { ...scenario.kept, document: document as unknown as DraftLine, options: own ?? options, reading },
  };
}

function open(scenarios: ScenarioDetail[], role: Role = "engineer") {
  const routes = createRoutes(role, scenarios);
  for (const { id, kept: version } of scenarios)
    if (version.reading) {
      const { acceptedRisk: _risk, ...run } = version.options;
      const bytes = encodeResult(simulate(version.document as unknown as Line, run));
      routes[`GET /api/results/r-${id}`] = () => new Response(bytes as Uint8Array<ArrayBuffer>);
    }
  serve(routes);
  const shares = {
    createShare: async () => ({ ok: true as const, value: { id: "x", url: "/s/x" } }),
    revokeShare: async () => ({ ok: true as const, value: null }),
  };
  renderLine({
    role,
    scenarios,
    children: (
      <ShareActionsContext value={shares}>
        <ScenarioRows />
      </ShareActionsContext>
    ),
  });
}

const rowOf = (name: string) => screen.getByRole("heading", { name: new RegExp(`^${name}`) }).closest("li")!;
const two = () => [kept("s-base", "As run today", line), kept("s-more", "More stock", more)];

it("holds a scenario against the base: the paired difference, its interval, and in words", async () => {
  open(two());
  const found = pairedDifferences(simulate(more, how), simulate(line, how), 0.1);
  const words = sayDifference("More stock", "As run today", found, 0.1, "EUR");
  await waitFor(() =>
    expect(within(rowOf("More stock")).getByText(words.replaceAll(/[\u202f\u00a0]/g, " "))).toBeTruthy(),
  );
  expect(words).toMatch(/ties up EUR\u00a0[\d\u202f]+ more/);
  const mark = within(rowOf("More stock")).getByRole("img", { name: /^More stock against As run today/ });
  expect(mark.getAttribute("aria-label")).toContain(`${(Math.abs(found.atRisk.value) * 100).toFixed(1)} points`);
  expect(within(rowOf("As run today")).getByText("what the others are held against")).toBeTruthy();
  expect(within(rowOf("More stock")).getByText(/^Drive units ready to ship: size 120 → 220/)).toBeTruthy();
  expect(screen.getByText(/End-of-line test: stopped/)).toBeTruthy();
});

it("turns the comparison round when another scenario is the one held against", async () => {
  open(two());
  await waitFor(() => expect(within(rowOf("More stock")).getByText(/^At the edge/)).toBeTruthy());
  fireEvent.click(screen.getByRole("combobox", { name: /^Held against/ }));
  fireEvent.click(await screen.findByRole("option", { name: /^More stock/ }));
  await waitFor(() => expect(within(rowOf("As run today")).getByText(/than More stock|from More stock/)).toBeTruthy());
  expect(within(rowOf("More stock")).getByText("what the others are held against")).toBeTruthy();
});

it("runs what has no run of these weeks, on this page, and then compares it", async () => {
  open([kept("s-base", "As run today", line), kept("s-more", "More stock", more, { ...options, seed: "other" })]);
  await waitFor(() => expect(screen.getByText(/^One scenario has no kept run of these weeks/)).toBeTruthy());
  fireEvent.click(screen.getByRole("button", { name: "Run on the same weeks" }));
  await waitFor(() => expect(within(rowOf("More stock")).getByText(/^At the edge/)).toBeTruthy());
  expect(within(rowOf("More stock")).getByText(/run on this page/)).toBeTruthy();
});

it("says which version has faults, and compares the others", async () => {
  const broken = { ...line, nodes: line.nodes.filter(({ kind }) => kind !== "customer") };
  open([...two(), kept("s-broken", "Half drawn", broken as Line, null)]);
  await waitFor(() => expect(within(rowOf("More stock")).getByText(/^At the edge/)).toBeTruthy());
  expect(within(rowOf("Half drawn")).getByText(/has faults and cannot run/)).toBeTruthy();
  expect(screen.queryByRole("button", { name: "Run on the same weeks" })).toBeNull();
});

it("compares the scenarios chosen, six at most", async () => {
  const many = ["B", "C", "D", "E", "F", "G"].map((name) => kept(`s-${name}`, `Plan ${name}`, line, null));
  open([...two(), ...many]);
  await waitFor(() => expect(screen.getAllByRole("listitem")).toHaveLength(6));
  const box = (name: string) => screen.getByRole<HTMLInputElement>("checkbox", { name });
  expect(box("Plan G").disabled).toBe(true);
  fireEvent.click(box("Plan B"));
  fireEvent.click(box("Plan G"));
  await waitFor(() => expect(screen.getByRole("heading", { name: "Plan G" })).toBeTruthy());
  expect(screen.queryByRole("heading", { name: "Plan B" })).toBeNull();
});

it("says why when the kept versions cannot be read, and offers a viewer no link", async () => {
  const scenarios = two();
  serve({ "GET /api/lines/l-1": createRoutes("viewer", scenarios)["GET /api/lines/l-1"] });
  renderLine({ role: "viewer", scenarios, children: <ScenarioRows /> });
  expect(await screen.findByText(/^The kept versions could not be read/)).toBeTruthy();
  expect(screen.queryByRole("button", { name: "Share side by side" })).toBeNull();
});

it("names the weeks that an accepted risk gives up", () => {
  expect([0.1, 0.05, 0.25, 0.025].map(worstWeeks)).toEqual([
    "the worst tenth of weeks",
    "the worst twentieth of weeks",
    "the worst quarter of weeks",
    "the worst 2.5\u202f% of weeks",
  ]);
});

it("does not tell two scenarios apart whose interval spans nothing", () => {
  const figure = (value: number, halfWidth: number) => ({ value, halfWidth });
  const found = {
    atRisk: figure(0.004, 0.006),
    mean: figure(0, 1),
    risk: figure(0, 1),
    moneyTiedUp: figure(-31_000, 200),
    costPerYear: figure(900, 4_000),
  };
  expect(sayDifference("B", "A", found, 0.1, "EUR")).toBe(
    "At the edge of the worst tenth of weeks these weeks do not tell B from A (\u22120.2 to +1.0 points); it ties up EUR\u00a031\u202f000 less and costs about as much a year.",
  );
  expect(sayDifference("B", "A", { ...found, atRisk: figure(-0.041, 0.005) }, 0.1, "EUR")).toMatch(
    /B ships 4\.1 points less than A, between 3\.6 and 4\.6;/,
  );
});
