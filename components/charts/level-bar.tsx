import { formatCount } from "@/lib/format";
import { hatch } from "./hatch-defs";

type Props = { p10: number; p50: number; p90: number; max: number; size: number | null; label: string; width?: number };

/** Levels of one buffer lying down: solid to P10, ruled to P90, the median's line, a triangle at the number of places. */
export function LevelBar({ p10, p50, p90, max, size, label, width = 168 }: Props) {
  const x = (value: number) => (Math.min(value, max) / max) * (width - 10);
  return (
    <svg
      width={width}
      height="20"
      role="img"
      aria-label={`${label} on hand: P10 ${formatCount(p10)}, median ${formatCount(p50)}, P90 ${formatCount(p90)}`}
      className="ml-auto"
    >
      <rect y="3" width={x(p10)} height="10" fill="var(--water-400)" />
      <rect x={x(p10)} y="3" width={x(p90) - x(p10)} height="10" fill={hatch.water} />
      <path d={`M${x(p50)} 2v12`} stroke="var(--water-700)" strokeWidth="2" />
      <path d={`M0 1V14H${width - 10}`} fill="none" stroke="var(--ink)" strokeWidth="1.3" />
      {[0.25, 0.5, 0.75, 1].map((share) => (
        <path
          key={share}
          d={`M${share * (width - 10)} 14v${share === 0.5 || share === 1 ? 5 : 3}`}
          stroke="var(--ink)"
        />
      ))}
      {size !== null && size <= max && <path d={`M${x(size) + 1} 8l6-3.5v7z`} fill="var(--ink)" />}
    </svg>
  );
}
