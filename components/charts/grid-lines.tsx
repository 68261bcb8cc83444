"use client";

import { Scale, Shape } from "@visx/visx";
import { useMediaQuery } from "@/lib/client/use-media-query";
import { formatPercent } from "@/lib/format";
import { spread, sweepStart } from "./chart-labels";
import { ShareGrid, ValueAxis } from "./share-axes";

export type GridLine = { key: string; name: string; points: readonly { value: number; share: number }[] };

type Props = { lines: readonly GridLine[]; showValue(value: number): string; label: string };

const height = 260;
const dashes = [undefined, "8 3", "4 3", "2 3", "10 3 2 3", "1 4"];

/** A percentile against one number, a line for each value of another; lines differ in dash as well as hue. */
export function GridLines({ lines, showValue, label }: Props) {
  const isNarrow = useMediaQuery("(max-width: 639px)");
  const [width, margin] = isNarrow ? [400, 96] : [680, 150];
  const points = lines.flatMap((line) => line.points);
  const values = [...new Set(points.map(({ value }) => value))].sort((a, b) => a - b);
  if (values.length < 2) return null;
  const from = sweepStart(Math.min(...points.map(({ share }) => share)));
  const x = Scale.scaleLinear<number>({ domain: [values[0], values[values.length - 1]], range: [46, width - margin] });
  const y = Scale.scaleLinear<number>({ domain: [from, 1], range: [height - 30, 10] });
  const order = [...lines].sort((a, b) => (b.points.at(-1)?.share ?? 0) - (a.points.at(-1)?.share ?? 0));
  const ends = spread(
    order.map(({ points: own }) => y(own.at(-1)?.share ?? from) + 4),
    height - 30,
  );
  return (
    <svg viewBox={`0 0 ${width} ${height}`} width="100%" className="max-w-[860px]" role="img" aria-label={label}>
      <ShareGrid from={from} y={y} left={46} right={width - margin} />
      {order.map(({ key, name, points: own }, i) => (
        <g key={key}>
          <Shape.LinePath
            data={[...own]}
            x={({ value }) => x(value)}
            y={({ share }) => y(share)}
            stroke={i % 2 === 0 ? "var(--ink)" : "var(--water-600)"}
            strokeWidth="2"
            strokeDasharray={dashes[i]}
          />
          <text x={width - margin + 8} y={ends[i]} fontSize="12.5" fill="var(--ink)">
            <tspan fontWeight="640">{name}</tspan> {formatPercent(own.at(-1)?.share ?? NaN)}
          </text>
        </g>
      ))}
      <ValueAxis values={values} x={x} y={height - 30} left={46} right={width - margin} showValue={showValue} />
    </svg>
  );
}
