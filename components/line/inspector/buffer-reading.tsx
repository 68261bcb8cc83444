"use client";

import { StaffGauge } from "@/components/charts/staff-gauge";
import { useLine } from "@/lib/client/line-state";
import { formatCount, formatMoney, formatPercent } from "@/lib/format";
import { setField } from "@/lib/line/edits";
import type { DraftOf } from "@/lib/line/types";
import { useShownResult } from "../canvas/use-shown-result";

/** The large gauge with what the last reading says of the buffer. */
export function BufferReading({ node }: { node: DraftOf<"buffer"> }) {
  const { document, scenario, mayEdit, apply } = useLine();
  const reading = useShownResult()?.buffers[node.id];
  const kept = scenario.kept.document.nodes.find(({ id }) => id === node.id);
  const former = kept?.kind === "buffer" && kept.size !== node.size ? kept.size : null;
  const facts: [string, string][] = [
    [
      "Size",
      `${node.size === null ? "not typed yet" : formatCount(node.size)}${former ? `, was ${formatCount(former)}` : ""}`,
    ],
  ];
  if (reading) {
    if (reading.meanOnOrder !== null)
      facts.push(["On order, not yet here", `${formatCount(Math.round(reading.meanOnOrder))} mean`]);
    facts.push([
      "On hand, P10 to P90",
      `${formatCount(reading.p10)} – ${formatCount(reading.p90)}, median ${formatCount(reading.p50)}`,
    ]);
    facts.push(["Dry (nothing on hand)", `${formatPercent(reading.empty.value)} of hours`]);
    facts.push([
      "Capital tied up here",
      formatMoney(reading.mean.value * (node.unitValue ?? 0), document.money.currency),
    ]);
  }
  return (
    <div className="-mx-5 flex gap-4 border-b border-rule px-5 pb-4">
      <div className="pl-4">
        <StaffGauge
          isBig
          size={node.size}
          formerSize={former}
          levels={reading ? { p10: reading.p10, p50: reading.p50, p90: reading.p90 } : null}
          dry={reading?.empty.value ?? null}
          isPurchased={node.replenishment !== null}
          label={node.name}
          onSizeChange={mayEdit ? (size) => apply(setField(node.id, "size", size), `size ${node.id}`) : undefined}
        />
      </div>
      <dl className="min-w-0 space-y-2 text-s">
        {facts.map(([name, value]) => (
          <div key={name}>
            <dt className="text-ink-2">{name}</dt>
            <dd className="text-m font-[620]">{value}</dd>
          </div>
        ))}
        {!reading && <p className="text-ink-3">Not run yet.</p>}
      </dl>
    </div>
  );
}
