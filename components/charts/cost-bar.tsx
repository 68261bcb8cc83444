import { formatMoney } from "@/lib/format";
import { hatch } from "./hatch-defs";

export type CostParts = { carrying: number; overtime: number; fines: number; scrap: number };

export const costParts = [
  { key: "carrying", label: "Carrying stock", fill: hatch.room, edge: "var(--water-600)" },
  { key: "overtime", label: "Overtime", fill: hatch.stop, edge: "var(--ink-2)" },
  { key: "fines", label: "Late fines", fill: hatch.short, edge: "var(--silt-600)" },
  { key: "scrap", label: "Scrap", fill: hatch.bed, edge: "var(--ink-3)" },
] as const;

/** Parts of the cost a year in their order. `max` puts several on one scale. */
export function CostBar({ parts, max, height = 20 }: { parts: CostParts; max?: number; height?: number }) {
  const total = costParts.reduce((sum, { key }) => sum + parts[key], 0);
  const width = 300;
  const scale = (width - 1) / Math.max(1e-9, max ?? total);
  const label = costParts.map(({ key, label: name }) => `${name} ${formatMoney(parts[key])}`).join(", ");
  return (
    <svg
      viewBox={`0 0 ${width} ${height}`}
      width="100%"
      height={height}
      preserveAspectRatio="none"
      role="img"
      aria-label={label}
    >
      {costParts.map(({ key, fill, edge }, i) => {
        const from = costParts.slice(0, i).reduce((sum, part) => sum + parts[part.key], 0) * scale;
        return (
          <rect
            key={key}
            x={from + 0.5}
            y=".5"
            width={Math.max(0, parts[key] * scale)}
            height={height - 1}
            fill={fill}
            stroke={edge}
            vectorEffect="non-scaling-stroke"
          />
        );
      })}
      <rect
        x=".5"
        y=".5"
        width={Math.max(0, total * scale)}
        height={height - 1}
        fill="none"
        stroke="var(--ink)"
        vectorEffect="non-scaling-stroke"
      />
    </svg>
  );
}
