import { formatCount } from "@/lib/format";
import type { Cover } from "@/lib/sizing/needs";
import { hatch } from "./hatch-defs";
import { staffTop } from "./staff-gauge";

type Props = {
  needs: readonly Cover[];
  /** Name of each place on the axis; those that have no room are left out. */
  names: readonly string[];
  size: number;
  label: string;
  coverName: string;
  width?: number;
};

const height = 210;
const left = 52;

/** What each day or week needs: solid to the median, ruled to the level that covers it, today's size a line across. */
export function NeedChart({ needs, names, size, label, coverName, width = 620 }: Props) {
  const right = width - 96;
  const top = staffTop(size, ...needs.map(({ covered }) => covered));
  const y = (units: number) => height - 28 - (Math.max(0, units) / top) * (height - 40);
  const band = (right - left) / needs.length;
  const every = Math.ceil((Math.max(...names.map(({ length }) => length)) * 6.5 + 6) / band);
  const last = needs[needs.length - 1];
  return (
    <svg viewBox={`0 0 ${width} ${height}`} width="100%" className="max-w-[820px]" role="img" aria-label={label}>
      {[0, 0.25, 0.5, 0.75, 1].map((share) => (
        <g key={share}>
          <path d={`M${left} ${y(share * top)}H${right}`} stroke="var(--rule)" />
          <text x={left - 6} y={y(share * top) + 4} textAnchor="end" className="axis-text">
            {formatCount(share * top)}
          </text>
        </g>
      ))}
      {needs.map(({ p50, covered }, i) => {
        const x = left + i * band + Math.min(3, band * 0.12);
        const wide = band - 2 * Math.min(3, band * 0.12);
        return (
          <g key={i}>
            <rect x={x} y={y(covered)} width={wide} height={y(p50) - y(covered)} fill={hatch.room} />
            <rect x={x} y={y(p50)} width={wide} height={y(0) - y(p50)} fill="var(--water-400)" />
            <path d={`M${x} ${y(covered)}h${wide}`} stroke="var(--water-700)" strokeWidth="2" />
          </g>
        );
      })}
      <path d={`M${left} ${y(size)}H${right + 4}`} stroke="var(--ink)" strokeDasharray="5 3" strokeWidth="1.5" />
      <text x={right + 8} y={y(size) + 4} className="axis-text">
        size {formatCount(size)}
      </text>
      {Math.abs(y(last.covered) - y(size)) > 13 && (
        <text x={right + 8} y={y(last.covered) + 4} className="axis-text">
          {coverName} {formatCount(last.covered)}
        </text>
      )}
      <path d={`M${left} ${y(0)}H${right}`} stroke="var(--ink)" strokeWidth="1.5" />
      {names.map((name, i) =>
        i % every === 0 ? (
          <text key={name} x={left + (i + 0.5) * band} y={height - 9} textAnchor="middle" className="axis-text">
            {name}
          </text>
        ) : null,
      )}
    </svg>
  );
}
