import { act, fireEvent, screen, waitFor, within } from "@testing-library/react";
import { expect, it } from "vitest";
import { SweepView } from "@/components/compare/sweep-view";
import { SweepProvider } from "@/components/compare/sweep-store";
import { ShareActionsContext } from "@/components/share/share-actions";
import type { SimulationClient } from "@/lib/client/simulation-client";
import { setField } from "@/lib/line/edits";
import type { Line } from "@/lib/line/types";
import type { Role } from "@/lib/schema/roles";
import { pairedDifference, percentile, simulate } from "@/lib/simulation";
import { withSize } from "@/lib/sizing/with-size";
import {
  createActions,
  createClient,
  createDraft,
  createRoutes,
  createScenario,
  exampleDocument,
  renderLine,
  serve,
  smallOptions,
} from "./line-harness";
import { createProbe } from "./line-probe";

const { probe, Probe } = createProbe();
const options = { ...smallOptions, replications: 8, weeks: 10 };
const document = exampleDocument as unknown as Line;
const shares = {
  createShare: async () => ({ ok: true as const, value: { id: "x", url: "/s/x" } }),
  revokeShare: async () => ({ ok: true as const, value: null }),
};

function open(role: Role = "engineer", client?: SimulationClient, selection: string[] = ["stator"]) {
  const scenario = createScenario({ draft: createDraft({ options }) });
  const actions = createActions();
  serve(createRoutes(role, [scenario]));
  const all = (isShown: boolean) => (
    <ShareActionsContext value={shares}>
      <Probe />
      <SweepProvider>{isShown && <SweepView />}</SweepProvider>
    </ShareActionsContext>
  );
  renderLine({ role, client, actions, scenarios: [scenario], children: all(true) });
  act(() => probe.line.select(selection));
  return actions;
}

function typeSizes(text: string) {
  fireEvent.click(screen.getByRole("radio", { name: "By hand" }));
  fireEvent.change(screen.getByLabelText("Sizes, units"), { target: { value: text } });
}
const rowOf = (size: string) => screen.getByRole("rowheader", { name: new RegExp(`^${size}\\b`) }).closest("tr")!;
const firstBuffer = exampleDocument.nodes.find(({ kind }) => kind === "buffer")!;

it("suggests a range around the size as it is and counts its sizes", () => {
  open();
  expect(screen.getByText("Nothing compared yet")).toBeTruthy();
  expect(screen.getByRole("button", { name: /^Run \d+ sizes$/ })).toBeTruthy();
  fireEvent.change(screen.getByLabelText("Step"), { target: { value: "0" } });
  expect(screen.getByRole<HTMLButtonElement>("button", { name: "Run sizes" })).toBeTruthy();
});

it("runs each size with the same draws and shows what a step gains, paired", async () => {
  open();
  typeSizes("1500, 2000 2500");
  fireEvent.click(screen.getByRole("button", { name: "Run 3 sizes" }));
  await waitFor(() => expect(screen.getByRole("rowheader", { name: /^2\u202f500/ })).toBeTruthy());
  const { acceptedRisk, ...runOptions } = options;
  const [small, middle] = [1500, 2000].map((size) => simulate(withSize(document, firstBuffer.id, size), runOptions));
  const gain = pairedDifference(middle, small, acceptedRisk);
  const cells = [...rowOf("2\u202f000").querySelectorAll("td")].map(({ textContent }) => textContent!);
  expect(Math.abs(Number.parseFloat(cells[1]) - percentile(middle, acceptedRisk).value * 100)).toBeLessThan(0.5001);
  expect(cells[3]).toContain((Math.abs(gain.value) * 100).toFixed(1));
  expect(cells[3]).toContain((gain.halfWidth! * 100).toFixed(1));
  expect([...rowOf("1\u202f500").querySelectorAll("td")][3].textContent).toBe("–");
  expect(screen.getByRole("img", { name: /^Fill rate by size: / })).toBeTruthy();
});

it("says what is wrong with sizes typed by hand, once tried", () => {
  open();
  typeSizes("1500, ten");
  fireEvent.click(screen.getByRole("button", { name: "Run sizes" }));
  expect(screen.getByText(/^Sizes are whole numbers/)).toBeTruthy();
});

it("can be cancelled and keeps the sizes done; can be started again", async () => {
  let nRuns = 0;
  const { client, pending } = createClient(() => ++nRuns === 2);
  open("engineer", client);
  typeSizes("1500, 2000");
  fireEvent.click(screen.getByRole("button", { name: "Run 2 sizes" }));
  await waitFor(() => expect(pending).toHaveLength(1));
  expect(screen.getByText(/^Running size 2.000/)).toBeTruthy();
  fireEvent.click(screen.getByRole("button", { name: "Cancel" }));
  expect(rowOf("1\u202f500")).toBeTruthy();
  expect(screen.queryByRole("button", { name: "Cancel" })).toBeNull();
  fireEvent.click(screen.getByRole("button", { name: "Run 2 sizes" }));
  await waitFor(() => expect(rowOf("2\u202f000")).toBeTruthy());
});

it("says why it stopped when a run fails", async () => {
  const { client } = createClient();
  open("engineer", { ...client, run: () => Promise.reject(new Error("a worker stopped")) });
  typeSizes("1500");
  fireEvent.click(screen.getByRole("button", { name: "Run 1 size" }));
  expect(await screen.findByText("The comparison stopped")).toBeTruthy();
  expect(screen.getByText(/^a worker stopped/)).toBeTruthy();
});

it("keeps a size as a scenario together with its run", async () => {
  const actions = open();
  typeSizes("1500, 2000");
  fireEvent.click(screen.getByRole("button", { name: "Run 2 sizes" }));
  await waitFor(() => expect(rowOf("2\u202f000")).toBeTruthy());
  fireEvent.click(within(rowOf("2\u202f000")).getByRole("button", { name: /^Keep size/ }));
  fireEvent.click(await screen.findByRole("button", { name: "Save as scenario" }));
  await waitFor(() => expect(actions.saveAsScenario).toHaveBeenCalledOnce());
  const sent = actions.saveAsScenario.mock.calls[0][0];
  expect(sent.name).toBe(`${firstBuffer.name} 2000`);
  expect(sent.document?.nodes.find(({ id }) => id === firstBuffer.id)).toMatchObject({ size: 2000 });
});

it("says that the line has changed since", async () => {
  open();
  typeSizes("1500");
  fireEvent.click(screen.getByRole("button", { name: "Run 1 size" }));
  await waitFor(() => expect(rowOf("1\u202f500")).toBeTruthy());
  act(() => probe.line.apply(setField("wind", "scrapRate", 0.05)));
  expect(screen.getByText("The line has changed since these values were run.")).toBeTruthy();
});

it("compares nothing on a faulty line, and lets a viewer compare but keep nothing", async () => {
  open("viewer");
  typeSizes("1500");
  fireEvent.click(screen.getByRole("button", { name: "Run 1 size" }));
  await waitFor(() => expect(rowOf("1\u202f500")).toBeTruthy());
  expect(screen.queryByRole("button", { name: /^Keep size/ })).toBeNull();
});
