import { act, fireEvent, screen, within } from "@testing-library/react";
import userEvent from "@testing-library/user-event";
import { beforeEach, expect, it } from "vitest";
import { InspectorPanel } from "@/components/line/inspector/inspector-panel";
import { linkKey } from "@/lib/line/edits";
import type { DraftNode, NodeKind } from "@/lib/line/types";
import type { Role } from "@/lib/schema/roles";
import { createRoutes, createScenario, renderLine, serve } from "./line-harness";
import { createProbe } from "./line-probe";

const { probe, Probe } = createProbe();

function open(selection: string[], role: Role = "engineer") {
  serve(createRoutes(role, [createScenario()]));
  renderLine({
    role,
    children: (
      <>
        <Probe />
        <InspectorPanel />
      </>
    ),
  });
  act(() => probe.line.select(selection));
}

const node = <K extends NodeKind>(kind: K, id: string) => {
  const found = probe.line.document.nodes.find((one) => one.id === id);
  if (found?.kind !== kind) throw new Error(`${id} is no ${kind}`);
  return found as Extract<DraftNode, { kind: K }>;
};
const type = (label: string, value: string) => fireEvent.change(screen.getByLabelText(label), { target: { value } });
async function pick(label: RegExp, option: string | RegExp) {
  const user = userEvent.setup();
  await user.click(screen.getByRole("combobox", { name: label }));
  await user.click(screen.getByRole("option", { name: option }));
}

beforeEach(() => {
  // Radix asks for both; the test's DOM has neither.
  Element.prototype.hasPointerCapture ??= () => false;
  Element.prototype.scrollIntoView ??= () => undefined;
});

it("writes a supplier's fields, shares typed in percent", () => {
  open(["sup-lam"]);
  type("Lead time, quoted", "12");
  type("On time", "82.5");
  type("Rejected units", "1,5");
  expect(node("supplier", "sup-lam")).toMatchObject({ leadTimeDays: 12, onTimeShare: 0.825, rejectRate: 0.015 });
  fireEvent.click(screen.getByLabelText(/^Disruptions/));
  const before = node("supplier", "sup-lam").disruption;
  fireEvent.click(screen.getByLabelText(/^Disruptions/));
  expect(node("supplier", "sup-lam").disruption === null).toBe(before !== null);
});

it("changes a lateness to another distribution of the same mean and spread", async () => {
  open(["sup-lam"]);
  await pick(/^Lateness/, /^gamma/i);
  type("Mean", "3");
  type("Standard deviation", "1.5");
  await pick(/^Lateness/, /^lognormal/i);
  expect(node("supplier", "sup-lam").lateness).toEqual({ type: "lognormal", mean: 3, sd: 1.5 });
});

it("says beside the field what is wrong, and keeps what was typed", () => {
  open(["wind"]);
  const cycle = screen.getByLabelText<HTMLInputElement>("Cycle, mean");
  const former = node("station", "wind").cycleMinutes;
  fireEvent.change(cycle, { target: { value: "six" } });
  expect(cycle.value).toBe("six");
  expect(cycle.getAttribute("aria-invalid")).toBe("true");
  expect(screen.getByText("“six” is not a number.")).toBeTruthy();
  expect(node("station", "wind").cycleMinutes).toBe(former);
  fireEvent.change(cycle, { target: { value: "0" } });
  expect(probe.line.faults).toMatchObject([{ node: "wind", path: "cycleMinutes" }]);
  expect(document.getElementById(`${cycle.id}-note`)?.textContent).toBe(probe.line.faults[0].message);
  fireEvent.change(cycle, { target: { value: "7" } });
  expect(probe.line.faults).toEqual([]);
});

it("changes the rule of a purchased buffer: a lot comes with the reorder point and goes with it", async () => {
  open(["lam"]);
  expect(screen.getByText("Purchased stock")).toBeTruthy();
  await pick(/^Replenishment/, /reorder point/);
  expect(node("buffer", "lam").replenishment).toMatchObject({ rule: "reorderPoint", lot: expect.any(Number) });
  expect(probe.line.faults).toEqual([]);
  expect(screen.getByLabelText("Reorder point")).toBeTruthy();
  await pick(/^Replenishment/, /up to a level/);
  expect(node("buffer", "lam").replenishment).toMatchObject({ rule: "orderUpTo", lot: null });
});

it("offers no replenishment where a station fills the buffer", () => {
  open(["stator"]);
  expect(screen.queryByRole("combobox", { name: /^Replenishment/ })).toBeNull();
  type("Places", "60");
  expect(node("buffer", "stator").size).toBe(60);
  type("Start level", "61");
  expect(probe.line.faults[0]).toMatchObject({ node: "stator", path: "startLevel" });
  type("Start level", "");
  expect(node("buffer", "stator").startLevel).toBeNull();
});

it("draws the curve of a size by runs of its own", async () => {
  open(["stator"]);
  await userEvent.click(screen.getByRole("button", { name: "Draw the curve" }));
  const curve = await screen.findByRole("img", { name: /^P10 by size: / });
  expect(curve.getAttribute("aria-label")?.match(/%/g)).toHaveLength(5);
  type("Places", "70");
  expect(screen.getByRole("button", { name: "Draw again" })).toBeTruthy();
});

it("writes the quantity of a channel into a station only", () => {
  open([linkKey("lam", "wind")]);
  type("Quantity per unit made", "2");
  expect(probe.line.document.links.find(({ from }) => from === "lam")?.quantity).toBe(2);
  act(() => probe.line.select([linkKey("wind", "stator")]));
  expect(screen.queryByLabelText("Quantity per unit made")).toBeNull();
});

it("sets the week, money and overtime of the line", () => {
  open([]);
  fireEvent.click(screen.getByRole("button", { name: "Line settings" }));
  type("Days a week", "6");
  expect(probe.line.document.calendar.daysPerWeek).toBe(6);
});

it("deletes and duplicates, each one step of undo", () => {
  open(["wind"]);
  const count = probe.line.document.nodes.length;
  fireEvent.click(screen.getByRole("button", { name: "Duplicate" }));
  expect(probe.line.document.nodes).toHaveLength(count + 1);
  act(() => probe.line.undo());
  act(() => probe.line.select(["wind"]));
  fireEvent.click(screen.getByRole("button", { name: "Delete" }));
  expect(probe.line.document.nodes).toHaveLength(count - 1);
  expect(probe.line.document.links.some(({ from, to }) => from === "wind" || to === "wind")).toBe(false);
  act(() => probe.line.undo());
  expect(probe.line.document.nodes).toHaveLength(count);
});

it("shows a viewer every figure and lets none be changed", () => {
  open(["sup-lam"], "viewer");
  const form = screen.getByRole("complementary", { name: "Form of what is selected" });
  for (const field of within(form).getAllByRole<HTMLInputElement>("textbox")) expect(field.readOnly).toBe(true);
  for (const box of within(form).getAllByRole<HTMLInputElement>("checkbox")) expect(box.disabled).toBe(true);
  expect(within(form).queryByRole("button", { name: "Delete" })).toBeNull();
});
