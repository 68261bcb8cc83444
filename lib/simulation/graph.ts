import type { Buffer, Customer, Line, Station, Supplier } from "@/lib/line/types";

/** The nodes of a line by kind, in document order, and how they hang together. Numbers are indices within the kind. */
export type Graph = {
  suppliers: Supplier[];
  buffers: Buffer[];
  stations: Station[];
  customers: Customer[];
  /** Buffer fed by each supplier. */
  supplierBuffer: number[];
  /** Suppliers and feeding stations of each buffer, in link order. */
  bufferSuppliers: number[][];
  bufferFeeders: number[][];
  /** Stations that take from each buffer. */
  bufferTakers: number[][];
  stationInputs: { buffer: number; quantity: number }[][];
  stationOutput: number[];
  customerBuffer: number[];
  /** Stations downstream first: again and again the first one in document order whose output's takers are all listed. */
  serviceOrder: number[];
};

/**
 * Reads the links of a line.
 * @throws RangeError on the first thing that no line may have; `parseLine` finds them all and says how to mend them.
 */
export function buildGraph(line: Line): Graph {
  const suppliers = line.nodes.filter((node) => node.kind === "supplier");
  const buffers = line.nodes.filter((node) => node.kind === "buffer");
  const stations = line.nodes.filter((node) => node.kind === "station");
  const customers = line.nodes.filter((node) => node.kind === "customer");
  const indices = new Map<string, { kind: string; index: number }>();
  for (const nodes of [suppliers, buffers, stations, customers]) {
    nodes.forEach((node, index) => {
      if (indices.has(node.id)) throw new RangeError(`two nodes have the id "${node.id}"`);
      indices.set(node.id, { kind: node.kind, index });
    });
  }
  const graph: Omit<Graph, "serviceOrder"> = {
    suppliers,
    buffers,
    stations,
    customers,
    supplierBuffer: suppliers.map(() => -1),
    bufferSuppliers: buffers.map(() => []),
    bufferFeeders: buffers.map(() => []),
    bufferTakers: buffers.map(() => []),
    stationInputs: stations.map(() => []),
    stationOutput: stations.map(() => -1),
    customerBuffer: customers.map(() => -1),
  };
  for (const link of line.links) {
    const from = indices.get(link.from);
    const to = indices.get(link.to);
    if (!from || !to) throw new RangeError(`the link ${link.from} -> ${link.to} has an end that is no node`);
    const claim = (ends: number[], at: number, value: number): void => {
      if (ends[at] !== -1) throw new RangeError(`the link ${link.from} -> ${link.to} is one too many`);
      ends[at] = value;
    };
    switch (`${from.kind} ${to.kind}`) {
      case "supplier buffer":
        claim(graph.supplierBuffer, from.index, to.index);
        graph.bufferSuppliers[to.index].push(from.index);
        break;
      case "station buffer":
        claim(graph.stationOutput, from.index, to.index);
        graph.bufferFeeders[to.index].push(from.index);
        break;
      case "buffer station":
        graph.stationInputs[to.index].push({ buffer: from.index, quantity: link.quantity ?? 1 });
        graph.bufferTakers[from.index].push(to.index);
        break;
      case "buffer customer":
        claim(graph.customerBuffer, to.index, from.index);
        break;
      default:
        throw new RangeError(`a ${from.kind} cannot feed a ${to.kind} (${link.from} -> ${link.to})`);
    }
  }
  requireWhole(graph);
  return { ...graph, serviceOrder: orderStations(graph) };
}

function requireWhole(graph: Omit<Graph, "serviceOrder">): void {
  const open = (nodes: { id: string }[], isOpen: (index: number) => boolean): void => {
    const index = nodes.findIndex((_, i) => isOpen(i));
    if (index !== -1) throw new RangeError(`node "${nodes[index].id}" lacks a link`);
  };
  open(graph.suppliers, (i) => graph.supplierBuffer[i] === -1);
  open(graph.stations, (i) => graph.stationOutput[i] === -1 || graph.stationInputs[i].length === 0);
  open(graph.customers, (i) => graph.customerBuffer[i] === -1);
  open(graph.buffers, (i) => graph.bufferTakers[i].length === 0 && !graph.customerBuffer.includes(i));
  graph.buffers.forEach((buffer, i) => {
    const isPurchased = graph.bufferSuppliers[i].length > 0;
    if (isPurchased === graph.bufferFeeders[i].length > 0) {
      throw new RangeError(`buffer "${buffer.id}" must be fed by suppliers or by stations`);
    }
    if (isPurchased !== (buffer.replenishment !== null)) {
      throw new RangeError(`buffer "${buffer.id}" must have a replenishment exactly if suppliers feed it`);
    }
  });
  if (graph.customers.length === 0) throw new RangeError("the line has no customer");
}

function orderStations(graph: Omit<Graph, "serviceOrder">): number[] {
  const nOpen = graph.bufferTakers.map((takers) => takers.length);
  const isServed = graph.stations.map(() => false);
  const order: number[] = [];
  while (order.length < graph.stations.length) {
    const next = graph.stations.findIndex((_, i) => !isServed[i] && nOpen[graph.stationOutput[i]] === 0);
    if (next === -1) throw new RangeError("the line has a cycle");
    isServed[next] = true;
    order.push(next);
    for (const input of graph.stationInputs[next]) nOpen[input.buffer]--;
  }
  return order;
}
