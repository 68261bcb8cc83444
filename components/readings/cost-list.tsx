import { CostBar, costParts } from "@/components/charts/cost-bar";
import { formatMoney, formatMoneyFigure, formatNumber } from "@/lib/format";
import type { DraftLine } from "@/lib/line/types";
import type { RunResult } from "@/lib/simulation/types";

export function CostList({ result, document }: { result: RunResult; document: DraftLine }) {
  const { costPerYear, moneyTiedUp, overtimeWeeks } = result.summary;
  const { overtime, money } = document;
  const notes: Record<(typeof costParts)[number]["key"], string> = {
    carrying: `${formatNumber((money.carryingRate ?? 0) * 100)}\u202f% a year of ${formatMoney(moneyTiedUp.value, money.currency)}`,
    overtime: overtime ? `in ${formatNumber(overtimeWeeks.value * 100, 1)}\u202f% of weeks` : "none planned",
    fines: "a unit and week late",
    scrap: "value of the parts in it",
  };
  const parts = {
    carrying: costPerYear.carrying.value,
    overtime: costPerYear.overtime.value,
    fines: costPerYear.fines.value,
    scrap: costPerYear.scrap.value,
  };
  const total = formatMoneyFigure(costPerYear.total);
  return (
    <section>
      <h2 className="figure-title mb-2 flex items-baseline">
        Cost a year <span className="ml-auto text-s font-text text-ink-3">{money.currency}</span>
      </h2>
      <CostBar parts={parts} />
      <table className="sheet-table mt-1">
        <tbody>
          {costParts.map(({ key, label, fill, edge }) => {
            const figure = formatMoneyFigure(costPerYear[key]);
            return (
              <tr key={key}>
                <th scope="row" className="text-left font-text!">
                  <span className="flex items-start gap-2">
                    <svg width="16" height="12" aria-hidden className="mt-1 shrink-0">
                      <rect x=".5" y=".5" width="15" height="11" fill={fill} stroke={edge} />
                    </svg>
                    <span>
                      {label}
                      <span className="block text-s text-ink-3">{notes[key]}</span>
                    </span>
                  </span>
                </th>
                <td className="text-right whitespace-nowrap">
                  {figure.value} <span className="block text-s text-ink-3">{figure.spread}</span>
                </td>
              </tr>
            );
          })}
          <tr data-sum="true">
            <th scope="row" className="text-left">
              {money.currency} a year <span className="font-text text-ink-3">{total.spread}</span>
            </th>
            <td className="text-right">{total.value}</td>
          </tr>
        </tbody>
      </table>
    </section>
  );
}
