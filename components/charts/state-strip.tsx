import { timeParts } from "./time-bar";
import { foldColumns, listRuns, mostOften } from "./trace-columns";
import { axisLeft, tickX, type TimeAxis, TimeLines } from "./week-axis";

type Props = {
  axis: TimeAxis;
  /** By tick: index in `timeParts` of what the station did. */
  states: Uint8Array;
  label: string;
};

const height = 20;

/** What a station did tick by tick, in the patterns of the time bar. */
export function StateStrip({ axis, states, label }: Props) {
  const { ticksPerColumn, columns } = foldColumns(states, axis.width, (from, to) => mostOften(states, from, to));
  const x = (column: number): number => tickX(axis, Math.min(axis.nTicks, column * ticksPerColumn));
  const runs = listRuns(columns);
  return (
    <svg viewBox={`0 0 ${axis.width} ${height}`} width="100%" role="img" aria-label={label}>
      {timeParts.map(({ key, fill }, i) => (
        <path
          key={key}
          d={runs
            .filter(({ value }) => value === i)
            .map(({ from, to }) => `M${x(from)} 3H${x(to)}V15H${x(from)}Z`)
            .join("")}
          fill={fill}
        />
      ))}
      <rect
        x={axisLeft}
        y="3"
        width={tickX(axis, axis.nTicks) - axisLeft}
        height="12"
        fill="none"
        stroke="var(--ink)"
        strokeWidth="1"
      />
      <TimeLines axis={{ ...axis, dayStarts: [] }} top={0} bottom={18} />
    </svg>
  );
}
