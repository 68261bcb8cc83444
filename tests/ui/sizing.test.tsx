import { fireEvent, screen, waitFor, within } from "@testing-library/react";
import { expect, it } from "vitest";
import { SizingProvider } from "@/components/sizing/sizing-store";
import { SizingView } from "@/components/sizing/sizing-view";
import type { SimulationClient } from "@/lib/client/simulation-client";
import type { DraftLine, Line } from "@/lib/line/types";
import type { Role } from "@/lib/schema/roles";
import { simulate } from "@/lib/simulation";
import { customer, line, periodic, purchased, supplier } from "@/tests/helpers/small-lines";
import {
  createActions,
  createClient,
  createDraft,
  createRoutes,
  createScenario,
  renderLine,
  serve,
  smallOptions,
} from "./line-harness";

/** A customer who draws on a purchased buffer, small enough to be searched for real. */
const store: Line = {
  ...line(
    [supplier("s", 2), { ...purchased("store", 20), name: "Shaft store" }, customer("c", { type: "poisson", mean: 4 })],
    [
      ["s", "store"],
      ["store", "c"],
    ],
    { calendar: periodic },
  ),
  name: "Shafts",
};
const options = { ...smallOptions, replications: 20, weeks: 60, warmupWeeks: 10, targetFillRate: 1, acceptedRisk: 0.1 };

type Settings = { role?: Role; client?: SimulationClient; document?: Line };

function open({ role = "engineer", client, document = store }: Settings = {}) {
  const scenario = createScenario({ draft: createDraft({ document: document as unknown as DraftLine, options }) });
  const actions = createActions();
  serve(createRoutes(role, [scenario]));
  renderLine({
    role,
    client,
    actions,
    scenarios: [scenario],
    children: (
      <SizingProvider>
        <SizingView />
      </SizingProvider>
    ),
  });
  return actions;
}

const rowOf = () =>
  within(screen.getByRole("group", { name: "Sizes of all buffers" }))
    .getByRole("rowheader", { name: "Shaft store" })
    .closest("tr")!;
const search = () => fireEvent.click(screen.getAllByRole("button", { name: "Search sizes" })[0]);
const found = () => waitFor(() => expect(screen.getByText("Sizes for 10 % risk")).toBeTruthy(), { timeout: 20_000 });
const whole = () =>
  waitFor(() => expect(screen.queryByRole("button", { name: "Cancel search" })).toBeNull(), { timeout: 30_000 });

it("finds the set, confirms it on unseen weeks, and shows those figures", async () => {
  open();
  expect(screen.getAllByText("No search yet")).toHaveLength(1);
  search();
  await found();
  await whole();
  const row = rowOf();
  const size = Number(row.querySelectorAll("td")[1].textContent!.replace(/\D/g, ""));
  const run = (seed: string) => {
    const sized = { ...store, nodes: store.nodes.map((node) => (node.id === "store" ? { ...node, size } : node)) };
    const { acceptedRisk: _, ...how } = options;
    return simulate(sized as Line, { ...how, seed }).summary;
  };
  expect(run("1").risk.value).toBeLessThanOrEqual(0.1);
  const text = screen.getByText(/unseen weeks \(seed phrase/).textContent!;
  expect(text).toContain("1/unseen");
  expect(text).toContain(`${(100 * run("1/unseen").risk.value).toFixed(1)}\u202f%`);
  const terrace = screen.getByRole("img", { name: /^Capital tied up by accepted risk/ });
  expect(terrace.getAttribute("aria-label")).not.toMatch(/not searched yet/);
});

it("shows another step of the frontier when its risk is chosen", async () => {
  open();
  search();
  await whole();
  const sizeAt = () => rowOf().querySelectorAll("td")[1].textContent;
  const before = sizeAt();
  fireEvent.click(screen.getByRole("combobox", { name: /^Weeks/ }));
  fireEvent.click(await screen.findByRole("option", { name: /^99 of 100/ }));
  expect(screen.getByText("Sizes for 1 % risk")).toBeTruthy();
  expect(Number(sizeAt())).toBeGreaterThan(Number(before));
  expect(screen.queryByText(/has changed since this search/)).toBeNull();
});

it("says that the question has changed when another target is asked for", async () => {
  open();
  search();
  await whole();
  fireEvent.click(screen.getByRole("combobox", { name: /^Target/ }));
  fireEvent.click(await screen.findByRole("option", { name: /^90/ }));
  expect(screen.getByText(/has changed since this search/)).toBeTruthy();
});

it("can be cancelled, keeps what is found, and goes on from there without running it again", async () => {
  let nRuns = 0;
  let isHeld = true;
  const { client, pending } = createClient(() => ++nRuns > 30 && isHeld);
  open({ client });
  search();
  await waitFor(() => expect(pending.length).toBeGreaterThan(0), { timeout: 20_000 });
  fireEvent.click(screen.getByRole("button", { name: "Cancel search" }));
  expect(screen.getByText("Search stopped")).toBeTruthy();
  expect(screen.getByText(/^Cheapest so far within/)).toBeTruthy();
  isHeld = false;
  const before = nRuns;
  fireEvent.click(screen.getByRole("button", { name: "Go on searching" }));
  await whole();
  const resumed = nRuns - before;
  document.body.innerHTML = "";
  let nFresh = 0;
  const fresh = createClient(() => ++nFresh < 0);
  open({ client: fresh.client });
  search();
  await whole();
  expect(resumed).toBeLessThan(nFresh - 15);
});

it("says why it stopped when a run fails, and can go on", async () => {
  const { client } = createClient();
  let isBroken = true;
  const run: SimulationClient["run"] = (...args) =>
    isBroken ? Promise.reject(new Error("a worker stopped")) : client.run(...args);
  open({ client: { ...client, run } });
  search();
  expect(await screen.findByText("The search stopped")).toBeTruthy();
  expect(screen.getByText(/^a worker stopped/)).toBeTruthy();
  isBroken = false;
  fireEvent.click(screen.getByRole("button", { name: "Go on searching" }));
  await found();
});

it("makes the found set a scenario together with its run over the search's weeks", async () => {
  const actions = open();
  search();
  await whole();
  const shown = rowOf().querySelectorAll("td")[1].textContent;
  fireEvent.click(screen.getByRole("button", { name: "Keep as a scenario" }));
  fireEvent.click(await screen.findByRole("button", { name: "Save as scenario" }));
  await waitFor(() => expect(actions.saveAsScenario).toHaveBeenCalledOnce());
  const sent = actions.saveAsScenario.mock.calls[0][0];
  expect(sent.name).toBe("Sized for 10\u202f% risk");
  expect(sent.options).toMatchObject({ seed: "1", targetFillRate: 1, acceptedRisk: 0.1 });
  expect(String(sent.document?.nodes.find(({ id }) => id === "store")?.["size" as never])).toBe(shown);
});

it("lets a viewer search but keep nothing", async () => {
  open({ role: "viewer" });
  search();
  await whole();
  expect(screen.queryByRole("button", { name: "Keep as a scenario" })).toBeNull();
});

it("says what holds the line back where stock cannot reach the risk", async () => {
  const late: Line = {
    ...store,
    nodes: store.nodes.map((node) =>
      node.kind === "supplier"
        ? { ...node, name: "Shaft works", disruption: { meanDaysBetween: 30, meanDaysLasting: 40 } }
        : node,
    ),
  };
  open({ document: late });
  search();
  await whole();
  expect(screen.getByText("No set in range keeps to this risk")).toBeTruthy();
  expect(screen.getByText(/^Stock alone does not bring this line to/)).toBeTruthy();
  expect(
    within(screen.getByText(/What holds it back/).parentElement!).getByText(/^Shaft works: disrupted/),
  ).toBeTruthy();
});

it("refuses a search with all sizes held fixed, and ranges that make no sense, with the reason", async () => {
  open();
  fireEvent.click(screen.getByRole("button", { name: "No sizes held fixed" }));
  const dialog = await screen.findByRole("dialog");
  fireEvent.change(within(dialog).getByLabelText("Least"), { target: { value: "90" } });
  fireEvent.change(within(dialog).getByLabelText("Largest"), { target: { value: "30" } });
  expect(within(dialog).getByText("The least size is above the largest.")).toBeTruthy();
  fireEvent.click(within(dialog).getByRole("checkbox", { name: /^Shaft store/ }));
  fireEvent.click(within(dialog).getByRole("button", { name: "Done" }));
  expect(screen.getByText("All sizes are held fixed. Let at least one change.")).toBeTruthy();
  expect(screen.queryByRole("button", { name: "Search sizes", hidden: false })?.hasAttribute("disabled") ?? true).toBe(
    true,
  );
});

it("sets the formula and the plan on averages beside what is found, each with its risk", async () => {
  open();
  search();
  await whole();
  const table = screen.getByRole("group", { name: "Formula beside simulation" });
  expect(within(table).getByRole("rowheader", { name: "Shaft store" })).toBeTruthy();
  expect(screen.getByText(/^Textbook sizes \(/).textContent).toMatch(/miss 100\u202f% in [\d.]+\u202f%/);
  expect(screen.getByText(/^Planned on averages/).textContent).toMatch(/in [\d.]+\u202f%/);
});

it("works out what the week needs, and says when it is out of date", async () => {
  open();
  fireEvent.click(screen.getByRole("button", { name: "Work out the needs for 9 of 10 weeks" }));
  const table = await screen.findByRole("group", { name: "Needs of all buffers" });
  const cells = [...within(table).getByText("Shaft store").closest("tr")!.querySelectorAll("td")].map(
    ({ textContent }) => Number(textContent),
  );
  const [size, half, nine, years] = cells;
  expect(size).toBe(20);
  expect(half).toBeLessThan(nine);
  expect(nine).toBeLessThan(years);
  expect(screen.getByRole("img", { name: /^Need of Shaft store over the week/ })).toBeTruthy();
  fireEvent.click(screen.getByRole("radio", { name: "Over the year" }));
  expect(screen.getByRole("img", { name: /^Need of Shaft store over the year/ })).toBeTruthy();
  fireEvent.click(screen.getByRole("combobox", { name: /^Weeks/ }));
  fireEvent.click(await screen.findByRole("option", { name: /^19 of 20/ }));
  expect(screen.getByText(/accepted risk have changed since/)).toBeTruthy();
});
