import { expect, it } from "vitest";
import { digestLine, parseLine } from "@/lib/line";
import { exampleLine } from "@/lib/line/example";
import type { Fault, Line, LineNode, Link } from "@/lib/line/types";

const faultsOf = (json: unknown): Fault[] => {
  const answer = parseLine(json);
  return "faults" in answer ? answer.faults : [];
};
const node = (id: string): LineNode => exampleLine.nodes.find((one) => one.id === id)!;
const add = (nodes: LineNode[], links: Link[], drop: (link: Link) => boolean = () => false): Line => ({
  ...exampleLine,
  nodes: [...exampleLine.nodes, ...nodes],
  links: [...exampleLine.links.filter((link) => !drop(link)), ...links],
});
const copy = <T extends LineNode>(of: string, id: string): T => ({ ...node(of), id, name: id }) as T;
const link = (from: string, to: string, quantity?: number): Link =>
  quantity === undefined ? { from, to } : { from, to, quantity };
const isLink = (from: string, to: string) => (one: Link) => one.from === from && one.to === to;

/** What a faulty line is, and the node or link that its fault has to name. */
const cases: [string, Line, Partial<Fault>][] = [
  ["a supplier at a station", add([copy("sup-lam", "s2")], [link("s2", "wind")]), { link: link("s2", "wind") }],
  ["a station at a customer", add([], [link("eol", "cus-a")]), { link: link("eol", "cus-a") }],
  ["a buffer at a buffer", add([], [link("lam", "wire")]), { link: link("lam", "wire") }],
  ["a customer at a buffer", add([], [link("cus-a", "fg")]), { link: link("cus-a", "fg") }],
  ["an end that is not there", add([], [link("lam", "ghost")]), { link: link("lam", "ghost") }],
  ["a link twice", add([], [link("lam", "wind")]), { link: link("lam", "wind") }],
  ["a circle", add([], [link("fg", "final")]), { node: "final" }],
  ["a supplier of two buffers", add([], [link("sup-lam", "wire")]), { node: "sup-lam" }],
  ["a supplier of none", add([copy("sup-lam", "s2")], []), { node: "s2" }],
  ["a station with two outputs", add([], [link("wind", "rot")]), { node: "wind" }],
  ["a station without output", add([], [], isLink("wind", "stator")), { node: "wind" }],
  ["a station without input", add([copy("ctrl", "c2")], [link("c2", "cb")]), { node: "c2" }],
  ["a customer of two buffers", add([], [link("unit", "cus-a")]), { node: "cus-a" }],
  ["a customer of none", add([copy("cus-a", "c9")], []), { node: "c9" }],
  ["a buffer that nothing feeds", add([], [], isLink("wind", "stator")), { node: "stator" }],
  ["a buffer that nobody takes from", add([], [], isLink("stator", "final")), { node: "stator" }],
  ["a buffer of suppliers and stations", add([copy("sup-lam", "s2")], [link("s2", "stator")]), { node: "stator" }],
  ["an id twice", add([copy("wind", "lam")], []), { node: "lam", path: "id" }],
  [
    "a purchased buffer without replenishment",
    {
      ...exampleLine,
      nodes: exampleLine.nodes.map((n) => (n.id === "lam" ? { ...n, replenishment: null } : n) as LineNode),
    },
    { node: "lam", path: "replenishment" },
  ],
  [
    "a station-fed buffer with replenishment",
    {
      ...exampleLine,
      nodes: exampleLine.nodes.map(
        (n) =>
          (n.id === "stator"
            ? {
                ...n,
                replenishment: { rule: "orderUpTo", reviewDays: 5, lot: null, minimumOrder: 0, orderMultiple: 1 },
              }
            : n) as LineNode,
      ),
    },
    { node: "stator", path: "replenishment" },
  ],
  ["shares that make 200 %", add([copy("sup-lam", "s2")], [link("s2", "lam")]), { node: "lam" }],
  [
    "a quantity into a buffer",
    add([], [link("wind", "stator", 2)], isLink("wind", "stator")),
    { link: link("wind", "stator"), path: "quantity" },
  ],
  [
    "a quantity that is no whole number",
    add([], [link("lam", "wind", 1.5)], isLink("lam", "wind")),
    { link: link("lam", "wind"), path: "quantity" },
  ],
];

it.each(cases)("finds %s and says where", (_, line, place) => {
  const faults = faultsOf(line);
  expect(faults).toEqual(expect.arrayContaining([expect.objectContaining(place)]));
  for (const { message } of faults) expect(message).toMatch(/\.$/);
});

it("finds a line without customers, and links that are none", () => {
  const nodes = exampleLine.nodes.filter(({ kind }) => kind !== "customer");
  const left = exampleLine.links.filter(({ to }) => nodes.some(({ id }) => id === to));
  expect(
    faultsOf({ ...exampleLine, nodes, links: left })
      .map(({ message }) => message)
      .join(" "),
  ).toContain("no customer");
  expect(faultsOf({ ...exampleLine, links: [...exampleLine.links, null] })).toMatchObject([
    { path: `links.${exampleLine.links.length}` },
  ]);
  expect(faultsOf({ ...exampleLine, nodes: "none" })).toMatchObject([{ path: "nodes" }]);
  expect(faultsOf({ ...exampleLine, links: 7 })).toMatchObject([{ path: "links" }]);
});

it("says of a buffer of suppliers and stations that it is one", () => {
  const mixed = add([copy("sup-lam", "s2")], [link("s2", "stator")]);
  expect(faultsOf(mixed).map(({ message }) => message)).toContainEqual(
    expect.stringContaining("is fed by suppliers and by stations"),
  );
});

it("takes shares that add up to 1 within a millionth", () => {
  const shared = (a: number, b: number) => {
    const line = add([{ ...copy<LineNode>("sup-lam", "s2"), share: b } as LineNode], [link("s2", "lam")]);
    return faultsOf({ ...line, nodes: line.nodes.map((n) => (n.id === "sup-lam" ? { ...n, share: a } : n)) });
  };
  expect(shared(0.3, 0.7)).toEqual([]);
  expect(shared(0.3333333, 0.6666667)).toEqual([]);
  for (const off of [5e-7, -5e-7]) expect(shared(0.3, 0.7 + off)).toEqual([]);
  for (const off of [2e-6, -2e-6, -0.1]) expect(shared(0.3, 0.7 + off)).toMatchObject([{ node: "lam" }]);
});

it("gives one digest to one document, however its fields are ordered, and another to any change", () => {
  const turned = Object.fromEntries(Object.entries(exampleLine).reverse()) as Line;
  expect(digestLine(turned)).toBe(digestLine(exampleLine));
  expect(digestLine(exampleLine)).toMatch(/^[0-9a-f]{64}$/);
  const changed = {
    ...exampleLine,
    nodes: exampleLine.nodes.map((n) => (n.id === "lam" ? { ...n, size: 2_801 } : n) as LineNode),
  };
  expect(digestLine(changed)).not.toBe(digestLine(exampleLine));
  expect(digestLine({ ...exampleLine, nodes: [...exampleLine.nodes].reverse() })).not.toBe(digestLine(exampleLine));
});
