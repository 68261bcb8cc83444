import type { DraftLine, DraftNode, NodeKind } from "../types";
import { type Edit, findNode, replaceNode, setPath, type SheetState, withDocument } from "./edit";
import { settleFeeds } from "./feeds";

const words: Record<NodeKind, string> = {
  supplier: "Supplier",
  buffer: "Buffer",
  station: "Station",
  customer: "Customer",
};

/** Key by which a link is selected. */
export const linkKey = (from: string, to: string) => `${from}>${to}`;

/** First id "kind-n" that is free. */
export function nextId(document: DraftLine, kind: NodeKind): string {
  return `${kind}-${nextNumber(document, kind)}`;
}

function nextNumber(document: DraftLine, kind: NodeKind): number {
  const taken = new Set(document.nodes.flatMap((node) => [node.id, node.name]));
  let n = document.nodes.filter((node) => node.kind === kind).length + 1;
  while (taken.has(`${kind}-${n}`) || taken.has(`${words[kind]} ${n}`)) n++;
  return n;
}

/** A node as it is when just drawn: what only the plant can know is missing, the rest is the plain case. */
export function createNode(document: DraftLine, kind: NodeKind): DraftNode {
  const n = nextNumber(document, kind);
  const named = { id: `${kind}-${n}`, name: `${words[kind]} ${n}` };
  switch (kind) {
    case "supplier":
      return {
        kind,
        ...named,
        leadTimeDays: null,
        lateness: null,
        onTimeShare: 1,
        correlation: 0,
        keepsSequence: true,
        disruption: null,
        rejectRate: 0,
        lotRejectRate: 0,
        share: 1,
      };
    case "buffer":
      return { kind, ...named, size: null, startLevel: null, unitValue: 0, replenishment: null };
    case "station":
      return { kind, ...named, cycleMinutes: null, cycleCv: 0, parallel: 1, scrapRate: 0, stoppages: null };
    case "customer":
      return {
        kind,
        ...named,
        weeklyDemand: { type: "normal", mean: null, sd: null },
        correlation: 0,
        callOff: "daily",
        unmet: "backorder",
        lateFine: 0,
      };
  }
}

/** Adds a node at a place on the sheet (px at 100 %). */
export function addNode(kind: NodeKind, at: { x: number; y: number }): Edit {
  return {
    label: `add a ${kind}`,
    apply(state) {
      const node = createNode(state.document, kind);
      return {
        ...state,
        document: { ...state.document, nodes: [...state.document.nodes, node] },
        layout: { ...state.layout, positions: { ...state.layout.positions, [node.id]: at } },
      };
    },
  };
}

/** Deletes nodes with their links, links by `linkKey`, and notes. */
export function deleteItems(ids: readonly string[]): Edit {
  const gone = new Set(ids);
  return {
    label: ids.length === 1 ? "delete" : `delete ${ids.length} things`,
    apply(state) {
      const { document } = state;
      const nodes = document.nodes.filter((node) => !gone.has(node.id));
      const links = document.links.filter(
        ({ from, to }) => !gone.has(from) && !gone.has(to) && !gone.has(linkKey(from, to)),
      );
      const notes = state.notes.filter((note) => !gone.has(note.id));
      const isSame =
        nodes.length === document.nodes.length &&
        links.length === document.links.length &&
        notes.length === state.notes.length;
      if (isSame) return state;
      const positions = Object.fromEntries(Object.entries(state.layout.positions).filter(([id]) => !gone.has(id)));
      return {
        document: settleFeeds({ ...document, nodes, links }, document),
        layout: { ...state.layout, positions },
        notes,
      };
    },
  };
}

/** Copies nodes and the links among them, a little to the lower right. */
export function duplicate(ids: readonly string[]): Edit {
  return {
    label: ids.length === 1 ? "duplicate" : `duplicate ${ids.length} nodes`,
    apply(state) {
      const copies = new Map<string, string>();
      let { document } = state;
      const positions = { ...state.layout.positions };
      for (const id of ids) {
        const node = findNode(state.document, id);
        if (!node) continue;
        const copyId = nextId(document, node.kind);
        const at = positions[id] ?? { x: 0, y: 0 };
        copies.set(id, copyId);
        positions[copyId] = { x: at.x + 32, y: at.y + 48 };
        document = {
          ...document,
          nodes: [...document.nodes, { ...node, id: copyId, name: copyName(document, node.name) }],
        };
      }
      if (copies.size === 0) return state;
      const links = state.document.links
        .filter(({ from, to }) => copies.has(from) && copies.has(to))
        .map((link) => ({ ...link, from: copies.get(link.from)!, to: copies.get(link.to)! }));
      const next = { ...document, links: [...document.links, ...links] };
      return { ...state, document: settleFeeds(next, state.document), layout: { ...state.layout, positions } };
    },
  };
}

function copyName(document: DraftLine, name: string): string {
  const taken = new Set(document.nodes.map((node) => node.name));
  const stem = name.replace(/ \(\d+\)$/, "");
  let n = 2;
  while (taken.has(`${stem} (${n})`)) n++;
  return `${stem} (${n})`;
}

/** Sets one field of a node by its dotted path, for instance `stoppages.meanUpHours`. */
export function setField(nodeId: string, path: string, value: unknown): Edit {
  return setNode(nodeId, `change ${path}`, (node) => setPath(node, path, value));
}

/** Changes a node by a pure function. */
export function setNode(nodeId: string, label: string, change: (node: DraftNode) => DraftNode): Edit {
  return { label, apply: (state) => withDocument(state, replaceNode(state.document, nodeId, change)) };
}

/** Moves nodes and notes to new places. */
export function moveNodes(places: Readonly<Record<string, { x: number; y: number }>>): Edit {
  const n = Object.keys(places).length;
  return {
    label: n === 1 ? "move" : `move ${n} things`,
    apply(state: SheetState) {
      const nodeIds = new Set(state.document.nodes.map((node) => node.id));
      const moved = Object.entries(places).filter(([id]) => nodeIds.has(id));
      const notes = state.notes.map((note) => {
        const at = places[note.id];
        return at && (at.x !== note.x || at.y !== note.y) ? { ...note, ...at } : note;
      });
      const isMoved = moved.some(([id, at]) => {
        const old = state.layout.positions[id];
        return !old || old.x !== at.x || old.y !== at.y;
      });
      const areNotesMoved = notes.some((note, i) => note !== state.notes[i]);
      if (!isMoved && !areNotesMoved) return state;
      return {
        ...state,
        notes: areNotesMoved ? notes : state.notes,
        layout: isMoved
          ? { ...state.layout, positions: { ...state.layout.positions, ...Object.fromEntries(moved) } }
          : state.layout,
      };
    },
  };
}
