"use client";

import { Scale, Shape } from "@visx/visx";
import { formatCount, formatPercent, percentileName } from "@/lib/format";
import { useMediaQuery } from "@/lib/client/use-media-query";
import type { SweepRow } from "@/lib/schema/lines";
import type { Figure } from "@/lib/simulation/types";

type Props = {
  rows: readonly SweepRow[];
  acceptedRisk: number;
  currentSize: number;
  restSize: number | null;
  /** A value as the axis shows it. */
  showValue?(value: number): string;
};

const height = 270;

/** P5, the accepted risk's percentile and P50 against size, with 95 % bands; today's size and the one past which more stops helping. */
export function SweepChart({ rows, acceptedRisk, currentSize, restSize, showValue = formatCount }: Props) {
  const isNarrow = useMediaQuery("(max-width: 639px)");
  const [width, margin] = isNarrow ? [400, 96] : [680, 150];
  if (rows.length < 2) return null;
  const [first, last] = [rows[0].size, rows[rows.length - 1].size];
  const low = Math.min(
    ...rows.map(({ p05, atRisk }) =>
      Math.min(p05.value - (p05.halfWidth ?? 0), atRisk.value - (atRisk.halfWidth ?? 0)),
    ),
  );
  const from = sweepStart(low);
  const x = Scale.scaleLinear<number>({ domain: [first, last], range: [46, width - margin] });
  const y = Scale.scaleLinear<number>({ domain: [from, 1], range: [height - 30, 10] });
  const name = percentileName(acceptedRisk);
  const series = [
    {
      key: "p50",
      name: "P50",
      of: (row: SweepRow) => row.p50,
      stroke: "var(--water-600)",
      wash: "var(--water-200)",
      dash: "8 3",
      strong: false,
    },
    {
      key: "risk",
      name,
      of: (row: SweepRow) => row.atRisk,
      stroke: "var(--ink)",
      wash: "var(--ink-3)",
      dash: undefined,
      strong: true,
    },
    {
      key: "p05",
      name: "P5",
      of: (row: SweepRow) => row.p05,
      stroke: "var(--silt-600)",
      wash: "var(--silt-300)",
      dash: "4 3",
      strong: false,
    },
  ].filter(({ key }, i, all) => key !== "p05" || all.findIndex((other) => other.name === "P5") === i);
  const gridStep = 1 - from > 0.5 ? 0.2 : 1 - from > 0.2 ? 0.1 : 0.05;
  const grid = Array.from({ length: 30 }, (_, i) => 1 - i * gridStep).filter((share) => share >= from - 1e-9);
  const label = `Fill rate by size: ${rows.map((row) => `${showValue(row.size)}: ${name} ${formatPercent(row.atRisk.value)}`).join("; ")}`;
  const ends = spread(
    series.map(({ of: read }) => y(read(rows[rows.length - 1]).value) + 4),
    height - 30,
  );
  const named = labelled(rows.map(({ size }) => ({ at: x(size), width: 10 + showValue(size).length * 7 })));
  const isInside = (size: number) => size >= first && size <= last;
  return (
    <svg viewBox={`0 0 ${width} ${height}`} width="100%" className="max-w-[860px]" role="img" aria-label={label}>
      {grid.map((share) => (
        <g key={share}>
          <path d={`M46 ${y(share)}H${width - margin}`} stroke="var(--rule)" />
          <text x="40" y={y(share) + 4} textAnchor="end" className="axis-text">
            {Math.round(share * 100)}
          </text>
        </g>
      ))}
      {series.map(({ key, of: read, stroke, wash, dash, strong }, i) => (
        <g key={key}>
          <Shape.Area
            data={[...rows]}
            x={(row) => x(row.size)}
            y0={(row) => y(clamp(edge(read(row), -1), from))}
            y1={(row) => y(clamp(edge(read(row), 1), from))}
            fill={wash}
            opacity={0.45}
          />
          <Shape.LinePath
            data={[...rows]}
            x={(row) => x(row.size)}
            y={(row) => y(clamp(read(row).value, from))}
            stroke={stroke}
            strokeWidth={strong ? 2.5 : 1.8}
            strokeDasharray={dash}
          />
          {rows.map((row) => (
            <path
              key={row.size}
              d={`M${x(row.size)} ${y(clamp(read(row).value, from)) - 4}v8`}
              stroke={stroke}
              strokeWidth="1.5"
            />
          ))}
          <text x={width - margin + 8} y={ends[i]} fontSize="12.5" fill="var(--ink)">
            <tspan fontWeight="640">{series[i].name}</tspan> {formatPercent(read(rows[rows.length - 1]).value)}
          </text>
        </g>
      ))}
      {isInside(currentSize) && (
        <>
          <path d={`M${x(currentSize)} 4V${height - 30}`} stroke="var(--ink)" strokeDasharray="4 3" />
          <text x={x(currentSize) + 5} y={height - 36} className="axis-text">
            now {showValue(currentSize)}
          </text>
        </>
      )}
      {restSize !== null && isInside(restSize) && restSize !== currentSize && (
        <path d={`M${x(restSize)} 4V${height - 30}`} stroke="var(--ink)" strokeWidth="1.5" />
      )}
      <path d={`M46 ${height - 30}H${width - margin}`} stroke="var(--ink)" strokeWidth="1.5" />
      {rows.map((row, i) => (
        <g key={row.size}>
          <path d={`M${x(row.size)} ${height - 30}v6`} stroke="var(--ink)" />
          {named.has(i) && (
            <text x={x(row.size)} y={height - 9} textAnchor="middle" className="axis-text">
              {showValue(row.size)}
            </text>
          )}
        </g>
      ))}
    </svg>
  );
}

const edge = (figure: Figure, sign: 1 | -1) => figure.value + sign * (figure.halfWidth ?? 0);
const clamp = (share: number, from: number) => Math.min(1, Math.max(from, share));

/** Lower end of the scale: a full twentieth, and never so high that nothing is left to read a value off. */
export const sweepStart = (low: number) => Math.min(0.95, Math.max(0, Math.floor(low * 20 + 1e-9) / 20));

/** Heights from the top, at least 15 px apart and none below `bottom`. */
export function spread(wanted: readonly number[], bottom: number): number[] {
  let last = -Infinity;
  const apart = wanted.map((at) => (last = Math.max(at, last + 15)));
  return apart.map((at, i) => Math.min(at, bottom - 15 * (apart.length - 1 - i)));
}

/** Which labels, from the left, have room beside those before them. */
export function labelled(labels: readonly { at: number; width: number }[]): Set<number> {
  let end = -Infinity;
  const kept = labels.flatMap(({ at, width }, i) => {
    if (at - width / 2 < end) return [];
    end = at + width / 2;
    return [i];
  });
  return new Set(kept);
}
