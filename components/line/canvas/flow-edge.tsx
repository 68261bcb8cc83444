"use client";

import { BaseEdge, type Edge, type EdgeProps } from "@xyflow/react";

export type ChannelEdge = Edge<{ path: string; quantity: number | null; middle: { x: number; y: number } }, "channel">;

/** What can be pressed of a channel, and its quantity; the water itself is drawn by one layer under all nodes. */
export function ChannelEdgeView({ data }: EdgeProps<ChannelEdge>) {
  if (!data) return null;
  const { path, quantity, middle } = data;
  return (
    <>
      <BaseEdge path={path} interactionWidth={16} style={{ stroke: "transparent", strokeWidth: 7 }} />
      {quantity !== 1 && (
        <text
          x={middle.x}
          y={middle.y - 8}
          textAnchor="middle"
          fontSize="12"
          fontWeight="600"
          fill="var(--ink)"
          stroke="var(--paper)"
          strokeWidth="3"
          paintOrder="stroke"
        >
          {quantity ?? "?"} ×
        </text>
      )}
    </>
  );
}

export const edgeTypes = { channel: ChannelEdgeView };
