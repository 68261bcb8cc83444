"use client";

import "@xyflow/react/dist/base.css";
import { type Connection, type IsValidConnection, ReactFlow, ReactFlowProvider, ViewportPortal } from "@xyflow/react";
import { useState } from "react";
import { useLine } from "@/lib/client/line-state";
import { canConnect, connect } from "@/lib/line/edits";
import { ChannelLayer } from "../drawing/channel-layer";
import { CanvasTools } from "./canvas-tools";
import { type ChannelEdge, edgeTypes } from "./flow-edge";
import { nodeTypes, type SheetNode } from "./flow-nodes";
import { SheetKey } from "./sheet-key";
import { useCanvasKeys } from "./use-canvas-keys";
import { useCentre } from "./use-centre";
import { fitOptions, useFit } from "./use-fit";
import { useFlow } from "./use-flow";
import { ZoomControls } from "./zoom-controls";

const ariaLabels = {
  "node.a11yDescription.default": "Press Enter to select, then the arrow keys to move and Delete to take it out.",
  "edge.a11yDescription.default": "Press Enter to select the channel, then Delete to take it out.",
} as const;

/** The sheet on which the line is drawn. */
export function SheetCanvas() {
  return (
    <ReactFlowProvider>
      <Canvas />
    </ReactFlowProvider>
  );
}

function Canvas() {
  const { document, mayEdit, selection, select, apply } = useLine();
  const { nodes, edges, channels, onNodesChange, onEdgesChange } = useFlow();
  const [refusal, setRefusal] = useState<string | null>(null);
  const onKeyDown = useCanvasKeys();
  useCentre();
  const fit = useFit();

  const isValidConnection: IsValidConnection<ChannelEdge> = ({ source, target }) =>
    canConnect(document, source, target) === null;

  function onConnect({ source, target }: Connection) {
    setRefusal(null);
    apply(connect(source, target));
  }

  return (
    // Keys of the sheet bubble up from the node, the link or the pane that has the focus.
    <div className="sheet-canvas relative min-h-0 flex-1" onKeyDown={onKeyDown}>
      <CanvasTools />
      <ReactFlow<SheetNode, ChannelEdge>
        nodes={nodes}
        edges={edges}
        nodeTypes={nodeTypes}
        edgeTypes={edgeTypes}
        onNodesChange={onNodesChange}
        onEdgesChange={onEdgesChange}
        onConnect={onConnect}
        isValidConnection={isValidConnection}
        onConnectStart={() => setRefusal(null)}
        onConnectEnd={(_, { fromNode, toNode, fromHandle, isValid }) => {
          if (isValid || !fromNode || !toNode) return;
          const [from, to] = fromHandle?.type === "target" ? [toNode, fromNode] : [fromNode, toNode];
          setRefusal(canConnect(document, from.id, to.id));
        }}
        onMoveStart={fit.onMoveStart}
        onPaneClick={() => selection.length > 0 && select([])}
        nodesDraggable={mayEdit}
        nodesConnectable={mayEdit}
        deleteKeyCode={null}
        selectionKeyCode="Shift"
        multiSelectionKeyCode={["Control", "Meta", "Shift"]}
        connectionRadius={28}
        minZoom={0.2}
        maxZoom={2}
        fitView
        fitViewOptions={fitOptions}
        onlyRenderVisibleElements={document.nodes.length > 120}
        nodeDragThreshold={2}
        zIndexMode="manual"
        proOptions={{ hideAttribution: true }}
        ariaLabelConfig={ariaLabels}
        aria-label="Sheet of the line"
        tabIndex={0}
      >
        <ViewportPortal>
          <svg
            className="pointer-events-none absolute top-0 left-0 -z-10 overflow-visible"
            width="1"
            height="1"
            aria-hidden
          >
            <ChannelLayer channels={channels} chosen={selection} />
          </svg>
        </ViewportPortal>
        <ZoomControls onFit={fit.fit} />
      </ReactFlow>
      <SheetKey />
      {refusal && (
        <p
          role="alert"
          className="absolute bottom-3 left-1/2 z-10 max-w-[70%] -translate-x-1/2 border border-silt-600 bg-sheet px-3 py-2 text-silt-700"
        >
          Not connected. {refusal}
          <button type="button" className="ml-3 text-ink underline underline-offset-3" onClick={() => setRefusal(null)}>
            Close
          </button>
        </p>
      )}
    </div>
  );
}
