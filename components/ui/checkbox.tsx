"use client";

import { Checkbox as Radix } from "radix-ui";
import { useId } from "react";
import { TickIcon } from "./icons";

type Props = { label: string; hint?: string; checked: boolean; onChange(checked: boolean): void; disabled?: boolean };

export function Checkbox({ label, hint, checked, onChange, disabled }: Props) {
  const id = useId();
  return (
    <span className="flex min-h-8 items-start gap-2.5 py-1.5 max-sm:min-h-11">
      <Radix.Root
        id={id}
        checked={checked}
        disabled={disabled}
        onCheckedChange={(next) => onChange(next === true)}
        className="mt-px grid size-[18px] shrink-0 place-items-center rounded-field border border-rule-2 bg-sheet text-on-ink disabled:bg-sunk data-[state=checked]:border-ink data-[state=checked]:bg-ink"
      >
        <Radix.Indicator>
          <TickIcon />
        </Radix.Indicator>
      </Radix.Root>
      <label htmlFor={id} className="leading-5">
        {label}
        {hint && <span className="block text-s text-ink-3">{hint}</span>}
      </label>
    </span>
  );
}
