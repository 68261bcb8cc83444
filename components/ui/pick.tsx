"use client";

import { Select as Radix } from "radix-ui";
import { useId } from "react";
import { cx } from "./cx";
import { ErrorLine } from "./error-line";
import { ChevronIcon, TickIcon } from "./icons";

export type PickOption<T extends string = string> = { value: T; label: string; hint?: string };

type Props<T extends string> = {
  label: string;
  value: T;
  onChange(value: T): void;
  options: readonly PickOption<T>[];
  disabled?: boolean;
  /** The label above, as fields have it, instead of inside. */
  isField?: boolean;
  error?: string;
  className?: string;
};

/** One of a few: the label stands inside in small type, the choice in bold. */
export function Pick<T extends string>({
  label,
  value,
  onChange,
  options,
  disabled,
  isField = false,
  error,
  className,
}: Props<T>) {
  const id = useId();
  const chosen = options.find((option) => option.value === value);
  const trigger = (
    <Radix.Trigger
      aria-label={`${label}: ${chosen?.label ?? "none"}`}
      aria-invalid={error !== undefined}
      aria-describedby={isField && error ? id : undefined}
      className={cx(
        "inline-flex h-8 max-w-full items-center gap-2 rounded-field border border-rule-2 bg-sheet px-2.5 text-left hover:enabled:border-ink disabled:bg-sunk disabled:text-ink-2 max-sm:h-11",
        isField && "w-full",
        error && "border-silt-600 shadow-[0_0_0_1px_var(--silt-600)]",
        className,
      )}
    >
      {!isField && <span className="text-s text-ink-3">{label}</span>}
      <span className={cx("min-w-0 flex-1 truncate", !isField && "font-[620]")}>{chosen?.label ?? "Choose"}</span>
      <ChevronIcon />
    </Radix.Trigger>
  );
  return (
    <Radix.Root value={value} onValueChange={(next) => onChange(next as T)} disabled={disabled}>
      {isField ? (
        <div className="min-w-0">
          <span className="mb-[3px] block text-s text-ink-2">{label}</span>
          {trigger}
          {error && (
            <ErrorLine id={id} className="mt-1">
              {error}
            </ErrorLine>
          )}
        </div>
      ) : (
        trigger
      )}
      <Radix.Portal>
        <Radix.Content
          position="popper"
          sideOffset={4}
          collisionPadding={8}
          className="z-50 max-h-(--radix-select-content-available-height) min-w-(--radix-select-trigger-width) overflow-hidden border border-ink bg-sheet text-ink shadow-dialog"
        >
          <Radix.Viewport className="py-1">
            {options.map((option) => (
              <Radix.Item
                key={option.value}
                value={option.value}
                className="flex min-h-8 cursor-pointer items-center gap-3 px-3 py-1 outline-none data-[highlighted]:bg-water-100 max-sm:min-h-11"
              >
                <span className="w-3.5">
                  <Radix.ItemIndicator>
                    <TickIcon />
                  </Radix.ItemIndicator>
                </span>
                <Radix.ItemText>{option.label}</Radix.ItemText>
                {option.hint && <span className="ml-auto pl-4 text-s text-ink-3">{option.hint}</span>}
              </Radix.Item>
            ))}
          </Radix.Viewport>
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  );
}
