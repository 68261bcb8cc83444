"use client";

import { Pick } from "@/components/ui/pick";
import { useLine } from "@/lib/client/line-state";
import { formatPercent } from "@/lib/format";

/** Which scenario is on screen; each with the figure of its last kept run. */
export function ScenarioPick() {
  const { line, scenario, selectScenario, isSwitching } = useLine();
  return (
    <span aria-busy={isSwitching} className="max-w-[calc(100vw-80px)] min-w-0 shrink-0 lg:max-w-72">
      <Pick
        label="Scenario"
        value={scenario.id}
        onChange={selectScenario}
        options={line.scenarios.map(({ id, name, isBase, reading }) => ({
          value: id,
          label: name,
          hint: [isBase && "base", reading && formatPercent(reading.atRisk.value, 1)].filter(Boolean).join(", "),
        }))}
      />
    </span>
  );
}
