"use client";

import { useId, useState, type ReactNode } from "react";

type Props = {
  label: string;
  /** As shown while the field is not being edited. */
  value: string;
  isReadOnly: boolean;
  inputMode?: "numeric" | "text";
  corner?: ReactNode;
  /** Takes what was typed, or says what is wrong with it. */
  read(text: string): string | null;
};

/** A small field that takes effect on Enter or on leaving it; Esc brings the value back. */
export function StripField({ label, value, isReadOnly, inputMode = "text", corner, read }: Props) {
  const id = useId();
  const [typed, setTyped] = useState<string | null>(null);
  const [error, setError] = useState<string | null>(null);
  const finish = (): void => {
    const problem = typed === null ? null : read(typed);
    setError(problem);
    if (!problem) setTyped(null);
  };
  return (
    <div className="relative min-w-0">
      <div className="mb-[3px] flex items-baseline justify-between gap-1 text-s whitespace-nowrap text-ink-2">
        <label htmlFor={id}>{label}</label>
        {corner}
      </div>
      <input
        id={id}
        value={typed ?? value}
        readOnly={isReadOnly}
        inputMode={inputMode}
        autoComplete="off"
        spellCheck={false}
        aria-invalid={error !== null}
        aria-describedby={error ? `${id}-error` : undefined}
        className={`h-7 w-full min-w-0 rounded-[2px] border px-2 font-typed text-m tracking-[-.02em] ${
          error ? "border-silt-600" : "border-rule-2"
        } ${isReadOnly ? "bg-sunk text-ink-2" : "bg-sheet"}`}
        onChange={(event) => setTyped(event.target.value)}
        onBlur={finish}
        onKeyDown={(event) => {
          if (event.key === "Enter") finish();
          if (event.key !== "Escape") return;
          event.preventDefault();
          setTyped(null);
          setError(null);
        }}
      />
      {error && (
        <p
          id={`${id}-error`}
          role="alert"
          className="absolute right-0 bottom-full mb-1 w-max max-w-64 border border-silt-600 bg-sheet px-2 py-1 text-s text-silt-700"
        >
          {error}
        </p>
      )}
    </div>
  );
}
