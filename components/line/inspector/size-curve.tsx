"use client";

import { Button } from "@/components/ui/button";
import { ErrorLine } from "@/components/ui/error-line";
import { useLine } from "@/lib/client/line-state";
import { useJob } from "@/lib/client/use-job";
import { useSimulation } from "@/lib/client/use-simulation";
import { formatCount, formatPercent, percentileName } from "@/lib/format";
import type { DraftOf, Line } from "@/lib/line/types";
import { percentile } from "@/lib/simulation";
import { withSize } from "@/lib/sizing/with-size";
import type { Figure } from "@/lib/simulation/types";

type Point = { size: number; figure: Figure };
/** `digest` of the line it was drawn for. */
type Drawn = { points: Point[]; digest: string | null };

const shares = [0.7, 0.85, 1, 1.15, 1.3];

/** The percentile of the accepted risk against this buffer's size, by quick runs with the same draws; when asked for. */
export function SizeCurve({ node }: { node: DraftOf<"buffer"> }) {
  const { parsed, digest, options } = useLine();
  const client = useSimulation();
  const { state, start } = useJob<Point[], Drawn>();
  const isStale = state.status === "done" && state.value.digest !== digest;
  const points = state.status === "running" ? state.progress : state.status === "done" ? state.value.points : [];
  if (!parsed || node.size === null) return null;

  const draw = (line: Line, size: number) =>
    start([], async (signal, onProgress) => {
      const points: Point[] = [];
      for (const next of new Set(shares.map((share) => Math.max(1, Math.round(size * share))))) {
        const result = await client.run(
          withSize(line, node.id, next),
          { ...runOptions(options), replications: 20 },
          { signal },
        );
        points.push({ size: next, figure: percentile(result, options.acceptedRisk) });
        onProgress([...points]);
      }
      return { points, digest };
    });

  const name = percentileName(options.acceptedRisk);
  return (
    <section className="border-t border-rule pt-3">
      <h3 className="text-s text-ink-2">{name} of weekly fill rate against this size, live</h3>
      {points.length > 1 && <Curve points={points} current={node.size} name={name} />}
      {state.status === "failed" && <ErrorLine>{state.message}</ErrorLine>}
      {(state.status === "idle" || state.status === "failed" || isStale) && (
        <Button size="small" className="mt-2" onClick={() => void draw(parsed, node.size!)}>
          {isStale ? "Draw again" : "Draw the curve"}
        </Button>
      )}
      {state.status === "running" && (
        <p role="status" className="text-s text-ink-3">
          Running {points.length} of {shares.length} sizes
        </p>
      )}
    </section>
  );
}

const runOptions = ({
  seed,
  weeks,
  warmupWeeks,
  targetFillRate,
}: {
  seed: string;
  weeks: number;
  warmupWeeks: number;
  targetFillRate: number;
}) => ({ seed, weeks, warmupWeeks, targetFillRate });

const width = 268;
const height = 72;

function Curve({ points, current, name }: { points: Point[]; current: number; name: string }) {
  const low = Math.min(...points.map(({ figure }) => figure.value - (figure.halfWidth ?? 0)));
  const from = Math.max(0, Math.floor(low * 20) / 20);
  const [first, last] = [points[0].size, points[points.length - 1].size];
  const x = (size: number) => 34 + ((size - first) / Math.max(1, last - first)) * (width - 48);
  const y = (share: number) => 6 + ((1 - share) / Math.max(0.05, 1 - from)) * (height - 12);
  const band = [
    ...points.map(({ size, figure }) => `${x(size)},${y(Math.min(1, figure.value + (figure.halfWidth ?? 0)))}`),
    ...[...points]
      .reverse()
      .map(({ size, figure }) => `${x(size)},${y(Math.max(from, figure.value - (figure.halfWidth ?? 0)))}`),
  ].join(" ");
  const label = points.map(({ size, figure }) => `${formatCount(size)}: ${formatPercent(figure.value)}`).join(", ");
  return (
    <svg
      viewBox={`0 0 ${width} ${height + 20}`}
      width="100%"
      role="img"
      aria-label={`${name} by size: ${label}`}
      className="mt-1"
    >
      {[from, (1 + from) / 2, 1].map((share) => (
        <g key={share}>
          <path d={`M34 ${y(share)}H${width - 10}`} stroke="var(--rule)" />
          <text x="29" y={y(share) + 4} textAnchor="end" className="axis-text">
            {Math.round(share * 100)}
          </text>
        </g>
      ))}
      <polygon points={band} fill="url(#hatch-water)" />
      <polyline
        points={points.map(({ size, figure }) => `${x(size)},${y(figure.value)}`).join(" ")}
        fill="none"
        stroke="var(--water-700)"
        strokeWidth="2"
      />
      {current >= first && current <= last && (
        <path d={`M${x(current)} 2V${height}`} stroke="var(--ink)" strokeWidth="1.5" />
      )}
      <path d={`M34 ${height}H${width - 10}`} stroke="var(--ink)" strokeWidth="1.5" />
      {[first, last].map((size, i) => (
        <text key={size} x={x(size)} y={height + 15} textAnchor={i === 0 ? "start" : "end"} className="axis-text">
          {formatCount(size)}
        </text>
      ))}
    </svg>
  );
}
