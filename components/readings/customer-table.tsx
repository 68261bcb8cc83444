import { formatShare, percentileName } from "@/lib/format";
import type { DraftLine } from "@/lib/line/types";
import { percentile } from "@/lib/simulation";
import type { Figure, RunResult } from "@/lib/simulation/types";
import { ReadingTable, RowName } from "./reading-table";

type Props = { result: RunResult; document: DraftLine; acceptedRisk: number };

/** Each customer on its own; with one customer the whole says it already. */
export function CustomerTable({ result, document, acceptedRisk }: Props) {
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
    <ReadingTable
      title="Customers"
      first="Customer"
      heads={[percentileName(acceptedRisk), "Mean", "Weeks below target"]}
    >
      {customers.map(({ id, name }) => (
        <tr key={id}>
          <RowName>{name}</RowName>
          {cell(percentile(result, acceptedRisk, id))}
          {cell(result.customers[id].mean)}
          {cell(result.customers[id].risk)}
        </tr>
      ))}
    </ReadingTable>
  );
}
