import { formatPercent } from "@/lib/format";
import { hatch } from "./hatch-defs";

export type TimeShares = { working: number; short: number; noRoom: number; stopped: number };

export const timeParts = [
  { key: "working", label: "working", fill: "var(--ink)", edge: "var(--ink)" },
  { key: "short", label: "short of parts", fill: hatch.short, edge: "var(--silt-600)" },
  { key: "noRoom", label: "no room", fill: hatch.room, edge: "var(--water-600)" },
  { key: "stopped", label: "stopped", fill: hatch.stop, edge: "var(--ink-2)" },
] as const;

type Props = { shares: TimeShares; width?: number; height?: number; label?: string };

/** Where a station's work time goes, always in the same order. */
export function TimeBar({ shares, width = 120, height = 9, label }: Props) {
  const said = timeParts.map(({ key, label: name }) => `${name} ${formatPercent(shares[key])}`).join(", ");
  return (
    <svg
      width={width}
      height={height}
      role="img"
      aria-label={label ? `${label}: ${said}` : said}
      className="max-w-full"
    >
      {timeParts.map(({ key, fill, edge }, i) => {
        const x = timeParts.slice(0, i).reduce((sum, part) => sum + shares[part.key], 0) * width;
        const w = shares[key] * width;
        if (!(w >= 0.4)) return null;
        return (
          <g key={key}>
            <rect x={x} width={w} height={height} fill={fill} />
            {i > 0 && <path d={`M${x} 0v${height}`} stroke={edge} />}
          </g>
        );
      })}
      <rect x=".5" y=".5" width={width - 1} height={height - 1} fill="none" stroke="var(--ink)" />
    </svg>
  );
}

/** What the four hatches mean. */
export function TimeKey() {
  return (
    <ul className="flex flex-wrap gap-x-4 gap-y-1 text-s text-ink-2">
      {timeParts.map(({ key, label, fill, edge }) => (
        <li key={key} className="flex items-center gap-1.5">
          <svg width="18" height="10" aria-hidden>
            <rect x=".5" y=".5" width="17" height="9" fill={fill} stroke={edge} />
          </svg>
          {label}
        </li>
      ))}
    </ul>
  );
}
