import { formatPercent, percentileName } from "@/lib/format";
import type { Figure } from "@/lib/simulation/types";
import { hatch } from "./hatch-defs";
import { Whisker } from "./whisker";

type Props = {
  /** Shares 0..1. */
  p05: number;
  atRisk: Figure;
  p50: number;
  acceptedRisk: number;
  /** A live reading of an edit, as a ring with its whisker above the bar. */
  live?: Figure | null;
  /** The reading itself is live: ring instead of a settled bar. */
  isLive?: boolean;
  /** Ends of the scale, shares; the left one chosen from the figures where absent. */
  from?: number;
  to?: number;
  hasAxis?: boolean;
  hasWhisker?: boolean;
  height?: number;
};

const width = 272;

/** Left end of a common scale: a full ten points below the least figure, never above 60 %. */
export function rulerStart(...shares: number[]): number {
  const least = Math.min(0.7, ...shares.filter(Number.isFinite));
  return Math.max(0, Math.floor(least * 10 - 1e-9) / 10);
}

/** Fill rate on a graduated ruler: silt from P5 to the accepted risk, a thick bar there, ruled water to P50, the level's mark at P50. */
export function FillRateRuler(props: Props) {
  const { p05, atRisk, p50, acceptedRisk, live, isLive = false, to = 1, hasAxis = true, hasWhisker = false } = props;
  const from = props.from ?? rulerStart(Math.min(p05, atRisk.value, live?.value ?? 1));
  const x = (share: number) => 2 + ((Math.min(Math.max(share, from), to) - from) / (to - from)) * (width - 4);
  const y = 18;
  const bar = 14;
  const low = Math.min(p05, atRisk.value);
  const label = `Weekly fill rate: P5 ${formatPercent(p05)}, ${percentileName(acceptedRisk)} ${formatPercent(atRisk.value)}, P50 ${formatPercent(p50)}${live ? `; with the edit about ${formatPercent(live.value)}` : ""}`;
  return (
    <svg
      viewBox={`0 0 ${width} ${hasAxis ? 54 : 40}`}
      width="100%"
      role="img"
      aria-label={label}
      className="max-w-[360px]"
    >
      <rect x={x(low)} y={y} width={Math.max(0, x(atRisk.value) - x(low))} height={bar} fill={hatch.short} />
      <path d={`M${x(low)} ${y}v${bar}`} stroke="var(--silt-600)" strokeWidth="1.5" />
      <rect x={x(atRisk.value)} y={y} width={Math.max(0, x(p50) - x(atRisk.value))} height={bar} fill={hatch.room} />
      <path d={`M${x(p50)} ${y}v${bar}`} stroke="var(--water-700)" strokeWidth="2" />
      <path
        d={`M${x(atRisk.value)} ${y - 4}v${bar + 5}`}
        stroke={isLive ? "var(--water-600)" : "var(--ink)"}
        strokeWidth={isLive ? 2 : 3}
        strokeDasharray={isLive ? "3 2" : undefined}
      />
      {hasWhisker && atRisk.halfWidth !== null && (
        <Whisker
          x={x(atRisk.value)}
          from={x(atRisk.value - atRisk.halfWidth)}
          to={x(atRisk.value + atRisk.halfWidth)}
          y={y - 9}
          isLive={isLive}
        />
      )}
      {live && (
        <Whisker
          x={x(live.value)}
          from={x(live.value - (live.halfWidth ?? 0))}
          to={x(live.value + (live.halfWidth ?? 0))}
          y={y - 9}
          isLive
        />
      )}
      <Ruler x={x} from={from} to={to} y={y + bar} hasAxis={hasAxis} />
    </svg>
  );
}

function Ruler({
  x,
  from,
  to,
  y,
  hasAxis,
}: {
  x(share: number): number;
  from: number;
  to: number;
  y: number;
  hasAxis: boolean;
}) {
  const points = Math.round((to - from) * 100);
  const major = points > 60 ? 20 : points > 25 ? 10 : 5;
  const minor = major / 5;
  const start = Math.ceil(from * 100 - 1e-9);
  const ticks = Array.from({ length: points + 1 }, (_, i) => start + i).filter((p) => p % minor === 0 && p <= to * 100);
  return (
    <g>
      <path d={`M${x(from) - 1} ${y}H${x(to) + 1}`} stroke="var(--ink)" strokeWidth="1.5" />
      {ticks.map((p) => (
        <path
          key={p}
          d={`M${x(p / 100)} ${y}v${p % major === 0 ? 7 : 4}`}
          stroke="var(--ink)"
          strokeWidth={p % major === 0 ? 1.2 : 0.8}
        />
      ))}
      {hasAxis &&
        ticks
          .filter((p) => p % major === 0)
          .map((p) => (
            <text
              key={p}
              x={x(p / 100)}
              y={y + 20}
              textAnchor={p === 100 ? "end" : p / 100 <= from ? "start" : "middle"}
              className="axis-text"
            >
              {p === 100 ? "100\u202f%" : p}
            </text>
          ))}
    </g>
  );
}
