import type { DraftLine, DraftNode } from "./types";

export type Size = { width: number; height: number };
export type Point = { x: number; y: number };

/** Drawn sizes in px at 100 %. They are fixed, so that channels are known without measuring. */
export const plate = { width: 148, height: 60 };
export const gauge = { width: 148, height: 104, x: 4, y: 36, bay: 39, depth: 50 };
export const station = { width: 156, head: 60, inlet: 34, foot: 26 };

/** Links into a station, in document order: its inlets from top to bottom. */
export function inletsOf(document: DraftLine, stationId: string): DraftLine["links"] {
  return document.links.filter((link) => link.to === stationId);
}

export function sizeOf(document: DraftLine, node: DraftNode): Size {
  if (node.kind === "buffer") return { width: gauge.width, height: gauge.height };
  if (node.kind !== "station") return plate;
  const nInlets = inletsOf(document, node.id).length;
  const inlets = nInlets > 1 ? nInlets * station.inlet : 8;
  return { width: station.width, height: station.head + inlets + station.foot };
}

/** Where a channel leaves a node, from its top left corner: a gauge at its bed, plates at the middle of the right side. */
export function outletOf(document: DraftLine, node: DraftNode): Point {
  if (node.kind === "buffer") return { x: gauge.x + gauge.bay, y: gauge.y + gauge.depth - 3 };
  const { width, height } = sizeOf(document, node);
  return { x: width, y: height / 2 };
}

/** Where a channel enters: a gauge near its top, a station at the inlet of its own, plates at the middle of the left side. */
export function inletOf(document: DraftLine, node: DraftNode, fromId?: string): Point {
  if (node.kind === "buffer") return { x: gauge.x + 9, y: gauge.y + 8 };
  const { height } = sizeOf(document, node);
  if (node.kind !== "station") return { x: 0, y: height / 2 };
  const inlets = inletsOf(document, node.id);
  const index = inlets.findIndex((link) => link.from === fromId);
  if (inlets.length < 2 || index < 0) return { x: 0, y: height / 2 };
  return { x: 0, y: station.head + (index + 0.5) * station.inlet };
}
