"use client";

import { Scale, Shape } from "@visx/visx";
import { formatCount } from "@/lib/format";
import { hatch } from "./hatch-defs";
import { staffTop } from "./staff-gauge";

export type FanWeek = { p05: number; p10: number; p25: number; p50: number; p75: number; p90: number; p95: number };

type Props = { weeks: readonly FanWeek[]; nWarmup: number; label: string; width?: number };

const height = 240;

/** Percentiles of a level week by week: P5 to P95 ruled, P10 to P90 washed with an edge, P25 to P75 solid, the median a line. */
export function FanChart({ weeks, nWarmup, label, width = 520 }: Props) {
  const top = staffTop(...weeks.map(({ p95 }) => p95));
  const x = Scale.scaleLinear<number>({ domain: [0, Math.max(1, weeks.length - 1)], range: [48, width - 74] });
  const y = Scale.scaleLinear<number>({ domain: [0, top], range: [height - 28, 8] });
  const at = weeks.map((week, i) => ({ i, ...week }));
  const area = (low: keyof FanWeek, high: keyof FanWeek, fill: string, stroke?: string) => (
    <Shape.Area
      data={at}
      x={({ i }) => x(i)}
      y0={(d) => y(d[low])}
      y1={(d) => y(d[high])}
      fill={fill}
      stroke={stroke}
      strokeWidth={stroke ? 1 : 0}
    />
  );
  const last = weeks[weeks.length - 1];
  return (
    <svg viewBox={`0 0 ${width} ${height}`} width="100%" role="img" aria-label={label}>
      {[0, 0.25, 0.5, 0.75, 1].map((share) => (
        <g key={share}>
          <path d={`M48 ${y(share * top)}H${width - 74}`} stroke="var(--rule)" />
          <text x="42" y={y(share * top) + 4} textAnchor="end" className="axis-text">
            {formatCount(share * top)}
          </text>
        </g>
      ))}
      {area("p05", "p95", hatch.water)}
      {area("p10", "p90", "var(--water-200)", "var(--water-600)")}
      {area("p25", "p75", "var(--water-400)")}
      <Shape.LinePath data={at} x={({ i }) => x(i)} y={(d) => y(d.p50)} stroke="var(--water-700)" strokeWidth={2} />
      {nWarmup > 0 && nWarmup < weeks.length && (
        <>
          <path d={`M${x(nWarmup)} 4V${height - 28}`} stroke="var(--ink)" strokeDasharray="4 3" />
          <text x={x(nWarmup) + 5} y="14" className="axis-text">
            recorded from here
          </text>
        </>
      )}
      <path d={`M48 ${height - 28}H${width - 74}`} stroke="var(--ink)" strokeWidth="1.5" />
      {weekTicks(weeks.length).map((week) => (
        <g key={week}>
          <path d={`M${x(week)} ${height - 28}v6`} stroke="var(--ink)" />
          <text x={x(week)} y={height - 8} textAnchor="middle" className="axis-text">
            {week}
          </text>
        </g>
      ))}
      {last &&
        endLabels(last, y).map(({ name, value, at: place }) => (
          <text key={name} x={width - 68} y={place} className="axis-text" fontWeight={name === "P50" ? 700 : 400}>
            {name} {formatCount(value)}
          </text>
        ))}
    </svg>
  );
}

function weekTicks(n: number): number[] {
  const step = [1, 2, 5, 10, 20, 50, 100, 200, 500, 1_000].find((s) => n / s <= 8) ?? 1_000;
  return Array.from({ length: Math.floor((n - 1) / step) + 1 }, (_, i) => i * step);
}

/** Labels at the right end, pushed apart so that none covers another. */
function endLabels(week: FanWeek, y: (value: number) => number) {
  const names = [
    { name: "P95", value: week.p95 },
    { name: "P90", value: week.p90 },
    { name: "P50", value: week.p50 },
    { name: "P10", value: week.p10 },
    { name: "P5", value: week.p05 },
  ];
  let last = -Infinity;
  const placed = names.map(({ name, value }) => {
    const at = Math.max(y(value) + 4, last + 14);
    last = at;
    return { name, value, at };
  });
  const over = Math.max(0, last - (height - 28));
  return placed.map((label) => ({ ...label, at: label.at - over }));
}
