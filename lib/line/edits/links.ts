import { isLinkAllowed } from "../parse-links";
import type { DraftLine, DraftNode, Layout } from "../types";
import { type Edit, findNode, replaceNode, type SheetState, withDocument } from "./edit";
import { defaultSize, settleFeeds, suppliersOf } from "./feeds";
import { createNode } from "./nodes";

const twoStep = (from: DraftNode, to: DraftNode) =>
  (from.kind === "station" && to.kind === "station") || (from.kind === "supplier" && to.kind === "station");

/**
 * Why two nodes cannot be joined, or null. A station to a station and a supplier to a station are joined through a
 * new buffer.
 */
export function canConnect(document: DraftLine, fromId: string, toId: string): string | null {
  const from = findNode(document, fromId);
  const to = findNode(document, toId);
  if (!from || !to) return "One of the two is no longer on the line.";
  if (from.id === to.id) return `${from.name} cannot feed itself.`;
  if (document.links.some((link) => link.from === fromId && link.to === toId))
    return `${from.name} feeds ${to.name} already.`;
  const outputs = document.links.filter((link) => link.from === fromId).length;
  if (from.kind === "customer") return `${from.name} is a customer: nothing leaves it.`;
  if (to.kind === "supplier") return `${to.name} is a supplier: nothing enters it.`;
  if (from.kind === "supplier" && outputs > 0)
    return `${from.name} feeds a buffer already. A supplier feeds exactly one.`;
  if (from.kind === "station" && outputs > 0)
    return `${from.name} fills a buffer already. A station fills exactly one.`;
  if (!isLinkAllowed(from.kind, to.kind) && !twoStep(from, to))
    return from.kind === "buffer"
      ? `${from.name} is a buffer: it feeds stations and customers. Put a station between.`
      : `${from.name} has to fill a buffer that ${to.name} draws on. Add a buffer between.`;
  if (to.kind === "customer" && document.links.some((link) => link.to === toId))
    return `${to.name} draws on a buffer already. A customer draws on exactly one.`;
  if (to.kind === "buffer") {
    const feeders = document.links
      .filter((link) => link.to === toId)
      .map((link) => findNode(document, link.from)?.kind);
    if (feeders.some((kind) => kind !== from.kind))
      return `${to.name} is fed by ${feeders[0] === "supplier" ? "suppliers" : "stations"}. Suppliers and stations need a buffer each.`;
  }
  if (reaches(document, toId, fromId)) return `That would close a circle: ${to.name} leads back to ${from.name}.`;
  return null;
}

function reaches(document: DraftLine, fromId: string, toId: string): boolean {
  const passed = new Set<string>();
  const open = [fromId];
  for (let id = open.pop(); id !== undefined; id = open.pop()) {
    if (id === toId) return true;
    if (passed.has(id)) continue;
    passed.add(id);
    for (const link of document.links) if (link.from === id) open.push(link.to);
  }
  return false;
}

/** Joins two nodes; changes nothing where `canConnect` gives a reason against it. */
export function connect(fromId: string, toId: string): Edit {
  return {
    label: "connect",
    apply(state) {
      if (canConnect(state.document, fromId, toId) !== null) return state;
      const from = findNode(state.document, fromId)!;
      const to = findNode(state.document, toId)!;
      return twoStep(from, to) ? connectThroughBuffer(state, from, to) : connectDirectly(state, from, to);
    },
  };
}

function connectDirectly(state: SheetState, from: DraftNode, to: DraftNode): SheetState {
  const { document } = state;
  const linked = settleFeeds({ ...document, links: [...document.links, { from: from.id, to: to.id }] }, document);
  if (from.kind !== "supplier" || suppliersOf(linked, to.id).length > 1) return { ...state, document: linked };
  return { ...state, document: fillSize(linked, to.id, from.leadTimeDays) };
}

function connectThroughBuffer(state: SheetState, from: DraftNode, to: DraftNode): SheetState {
  const { document, layout } = state;
  const blank = { ...createNode(document, "buffer"), name: freeName(document, `${from.name} stock`) };
  const buffer = from.kind === "station" ? { ...blank, size: 1, startLevel: 0, unitValue: 0 } : blank;
  const links = [...document.links, { from: from.id, to: buffer.id }, { from: buffer.id, to: to.id }];
  const linked = settleFeeds({ ...document, nodes: [...document.nodes, buffer as DraftNode], links }, document);
  const done = from.kind === "supplier" ? fillSize(linked, buffer.id, from.leadTimeDays) : linked;
  return { ...state, document: done, layout: placeBetween(layout, from.id, to.id, buffer.id) };
}

function freeName(document: DraftLine, wanted: string): string {
  const taken = new Set(document.nodes.map((node) => node.name));
  let name = wanted;
  for (let n = 2; taken.has(name); n++) name = `${wanted} (${n})`;
  return name;
}

function fillSize(document: DraftLine, bufferId: string, leadTimeDays: number | null): DraftLine {
  return replaceNode(document, bufferId, (node) =>
    node.kind === "buffer" && node.size === null
      ? { ...node, size: defaultSize(document, bufferId, leadTimeDays) }
      : node,
  );
}

function placeBetween(layout: Layout, fromId: string, toId: string, newId: string): Layout {
  const a = layout.positions[fromId];
  const b = layout.positions[toId];
  if (!a || !b) return layout;
  const at = { x: Math.round((a.x + b.x) / 2), y: Math.round((a.y + b.y) / 2) };
  return { ...layout, positions: { ...layout.positions, [newId]: at } };
}

/** Units per unit made, on a link from a buffer to a station; null leaves a gap. */
export function setLinkQuantity(fromId: string, toId: string, quantity: number | null): Edit {
  return {
    label: "change the quantity",
    apply(state) {
      const old = state.document.links.find((link) => link.from === fromId && link.to === toId);
      if (!old || old.quantity === quantity) return state;
      const links = state.document.links.map((link) => (link === old ? { ...link, quantity } : link));
      return withDocument(state, { ...state.document, links });
    },
  };
}
