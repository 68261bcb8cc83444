import { describeField, fieldName } from "./field-names";
import type { DraftLine, DraftNode } from "./types";

/** One thing in which two documents differ; `text` says it in words, from the first to the second. */
export type Difference = { node?: string; name: string; field: string; from: unknown; to: unknown; text: string };

/** What differs between two line documents, field by field: the line's own fields, then nodes, then links. */
export function differences(a: DraftLine, b: DraftLine): Difference[] {
  const { nodes: nodesA, links: linksA, ...ownA } = a;
  const { nodes: nodesB, links: linksB, ...ownB } = b;
  return [
    ...compareFields("The line", undefined, "line", ownA, ownB),
    ...compareNodes(nodesA, nodesB),
    ...compareLinks(a, b, linksA, linksB),
  ];
}

function compareNodes(a: readonly DraftNode[], b: readonly DraftNode[]): Difference[] {
  if (a === b) return [];
  const before = new Map(a.map((node) => [node.id, node]));
  const after = new Map(b.map((node) => [node.id, node]));
  const found: Difference[] = [];
  for (const node of a)
    if (!after.has(node.id))
      found.push({
        node: node.id,
        name: node.name,
        field: "",
        from: node,
        to: undefined,
        text: `${node.name} taken out`,
      });
  for (const node of b) {
    const old = before.get(node.id);
    if (!old)
      found.push({ node: node.id, name: node.name, field: "", from: undefined, to: node, text: `${node.name} added` });
    else if (old !== node) found.push(...compareFields(node.name, node.id, node.kind, old, node));
  }
  return found;
}

function compareLinks(
  a: DraftLine,
  b: DraftLine,
  linksA: DraftLine["links"],
  linksB: DraftLine["links"],
): Difference[] {
  if (linksA === linksB) return [];
  const key = ({ from, to }: { from: string; to: string }) => JSON.stringify([from, to]);
  const before = new Map(linksA.map((link) => [key(link), link]));
  const after = new Map(linksB.map((link) => [key(link), link]));
  const found: Difference[] = [];
  const nameIn = (document: DraftLine, id: string) => document.nodes.find((node) => node.id === id)?.name ?? id;
  for (const [pair, link] of before)
    if (!after.has(pair)) {
      const name = `${nameIn(a, link.from)} to ${nameIn(a, link.to)}`;
      found.push({ name, field: "link", from: link, to: undefined, text: `Link ${name} taken out` });
    }
  for (const [pair, link] of after) {
    const name = `${nameIn(b, link.from)} to ${nameIn(b, link.to)}`;
    const old = before.get(pair);
    if (!old) found.push({ name, field: "link", from: undefined, to: link, text: `Link ${name} added` });
    else if ((old.quantity ?? 1) !== (link.quantity ?? 1))
      found.push({
        name,
        field: "quantity",
        from: old.quantity ?? 1,
        to: link.quantity ?? 1,
        text: `${name}: quantity ${old.quantity ?? 1} → ${link.quantity ?? 1}`,
      });
  }
  return found;
}

type Fields = Record<string, unknown>;

function compareFields(
  name: string,
  node: string | undefined,
  kind: string,
  a: Fields,
  b: Fields,
  prefix = "",
): Difference[] {
  return [...new Set([...Object.keys(a), ...Object.keys(b)])].flatMap((key) => {
    const from = a[key];
    const to = b[key];
    const path = prefix ? `${prefix}.${key}` : key;
    if (isSame(from, to)) return [];
    if (isFields(from) && isFields(to) && from.type === to.type && from.pattern === to.pattern)
      return compareFields(name, node, kind, from, to, path);
    const field = fieldName(kind, path);
    const text = `${name}: ${field} ${describeField(path, from)} → ${describeField(path, to)}`;
    return [{ ...(node === undefined ? {} : { node }), name, field, from, to, text }];
  });
}

const isFields = (value: unknown): value is Fields =>
  typeof value === "object" && value !== null && !Array.isArray(value);

function isSame(a: unknown, b: unknown): boolean {
  if (Object.is(a, b)) return true;
  if (Array.isArray(a) && Array.isArray(b)) return a.length === b.length && a.every((value, i) => isSame(value, b[i]));
  if (!isFields(a) || !isFields(b)) return false;
  const keys = new Set([...Object.keys(a), ...Object.keys(b)]);
  return [...keys].every((key) => isSame(a[key], b[key]));
}
