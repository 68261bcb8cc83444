import { describe, expect, it } from "vitest";
import { autoLayout } from "@/lib/line/auto-layout";
import { capacityAWeek, dueAWeek, loadsOf } from "@/lib/line/capacity";
import { cautionsOf } from "@/lib/line/cautions";
import { differences } from "@/lib/line/diff";
import {
  addNode,
  canConnect,
  connect,
  deleteItems,
  duplicate,
  type Edit,
  linkKey,
  moveNodes,
  setField,
  setLineField,
  setLinkQuantity,
} from "@/lib/line/edits";
import type { SheetState } from "@/lib/line/edits/edit";
import { emptyLine, exampleLine } from "@/lib/line/example";
import { parseLine } from "@/lib/line";
import { sizeOf } from "@/lib/line/sheet-sizes";
import type { DraftLine, DraftNode, Line } from "@/lib/line/types";

const example = exampleLine as DraftLine;
const sheet = (document: DraftLine): SheetState => ({ document, layout: autoLayout(document), notes: [] });
const after = (state: SheetState, ...edits: Edit[]) => edits.reduce((now, edit) => edit.apply(now), state);
const nodeOf = ({ document }: SheetState, id: string): DraftNode => document.nodes.find((node) => node.id === id)!;

/** Suppliers, stations and a customer of a new line, not joined yet. */
const begun = after(
  sheet(emptyLine("Gear line")),
  addNode("supplier", { x: 0, y: 0 }),
  addNode("station", { x: 200, y: 0 }),
  addNode("station", { x: 400, y: 0 }),
  addNode("buffer", { x: 600, y: 0 }),
  addNode("customer", { x: 800, y: 0 }),
);

describe("connect", () => {
  const drawn = after(
    begun,
    setField("supplier-1", "leadTimeDays", 10),
    setField("station-1", "cycleMinutes", 8),
    setField("station-2", "cycleMinutes", 8),
    setField("customer-1", "weeklyDemand", { type: "normal", mean: 500, sd: 60 }),
    connect("buffer-1", "customer-1"),
    connect("station-2", "buffer-1"),
    connect("station-1", "station-2"),
    connect("supplier-1", "station-1"),
  );

  it("puts a buffer of one place, empty, between two stations", () => {
    const between = drawn.document.links.find(({ to }) => to === "station-2")!.from;
    expect(nodeOf(drawn, between)).toMatchObject({
      kind: "buffer",
      size: 1,
      startLevel: 0,
      unitValue: 0,
      replenishment: null,
    });
    expect(drawn.document.links).toContainEqual({ from: "station-1", to: between });
    expect(drawn.layout.positions[between]).toEqual({ x: 300, y: 0 });
  });

  it("puts a purchased buffer between a supplier and a station, sized to the mean use over lead time and review", () => {
    const bought = drawn.document.links.find(({ to }) => to === "station-1")!.from;
    // 100 a day over 10 + 5 days; the review is once a week.
    expect(nodeOf(drawn, bought)).toMatchObject({
      size: 1_500,
      replenishment: { rule: "orderUpTo", reviewDays: 5, lot: null, minimumOrder: 0, orderMultiple: 1 },
    });
  });

  it("makes a line that runs once the last gap is filled", () => {
    const faults = (state: SheetState) => {
      const answer = parseLine(state.document);
      return "faults" in answer ? answer.faults : [];
    };
    expect(faults(drawn)).toMatchObject([{ node: "buffer-1", path: "size" }]);
    expect(faults(after(drawn, setField("buffer-1", "size", 200)))).toEqual([]);
  });

  it("shares the orders of a buffer among its suppliers as they come and go", () => {
    const bought = drawn.document.links.find(({ to }) => to === "station-1")!.from;
    const two = after(drawn, addNode("supplier", { x: 0, y: 90 }), connect("supplier-2", bought));
    const shares = ["supplier-1", "supplier-2"].map((id) => (nodeOf(two, id) as { share: number }).share);
    expect(shares[0] + shares[1]).toBeCloseTo(1, 9);
    expect(nodeOf(after(two, deleteItems(["supplier-2"])), "supplier-1")).toMatchObject({ share: 1 });
  });

  it("keeps the rule while nothing feeds the buffer, and drops it when a station does", () => {
    const bought = drawn.document.links.find(({ to }) => to === "station-1")!.from;
    const unfed = after(drawn, deleteItems([linkKey("supplier-1", bought)]));
    expect(nodeOf(unfed, bought)).toMatchObject({ replenishment: { rule: "orderUpTo" } });
    const made = after(unfed, addNode("station", { x: 0, y: 200 }), connect("station-3", bought));
    expect(nodeOf(made, bought)).toMatchObject({ replenishment: null });
  });

  it.each([
    ["lam", "lam", "itself"],
    ["lam", "wind", "already"],
    ["cus-a", "fg", "nothing leaves it"],
    ["fg", "sup-lam", "nothing enters it"],
    ["sup-lam", "wire", "exactly one"],
    ["wind", "rot", "exactly one"],
    ["lam", "wire", "Put a station between"],
    ["unit", "cus-a", "exactly one"],
    ["fg", "final", "circle"],
    ["lam", "ghost", "no longer on the line"],
  ])("refuses %s to %s and says why", (from, to, why) => {
    expect(canConnect(example, from, to)).toContain(why);
    const state = sheet(example);
    expect(connect(from, to).apply(state)).toBe(state);
  });

  it("refuses a supplier at a buffer that stations fill, and a supplier at a customer", () => {
    const state = after(sheet(example), addNode("supplier", { x: 0, y: 0 }));
    const id = state.document.nodes[state.document.nodes.length - 1].id;
    expect(canConnect(state.document, id, "stator")).toContain("need a buffer each");
    expect(canConnect(state.document, id, "cus-a")).toContain("Add a buffer between");
  });
});

describe("other edits", () => {
  it("delete takes links and places along", () => {
    const state = after(sheet(example), deleteItems(["wind", linkKey("unit", "eol")]));
    expect(state.document.nodes).toHaveLength(example.nodes.length - 1);
    expect(state.document.links.some(({ from, to }) => from === "wind" || to === "wind" || to === "eol")).toBe(false);
    expect(state.layout.positions).not.toHaveProperty("wind");
  });

  it("duplicate copies nodes and the links among them under names of their own", () => {
    const state = after(sheet(example), duplicate(["wind", "stator"]));
    const added = state.document.nodes.slice(example.nodes.length);
    expect(added.map(({ name }) => name)).toEqual(["wind", "stator"].map((id) => `${nodeOf(state, id).name} (2)`));
    expect(state.document.links.slice(example.links.length)).toEqual([{ from: added[0].id, to: added[1].id }]);
    expect(new Set(state.document.nodes.map(({ id }) => id)).size).toBe(state.document.nodes.length);
  });

  it("what changes nothing gives back the same state, so that it is no step of undo", () => {
    const state = sheet(example);
    for (const edit of [
      setField("wind", "scrapRate", (nodeOf(state, "wind") as { scrapRate: number }).scrapRate),
      setField("ghost", "size", 3),
      setLineField("name", example.name),
      setLinkQuantity("lam", "ghost", 2),
      moveNodes({ wind: state.layout.positions.wind, ghost: { x: 0, y: 0 } }),
      deleteItems(["ghost"]),
      duplicate(["ghost"]),
    ])
      expect(edit.apply(state)).toBe(state);
  });

  it("leaves the state before it as it was", () => {
    const state = sheet(example);
    const before = structuredClone(state);
    after(
      state,
      setField("wind", "stoppages.meanUpHours", 9),
      moveNodes({ wind: { x: 1, y: 2 } }),
      deleteItems(["lam"]),
    );
    expect(state).toEqual(before);
  });
});

describe("differences", () => {
  it("says fields, nodes and links that differ, in words", () => {
    const next = after(
      sheet(example),
      setField("lam", "size", 3_000),
      setField("wind", "scrapRate", 0.02),
      setLineField("overtime", null),
      addNode("station", { x: 0, y: 0 }),
      deleteItems(["cus-b"]),
    ).document;
    const texts = differences(example, next).map(({ text }) => text);
    expect(texts).toContain("Lamination stacks: size 2\u202f800 → 3\u202f000");
    expect(texts.some((text) => /^Stator winding: scrap 1\.2\u202f% → 2\u202f%$/.test(text))).toBe(true);
    expect(texts.some((text) => text.startsWith("The line: overtime"))).toBe(true);
    expect(texts.some((text) => text.endsWith("added"))).toBe(true);
    expect(texts.some((text) => text === "Bike maker South taken out")).toBe(true);
    expect(differences(example, structuredClone(example))).toEqual([]);
  });
});

describe("what the numbers say before a run", () => {
  it("sums what is due and what stations can make", () => {
    expect(dueAWeek(example)).toBe(560);
    const eol = exampleLine.nodes.find(({ id }) => id === "eol");
    if (eol?.kind !== "station") throw new Error("no station eol");
    // 80 h a week over 6.6 min, up 30 of 31.8 h, less 1.8 % scrap.
    expect(capacityAWeek(exampleLine, eol)).toBeCloseTo(((80 * 60) / 6.6) * (30 / 31.8) * (1 - 0.018), 6);
    const ratios = loadsOf(exampleLine).map(({ due, capacity }) => due / capacity);
    expect(ratios).toHaveLength(6);
    expect(ratios).toEqual([...ratios].sort((a, b) => b - a));
  });

  it("cautions where work can hurt or figures mislead", () => {
    const messages = (line: Line) =>
      cautionsOf(line)
        .map(({ message }) => message)
        .join(" ");
    expect(messages(exampleLine)).toContain("local working-time rules");
    const doubled = exampleLine.nodes.map((node) =>
      node.kind === "customer" ? { ...node, weeklyDemand: { type: "fixed" as const, value: 900 } } : node,
    );
    expect(messages({ ...exampleLine, nodes: doubled })).toContain("the backlog grows");
    expect(messages({ ...exampleLine, overtime: { backlogTrigger: 0, hoursPerWeek: 100, costPerHour: 1 } })).toContain(
      "more hours than a week has",
    );
    const worthless = exampleLine.nodes.map((node) => (node.id === "lam" ? { ...node, unitValue: 0 } : node));
    expect(messages({ ...exampleLine, nodes: worthless as Line["nodes"] })).toContain("Lamination stacks has no value");
  });
});

describe("autoLayout", () => {
  const { positions } = autoLayout(example);
  const box = (node: DraftNode) => ({ ...positions[node.id], ...sizeOf(example, node) });

  it("runs from left to right", () => {
    for (const { from, to } of example.links) expect(positions[from].x).toBeLessThan(positions[to].x);
  });

  it("lets no two nodes overlap", () => {
    const boxes = example.nodes.map(box);
    boxes.forEach((a, i) =>
      boxes.slice(i + 1).forEach((b) => {
        const isApart = a.x + a.width <= b.x || b.x + b.width <= a.x || a.y + a.height <= b.y || b.y + b.height <= a.y;
        expect(isApart).toBe(true);
      }),
    );
  });
});
