import { formatNumber } from "@/lib/format";
import type { Figure } from "@/lib/simulation/types";
import { hatch } from "./hatch-defs";

export type CauseRow = { key: string; label: string; hours: Figure; isGrave: boolean };

/** Hours a week by cause, longest first, with their intervals. */
export function CauseBars({ rows }: { rows: readonly CauseRow[] }) {
  const most = Math.max(0.1, ...rows.map(({ hours }) => hours.value + (hours.halfWidth ?? 0)));
  const width = 116;
  const x = (value: number) => (Math.max(0, value) / most) * (width - 8);
  return (
    <table className="sheet-table">
      <caption className="sr-only">What holds the line up, hours a week</caption>
      <tbody>
        {rows.map(({ key, label, hours, isGrave }) => (
          <tr key={key}>
            <th scope="row" className="text-left font-text!">
              {label}
            </th>
            <td className="w-[116px] max-sm:hidden">
              <svg width={width} height="18" aria-hidden>
                <rect
                  x=".5"
                  y="3.5"
                  width={x(hours.value)}
                  height="11"
                  fill={isGrave ? hatch.short : hatch.bed}
                  stroke={isGrave ? "var(--silt-600)" : "var(--ink-3)"}
                />
                {hours.halfWidth !== null && (
                  <path
                    d={`M${x(hours.value - hours.halfWidth)} 6v6M${x(hours.value + hours.halfWidth)} 6v6M${x(hours.value - hours.halfWidth)} 9H${x(hours.value + hours.halfWidth)}`}
                    stroke="var(--ink)"
                    strokeWidth="1.4"
                    fill="none"
                  />
                )}
              </svg>
            </td>
            <td className="text-right whitespace-nowrap">
              <b className="font-[560]">{formatNumber(hours.value, 2)}</b>
              {hours.halfWidth !== null && (
                <span className="text-ink-3">
                  {" "}
                  ±{"\u202f"}
                  {formatNumber(hours.halfWidth, 2)}
                </span>
              )}
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
