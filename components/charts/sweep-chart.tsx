"use client";

import { Scale, Shape } from "@visx/visx";
import { formatCount, formatPercent, percentileName } from "@/lib/format";
import { useMediaQuery } from "@/lib/client/use-media-query";
import type { SweepRow } from "@/lib/schema/lines";
import type { Figure } from "@/lib/simulation/types";
import { spread, sweepStart } from "./chart-labels";
import { ShareGrid, ValueAxis } from "./share-axes";

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
  const label = `Fill rate by size: ${rows.map((row) => `${showValue(row.size)}: ${name} ${formatPercent(row.atRisk.value)}`).join("; ")}`;
  const ends = spread(
    series.map(({ of: read }) => y(read(rows[rows.length - 1]).value) + 4),
    height - 30,
  );
  const isInside = (size: number) => size >= first && size <= last;
  return (
    <svg viewBox={`0 0 ${width} ${height}`} width="100%" className="max-w-[860px]" role="img" aria-label={label}>
      <ShareGrid from={from} y={y} left={46} right={width - margin} />
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
      <ValueAxis
        values={rows.map(({ size }) => size)}
        x={x}
        y={height - 30}
        left={46}
        right={width - margin}
        showValue={showValue}
      />
    </svg>
  );
}

const edge = (figure: Figure, sign: 1 | -1) => figure.value + sign * (figure.halfWidth ?? 0);
const clamp = (share: number, from: number) => Math.min(1, Math.max(from, share));
