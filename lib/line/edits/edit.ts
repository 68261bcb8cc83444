import type { DraftLine, DraftNode, Layout, Note } from "../types";

/** All that one scenario's sheet holds: what undo brings back. */
export type SheetState = { document: DraftLine; layout: Layout; notes: Note[] };

/** A change of the sheet. `apply` is pure and returns the same object when nothing changes; `label` completes "Undo: ...". */
export type Edit = { label: string; apply(state: SheetState): SheetState };

export function withDocument(state: SheetState, document: DraftLine): SheetState {
  return document === state.document ? state : { ...state, document };
}

export function findNode(document: DraftLine, id: string): DraftNode | undefined {
  return document.nodes.find((node) => node.id === id);
}

/** Replaces one node; the same document when `next` is the node itself. */
export function replaceNode(document: DraftLine, id: string, change: (node: DraftNode) => DraftNode): DraftLine {
  let isChanged = false;
  const nodes = document.nodes.map((node) => {
    if (node.id !== id) return node;
    const next = change(node);
    isChanged ||= next !== node;
    return next;
  });
  return isChanged ? { ...document, nodes } : document;
}

/**
 * Sets the field at a dotted path without changing the object.
 * @returns The same object when the value is there already.
 */
export function setPath<T extends object>(object: T, path: string, value: unknown): T {
  const [key, ...rest] = path.split(".");
  if (key === "__proto__") return object;
  const old = (object as Record<string, unknown>)[key];
  const next = rest.length === 0 ? value : setPath((old ?? {}) as object, rest.join("."), value);
  if (Object.is(old, next)) return object;
  return (Array.isArray(object) ? Object.assign([...object], { [key]: next }) : { ...object, [key]: next }) as T;
}
