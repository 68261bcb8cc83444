import { formatPercent } from "@/lib/format";
import type { Figure } from "@/lib/simulation/types";
import { Whisker } from "./whisker";

export type Confirmation = { key: string; name: string; risk: Figure; isSearched: boolean };

const width = 330;
const row = 22;

/** Risk on the search's weeks and on weeks it has not seen, against the accepted one. */
export function ConfirmRuler({ rows, acceptedRisk }: { rows: readonly Confirmation[]; acceptedRisk: number }) {
  const ends = rows.flatMap(({ risk }) => [risk.value - (risk.halfWidth ?? 0), risk.value + (risk.halfWidth ?? 0)]);
  const span = Math.max(acceptedRisk, ...ends) - Math.min(acceptedRisk, ...ends);
  const step = [0.005, 0.01, 0.02, 0.05, 0.1].find((one) => span / one <= 5) ?? 0.2;
  const from = Math.max(0, Math.floor((Math.min(acceptedRisk, ...ends) - step / 4) / step) * step);
  const to = Math.ceil((Math.max(acceptedRisk, ...ends) + step / 4) / step) * step;
  const x = (share: number) => 6 + ((share - from) / (to - from)) * 190;
  const base = 20 + rows.length * row;
  const ticks = Array.from({ length: Math.round((to - from) / step) + 1 }, (_, i) => from + i * step);
  return (
    <svg
      viewBox={`0 0 ${width} ${base + 22}`}
      width="100%"
      className="max-w-[380px]"
      role="img"
      aria-label={`Risk against the accepted ${formatPercent(acceptedRisk, 1)}: ${rows.map(({ name, risk }) => `${name} ${formatPercent(risk.value)}`).join("; ")}`}
    >
      <path d={`M${x(acceptedRisk)} 14V${base}`} stroke="var(--ink)" strokeWidth="2.5" />
      <text
        x={x(acceptedRisk)}
        y="10"
        textAnchor={x(acceptedRisk) > 150 ? "end" : "middle"}
        fontSize="12"
        fontWeight="640"
        fill="var(--ink)"
      >
        accepted {formatPercent(acceptedRisk, 1)}
      </text>
      {rows.map(({ key, name, risk, isSearched }, i) => (
        <g key={key}>
          <Whisker
            x={x(risk.value)}
            from={x(risk.value - (risk.halfWidth ?? 0))}
            to={x(risk.value + (risk.halfWidth ?? 0))}
            y={28 + i * row}
            isLive={isSearched}
          />
          <text
            x="206"
            y={32 + i * row}
            fontSize="12"
            fill={isSearched ? "var(--ink-3)" : "var(--ink)"}
            fontWeight={isSearched ? 400 : 600}
          >
            {name} {formatPercent(risk.value)}
          </text>
        </g>
      ))}
      <path d={`M6 ${base}H196`} stroke="var(--ink)" strokeWidth="1.5" />
      {ticks.map((tick) => (
        <g key={tick}>
          <path d={`M${x(tick)} ${base}v5`} stroke="var(--ink)" />
          <text x={x(tick)} y={base + 18} textAnchor="middle" className="axis-text">
            {Number((tick * 100).toFixed(1))}
          </text>
        </g>
      ))}
    </svg>
  );
}
