"use client";

import { useReactFlow, useStoreApi } from "@xyflow/react";
import { useEffect } from "react";
import { useLine } from "@/lib/client/line-state";

/** Brings a node into view when it is chosen elsewhere, in the list of faults for instance, and lies outside. */
export function useCentre() {
  const { selection } = useLine();
  const { getNode, setCenter, getZoom } = useReactFlow();
  const store = useStoreApi();
  const only = selection.length === 1 ? selection[0] : null;
  useEffect(() => {
    const node = only === null ? undefined : getNode(only);
    if (!node) return;
    const { width, height, transform } = store.getState();
    const [tx, ty, zoom] = transform;
    const w = node.measured?.width ?? 150;
    const h = node.measured?.height ?? 80;
    const x = node.position.x * zoom + tx;
    const y = node.position.y * zoom + ty;
    if (x >= 0 && y >= 0 && x + w * zoom <= width && y + h * zoom <= height) return;
    void setCenter(node.position.x + w / 2, node.position.y + h / 2, { zoom: getZoom(), duration: 160 });
  }, [only, getNode, setCenter, getZoom, store]);
}
