"use client";

import { useState } from "react";
import { LevelBar } from "@/components/charts/level-bar";
import { staffTop } from "@/components/charts/staff-gauge";
import { TimeBar } from "@/components/charts/time-bar";
import { Button } from "@/components/ui/button";
import { Empty } from "@/components/ui/empty";
import { ErrorBox } from "@/components/ui/error-box";
import { useLine } from "@/lib/client/line-state";
import { formatCount, formatMoney, formatNumber, formatPercent, percentileName } from "@/lib/format";
import type { DraftNode, DraftOf } from "@/lib/line/types";
import { percentile } from "@/lib/simulation";
import type { RunResult } from "@/lib/simulation/types";
import { useShownResult } from "../canvas/use-shown-result";
import { readingOf } from "../drawing/node-reading";
import { columnsOf } from "./columns";
import { NodeTable } from "./node-table";

type Group = { caption: string; nodes: DraftOf<"buffer">[] };

/** All nodes of the line at once, with the reading beside each. */
export function LineTable() {
  const { document, options } = useLine();
  const { acceptedRisk } = options;
  const result = useShownResult();
  const [refusals, setRefusals] = useState<readonly string[]>([]);
  const of = <K extends DraftNode["kind"]>(kind: K) =>
    document.nodes.filter((node): node is DraftOf<K> => node.kind === kind);
  const groups = groupBuffers(of("buffer"), document.links, new Set(of("customer").map(({ id }) => id)));
  const hours = (document.calendar.hoursPerDay ?? 0) * (document.calendar.daysPerWeek ?? 0);

  if (document.nodes.length === 0)
    return (
      <div className="p-5">
        <Empty title="Nothing is drawn yet">
          Add nodes on the sheet; their figures can then be typed or pasted here.
        </Empty>
      </div>
    );
  return (
    <div className="min-h-0 flex-1 overflow-auto px-5 py-3">
      {refusals.length > 0 && (
        <div className="mb-4">
          <ErrorBox
            title={`${refusals.length} pasted ${refusals.length === 1 ? "cell was" : "cells were"} not used`}
            action={
              <Button size="small" onClick={() => setRefusals([])}>
                Close
              </Button>
            }
          >
            <ul>
              {refusals.slice(0, 8).map((refusal) => (
                <li key={refusal}>{refusal}</li>
              ))}
            </ul>
            {refusals.length > 8 && <p>And {refusals.length - 8} more.</p>}
          </ErrorBox>
        </div>
      )}
      {groups.map(({ caption, nodes }, i) => (
        <BufferTable
          key={caption}
          caption={caption}
          nodes={nodes}
          result={result}
          isLast={i === groups.length - 1}
          onRefusals={setRefusals}
        />
      ))}
      <NodeTable
        caption="Stations"
        nodes={of("station")}
        columns={columnsOf.station}
        heads={result ? ["Where the hours go", "Working, h", "Short, h", "No room, h", "Stopped, h"] : []}
        readings={(node) => {
          const { shares } = readingOf(document, node, result);
          if (!shares) return [];
          const say = (share: number) => formatNumber(share * hours, 1);
          return [
            <TimeBar key="bar" shares={shares} label={node.name} />,
            say(shares.working),
            say(shares.short),
            say(shares.noRoom),
            say(shares.stopped),
          ];
        }}
        onRefusals={setRefusals}
      />
      <NodeTable
        caption="Suppliers"
        nodes={of("supplier")}
        columns={columnsOf.supplier}
        heads={result ? ["Late, run", "Mean lateness, d"] : []}
        readings={({ id }) => {
          const reading = result?.suppliers[id];
          return reading ? [formatPercent(reading.lateShare.value), formatNumber(reading.meanLateness.value, 2)] : [];
        }}
        onRefusals={setRefusals}
      />
      <NodeTable
        caption="Customers"
        nodes={of("customer")}
        columns={columnsOf.customer}
        heads={result ? ["Fill rate, mean", percentileName(acceptedRisk)] : []}
        readings={({ id }) => {
          const reading = result?.customers[id];
          return result && reading
            ? [formatPercent(reading.mean.value), formatPercent(percentile(result, acceptedRisk, id).value)]
            : [];
        }}
        onRefusals={setRefusals}
      />
      <p className="text-s text-ink-3">
        A block of cells copied from a spreadsheet can be pasted onto any cell. Arrow keys and Enter move from cell to
        cell.
      </p>
    </div>
  );
}

function groupBuffers(
  buffers: DraftOf<"buffer">[],
  links: readonly { from: string; to: string }[],
  customers: ReadonlySet<string>,
): Group[] {
  const isShipped = ({ id }: DraftOf<"buffer">) => links.some((link) => link.from === id && customers.has(link.to));
  return [
    { caption: "Purchased stock", nodes: buffers.filter(({ replenishment }) => replenishment !== null) },
    { caption: "Between stations", nodes: buffers.filter((node) => node.replenishment === null && !isShipped(node)) },
    { caption: "Finished goods", nodes: buffers.filter((node) => node.replenishment === null && isShipped(node)) },
  ].filter(({ nodes }) => nodes.length > 0);
}

type BufferTableProps = Group & {
  result: RunResult | null;
  isLast: boolean;
  onRefusals(refusals: readonly string[]): void;
};

function BufferTable({ caption, nodes, result, isLast, onRefusals }: BufferTableProps) {
  const { document } = useLine();
  const top = result ? staffTop(...nodes.map(({ id }) => result.buffers[id]?.p90 ?? 0)) : 1;
  const heads = result
    ? [`On hand, to ${formatCount(top)}`, "P10", "P50", "P90", "Dry, of hours", `Capital, ${document.money.currency}`]
    : [];
  const isPurchased = caption === "Purchased stock";
  const columns = columnsOf.buffer;
  return (
    <NodeTable
      caption={caption}
      nodes={nodes}
      columns={columns}
      heads={heads}
      readings={(node) => {
        const reading = result?.buffers[node.id];
        if (!reading || node.kind !== "buffer") return [];
        const { p10, p50, p90, empty, mean } = reading;
        return [
          <LevelBar
            key="levels"
            p10={p10}
            p50={p50}
            p90={p90}
            max={top}
            size={isPurchased ? null : node.size}
            label={node.name}
          />,
          formatCount(p10),
          formatCount(p50),
          formatCount(p90),
          <span key="dry" className={empty.value >= 0.01 ? "font-[620] text-silt-700 underline" : ""}>
            {formatPercent(empty.value)}
          </span>,
          formatMoney(mean.value * (node.unitValue ?? 0)),
        ];
      }}
      foot={
        isLast && result ? (
          <tr data-sum="true">
            <td colSpan={columns.length}>Tied up in all buffers</td>
            <td colSpan={heads.length} className="text-right">
              {formatMoney(result.summary.moneyTiedUp.value)}
            </td>
          </tr>
        ) : undefined
      }
      onRefusals={onRefusals}
    />
  );
}
