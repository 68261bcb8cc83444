import { formatCount } from "@/lib/format";
import { hatch } from "./hatch-defs";
import { staffTop } from "./staff-gauge";
import { foldColumns, listRuns } from "./trace-columns";
import { axisLeft, roundPlace, tickX, type TimeAxis, TimeLines } from "./week-axis";

/** A delivery: due at `due`, there at `arrived`, null while it is not; ticks, which may lie outside the drawing. */
export type DeliveryMark = { due: number; arrived: number | null; isLate: boolean; isRefused: boolean };

type Props = {
  axis: TimeAxis;
  /** Level at the end of each tick. */
  levels: Int32Array;
  deliveries?: readonly DeliveryMark[];
  label: string;
};

const top = 18;
const bed = 78;
const height = 90;

/** A buffer's level tick by tick: a step line with water under it, silt under the bed while dry, deliveries as marks above. */
export function LevelTrace({ axis, levels, deliveries = [], label }: Props) {
  const most = staffTop(levels.reduce((a, b) => Math.max(a, b), 0));
  const y = (level: number): number => roundPlace(bed - (level / most) * (bed - top));
  const lowest = (from: number, to: number): number => levels.subarray(from, to).reduce((a, b) => Math.min(a, b));
  const { ticksPerColumn, columns } = foldColumns(levels, 2 * axis.width, lowest);
  const x = (column: number): number => tickX(axis, Math.min(axis.nTicks, column * ticksPerColumn));
  const runs = listRuns(columns);
  const dry = runs.filter(({ value }) => value === 0);
  const line = runs.map(({ from, to, value }) => `${from === 0 ? "M" : "L"}${x(from)} ${y(value)}H${x(to)}`).join("");
  const chosen = tickX(axis, axis.weeks[axis.weeks.length - 1].firstTick);
  const water = `${line}V${bed}H${axisLeft}Z`;
  return (
    <svg viewBox={`0 0 ${axis.width} ${height}`} width="100%" role="img" aria-label={label}>
      <TimeLines axis={axis} top={top} bottom={bed} />
      {[most / 2, most].map((level) => (
        <g key={level}>
          <path d={`M${axisLeft - 5} ${y(level)}h5`} stroke="var(--ink)" />
          <text x={axisLeft - 8} y={y(level) + 4} textAnchor="end" className="axis-text">
            {formatCount(level)}
          </text>
        </g>
      ))}
      <path d={water} fill="var(--water-400)" />
      {/* Weeks before the one in question stand back. */}
      <rect x={axisLeft} y={top} width={chosen - axisLeft} height={bed - top} fill="var(--paper)" opacity=".5" />
      <path d={line} fill="none" stroke="var(--water-700)" strokeWidth="1.3" />
      <path
        d={`M${axisLeft} ${top}V${bed}H${tickX(axis, axis.nTicks)}`}
        fill="none"
        stroke="var(--ink)"
        strokeWidth="1.5"
      />
      {dry.map(({ from, to }) => (
        <rect key={from} x={x(from)} y={bed + 2} width={Math.max(1, x(to) - x(from))} height="8" fill={hatch.short} />
      ))}
      {deliveries.map((mark, i) => (
        <Delivery key={i} axis={axis} mark={mark} />
      ))}
    </svg>
  );
}

/** A water mark where units arrive; a dashed line from the day they were due; a cross where they were refused. */
function Delivery({ axis, mark: { due, arrived, isLate, isRefused } }: { axis: TimeAxis; mark: DeliveryMark }) {
  const from = tickX(axis, Math.max(0, due));
  const to = tickX(axis, arrived ?? axis.nTicks);
  const stroke = isLate || isRefused ? "var(--silt-600)" : "var(--ink)";
  return (
    <g stroke={stroke} fill="none" strokeWidth="1.5">
      {isLate && <path d={`M${from} 3v8M${from} 7H${to}`} strokeDasharray="3 2" />}
      {arrived !== null && !isRefused && <path d={`M${to - 4.5} 3h9l-4.5 8z`} fill={stroke} stroke="none" />}
      {arrived !== null && isRefused && <path d={`M${to - 4} 3l8 8M${to + 4} 3l-8 8`} />}
    </g>
  );
}
