import { act, fireEvent, screen, waitFor, within } from "@testing-library/react";
import userEvent from "@testing-library/user-event";
import { describe, expect, it } from "vitest";
import { BarSlots } from "@/components/line/bar-slot";
import { SheetCanvas } from "@/components/line/canvas/sheet-canvas";
import { ScenarioBar } from "@/components/line/scenario-bar";

import type { Role } from "@/lib/schema/roles";
import { createRoutes, createScenario, exampleDocument, renderLine, serve } from "./line-harness";
import { createProbe } from "./line-probe";

const { probe, Probe } = createProbe(
  <BarSlots>
    <ScenarioBar />
    <SheetCanvas />
  </BarSlots>,
);

function show(role: Role = "engineer") {
  serve(createRoutes(role, [createScenario()]));
  renderLine({ role, children: <Probe /> });
  const sheet = document.querySelector<HTMLElement>(".sheet-canvas")!;
  return { sheet, user: userEvent.setup() };
}

const nNodes = exampleDocument.nodes.length;
const [first] = exampleDocument.nodes;

describe("SheetCanvas", () => {
  it("draws every node and names it with its kind", async () => {
    show();
    for (const { name } of exampleDocument.nodes)
      await waitFor(() =>
        expect(document.querySelector(`.react-flow__node[aria-label^="${name}, "]`), name).not.toBeNull(),
      );
  });

  it.each([
    ["s", "supplier"],
    ["b", "buffer"],
    ["t", "station"],
    ["c", "customer"],
  ])("adds with key %s a %s, selects it and places it; undo takes it out in one step", (key, kind) => {
    const { sheet } = show();
    fireEvent.keyDown(sheet, { key });
    expect(probe.line.document.nodes).toHaveLength(nNodes + 1);
    const added = probe.line.document.nodes[nNodes];
    expect(added.kind).toBe(kind);
    expect(probe.line.selection).toEqual([added.id]);
    expect(probe.line.layout.positions[added.id]).toBeDefined();
    act(() => probe.line.undo());
    expect(probe.line.document).toEqual(exampleDocument);
  });

  it("adds a note under the author's name, to be typed at once", async () => {
    const { sheet } = show();
    fireEvent.keyDown(sheet, { key: "n" });
    expect(probe.line.notes).toMatchObject([{ text: "", author: "Ines Kallweit" }]);
    fireEvent.change(await screen.findByLabelText("Text of the note"), { target: { value: "Second supplier?" } });
    expect(probe.line.notes[0].text).toBe("Second supplier?");
  });

  it("does not take typing in a note for keys of the sheet", async () => {
    const { sheet } = show();
    fireEvent.keyDown(sheet, { key: "n" });
    fireEvent.keyDown(await screen.findByLabelText("Text of the note"), { key: "b" });
    expect(probe.line.document.nodes).toHaveLength(nNodes);
  });

  it("deletes what is selected with its channels, and offers to undo", () => {
    const { sheet } = show();
    act(() => probe.line.select([first.id]));
    fireEvent.keyDown(sheet, { key: "Delete" });
    expect(probe.line.document.nodes.some(({ id }) => id === first.id)).toBe(false);
    expect(probe.line.document.links.some(({ from, to }) => from === first.id || to === first.id)).toBe(false);
    expect(probe.line.selection).toEqual([]);
    act(() => probe.line.undo());
    expect(probe.line.document).toEqual(exampleDocument);
  });

  it("duplicates with Ctrl+D, selects all with Ctrl+A, lets go with Escape", () => {
    const { sheet } = show();
    act(() => probe.line.select([first.id]));
    fireEvent.keyDown(sheet, { key: "d", ctrlKey: true });
    expect(probe.line.document.nodes).toHaveLength(nNodes + 1);
    fireEvent.keyDown(sheet, { key: "a", ctrlKey: true });
    expect(probe.line.selection).toHaveLength(nNodes + 1);
    fireEvent.keyDown(sheet, { key: "Escape" });
    expect(probe.line.selection).toEqual([]);
  });

  it("connects through a dialog that lists what can be fed and says why the rest cannot", async () => {
    const { sheet, user } = show();
    fireEvent.keyDown(sheet, { key: "t" });
    const station = probe.line.document.nodes[nNodes];
    await user.click(await screen.findByRole("button", { name: "Connect to" }));
    const dialog = within(await screen.findByRole("dialog"));
    const supplier = exampleDocument.nodes.find(({ kind }) => kind === "supplier")!;
    const refused = dialog.getByRole("button", { name: new RegExp(`^${supplier.name}`) });
    expect(refused).toHaveProperty("disabled", true);
    expect(refused.textContent).toContain("nothing enters it");
    await user.click(dialog.getByRole("button", { name: /^Final assembly/ }));
    // Between two stations there is a buffer of one piece.
    const buffer = probe.line.document.nodes.at(-1)!;
    expect(buffer).toMatchObject({ kind: "buffer", size: 1, startLevel: 0 });
    expect(probe.line.document.links).toContainEqual(expect.objectContaining({ from: station.id, to: buffer.id }));
    expect(probe.line.document.links).toContainEqual(expect.objectContaining({ from: buffer.id, to: "final" }));
  });

  it("names the fault of a node and marks it", async () => {
    const { sheet } = show();
    fireEvent.keyDown(sheet, { key: "t" });
    const { id } = probe.line.document.nodes[nNodes];
    await waitFor(() =>
      expect(document.querySelector(`.react-flow__node[data-id="${id}"]`)?.getAttribute("aria-label")).toContain(
        "Fault:",
      ),
    );
  });

  it.each<Role>(["manager", "viewer"])("lets a %s select, and change nothing", (role) => {
    const { sheet } = show(role);
    act(() => probe.line.select([first.id]));
    for (const key of ["s", "n", "Delete"]) fireEvent.keyDown(sheet, { key });
    fireEvent.keyDown(sheet, { key: "d", ctrlKey: true });
    expect(probe.line.document).toEqual(exampleDocument);
    expect(probe.line.notes).toEqual([]);
    expect(screen.queryByRole("button", { name: "Add" })).toBeNull();
    expect(screen.queryByRole("button", { name: "Arrange" })).toBeNull();
    fireEvent.keyDown(sheet, { key: "a", ctrlKey: true });
    expect(probe.line.selection).toHaveLength(nNodes);
  });
});
