import { graphlib, layout as dagreLayout } from "@dagrejs/dagre";
import { type Size, sizeOf } from "./sheet-sizes";
import type { DraftLine, Layout } from "./types";

/**
 * Places all nodes in flow order from left to right.
 * @returns Top left corners, whole px, on a sheet that starts at (0, 0).
 * @remarks Layered drawing after Sugiyama; Gansner et al., IEEE Trans. Softw. Eng. 19 (1993), as dagre has it.
 */
export function autoLayout(document: DraftLine): Layout {
  const graph = new graphlib.Graph();
  graph.setGraph({ rankdir: "LR", nodesep: 6, ranksep: 40, marginx: 0, marginy: 0 });
  graph.setDefaultEdgeLabel(() => ({}));
  for (const node of document.nodes) graph.setNode(node.id, { ...sizeOf(document, node) });
  for (const { from, to } of document.links) if (graph.hasNode(from) && graph.hasNode(to)) graph.setEdge(from, to);
  dagreLayout(graph);
  const positions = document.nodes.map(({ id }) => {
    const { x, y, width, height } = graph.node(id) as Size & { x: number; y: number };
    return [id, { x: Math.round(x - width / 2), y: Math.round(y - height / 2) }] as const;
  });
  return { positions: Object.fromEntries(positions) };
}
