import { formatAmount, formatShare } from "@/lib/format";
import type { DraftLine } from "@/lib/line/types";
import type { RunResult } from "@/lib/simulation/types";
import { ReadingTable, RowName } from "./reading-table";

const heads = ["Orders a week", "Late", "Mean lateness, d", "Rejected a week", "Refused a week", "Disrupted"];

export function SupplierTable({ result, document }: { result: RunResult; document: DraftLine }) {
  const suppliers = document.nodes.filter((node) => node.kind === "supplier" && result.suppliers[node.id]);
  if (suppliers.length === 0) return null;
  return (
    <ReadingTable title="Deliveries as simulated" first="Supplier" heads={heads}>
      {suppliers.map(({ id, name }) => {
        const reading = result.suppliers[id];
        return (
          <tr key={id}>
            <RowName>{name}</RowName>
            <td className="text-right">{formatAmount(reading.ordersPerWeek, 2).value}</td>
            <td className="text-right">{formatShare(reading.lateShare).value}</td>
            <td className="text-right">{formatAmount(reading.meanLateness, 2).value}</td>
            <td className="text-right">{formatAmount(reading.rejectedPerWeek).value}</td>
            <td className="text-right">{formatAmount(reading.refusedPerWeek).value}</td>
            <td className="text-right">{formatShare(reading.disruptedShare).value}</td>
          </tr>
        );
      })}
    </ReadingTable>
  );
}
