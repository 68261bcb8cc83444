"use client";

import { Panel, useReactFlow, useViewport } from "@xyflow/react";
import { useEffect } from "react";

/** Zoom in, out and to the whole line; how far the sheet is zoomed also decides which details it shows. */
export function ZoomControls({ onFit }: { onFit(): void }) {
  const { zoom } = useViewport();
  const { zoomIn, zoomOut, zoomTo } = useReactFlow();
  useEffect(() => {
    const sheet = document.querySelector(".sheet-canvas");
    sheet?.toggleAttribute("data-far", zoom < 0.6);
  }, [zoom]);
  const part = "h-8 min-w-8 px-2 hover:bg-water-50 not-first:border-l not-first:border-rule-2";
  return (
    <Panel position="bottom-right" className="!m-3 flex rounded-press border border-rule-2 bg-sheet">
      <button type="button" className={part} aria-label="Zoom out" onClick={() => void zoomOut()}>
        −
      </button>
      <button type="button" className={`${part} min-w-14`} aria-label="Zoom to 100 %" onClick={() => void zoomTo(1)}>
        {Math.round(zoom * 100)}
        {"\u202f%"}
      </button>
      <button type="button" className={part} aria-label="Zoom in" onClick={() => void zoomIn()}>
        +
      </button>
      <button type="button" className={part} aria-label="Fit the whole line" onClick={onFit}>
        Fit
      </button>
    </Panel>
  );
}
