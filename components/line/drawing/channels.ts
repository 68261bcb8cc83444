import type { DraftLine, DraftNode } from "@/lib/line/types";
import { inletOf, outletOf, type Point } from "@/lib/line/sheet-sizes";

export type Channel = { key: string; from: string; to: string; path: string; middle: Point };

const corner = 6;
const lane = 8;

/**
 * Course of every link as a path with round corners. Channels that enter one node run their upright part in lanes of
 * their own, so that none hides another.
 * @param places - Top left corners by node id, px; links of nodes without a place are left out.
 */
export function channelsOf(document: DraftLine, places: Readonly<Record<string, Point>>): Channel[] {
  const byId = new Map(document.nodes.map((node) => [node.id, node]));
  const courses = document.links.flatMap(({ from, to }) => {
    const a = byId.get(from);
    const b = byId.get(to);
    if (!a || !b || !places[from] || !places[to]) return [];
    return [{ from, to, start: portOf(document, a, places[from]), end: entryOf(document, b, places[to], from) }];
  });
  return courses.map(({ from, to, start, end }) => {
    const rivals = courses.filter((other) => other.to === to);
    const turn = turnOf(start, end, laneOf(rivals, start, end));
    return {
      key: JSON.stringify([from, to]),
      from,
      to,
      path: roundPath(start, end, turn),
      middle: { x: turn, y: (start.y + end.y) / 2 },
    };
  });
}

const portOf = (document: DraftLine, node: DraftNode, at: Point): Point => shift(outletOf(document, node), at);
const entryOf = (document: DraftLine, node: DraftNode, at: Point, from: string): Point =>
  shift(inletOf(document, node, from), at);
const shift = (point: Point, by: Point): Point => ({ x: point.x + by.x, y: point.y + by.y });

type Course = { start: Point; end: Point };

/** Those from above: the uppermost inlet turns last; those from below: the other way round, so that courses do not cross. */
function laneOf(rivals: readonly Course[], start: Point, end: Point): number {
  const isDown = start.y <= end.y;
  const same = rivals.filter((other) => other.start.y <= other.end.y === isDown);
  const order = [...same].sort((a, b) =>
    isDown ? a.end.y - b.end.y || b.start.y - a.start.y : b.end.y - a.end.y || a.start.y - b.start.y,
  );
  return order.findIndex((other) => other.start === start && other.end === end);
}

function turnOf(start: Point, end: Point, laneIndex: number): number {
  const wanted = end.x - 14 - laneIndex * lane;
  const least = start.x + 10;
  return wanted >= least ? wanted : (start.x + end.x) / 2;
}

function roundPath(start: Point, end: Point, turn: number): string {
  const rise = end.y - start.y;
  if (Math.abs(rise) < 1) return `M${start.x} ${start.y}H${end.x}`;
  const sign = Math.sign(rise);
  const r = Math.min(corner, Math.abs(rise) / 2, Math.abs(turn - start.x), Math.abs(end.x - turn));
  const into = Math.sign(turn - start.x) || 1;
  const out = Math.sign(end.x - turn) || 1;
  return [
    `M${start.x} ${start.y}H${turn - into * r}`,
    `Q${turn} ${start.y} ${turn} ${start.y + sign * r}`,
    `V${end.y - sign * r}`,
    `Q${turn} ${end.y} ${turn + out * r} ${end.y}`,
    `H${end.x}`,
  ].join("");
}
