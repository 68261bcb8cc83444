import { CostBar } from "@/components/charts/cost-bar";
import { formatMoney, formatMoneyFigure, formatShare, percentileName, spreadText, withSign } from "@/lib/format";
import type { Figure, RunResult } from "@/lib/simulation/types";

/** Percentiles and risk of one scenario in figures. */
export function FillRateFigures({
  result,
  atRisk,
  acceptedRisk,
}: {
  result: RunResult;
  atRisk: Figure;
  acceptedRisk: number;
}) {
  const figures: [string, Figure][] = [
    ["P5", result.summary.p05],
    [percentileName(acceptedRisk), atRisk],
    ["P50", result.summary.p50],
    ["risk", result.summary.risk],
  ];
  return (
    <p className="flex flex-wrap gap-x-3 text-s text-ink-2">
      {figures
        .filter(([name], i) => figures.findIndex(([other]) => other === name) === i)
        .map(([name, figure]) => {
          const { value, spread } = formatShare(figure);
          return (
            <span key={name} className="whitespace-nowrap">
              {name} <b className="font-[560] text-ink">{value}</b> <span className="text-ink-3">{spread}</span>
            </span>
          );
        })}
    </p>
  );
}

/** An amount with its bar on the common scale and its paired difference to the base. */
export function Money({
  figure,
  difference,
  most,
  currency,
  name,
  parts,
}: {
  figure: Figure;
  difference: Figure | null;
  most: number;
  currency: string;
  name: string;
  parts?: RunResult;
}) {
  const { value, spread } = formatMoneyFigure(figure);
  const cost = parts?.summary.costPerYear;
  return (
    <div>
      <p className="text-s text-ink-2 lg:hidden">{name}</p>
      <p className="whitespace-nowrap">
        <b className="text-l font-[640]">
          <span className="text-s font-text lg:sr-only">{currency} </span>
          {value}
        </b>{" "}
        <span className="text-s text-ink-3">{spread}</span>
      </p>
      {cost ? (
        <CostBar
          parts={{
            carrying: cost.carrying.value,
            overtime: cost.overtime.value,
            fines: cost.fines.value,
            scrap: cost.scrap.value,
          }}
          max={most}
          height={14}
        />
      ) : (
        <span
          aria-hidden
          className="block h-3.5 border border-ink bg-water-400"
          style={{ width: `${(figure.value / most) * 100}%` }}
        />
      )}
      {difference && (
        <p className="text-s whitespace-nowrap text-ink-2">
          {withSign(formatMoney(difference.value))}{" "}
          <span className="text-ink-3">
            {difference.halfWidth !== null && spreadText(formatMoney(difference.halfWidth))}
          </span>
        </p>
      )}
    </div>
  );
}
