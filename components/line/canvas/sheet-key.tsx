"use client";

import { useSyncExternalStore } from "react";
import { StaffGauge } from "@/components/charts/staff-gauge";
import { TimeKey } from "@/components/charts/time-bar";
import { Button } from "@/components/ui/button";

const name = "forebay.key";
const listeners = new Set<() => void>();

function subscribe(listener: () => void) {
  listeners.add(listener);
  return () => listeners.delete(listener);
}

function put(isOpen: boolean) {
  window.localStorage.setItem(name, isOpen ? "open" : "away");
  listeners.forEach((listener) => listener());
}

/** What the marks mean; can be put away, and stays so. */
export function SheetKey() {
  const isOpen = useSyncExternalStore(
    subscribe,
    () => window.localStorage.getItem(name) === "open",
    () => false,
  );
  return (
    <aside aria-label="Key" className="absolute top-2 right-3 z-[5]">
      {isOpen ? (
        <div className="w-[330px] border-t border-ink bg-paper/95 px-3 pb-2">
          <div className="flex items-center justify-between">
            <h2 className="text-s font-[620]">Key</h2>
            <Button kind="plain" size="small" onClick={() => put(false)}>
              Put away
            </Button>
          </div>
          <div className="flex gap-4 text-s">
            <StaffGauge
              size={90}
              max={100}
              levels={{ p10: 26, p50: 50, p90: 66 }}
              isPurchased
              dry={0.02}
              width={40}
              height={92}
              label="Example of a gauge"
            />
            <ul className="space-y-1 text-ink-2">
              <li>triangle: size, in units</li>
              <li>dots: on order</li>
              <li>line with mark: median level</li>
              <li>ruled: P10 to P90 of day ends</li>
              <li>solid: held 9 days in 10</li>
              <li>hatch below: dry at least 1{"\u202f"}% of hours</li>
            </ul>
          </div>
          <div className="mt-2">
            <TimeKey />
          </div>
        </div>
      ) : (
        <Button size="small" onClick={() => put(true)}>
          Key
        </Button>
      )}
    </aside>
  );
}
