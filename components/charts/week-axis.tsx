export type AxisWeek = { firstTick: number; nTicks: number; label: string };

/** Traced time on paper: all ticks side by side, weeks parted by a line, the last one the week in question. */
export type TimeAxis = { nTicks: number; dayStarts: number[]; weeks: AxisWeek[]; width: number };

export const axisLeft = 48;
const axisRight = 6;

/** To a tenth of a unit, since paths have thousands of points. */
export const roundPlace = (place: number): number => Math.round(place * 10) / 10;

/** Where a tick begins. */
export function tickX({ nTicks, width }: TimeAxis, tick: number): number {
  return roundPlace(axisLeft + (tick / Math.max(1, nTicks)) * (width - axisLeft - axisRight));
}

/** Hairlines where days begin and ink where weeks do, from top to bottom of a row. */
export function TimeLines({ axis, top, bottom }: { axis: TimeAxis; top: number; bottom: number }) {
  const weekStarts = axis.weeks.slice(1).map(({ firstTick }) => firstTick);
  return (
    <>
      <path
        d={axis.dayStarts.map((tick) => `M${tickX(axis, tick)} ${top}V${bottom}`).join("")}
        stroke="var(--rule)"
        fill="none"
      />
      <path
        d={weekStarts.map((tick) => `M${tickX(axis, tick)} ${top}V${bottom}`).join("")}
        stroke="var(--ink)"
        fill="none"
      />
    </>
  );
}

/** The weeks' names, once below all rows. */
export function WeekAxis({ axis }: { axis: TimeAxis }) {
  const right = tickX(axis, axis.nTicks);
  return (
    <svg viewBox={`0 0 ${axis.width} 26`} width="100%" aria-hidden>
      <path d={`M${axisLeft} 1H${right}`} stroke="var(--ink)" strokeWidth="1.5" />
      <path d={axis.dayStarts.map((tick) => `M${tickX(axis, tick)} 1v5`).join("")} stroke="var(--ink)" />
      {axis.weeks.map(({ firstTick, nTicks, label }, i) => (
        <g key={firstTick}>
          <path d={`M${tickX(axis, firstTick)} 1v10`} stroke="var(--ink)" />
          <text
            x={tickX(axis, firstTick + nTicks / 2)}
            y="21"
            textAnchor="middle"
            className="axis-text"
            fontWeight={i === axis.weeks.length - 1 ? 700 : 400}
          >
            {label}
          </text>
        </g>
      ))}
    </svg>
  );
}
