import { TimeBar, TimeKey } from "@/components/charts/time-bar";
import { formatNumber } from "@/lib/format";
import type { DraftLine } from "@/lib/line/types";
import type { RunResult } from "@/lib/simulation/types";
import { readingOf } from "../line/drawing/node-reading";

export function StationTable({ result, document }: { result: RunResult; document: DraftLine }) {
  const hours = (document.calendar.hoursPerDay ?? 0) * (document.calendar.daysPerWeek ?? 0);
  const stations = document.nodes.filter((node) => node.kind === "station" && result.stations[node.id]);
  return (
    <section className="overflow-x-auto" tabIndex={0}>
      <h2 className="figure-title flex items-baseline gap-3">
        Where the stations’ hours go
        <span className="ml-auto text-s font-text text-ink-3">of {formatNumber(hours)} h a week, overtime apart</span>
      </h2>
      <table className="sheet-table mt-1">
        <thead>
          <tr>
            <th scope="col">Station</th>
            <th scope="col" className="max-sm:hidden">
              Share
            </th>
            {["Working", "Short", "No room", "Stopped"].map((head) => (
              <th key={head} scope="col" className="text-right!">
                {head}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {stations.map((node) => {
            const { shares } = readingOf(document, node, result);
            if (!shares) return null;
            return (
              <tr key={node.id}>
                <th scope="row" className="text-left font-text!">
                  {node.name}
                </th>
                <td className="max-sm:hidden">
                  <TimeBar shares={shares} width={110} label={node.name} />
                </td>
                <td className="text-right">{formatNumber(shares.working * hours, 1)}</td>
                <td className={`text-right ${shares.short >= 0.05 ? "font-[620] text-silt-700" : ""}`}>
                  {formatNumber(shares.short * hours, 1)}
                </td>
                <td className="text-right">{formatNumber(shares.noRoom * hours, 1)}</td>
                <td className="text-right">{formatNumber(shares.stopped * hours, 1)}</td>
              </tr>
            );
          })}
        </tbody>
      </table>
      <div className="mt-2">
        <TimeKey />
      </div>
    </section>
  );
}
