"use client";

import { type KeyboardEvent, type ReactNode, useId, useState } from "react";
import { explainNumber, readNumber } from "@/lib/line/clipboard";
import { cx } from "./cx";
import { bareInput, fieldBox, FieldFrame } from "./field-frame";

type Props = {
  label: string;
  /** Null: nothing typed yet. */
  value: number | null;
  /** Called with each sound number while typing, and with null when the field is emptied. */
  onChange(value: number | null): void;
  unit?: string;
  error?: string;
  hint?: ReactNode;
  /** Shows the value times this and gives back what is typed divided by it: 100 for a share typed in percent. */
  factor?: number;
  isWhole?: boolean;
  /** Steps of the buttons and the arrow keys; without it there are no buttons. */
  step?: number;
  readOnly?: boolean;
  placeholder?: string;
  className?: string;
};

/** A typed number with its unit. What cannot be read as a number stays on screen with a sentence and changes nothing. */
export function NumberField({
  label,
  value,
  onChange,
  unit,
  error,
  hint,
  factor = 1,
  isWhole,
  step,
  readOnly,
  placeholder,
  className,
}: Props) {
  const id = useId();
  const [typed, setTyped] = useState<string | null>(null);
  const isUnreadable = typed !== null && Number.isNaN(readNumber(typed, isWhole));
  const shown =
    typed !== null && (isUnreadable || agree(readNumber(typed, isWhole), value, factor)) ? typed : show(value, factor);
  const problem = isUnreadable ? `${explainNumber(typed, isWhole)}.` : error;

  function take(text: string) {
    setTyped(text);
    const read = readNumber(text, isWhole);
    if (read === null) onChange(null);
    else if (!Number.isNaN(read)) onChange(clean(read / (text.includes("%") ? 1 : factor)));
  }

  function stepBy(direction: number) {
    if (step === undefined || readOnly) return;
    setTyped(null);
    onChange(clean(((value ?? 0) * factor + direction * step) / factor));
  }

  function onKeyDown(event: KeyboardEvent) {
    if (step === undefined || (event.key !== "ArrowUp" && event.key !== "ArrowDown")) return;
    event.preventDefault();
    stepBy(event.key === "ArrowUp" ? 1 : -1);
  }

  return (
    <FieldFrame id={id} label={label} error={problem} hint={hint} className={className}>
      <span className={fieldBox({ error: problem, readOnly })}>
        <input
          id={id}
          inputMode="decimal"
          autoComplete="off"
          value={shown}
          placeholder={placeholder}
          readOnly={readOnly}
          aria-invalid={problem !== undefined}
          aria-describedby={problem || hint ? `${id}-note` : undefined}
          className={cx(bareInput, "typed")}
          onChange={(event) => take(event.target.value)}
          onBlur={() => !isUnreadable && setTyped(null)}
          onKeyDown={onKeyDown}
        />
        {unit && <span className="pl-2 text-s whitespace-nowrap text-ink-3">{unit}</span>}
        {step !== undefined && !readOnly && (
          <span className="-mr-[9px] ml-2 flex self-stretch border-l border-rule text-ink-2">
            <StepButton sign="−" label={`${label}: less`} onStep={() => stepBy(-1)} />
            <StepButton sign="+" label={`${label}: more`} onStep={() => stepBy(1)} className="border-l border-rule" />
          </span>
        )}
      </span>
    </FieldFrame>
  );
}

function StepButton({
  sign,
  label,
  onStep,
  className,
}: {
  sign: string;
  label: string;
  onStep(): void;
  className?: string;
}) {
  return (
    <button
      type="button"
      tabIndex={-1}
      aria-label={label}
      onClick={onStep}
      className={cx("grid w-[26px] place-items-center hover:bg-water-50", className)}
    >
      {sign}
    </button>
  );
}

/** Drops what binary fractions add: 12.000000000000002 is 12. */
const clean = (value: number) => Number(value.toPrecision(12));

const show = (value: number | null, factor: number) => (value === null ? "" : String(clean(value * factor)));

function agree(read: number | null, value: number | null, factor: number): boolean {
  if (read === null || value === null) return read === value;
  return Math.abs(read / factor - value) <= 1e-9 * Math.max(1, Math.abs(value)) || Math.abs(read - value) <= 1e-12;
}
