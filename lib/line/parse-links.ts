import { type Checker, isRecord, rule, shorten } from "./parse-fields";
import type { Link, NodeKind } from "./types";

export type NamedNode = { id: string; kind: NodeKind; name: string };

const allowed: Record<NodeKind, readonly NodeKind[]> = {
  supplier: ["buffer"],
  buffer: ["station", "customer"],
  station: ["buffer"],
  customer: [],
};

/** May a link run this way? Supplier to buffer, buffer to station or customer, station to buffer. */
export function isLinkAllowed(from: NodeKind, to: NodeKind): boolean {
  return allowed[from].includes(to);
}

/**
 * Checks every link on its own and returns those that can be followed.
 * @param nodes - By id.
 */
export function checkLinks(check: Checker, links: readonly unknown[], nodes: ReadonlyMap<string, NamedNode>): Link[] {
  const seen = new Set<string>();
  const sound: Link[] = [];
  links.forEach((value, index) => {
    if (!isRecord(value) || typeof value.from !== "string" || typeof value.to !== "string") {
      check.add({}, `links.${index}`, `Link ${index + 1} has to name the two nodes it joins (from, to).`);
      return;
    }
    const link = value as Link;
    const place = { link: { from: link.from, to: link.to } };
    check.keys(value, place, "", "The link", ["from", "to"], ["quantity"]);
    const from = nodes.get(link.from);
    const to = nodes.get(link.to);
    if (!from || !to) {
      check.add(
        place,
        undefined,
        `A link names "${shorten(from ? link.to : link.from)}", which is not on the line. Take the link out.`,
      );
      return;
    }
    const pair = JSON.stringify([link.from, link.to]);
    if (seen.has(pair)) {
      check.add(
        place,
        undefined,
        `${from.name} and ${to.name} are joined twice. Take one link out and set its quantity instead.`,
      );
      return;
    }
    seen.add(pair);
    if (!isLinkAllowed(from.kind, to.kind)) {
      check.add(
        place,
        undefined,
        `${from.name} (${from.kind}) cannot feed ${to.name} (${to.kind}). Links run supplier to buffer, buffer to station, station to buffer, buffer to customer.`,
      );
      return;
    }
    if (link.quantity !== undefined) {
      if (from.kind === "buffer" && to.kind === "station")
        check.number(link.quantity, place, "quantity", "The quantity", rule.wholeFromOne("Quantity per unit made"));
      else
        check.add(
          place,
          "quantity",
          `Only a link from a buffer to a station has a quantity. Take it off the link from ${from.name}.`,
        );
    }
    sound.push(link);
  });
  return sound;
}

/** Checks what each node needs around it, and that nothing runs in a circle. */
export function checkStructure(check: Checker, nodes: readonly NamedNode[], links: readonly Link[]): void {
  const byId = new Map(nodes.map((node) => [node.id, node]));
  const inputs = new Map<string, NamedNode[]>(nodes.map((node) => [node.id, []]));
  const outputs = new Map<string, NamedNode[]>(nodes.map((node) => [node.id, []]));
  for (const { from, to } of links) {
    outputs.get(from)?.push(byId.get(to)!);
    inputs.get(to)?.push(byId.get(from)!);
  }
  for (const node of nodes) checkSurroundings(check, node, inputs.get(node.id)!, outputs.get(node.id)!);
  if (!nodes.some((node) => node.kind === "customer"))
    check.add({}, undefined, "The line has no customer. Add one and join it to the finished goods.");
  for (const node of findCircle(nodes, outputs))
    check.add(
      { node: node.id },
      undefined,
      `${node.name} lies on a circle of links. Material has to run one way: take out one of the links.`,
    );
}

function checkSurroundings(check: Checker, node: NamedNode, inputs: NamedNode[], outputs: NamedNode[]) {
  const fault = (message: string) => check.add({ node: node.id }, undefined, message);
  const { name } = node;
  if (node.kind === "supplier" && outputs.length !== 1)
    fault(
      outputs.length === 0
        ? `${name} feeds no buffer. Join it to one.`
        : `${name} feeds ${outputs.length} buffers. A supplier feeds exactly one: add a supplier for each part.`,
    );
  if (node.kind === "station") {
    if (inputs.length === 0) fault(`${name} has no input. Join at least one buffer to it.`);
    if (outputs.length !== 1)
      fault(
        outputs.length === 0
          ? `${name} has nowhere to put what it makes. Join it to one buffer.`
          : `${name} feeds ${outputs.length} buffers. A station fills exactly one.`,
      );
  }
  if (node.kind === "customer" && inputs.length !== 1)
    fault(
      inputs.length === 0
        ? `${name} draws on no buffer. Join one to it.`
        : `${name} draws on ${inputs.length} buffers. A customer draws on exactly one.`,
    );
  if (node.kind === "buffer") {
    const kinds = new Set(inputs.map((input) => input.kind));
    if (kinds.size === 0) fault(`Nothing feeds ${name}. Join a supplier or a station to it.`);
    if (kinds.size > 1) fault(`${name} is fed by suppliers and by stations. Use a buffer for each.`);
    if (outputs.length === 0) fault(`Nothing takes from ${name}. Join a station or a customer to it.`);
  }
}

/** Nodes that remain when all with no open input are taken away again and again (Kahn 1962), and that reach one another. */
function findCircle(nodes: readonly NamedNode[], outputs: ReadonlyMap<string, NamedNode[]>): NamedNode[] {
  const nOpen = new Map(nodes.map((node) => [node.id, 0]));
  for (const targets of outputs.values()) for (const to of targets) nOpen.set(to.id, nOpen.get(to.id)! + 1);
  const free = nodes.filter((node) => nOpen.get(node.id) === 0);
  const left = new Set(nodes.map((node) => node.id));
  for (let node = free.pop(); node; node = free.pop()) {
    left.delete(node.id);
    for (const to of outputs.get(node.id)!) {
      nOpen.set(to.id, nOpen.get(to.id)! - 1);
      if (nOpen.get(to.id) === 0) free.push(to);
    }
  }
  // What only lies downstream of a circle leads nowhere back: take it away from the other end.
  for (let isShrinking = true; isShrinking;) {
    isShrinking = false;
    for (const id of left)
      if (!outputs.get(id)!.some((to) => left.has(to.id))) {
        left.delete(id);
        isShrinking = true;
      }
  }
  return nodes.filter((node) => left.has(node.id));
}
