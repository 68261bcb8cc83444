"use client";

import { ScenarioRows } from "./scenario-rows";
import { SweepView } from "./sweep-view";

export function CompareView() {
  return (
    <div className="space-y-5 px-4 pt-3 pb-8 sm:px-5">
      <ScenarioRows />
      <SweepView />
    </div>
  );
}
