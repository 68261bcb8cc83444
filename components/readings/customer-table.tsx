import { formatShare } from "@/lib/format";
import type { DraftLine } from "@/lib/line/types";
import type { Figure, RunResult } from "@/lib/simulation/types";

/** Each customer on its own; with one customer the whole says it already. */
export function CustomerTable({ result, document }: { result: RunResult; document: DraftLine }) {
  const customers = document.nodes.filter((node) => node.kind === "customer" && result.customers[node.id]);
  if (customers.length < 2) return null;
  const cell = (figure: Figure) => {
    const { value, spread } = formatShare(figure);
    return (
      <td className="text-right whitespace-nowrap">
        {value} <span className="text-ink-3">{spread}</span>
      </td>
    );
  };
  return (
    <section className="overflow-x-auto" tabIndex={0}>
      <h2 className="figure-title">Customers</h2>
      <table className="sheet-table mt-1">
        <thead>
          <tr>
            <th scope="col">Customer</th>
            {["P10", "Mean", "Weeks below target"].map((head) => (
              <th key={head} scope="col" className="text-right!">
                {head}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {customers.map(({ id, name }) => (
            <tr key={id}>
              <th scope="row" className="text-left font-text!">
                {name}
              </th>
              {cell(result.customers[id].p10)}
              {cell(result.customers[id].mean)}
              {cell(result.customers[id].risk)}
            </tr>
          ))}
        </tbody>
      </table>
    </section>
  );
}
