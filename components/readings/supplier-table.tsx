import { formatAmount, formatShare } from "@/lib/format";
import type { DraftLine } from "@/lib/line/types";
import type { RunResult } from "@/lib/simulation/types";

export function SupplierTable({ result, document }: { result: RunResult; document: DraftLine }) {
  const suppliers = document.nodes.filter((node) => node.kind === "supplier" && result.suppliers[node.id]);
  if (suppliers.length === 0) return null;
  return (
    <section className="overflow-x-auto" tabIndex={0}>
      <h2 className="figure-title">Deliveries as simulated</h2>
      <table className="sheet-table mt-1">
        <thead>
          <tr>
            <th scope="col">Supplier</th>
            {["Orders a week", "Late", "Mean lateness, d", "Rejected a week", "Refused a week", "Disrupted"].map(
              (head) => (
                <th key={head} scope="col" className="text-right!">
                  {head}
                </th>
              ),
            )}
          </tr>
        </thead>
        <tbody>
          {suppliers.map(({ id, name }) => {
            const reading = result.suppliers[id];
            return (
              <tr key={id}>
                <th scope="row" className="text-left font-text!">
                  {name}
                </th>
                <td className="text-right">{formatAmount(reading.ordersPerWeek, 2).value}</td>
                <td className="text-right">{formatShare(reading.lateShare).value}</td>
                <td className="text-right">{formatAmount(reading.meanLateness, 2).value}</td>
                <td className="text-right">{formatAmount(reading.rejectedPerWeek).value}</td>
                <td className="text-right">{formatAmount(reading.refusedPerWeek).value}</td>
                <td className="text-right">{formatShare(reading.disruptedShare).value}</td>
              </tr>
            );
          })}
        </tbody>
      </table>
    </section>
  );
}
