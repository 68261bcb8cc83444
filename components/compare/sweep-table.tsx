import type { ReactNode } from "react";
import {
  formatCount,
  formatMoney,
  formatNumber,
  formatPoints,
  formatShare,
  percentileName,
  spreadText,
} from "@/lib/format";
import type { SweepRow } from "@/lib/schema/lines";
import { findRest, pricesOf } from "@/lib/sizing/sweep";

type Props = {
  rows: readonly SweepRow[];
  acceptedRisk: number;
  currentSize: number;
  currency: string;
  /** A control at the end of each row. */
  action?(row: SweepRow): ReactNode;
};

/** Sizes with their percentiles, what each step gains and what it costs. */
export function SweepTable({ rows, acceptedRisk, currentSize, currency, action }: Props) {
  const prices = pricesOf(rows);
  const rest = findRest(rows);
  const name = percentileName(acceptedRisk);
  const names = ["P5", name, "P50"].filter((one, i, all) => all.indexOf(one) === i);
  return (
    <div className="overflow-x-auto" tabIndex={0}>
      <table className="sheet-table">
        <thead>
          <tr>
            <th scope="col">Size, units</th>
            {names.map((one) => (
              <th key={one} scope="col" className="text-right!">
                {one}
              </th>
            ))}
            <th scope="col" className="text-right!">
              Gain, points
            </th>
            <th scope="col" className="text-right!">
              Capital, {currency}
            </th>
            <th scope="col" className="text-right!">
              {currency} a point
            </th>
            <th scope="col" className="text-right!">
              Cost a year
            </th>
            {action && <th scope="col" aria-label="Keep" />}
          </tr>
        </thead>
        <tbody>
          {rows.map((row, i) => {
            const pricePerPoint = prices[i];
            const figures = { P5: row.p05, [name]: row.atRisk, P50: row.p50 };
            return (
              <tr key={row.size} data-selected={row.size === rest}>
                <th scope="row" className="text-left whitespace-nowrap">
                  {formatCount(row.size)}{" "}
                  {row.size === currentSize && <span className="font-text text-ink-3">now</span>}
                </th>
                {names.map((one) => {
                  const { value, spread } = formatShare(figures[one]);
                  return (
                    <td key={one} className="text-right whitespace-nowrap">
                      {one === name ? <b className="font-[640]">{value}</b> : value}{" "}
                      <span className="text-s text-ink-3">{spread}</span>
                    </td>
                  );
                })}
                <td className="text-right whitespace-nowrap">
                  {row.gain === null ? (
                    "–"
                  ) : (
                    <>
                      {formatPoints(row.gain.value)}{" "}
                      <span className="text-s text-ink-3">
                        {row.gain.halfWidth !== null && spreadText(formatNumber(row.gain.halfWidth * 100, 1))}
                      </span>
                    </>
                  )}
                </td>
                <td className="text-right">{formatMoney(row.moneyTiedUp.value)}</td>
                <td className="text-right">{pricePerPoint === null ? "–" : formatMoney(pricePerPoint)}</td>
                <td className="text-right whitespace-nowrap">
                  {formatNumber(Math.round(row.costPerYear.value / 100) * 100)}
                </td>
                {action && <td className="text-right">{action(row)}</td>}
              </tr>
            );
          })}
        </tbody>
      </table>
    </div>
  );
}

/** The finding of a comparison of sizes, in a sentence. */
export function saySweep(bufferName: string, rows: readonly SweepRow[], acceptedRisk: number): string {
  const rest = findRest(rows);
  const name = percentileName(acceptedRisk);
  if (rows.length < 3) return `${bufferName}: ${formatCount(rows.length)} sizes compared`;
  if (rest === null)
    return `${bufferName}: up to ${formatCount(rows[rows.length - 1].size)} every step still lifts ${name}`;
  if (rest === rows[0].size) return `${bufferName}: no step above ${formatCount(rest)} lifts ${name} clearly`;
  return `${bufferName}: past ${formatCount(rest)}, a step of stock no longer lifts ${name} clearly`;
}
