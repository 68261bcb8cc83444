"use client";

import { ToggleGroup } from "radix-ui";

type Props<T extends string> = {
  label: string;
  value: T;
  onChange(value: T): void;
  options: readonly { value: T; label: string }[];
};

/** Two or three ways to see one thing. */
export function SwitchTwo<T extends string>({ label, value, onChange, options }: Props<T>) {
  return (
    <ToggleGroup.Root
      type="single"
      aria-label={label}
      value={value}
      onValueChange={(next) => next && onChange(next as T)}
      className="inline-flex h-8 shrink-0 rounded-press border border-rule-2 bg-sheet max-sm:h-11"
    >
      {options.map((option) => (
        <ToggleGroup.Item
          key={option.value}
          value={option.value}
          className="px-[13px] font-[500] text-ink-2 not-first:border-l not-first:border-rule-2 hover:bg-water-50 data-[state=on]:bg-water-100 data-[state=on]:font-[620] data-[state=on]:text-ink data-[state=on]:shadow-[inset_0_-3px_0_var(--water-600)] data-[state=on]:focus-visible:shadow-focus"
        >
          {option.label}
        </ToggleGroup.Item>
      ))}
    </ToggleGroup.Root>
  );
}
