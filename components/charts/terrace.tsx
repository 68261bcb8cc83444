"use client";

import { formatChosenPercent, formatMoney, formatPercent, oneIn, withSign } from "@/lib/format";
import { useMediaQuery } from "@/lib/client/use-media-query";

/** A point of the frontier: money at the cheapest set found for an accepted risk; null while it is being searched for. */
export type Tread = { risk: number; money: number | null; isReached: boolean };
export type TerraceMark = { risk: number; money: number; label: string; note?: string; shape: "square" | "cross" };

type Props = {
  /** Descending risk. */
  treads: readonly Tread[];
  chosen: number;
  marks: readonly TerraceMark[];
  currency: string;
  /** What the money is: "Capital tied up". */
  what: string;
  onChoose(risk: number): void;
};

const height = 360;
const top = 16;
const bottom = 44;
const left = 64;
const labelWidth = 170;

/** Money against accepted risk as a terrace: a tread is the cheapest set found for a risk, a riser the price of the step. */
export function Terrace({ treads, chosen, marks, currency, what, onChoose }: Props) {
  const isNarrow = useMediaQuery("(max-width: 639px)");
  const width = isNarrow ? 420 : 640;
  const known = treads.flatMap(({ money }) => (money === null ? [] : [money]));
  const scale = moneyScale([...known, ...marks.map(({ money }) => money)]);
  const y = (money: number) =>
    height - bottom - ((money - scale.from) / (scale.to - scale.from)) * (height - bottom - top);
  const band = (width - left - 8) / treads.length;
  const x = (i: number) => left + i * band;
  const placeRisk = (risk: number) => left + band * (riskPosition(treads, risk) + 0.5);
  const label = `${what} by accepted risk: ${treads
    .map(({ risk, money, isReached }) =>
      money === null
        ? `${formatChosenPercent(risk)} not searched yet`
        : `${formatChosenPercent(risk)} ${formatMoney(money, currency)}${isReached ? "" : ", not reached"}`,
    )
    .join("; ")}`;
  return (
    <figure className="overflow-x-auto">
      <svg viewBox={`0 0 ${width} ${height}`} width="100%" className="max-w-[820px]" role="img" aria-label={label}>
        {scale.ticks.map((tick) => (
          <g key={tick}>
            <path d={`M${left} ${y(tick)}H${width - 8}`} stroke="var(--rule)" />
            <text x={left - 6} y={y(tick) + 4} textAnchor="end" className="axis-text">
              {formatMoney(tick)}
            </text>
          </g>
        ))}
        {treads.map(({ risk, money, isReached }, i) => (
          <Step
            key={risk}
            x={x(i)}
            band={band}
            y={money === null ? null : y(money)}
            bottom={height - bottom}
            isChosen={risk === chosen}
            isReached={isReached}
            money={money}
          />
        ))}
        {treads.map(({ money, risk }, i) => {
          const before = treads[i - 1]?.money ?? null;
          if (money === null || before === null) return null;
          const middle = (y(money) + y(before)) / 2;
          const isTall = Math.abs(y(before) - y(money)) > 16;
          return (
            <g key={risk}>
              <path d={`M${x(i)} ${y(before)}V${y(money)}`} stroke="var(--ink)" strokeWidth="3.5" />
              <text x={x(i) + 7} y={isTall ? middle + 4 : Math.max(y(money), y(before)) + 16} className="axis-text">
                <tspan fontWeight="600">{withSign(formatMoney(money - before))}</tspan>
              </text>
            </g>
          );
        })}
        <path d={`M${left} ${height - bottom}H${width - 8}`} stroke="var(--ink)" strokeWidth="1.5" />
        {treads.map(({ risk }, i) => (
          <g key={risk}>
            <path d={`M${x(i) + band / 2} ${height - bottom}v7`} stroke="var(--ink)" />
            <text
              x={x(i) + band / 2}
              y={height - bottom + 21}
              textAnchor="middle"
              fontSize="12.5"
              fill="var(--ink)"
              fontWeight="600"
            >
              {formatChosenPercent(risk)}
            </text>
            <text x={x(i) + band / 2} y={height - bottom + 37} textAnchor="middle" className="axis-text">
              {oneIn(risk)}
            </text>
          </g>
        ))}
        {marks.map((mark) => (
          <Mark key={mark.label} mark={mark} x={placeRisk(mark.risk)} y={y(mark.money)} currency={currency} />
        ))}
        {treads.map(({ risk, money }, i) => (
          <rect
            key={risk}
            x={x(i)}
            y={top - 10}
            width={band}
            height={height - top + 8}
            fill="transparent"
            className={money === null ? undefined : "cursor-pointer"}
            onClick={money === null ? undefined : () => onChoose(risk)}
          />
        ))}
      </svg>
    </figure>
  );
}

type StepProps = {
  x: number;
  band: number;
  y: number | null;
  bottom: number;
  isChosen: boolean;
  isReached: boolean;
  money: number | null;
};

function Step({ x, band, y, bottom: ground, isChosen, isReached, money }: StepProps) {
  return (
    <g>
      {isChosen && <rect x={x} y={top - 10} width={band} height={ground - top + 10} fill="var(--water-100)" />}
      {y === null ? (
        <path d={`M${x + band / 2} ${ground - 4}v-40`} stroke="var(--rule-2)" strokeDasharray="2 5" />
      ) : (
        <>
          <path
            d={`M${x} ${y}H${x + band}`}
            stroke={isReached ? "var(--water-600)" : "var(--silt-600)"}
            strokeWidth="3"
            strokeDasharray={isReached ? undefined : "7 4"}
          />
          {isReached && (
            <path
              d={`M${x + band - 26} ${y + 6}h20M${x + band - 23} ${y + 10}h14M${x + band - 20} ${y + 14}h8`}
              stroke="var(--water-600)"
              strokeWidth="1.2"
            />
          )}
          {isChosen && money !== null && (
            <>
              <path
                d={`M${x + band / 2 - 7} ${y - 13}h14l-7 11z`}
                fill="var(--sheet)"
                stroke="var(--water-700)"
                strokeWidth="1.6"
              />
              <text x={x + band / 2} y={y - 20} textAnchor="middle" fontSize="14" fontWeight="700" fill="var(--ink)">
                {formatMoney(money)}
              </text>
            </>
          )}
        </>
      )}
    </g>
  );
}

function Mark({ mark, x, y, currency }: { mark: TerraceMark; x: number; y: number; currency: string }) {
  // The terrace rises to the right: to the left of a mark above it there is room, but for the axis.
  const isRight = mark.shape === "cross" || x - left < labelWidth;
  const at = isRight ? x + 11 : x - 11;
  const anchor = isRight ? "start" : "end";
  return (
    <g>
      {mark.shape === "square" ? (
        <rect x={x - 5} y={y - 5} width="10" height="10" fill="var(--sheet)" stroke="var(--ink)" strokeWidth="2" />
      ) : (
        <path d={`M${x - 5} ${y - 5}l10 10m0-10l-10 10`} stroke="var(--ink)" strokeWidth="2" />
      )}
      <text
        x={at}
        y={y - 2}
        textAnchor={anchor}
        className="axis-text"
        stroke="var(--paper)"
        strokeWidth="3"
        paintOrder="stroke"
      >
        <tspan fontWeight="640" fill="var(--ink)">
          {mark.label}: {formatMoney(mark.money, currency)}
        </tspan>
        , risk {formatPercent(mark.risk, 0)}
      </text>
      {mark.note && (
        <text
          x={at}
          y={y + 13}
          textAnchor={anchor}
          fontSize="11.5"
          fontWeight="600"
          fill="var(--silt-700)"
          stroke="var(--paper)"
          strokeWidth="3"
          paintOrder="stroke"
        >
          {mark.note}
        </text>
      )}
    </g>
  );
}

/** Where a risk stands among the treads, in bands from the left, straight between neighbours on a logarithmic scale. */
export function riskPosition(treads: readonly { risk: number }[], risk: number): number {
  if (treads.length === 0) return 0;
  if (risk >= treads[0].risk) return -0.35;
  const last = treads.length - 1;
  if (risk <= treads[last].risk) return last + 0.35;
  const i = treads.findIndex((tread) => tread.risk < risk);
  const [high, low] = [Math.log(treads[i - 1].risk), Math.log(treads[i].risk)];
  return i - 1 + (high - Math.log(risk)) / (high - low);
}

/** Ends and ticks of an axis of money; it may begin above zero since nothing is filled. */
export function moneyScale(values: readonly number[]): { from: number; to: number; ticks: number[] } {
  const [low, high] = values.length === 0 ? [0, 1] : [Math.min(...values), Math.max(...values)];
  const span = Math.max(high - low, high * 0.05, 1);
  const power = 10 ** Math.floor(Math.log10(span / 4));
  const step = [1, 2, 5, 10].map((m) => m * power).find((one) => span / one <= 6) ?? power * 10;
  const from = Math.max(0, Math.floor((low - span * 0.1) / step) * step);
  const to = Math.ceil((high + span * 0.12) / step) * step;
  return { from, to, ticks: Array.from({ length: Math.round((to - from) / step) + 1 }, (_, i) => from + i * step) };
}
