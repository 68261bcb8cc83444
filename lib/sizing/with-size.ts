import type { Line } from "@/lib/line/types";

/** The line with one buffer at another size; a start level above the room comes down with it. */
export function withSize(line: Line, bufferId: string, size: number): Line {
  return {
    ...line,
    nodes: line.nodes.map((node) => {
      if (node.id !== bufferId || node.kind !== "buffer") return node;
      const isTooHigh = node.replenishment === null && node.startLevel !== null && node.startLevel > size;
      return { ...node, size, startLevel: isTooHigh ? size : node.startLevel };
    }),
  };
}
