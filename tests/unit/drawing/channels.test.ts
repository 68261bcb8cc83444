import { describe, expect, it } from "vitest";
import { channelsOf } from "@/components/line/drawing/channels";
import { inletOf, outletOf, sizeOf } from "@/lib/line/sheet-sizes";
import { placesOf } from "@/components/line/drawing/use-sheet";
import example from "@/lib/line/example.json";
import type { DraftLine } from "@/lib/line/types";

const line = example as unknown as DraftLine;
const places = placesOf(line, { positions: {} });
const channels = channelsOf(line, places);

const start = (path: string) =>
  path
    .match(/^M(-?[\d.]+) (-?[\d.]+)/)!
    .slice(1)
    .map(Number);
const end = (path: string) => Number(path.match(/H(-?[\d.]+)$/)![1]);
const nodeOf = (id: string) => line.nodes.find((node) => node.id === id)!;

describe("channelsOf", () => {
  it("draws one channel a link, from the outlet of its source to the inlet of its target", () => {
    expect(channels.map(({ from, to }) => [from, to])).toEqual(line.links.map(({ from, to }) => [from, to]));
    for (const { from, to, path } of channels) {
      const out = outletOf(line, nodeOf(from));
      expect(start(path)).toEqual([places[from].x + out.x, places[from].y + out.y]);
      expect(end(path)).toBe(places[to].x + inletOf(line, nodeOf(to), from).x);
    }
  });

  it("leaves out a link whose node has no place", () => {
    const [{ from, to }] = line.links;
    const without = Object.fromEntries(Object.entries(places).filter(([id]) => id !== from));
    const left = channelsOf(line, without);
    expect(left.some((channel) => channel.from === from && channel.to === to)).toBe(false);
    expect(left.length).toBeLessThan(channels.length);
  });

  it("gives the channels that rise to one station upright lanes of their own", () => {
    const busiest = channels.filter(({ to }) => to === "final");
    expect(busiest.length).toBeGreaterThan(3);
    for (const isDown of [true, false]) {
      const turns = busiest
        .filter(({ path }) => path.includes("V"))
        .filter(({ from, to }) => {
          const out = places[from].y + outletOf(line, nodeOf(from)).y;
          const into = places[to].y + inletOf(line, nodeOf(to), from).y;
          return out <= into === isDown;
        })
        .map(({ middle }) => middle.x)
        .sort((a, b) => a - b);
      // A channel is 7 px wide with its walls: lanes closer than that would lie on one another.
      turns.slice(1).forEach((x, i) => expect(x - turns[i]).toBeGreaterThanOrEqual(7));
    }
  });

  it("draws a level link as one straight line, and no corner of more than 6 px", () => {
    const two: DraftLine = { ...line, links: [line.links[0]] };
    const { from, to } = line.links[0];
    const out = outletOf(two, nodeOf(from));
    const into = inletOf(two, nodeOf(to), from);
    const level = { [from]: { x: 0, y: 0 }, [to]: { x: 400, y: out.y - into.y } };
    expect(channelsOf(two, level)[0].path).toBe(`M${out.x} ${out.y}H${400 + into.x}`);
    const low = { [from]: { x: 0, y: 0 }, [to]: { x: 400, y: 300 } };
    const { path, middle } = channelsOf(two, low)[0];
    expect(path).toContain(`H${middle.x - 6}Q${middle.x} ${out.y} ${middle.x} ${out.y + 6}V`);
  });
});

describe("sizes", () => {
  it("makes a station taller by one inlet an input", () => {
    const many = line.nodes.filter(({ kind }) => kind === "station").map((node) => sizeOf(line, node).height);
    const links = line.links.filter(({ to }) => to === "final").length;
    expect(links).toBeGreaterThan(1);
    expect(sizeOf(line, nodeOf("final")).height).toBe(Math.max(...many));
    const fewer = {
      ...line,
      links: line.links.filter((_, i) => i !== line.links.findIndex(({ to }) => to === "final")),
    };
    expect(sizeOf(line, nodeOf("final")).height - sizeOf(fewer, nodeOf("final")).height).toBe(34);
  });

  it("lets automatic places overlap nowhere", () => {
    const sizes = Object.fromEntries(line.nodes.map((node) => [node.id, sizeOf(line, node)]));
    const boxes = line.nodes.map(({ id }) => ({ ...places[id], ...sizes[id] }));
    for (const [i, a] of boxes.entries())
      for (const b of boxes.slice(i + 1))
        expect(a.x + a.width <= b.x || b.x + b.width <= a.x || a.y + a.height <= b.y || b.y + b.height <= a.y).toBe(
          true,
        );
  });
});
