import { graphlib, layout as dagreLayout } from "@dagrejs/dagre";
import type { DraftLine, Layout } from "./types";

export type Size = { width: number; height: number };

/** Sizes by kind for a sheet that has not been measured yet, px at 100 %. */
const usual: Record<DraftLine["nodes"][number]["kind"], Size> = {
  supplier: { width: 128, height: 44 },
  buffer: { width: 120, height: 92 },
  station: { width: 140, height: 76 },
  customer: { width: 128, height: 44 },
};

/**
 * Places all nodes in flow order from left to right.
 * @param sizes - Measured sizes by node id, px at 100 %.
 * @returns Top left corners, whole px, on a sheet that starts at (0, 0).
 * @remarks Layered drawing after Sugiyama; Gansner et al., IEEE Trans. Softw. Eng. 19 (1993), as dagre has it.
 */
export function autoLayout(document: DraftLine, sizes: Readonly<Record<string, Size>> = {}): Layout {
  const graph = new graphlib.Graph();
  graph.setGraph({ rankdir: "LR", nodesep: 22, ranksep: 44, marginx: 0, marginy: 0 });
  graph.setDefaultEdgeLabel(() => ({}));
  for (const node of document.nodes) graph.setNode(node.id, { ...(sizes[node.id] ?? usual[node.kind]) });
  for (const { from, to } of document.links) if (graph.hasNode(from) && graph.hasNode(to)) graph.setEdge(from, to);
  dagreLayout(graph);
  const positions = document.nodes.map(({ id }) => {
    const { x, y, width, height } = graph.node(id) as Size & { x: number; y: number };
    return [id, { x: Math.round(x - width / 2), y: Math.round(y - height / 2) }] as const;
  });
  return { positions: Object.fromEntries(positions) };
}
