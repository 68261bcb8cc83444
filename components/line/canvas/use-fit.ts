"use client";

import { useReactFlow, useStore } from "@xyflow/react";
import { useCallback, useEffect, useRef } from "react";

export const fitOptions = { padding: 0.03, maxZoom: 1.1 };

/** Keeps the whole line in view while the sheet is made wider or narrower, until the user moves or zooms it. */
export function useFit() {
  const { fitView } = useReactFlow();
  const width = useStore((state) => state.width);
  const height = useStore((state) => state.height);
  const isFitted = useRef(true);
  const last = useRef({ width, height });

  const fit = useCallback(() => {
    isFitted.current = true;
    void fitView(fitOptions);
  }, [fitView]);

  useEffect(() => {
    const isFirst = last.current.width === 0;
    last.current = { width, height };
    if (!isFirst && width > 0 && isFitted.current) void fitView(fitOptions);
  }, [width, height, fitView]);

  // Moves of the sheet's own making come without an event.
  const onMoveStart = useCallback((event: MouseEvent | TouchEvent | null) => {
    if (event) isFitted.current = false;
  }, []);

  return { fit, onMoveStart };
}
