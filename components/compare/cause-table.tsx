import { causeLabel } from "@/components/readings/cause-words";
import { formatNumber, spreadText } from "@/lib/format";
import type { Figure } from "@/lib/simulation/types";
import type { Compared } from "./compared";

const mostRows = 6;

/** Root causes of all scenarios side by side, hours a week; the longest in any of them first. */
export function CauseTable({ rows }: { rows: readonly Compared[] }) {
  const shown = rows.filter(({ result }) => result !== null);
  if (shown.length === 0) return null;
  const causes = new Map<string, { label: string; hours: Map<string, Figure> }>();
  for (const { detail, result } of shown) {
    for (const { node, reason, hoursPerWeek } of result!.causes) {
      const key = `${node} ${reason}`;
      const entry = causes.get(key) ?? { label: causeLabel(detail.kept.document, node, reason), hours: new Map() };
      entry.hours.set(detail.id, hoursPerWeek);
      causes.set(key, entry);
    }
  }
  const most = ({ hours }: { hours: Map<string, Figure> }) =>
    Math.max(...[...hours.values()].map(({ value }) => value));
  const ordered = [...causes.entries()].sort(([, a], [, b]) => most(b) - most(a)).slice(0, mostRows);
  return (
    <details className="mt-3" open={shown.length > 1}>
      <summary className="cursor-pointer font-[620]">
        What holds the last station up <span className="text-s font-text text-ink-3">hours a week, by root cause</span>
      </summary>
      <div className="mt-1 overflow-x-auto" tabIndex={0} role="group" aria-label="Root causes by scenario">
        <table className="sheet-table max-w-4xl">
          <thead>
            <tr>
              <th scope="col">Cause</th>
              {shown.map(({ detail, letter }) => (
                <th key={detail.id} scope="col" className="text-right!">
                  {letter} <span className="sr-only">{detail.name}</span>
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {ordered.map(([key, { label, hours }]) => (
              <tr key={key}>
                <th scope="row" className="text-left font-text!">
                  {label}
                </th>
                {shown.map(({ detail }) => {
                  const figure = hours.get(detail.id);
                  return (
                    <td key={detail.id} className="text-right whitespace-nowrap">
                      {figure ? formatNumber(figure.value, 2) : "0"}{" "}
                      <span className="text-s text-ink-3">
                        {figure && figure.halfWidth !== null && spreadText(formatNumber(figure.halfWidth, 2))}
                      </span>
                    </td>
                  );
                })}
              </tr>
            ))}
          </tbody>
        </table>
      </div>
    </details>
  );
}
