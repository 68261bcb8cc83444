"use client";

import { useMemo } from "react";
import { formatChosenPercent, formatCount, formatNumber } from "@/lib/format";
import type { Line } from "@/lib/line/types";
import { estimateSerialParts, leanShare, serialAssumptions } from "@/lib/sizing/serial-estimate";

/** Serial parts of the line with the Bernoulli estimate, or why it does not apply. */
export function SerialParts({ line }: { line: Line }) {
  const parts = useMemo(() => estimateSerialParts(line), [line]);
  const nameOf = (id: string) => line.nodes.find((node) => node.id === id)?.name ?? id;
  if (parts.length === 0) return null;
  return (
    <section className="mt-4">
      <h3 className="figure-title">Serial parts by the Bernoulli line</h3>
      <ul className="mt-1 max-w-[90ch] space-y-1">
        {parts.map(({ stations, buffers, estimate }) => (
          <li key={buffers.join()}>
            {stations.map(nameOf).join(estimate.applies ? " → " : ", ")} over {buffers.map(nameOf).join(", ")}:{" "}
            {estimate.applies ? (
              <>
                about {formatNumber(estimate.perHour, 1)} good units an hour with the sizes as they are,{" "}
                {formatNumber(estimate.perHourEndless, 1)} with endless room; {formatChosenPercent(leanShare)} of that
                takes{" "}
                {estimate.lean
                  .map(({ id, size, lean }) => `${nameOf(id)} ${formatCount(lean)} (now ${formatCount(size)})`)
                  .join(", ")}
                .
              </>
            ) : (
              <span className="text-ink-2">no estimate, since {estimate.reason}.</span>
            )}
          </li>
        ))}
      </ul>
      {parts.some(({ estimate }) => estimate.applies) && (
        <details className="mt-1 text-s text-ink-2">
          <summary className="cursor-pointer text-water-700">What the estimate takes for granted</summary>
          <ul className="mt-1 list-disc pl-5">
            {serialAssumptions.map((text) => (
              <li key={text}>{text}</li>
            ))}
          </ul>
        </details>
      )}
    </section>
  );
}
