import { type ReactNode, useLayoutEffect } from "react";
import { type LineState, useLine } from "@/lib/client/line-state";

/**
 * Lets a test read and drive the state of the line: `probe.line` is what was rendered last.
 * @param view - What is under test; shown inside the probe.
 */
export function createProbe(view: ReactNode = null) {
  const probe = { line: null as unknown as LineState };
  function Probe() {
    const state = useLine();
    useLayoutEffect(() => {
      probe.line = state;
    });
    return view;
  }
  return { probe, Probe };
}
