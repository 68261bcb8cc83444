"use client";

import { useState } from "react";
import { GridLines } from "@/components/charts/grid-lines";
import { TakeOutFigures } from "@/components/charts/take-out-figures";
import { Pick } from "@/components/ui/pick";
import { toast } from "@/components/ui/toast";
import { useLine } from "@/lib/client/line-state";
import { formatCount, formatMoneyFigure, formatShare, type FigureText, percentileName } from "@/lib/format";
import type { SweepRow } from "@/lib/schema/lines";
import type { Figure } from "@/lib/simulation/types";
import { KeepValueDialog } from "./keep-value-dialog";
import { countAsked, type SweepReading, type SweepRun, toRow } from "./sweep-store";
import { showBare, showValue } from "./sweep-values";

type Measure = { name: string; read(row: SweepRow): Figure; show(figure: Figure): FigureText };

/** Two numbers at once: a table of every pair, and the percentile as lines. */
export function SweepGrid({ run }: { run: SweepRun }) {
  const { options, document, mayEdit } = useLine();
  const [measureName, setMeasure] = useState<string | null>(null);
  const [keeping, setKeeping] = useState<SweepReading | null>(null);
  const { acceptedRisk } = options;
  const name = percentileName(acceptedRisk);
  const currency = document.money.currency ?? "";
  const measures: Measure[] = [
    { name, read: ({ atRisk }) => atRisk, show: formatShare },
    { name: "Risk", read: ({ risk }) => risk, show: formatShare },
    {
      name: `Capital, ${currency}`,
      read: ({ moneyTiedUp }) => moneyTiedUp,
      show: formatMoneyFigure,
    },
    {
      name: `Cost a year, ${currency}`,
      read: ({ costPerYear }) => costPerYear,
      show: formatMoneyFigure,
    },
  ];
  const measure = measures.find((one) => one.name === measureName) ?? measures[0];
  const { first, second, readings } = run;
  if (!second) return null;
  const at = (value: number, beside: number) => readings.find((one) => one.value === value && one.beside === beside);
  const rowOf = ({ value, reading }: SweepReading) => toRow(value, reading.result, null, acceptedRisk);
  const head = (varied: typeof first) => `${varied.nodeName}: ${varied.quantity.name}`;
  const lines = second.values.flatMap((beside) => {
    const points = first.values.flatMap((value) => {
      const entry = at(value, beside);
      return entry ? [{ value, share: rowOf(entry).atRisk.value }] : [];
    });
    return points.length > 0 ? [{ key: String(beside), name: showValue(beside, second.quantity.unit), points }] : [];
  });
  return (
    <>
      <div className="mt-4 flex flex-wrap items-baseline gap-x-4 gap-y-1">
        <h3 className="figure-title">
          {name} by {head(first)}, a line for each {head(second)}
        </h3>
        <span className="text-s text-ink-3">
          {formatCount(readings.length)} of {formatCount(countAsked(run))} pairs run
        </span>
        <span className="ml-auto flex flex-wrap gap-2">
          <Pick
            label="Table of"
            value={measure.name}
            options={measures.map((one) => ({ value: one.name, label: one.name }))}
            onChange={setMeasure}
          />
          <TakeOutFigures
            name={`${head(first)} and ${head(second)}`}
            rows={() => [
              [head(first), head(second), ...measures.flatMap((one) => [one.name, `${one.name} half-width`])],
              ...readings.map((entry) => [
                entry.value,
                entry.beside,
                ...measures.flatMap((one) => [one.read(rowOf(entry)).value, one.read(rowOf(entry)).halfWidth]),
              ]),
            ]}
          />
        </span>
      </div>
      <div className="mt-3 grid gap-6 min-[1700px]:grid-cols-2">
        <GridLines
          lines={lines}
          showValue={(value) => showBare(value, first.quantity.unit)}
          label={`${name} by ${head(first)} for ${lines.map((line) => line.name).join(", ")} of ${head(second)}`}
        />
        <div className="overflow-x-auto" tabIndex={0} role="group" aria-label="All pairs">
          <table className="sheet-table">
            <thead>
              <tr>
                <th scope="col">
                  {head(first)} <span className="font-text text-ink-3">against {head(second)}</span>
                </th>
                {second.values.map((beside) => (
                  <th key={beside} scope="col" className="text-right!">
                    {showValue(beside, second.quantity.unit)}
                    {beside === second.now && <span className="font-text text-ink-3"> now</span>}
                  </th>
                ))}
              </tr>
            </thead>
            <tbody>
              {first.values.map((value) => (
                <tr key={value}>
                  <th scope="row" className="text-left">
                    {showValue(value, first.quantity.unit)}
                    {value === first.now && <span className="font-text text-ink-3"> now</span>}
                  </th>
                  {second.values.map((beside) => {
                    const entry = at(value, beside);
                    const text = entry && measure.show(measure.read(rowOf(entry)));
                    return (
                      <td key={beside} className="text-right whitespace-nowrap">
                        {!entry || !text ? (
                          "–"
                        ) : mayEdit ? (
                          <button
                            type="button"
                            className="hover:underline"
                            title="Keep as a scenario"
                            onClick={() => setKeeping(entry)}
                          >
                            <b className="font-[560]">{text.value}</b>{" "}
                            <span className="text-s text-ink-3">{text.spread}</span>
                          </button>
                        ) : (
                          <>
                            <b className="font-[560]">{text.value}</b>{" "}
                            <span className="text-s text-ink-3">{text.spread}</span>
                          </>
                        )}
                      </td>
                    );
                  })}
                </tr>
              ))}
            </tbody>
          </table>
          {mayEdit && <p className="mt-1 text-s text-ink-3">Press a figure to keep its pair as a scenario.</p>}
        </div>
      </div>
      {keeping && keeping.beside !== null && (
        <KeepValueDialog
          what={`${showValue(keeping.value, first.quantity.unit)} with ${showValue(keeping.beside, second.quantity.unit)}`}
          name={`${first.nodeName} ${showBare(keeping.value, first.quantity.unit)}, ${second.nodeName} ${showBare(keeping.beside, second.quantity.unit)}`.replaceAll(
            "\u202f",
            "",
          )}
          entry={keeping}
          onClose={() => setKeeping(null)}
          onKept={(kept) => toast(`Kept as ${kept}.`)}
        />
      )}
    </>
  );
}
