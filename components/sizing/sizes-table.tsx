"use client";

import { SizeChange } from "@/components/charts/size-change";
import { TakeOutFigures } from "@/components/charts/take-out-figures";
import type { SizingSearch } from "@/lib/client/use-sizing";
import { formatChosenPercent, formatCount, formatMoney, withSign } from "@/lib/format";
import type { Line } from "@/lib/line/types";
import type { RunResult } from "@/lib/simulation/types";
import type { FrontierPoint } from "@/lib/sizing";

type Row = {
  id: string;
  name: string;
  today: number;
  found: number;
  isFixed: boolean;
  textbook: number | null;
  money: number | null;
};

/** Sizes of today, found and by the formula, and what each change ties up. */
export function SizesTable({ search, point }: { search: SizingSearch; point: FrontierPoint }) {
  const { line, today, textbook, averages } = search;
  const rows = listRows(search, point);
  const { currency } = line.money;
  const money = (result: RunResult | undefined) => (result ? formatMoney(result.summary.moneyTiedUp.value) : "–");
  const change = today && point.confirmed.summary.moneyTiedUp.value - today.result.summary.moneyTiedUp.value;
  return (
    <section className="min-w-0">
      <div className="flex flex-wrap items-baseline gap-x-3 gap-y-1">
        <h2 className="text-xl font-title tracking-[-.01em]">
          Sizes for {formatChosenPercent(point.acceptedRisk)} risk
        </h2>
        <span className="ml-auto flex flex-wrap items-center gap-x-3 text-s text-ink-2">
          <span>❘ today</span>
          <span>▾ found</span>
          <span>× textbook</span>
          <TakeOutFigures
            name={`${line.name} sizes`}
            rows={() => [
              ["buffer", "today", "found", "textbook", `capital change, ${currency}`],
              ...rows.map((row) => [row.name, row.today, row.found, row.textbook, row.money]),
            ]}
          />
        </span>
      </div>
      <div className="mt-1 overflow-x-auto" tabIndex={0} role="group" aria-label="Sizes of all buffers">
        <table className="sheet-table">
          <thead>
            <tr>
              <th scope="col">Buffer</th>
              <th scope="col" className="text-right!">
                Today
              </th>
              <th scope="col" className="text-right!">
                Found
              </th>
              <th scope="col" className="text-right!">
                Change
              </th>
              <th scope="col" className="w-[150px] max-md:hidden">
                <span className="flex justify-between">
                  <span>−40{"\u202f%"}</span>
                  <span>+40{"\u202f%"}</span>
                </span>
              </th>
              <th scope="col" className="text-right!">
                Textbook
              </th>
              <th scope="col" className="text-right!">
                Capital, {currency}
              </th>
            </tr>
          </thead>
          <tbody>
            {rows.map((row) => (
              <tr key={row.id}>
                <th scope="row" className="text-left font-text!">
                  {row.name} {row.isFixed && <span className="text-s text-ink-3">held fixed</span>}
                </th>
                <td className="text-right text-ink-2">{formatCount(row.today)}</td>
                <td className="text-right">
                  <b className="font-[640]">{formatCount(row.found)}</b>
                </td>
                <td className="text-right">
                  {row.found === row.today ? "–" : withSign(formatCount(row.found - row.today))}
                </td>
                <td className="w-[150px] max-md:hidden">
                  <SizeChange today={row.today} found={row.found} textbook={row.textbook} />
                </td>
                <td className="text-right text-ink-2">{row.textbook === null ? "none" : formatCount(row.textbook)}</td>
                <td className="text-right">{row.money === null ? "–" : withSign(formatMoney(row.money))}</td>
              </tr>
            ))}
          </tbody>
          <tfoot>
            <tr className="border-t border-ink font-[620]">
              <th scope="row" className="border-b-0! text-left font-[620]!">
                Tied up, {currency}
              </th>
              <td className="text-right">{money(today?.result)}</td>
              <td className="text-right">{money(point.confirmed)}</td>
              <td />
              <td className="max-md:hidden" />
              <td className="text-right">{money(textbook?.result)}</td>
              <td className="text-right">{change === null ? "–" : withSign(formatMoney(change))}</td>
            </tr>
          </tfoot>
        </table>
      </div>
      {averages && (
        <p className="mt-2 text-s text-ink-3">
          Textbook sizes are set for {formatChosenPercent(search.options.acceptedRisk)} risk; capital is the mean over
          all weeks, of the found set over unseen weeks.
        </p>
      )}
    </section>
  );
}

function listRows({ line, problem, today, textbook }: SizingSearch, point: FrontierPoint): Row[] {
  const free = new Set(problem.buffers.map(({ id }) => id));
  return line.nodes.flatMap((node): Row[] => {
    if (node.kind !== "buffer") return [];
    const found = point.sizes[node.id] ?? node.size;
    const before = today && meanValue(line, today.result, node.id);
    const after = meanValue(line, point.confirmed, node.id);
    const formula = node.replenishment === null ? undefined : textbook?.sizes[node.id];
    return [
      {
        id: node.id,
        name: node.name,
        today: node.size,
        found,
        isFixed: !free.has(node.id),
        textbook: formula ?? null,
        money: before === null ? null : after - before,
      },
    ];
  });
}

function meanValue(line: Line, result: RunResult, id: string): number {
  const node = line.nodes.find((one) => one.id === id);
  return node?.kind === "buffer" ? result.buffers[id].mean.value * node.unitValue : 0;
}
