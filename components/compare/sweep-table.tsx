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
import type { Sweep, SweepRow } from "@/lib/schema/lines";
import { findRest, pricesOf } from "@/lib/sizing/sweep";
import { sayQuantity, showBare, showValue, valueHead } from "./sweep-values";

type Props = {
  sweep: Sweep;
  acceptedRisk: number;
  currency: string;
  /** A control at the end of each row. */
  action?(row: SweepRow): ReactNode;
};

/** Sizes with their percentiles, what each step gains and what it costs. */
export function SweepTable({ sweep, acceptedRisk, currency, action }: Props) {
  const { rows, currentSize, unit } = sweep;
  const prices = pricesOf(rows);
  const rest = restOf(sweep);
  const name = percentileName(acceptedRisk);
  const names = ["P5", name, "P50"].filter((one, i, all) => all.indexOf(one) === i);
  return (
    <div className="overflow-x-auto" tabIndex={0}>
      <table className="sheet-table">
        <thead>
          <tr>
            <th scope="col">{valueHead(sweep)}</th>
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
                  {showBare(row.size, unit)}{" "}
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

/** The size past which more stock stops helping; only stock has one. */
export function restOf({ quantity, rows }: Sweep): number | null {
  return quantity === undefined ? findRest(rows) : null;
}

/** The finding of a sweep, in a sentence. */
export function saySweep(sweep: Sweep, acceptedRisk: number): string {
  const { rows, unit } = sweep;
  const rest = restOf(sweep);
  const name = percentileName(acceptedRisk);
  const what = sayQuantity(sweep);
  const [first, last] = [rows[0], rows[rows.length - 1]];
  if (sweep.quantity !== undefined) {
    if (rows.length < 2) return `${what}: one value run`;
    const share = ({ atRisk }: SweepRow) => formatShare(atRisk).value;
    return `${what}: from ${showValue(first.size, unit)} to ${showValue(last.size, unit)}, ${name} goes from ${share(first)} to ${share(last)}`;
  }
  if (rows.length < 3) return `${what}: ${formatCount(rows.length)} sizes compared`;
  if (rest === null) return `${what}: up to ${formatCount(last.size)} every step still lifts ${name}`;
  if (rest === first.size) return `${what}: no step above ${formatCount(rest)} lifts ${name} clearly`;
  return `${what}: past ${formatCount(rest)}, a step of stock no longer lifts ${name} clearly`;
}
