"use client";

import { type KeyboardEvent, type PointerEvent, useRef } from "react";
import { formatCount } from "@/lib/format";
import { hatch } from "./hatch-defs";

export type GaugeLevels = { p10: number; p50: number; p90: number };

export type StaffGaugeProps = {
  /** Order-up-to level, reorder point or number of places; null while not typed. */
  size: number | null;
  /** Level that 9 of 10 day ends hold, median, and the one exceeded 1 day in 10; null before the first run. */
  levels: GaugeLevels | null;
  /** Purchased stock: dots up to the size stand for what is on order. */
  isPurchased: boolean;
  /** Share of time with nothing on hand; hatched under the bed from 1 %. */
  dry: number | null;
  /** The size before an edit, as a dashed hairline. */
  formerSize?: number | null;
  /** Upper end of the staff; chosen from the figures where absent. */
  max?: number;
  width?: number;
  height?: number;
  isBig?: boolean;
  /** Makes the triangle a slider. */
  onSizeChange?(size: number): void;
  label: string;
};

/** A round number at or above all that is to be drawn, so that the staff's parts are round too. */
export function staffTop(...values: number[]): number {
  const most = Math.max(1, ...values.filter(Number.isFinite)) * 1.05;
  const power = 10 ** Math.floor(Math.log10(most));
  return [1, 2, 3, 4, 5, 6, 8, 10].map((step) => step * power).find((top) => top >= most) ?? 10 * power;
}

/** Staff, walls and bed; solid water to P10, ruled to P90, the median with its mark, dots for what is on order, a triangle at the size. */
export function StaffGauge(props: StaffGaugeProps) {
  const { size, levels, isPurchased, dry, formerSize, isBig = false, onSizeChange, label } = props;
  const width = props.width ?? (isBig ? 74 : 30);
  const height = props.height ?? (isBig ? 196 : 50);
  const top = props.max ?? staffTop(size ?? 0, formerSize ?? 0, levels?.p90 ?? 0);
  const staff = isBig ? 28 : 9;
  const bay = width - staff;
  const y = (value: number) => 5 + height - (Math.min(Math.max(value, 0), top) / top) * height;
  return (
    <svg
      width={width + 12}
      height={height + 16}
      // An image hides what is inside it from screen readers, and with it the slider.
      role={onSizeChange ? "group" : "img"}
      aria-label={label}
      className="shrink-0"
    >
      <Staff x={staff} height={height} isBig={isBig} top={top} />
      {levels && <Water {...{ levels, size, isPurchased, isBig, bay, y }} x={staff} />}
      <path d={`M${staff} 1V${height + 5}H${staff + bay}V1`} fill="none" stroke="var(--ink)" strokeWidth="1.5" />
      {dry !== null && dry >= 0.01 && (
        <rect x={staff - 1} y={height + 6.5} width={bay + 2} height={isBig ? 8 : 5} fill={hatch.short} />
      )}
      {formerSize !== undefined && formerSize !== null && formerSize !== size && (
        <path d={`M${staff} ${y(formerSize)}h${bay}`} stroke="var(--ink)" strokeDasharray="3 2" />
      )}
      {size !== null && (
        <>
          {levels && <path d={`M${staff} ${y(size)}h${bay}`} stroke="var(--ink)" strokeDasharray="2 2" />}
          <SizeMark x={staff + bay} y={y(size)} {...{ size, top, height, isBig, label, onSizeChange }} />
        </>
      )}
    </svg>
  );
}

function Staff({ x, height, isBig, top }: { x: number; height: number; isBig: boolean; top: number }) {
  const nParts = isBig ? 20 : 10;
  return Array.from({ length: nParts + 1 }, (_, i) => {
    const isMajor = i % 5 === 0;
    const length = isMajor ? (isBig ? 16 : x) : isBig ? (i % 2 ? 5 : 9) : 4;
    const at = height + 5 - (i * height) / nParts;
    return (
      <g key={i}>
        <path d={`M${x - length} ${at}H${x}`} stroke="var(--ink-2)" strokeWidth={isMajor ? 1.3 : 0.9} />
        {isBig && isMajor && (
          <text x={x - 20} y={at + 4} textAnchor="end" className="axis-text">
            {formatCount((top * i) / nParts)}
          </text>
        )}
      </g>
    );
  });
}

type WaterProps = {
  levels: GaugeLevels;
  size: number | null;
  isPurchased: boolean;
  isBig: boolean;
  x: number;
  bay: number;
  y(value: number): number;
};

function Water({ levels: { p10, p50, p90 }, size, isPurchased, isBig, x, bay, y }: WaterProps) {
  const t = isBig ? 6 : 3.6;
  const middle = x + bay / 2;
  const settle = "transition-[y,height] duration-420 ease-forebay";
  return (
    <>
      {isPurchased && size !== null && size > p90 && (
        <rect x={x} y={y(size)} width={bay} height={y(p90) - y(size)} fill={hatch.order} opacity=".8" />
      )}
      <rect x={x} y={y(p90)} width={bay} height={y(p10) - y(p90)} fill={hatch.water} className={settle} />
      <rect x={x} y={y(p10)} width={bay} height={y(0) - y(p10)} fill="var(--water-400)" className={settle} />
      <path d={`M${x} ${y(p50)}h${bay}`} stroke="var(--water-700)" strokeWidth="2" />
      <path
        d={`M${middle - t} ${y(p50) - t * 1.5 - 1}h${2 * t}L${middle} ${y(p50) - 1}z`}
        fill="var(--paper)"
        stroke="var(--water-700)"
        strokeWidth="1.2"
      />
    </>
  );
}

type SizeMarkProps = {
  x: number;
  y: number;
  size: number;
  top: number;
  height: number;
  isBig: boolean;
  label: string;
  onSizeChange?(size: number): void;
};

function SizeMark({ x, y, size, top, height, isBig, label, onSizeChange }: SizeMarkProps) {
  const from = useRef<{ y: number; size: number } | null>(null);
  const w = isBig ? 10 : 7;
  const shape = <path d={`M${x + 1.5} ${y}l${w}-${isBig ? 6 : 4}v${isBig ? 12 : 8}z`} fill="var(--ink)" />;
  if (!onSizeChange) return shape;
  const step = Math.max(1, Math.round(top / 100));
  const set = (next: number) => onSizeChange(Math.max(1, Math.min(2 ** 30 - 1, Math.round(next))));

  function onKeyDown(event: KeyboardEvent) {
    const by = {
      ArrowUp: step,
      ArrowRight: step,
      ArrowDown: -step,
      ArrowLeft: -step,
      PageUp: 10 * step,
      PageDown: -10 * step,
    }[event.key];
    if (by === undefined) return;
    event.preventDefault();
    event.stopPropagation();
    set(size + by);
  }

  function onPointerMove(event: PointerEvent) {
    if (!from.current) return;
    const moved = ((from.current.y - event.clientY) / height) * top;
    set(Math.round((from.current.size + moved) / step) * step);
  }

  return (
    <g
      role="slider"
      tabIndex={0}
      aria-label={`Size of ${label}`}
      aria-orientation="vertical"
      aria-valuemin={1}
      aria-valuemax={Math.max(top, size)}
      aria-valuenow={size}
      aria-valuetext={`${formatCount(size)} units`}
      className="nodrag cursor-ns-resize touch-none"
      onKeyDown={onKeyDown}
      onPointerDown={(event) => {
        event.stopPropagation();
        event.currentTarget.setPointerCapture(event.pointerId);
        from.current = { y: event.clientY, size };
      }}
      onPointerMove={onPointerMove}
      onPointerUp={() => (from.current = null)}
      onPointerCancel={() => (from.current = null)}
    >
      <rect x={x - 4} y={y - 11} width="22" height="22" fill="transparent" />
      {shape}
    </g>
  );
}
