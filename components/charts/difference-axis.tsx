import { formatNumber, formatPoints, withSign } from "@/lib/format";
import type { Figure } from "@/lib/simulation/types";
import { Whisker } from "./whisker";

const width = 190;

/** Ends of one zero line for several differences, in points: whole steps that hold every interval. */
export function differenceScale(figures: readonly Figure[]): { from: number; to: number; step: number } {
  const ends = figures.flatMap(({ value, halfWidth }) => [value - (halfWidth ?? 0), value + (halfWidth ?? 0)]);
  const [low, high] = [Math.min(0, ...ends) * 100, Math.max(0, ...ends) * 100];
  const step = [0.5, 1, 2, 5, 10, 20].find((one) => (high - low) / one <= 5) ?? 50;
  const from = Math.floor(low / step) * step;
  return { from, to: Math.max(from + step, Math.ceil(high / step) * step), step };
}

type Props = { figure: Figure | null; scale: ReturnType<typeof differenceScale>; label: string; hasAxis?: boolean };

/** A paired difference in points on its zero line, with its 95 % interval. */
export function DifferenceAxis({ figure, scale: { from, to, step }, label, hasAxis = false }: Props) {
  const x = (value: number) => 6 + ((value - from) / (to - from)) * (width - 12);
  const ticks = Array.from({ length: Math.round((to - from) / step) + 1 }, (_, i) => from + i * step);
  const half = (figure?.halfWidth ?? 0) * 100;
  const value = (figure?.value ?? 0) * 100;
  return (
    <svg
      viewBox={`0 0 ${width} ${hasAxis ? 24 : 34}`}
      width="100%"
      className="max-w-[230px]"
      role="img"
      aria-label={figure ? `${label}: ${formatPoints(figure.value)} points` : label}
    >
      {hasAxis ? (
        <>
          {ticks.map((tick) => (
            <g key={tick}>
              <path d={`M${x(tick)} 17v6`} stroke="var(--ink)" />
              <text x={x(tick)} y="12" textAnchor="middle" className="axis-text">
                {tick === 0 ? "0" : withSign(formatNumber(tick, step < 1 ? 1 : 0))}
              </text>
            </g>
          ))}
          <path d={`M${x(from)} 23H${x(to)}`} stroke="var(--ink)" strokeWidth="1.5" />
        </>
      ) : (
        <>
          {ticks.map((tick) => (
            <path
              key={tick}
              d={`M${x(tick)} 0V34`}
              stroke={tick === 0 ? "var(--ink)" : "var(--rule)"}
              strokeWidth={tick === 0 ? 1.5 : 1}
            />
          ))}
          {figure && <Whisker x={x(value)} from={x(value - half)} to={x(value + half)} y={17} />}
        </>
      )}
    </svg>
  );
}
