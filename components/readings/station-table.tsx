import { TimeBar, TimeKey } from "@/components/charts/time-bar";
import { formatNumber } from "@/lib/format";
import type { DraftLine } from "@/lib/line/types";
import type { RunResult } from "@/lib/simulation/types";
import { readingOf } from "../line/drawing/node-reading";
import { ReadingTable, RowName } from "./reading-table";

export function StationTable({ result, document }: { result: RunResult; document: DraftLine }) {
  const hours = (document.calendar.hoursPerDay ?? 0) * (document.calendar.daysPerWeek ?? 0);
  const stations = document.nodes.filter((node) => node.kind === "station" && result.stations[node.id]);
  const title = (
    <>
      Where the stations’ hours go
      <span className="ml-auto text-s font-text text-ink-3">of {formatNumber(hours)} h a week, overtime apart</span>
    </>
  );
  return (
    <div>
      <ReadingTable title={title} first="Station" bar="Share" heads={["Working", "Short", "No room", "Stopped"]}>
        {stations.map((node) => {
          const { shares } = readingOf(document, node, result);
          if (!shares) return null;
          return (
            <tr key={node.id}>
              <RowName>{node.name}</RowName>
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
      </ReadingTable>
      <div className="mt-2">
        <TimeKey />
      </div>
    </div>
  );
}
