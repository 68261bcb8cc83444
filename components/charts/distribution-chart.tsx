"use client";

import { Scale } from "@visx/visx";
import { formatCount, formatPercent, percentileName } from "@/lib/format";
import type { RateHistogram } from "@/lib/statistics/histogram";
import type { Figure } from "@/lib/simulation/types";
import { hatch } from "./hatch-defs";

type Props = { histogram: RateHistogram; atRisk: Figure; acceptedRisk: number; width?: number };

const height = 300;
const foot = 30;
const head = 40;

/** One bar a point of weekly fill rate; silt left of the accepted-risk mark; weeks at exactly 100 % in a broken column of their own. */
export function DistributionChart({ histogram, atRisk, acceptedRisk, width = 640 }: Props) {
  const { counts, nFull, nWeeks } = histogram;
  const first = chooseStart(histogram, atRisk.value);
  const nLeft = counts.slice(0, first).reduce((sum, n) => sum + n, 0);
  const columnX = width - 78;
  const x = Scale.scaleLinear<number>({ domain: [first, 100], range: [8, columnX - 22] });
  const most = Math.max(1, ...counts.slice(first));
  const y = Scale.scaleLinear<number>({ domain: [0, most], range: [height - foot, head + 8] });
  const mark = Math.max(first, atRisk.value * 100);
  const half = (atRisk.halfWidth ?? 0) * 100;
  const step = 100 - first > 50 ? 20 : 10;
  const ticks = Array.from({ length: 101 - first }, (_, i) => first + i).filter((p) => p % (step / 5) === 0);
  const name = percentileName(acceptedRisk);
  const isRight = x(mark) > width * 0.55;
  const isNoteLeft = x(mark) - x(first) > 130;
  return (
    <svg
      viewBox={`0 0 ${width} ${height}`}
      width="100%"
      role="img"
      aria-label={`Distribution of weekly fill rates: ${name} at ${formatPercent(atRisk.value)}; ${formatCount(nFull)} of ${formatCount(nWeeks)} weeks at 100 %`}
    >
      {half > 0 && (
        <rect
          x={x(Math.max(first, mark - half))}
          y={head}
          width={Math.max(0, x(Math.min(100, mark + half)) - x(Math.max(first, mark - half)))}
          height={height - foot - head}
          fill="var(--ink-3)"
          opacity=".16"
        />
      )}
      {counts.slice(first).map((n, i) => {
        const left = x(first + i);
        const isBelow = first + i + 1 <= mark + 1e-9;
        return (
          n > 0 && (
            <rect
              key={i}
              x={left + 0.5}
              width={Math.max(1, x(first + i + 1) - left - 1)}
              y={Math.min(y(n), height - foot - 1)}
              height={Math.max(1, height - foot - y(n))}
              fill={isBelow ? hatch.short : "var(--water-400)"}
            />
          )
        );
      })}
      <FullColumn x={columnX} n={nFull} bottom={height - foot} />
      <path d={`M${x(mark)} ${head - 12}V${height - foot}`} stroke="var(--ink)" strokeWidth="2.5" />
      <g textAnchor={isRight ? "end" : "start"}>
        <text x={x(mark) + (isRight ? -7 : 7)} y={head - 22} fontSize="13" fontWeight="640" fill="var(--ink)">
          {name} {formatPercent(atRisk.value)}
          {atRisk.halfWidth !== null && ` ±\u202f${half.toFixed(1)}`}
        </text>
        <text x={x(mark) + (isRight ? -7 : 7)} y={head - 6} fontSize="12" fill="var(--silt-700)">
          {width >= 500 && "accepted risk: "}
          {formatPercent(acceptedRisk, 0)} of weeks lie left
        </text>
      </g>
      <path d={`M${x(first)} ${height - foot}H${x(100)}`} stroke="var(--ink)" strokeWidth="1.5" />
      {ticks.map((p) => (
        <g key={p}>
          <path d={`M${x(p)} ${height - foot}v${p % step === 0 ? 7 : 4}`} stroke="var(--ink)" />
          {p % step === 0 && (
            <text x={x(p)} y={height - foot + 21} textAnchor="middle" className="axis-text">
              {p}
            </text>
          )}
        </g>
      ))}
      {nLeft > 0 && (
        <text
          x={isNoteLeft ? x(first) : x(100)}
          y={head + 6}
          textAnchor={isNoteLeft ? "start" : "end"}
          className="axis-text"
        >
          {isNoteLeft && "← "}
          {formatCount(nLeft)} {nLeft === 1 ? "week" : "weeks"} below {first}
        </text>
      )}
    </svg>
  );
}

/** Left end: a full ten, with a hundredth of the weeks at most left of it and the mark well inside. */
function chooseStart({ counts, nWeeks }: RateHistogram, mark: number): number {
  let below = 0;
  let at = 0;
  while (at < 90 && below + counts[at] <= nWeeks * 0.01) below += counts[at++];
  const least = Math.min(at, mark * 100 - 5, 60);
  return Math.max(0, Math.floor(least / 10) * 10);
}

function FullColumn({ x, n, bottom }: { x: number; n: number; bottom: number }) {
  const top = head + 14;
  return (
    <g>
      {n > 0 && <path d={`M${x} ${bottom}V${top + 4}l8 -4 8 4 8 -4 8 4 V${bottom}z`} fill="var(--water-400)" />}
      {n > 0 && (
        <path d={`M${x - 2} ${top + 34}l9 -5 9 5 9 -5 9 5`} fill="none" stroke="var(--paper)" strokeWidth="4" />
      )}
      <path d={`M${x - 4} ${bottom}h40`} stroke="var(--ink)" strokeWidth="1.5" />
      <text x={x + 16} y={top - 8} textAnchor="middle" fontSize="12.5" fontWeight="620" fill="var(--ink)">
        {formatCount(n)}
      </text>
      <text x={x + 16} y={bottom + 21} textAnchor="middle" className="axis-text">
        100{"\u202f%"}
      </text>
    </g>
  );
}
