import type { ReactNode } from "react";
import { cx } from "./cx";
import { ErrorLine } from "./error-line";

type FrameProps = {
  id: string;
  label: string;
  hint?: ReactNode;
  error?: string;
  className?: string;
  children: ReactNode;
};

/** Label above, the control, then what is wrong with it or a hint. */
export function FieldFrame({ id, label, hint, error, className, children }: FrameProps) {
  return (
    <div className={cx("min-w-0", className)}>
      <label htmlFor={id} className="mb-[3px] block text-s text-ink-2">
        {label}
      </label>
      {children}
      {error ? (
        <ErrorLine id={`${id}-note`} className="mt-1">
          {error}
        </ErrorLine>
      ) : (
        hint && (
          <p id={`${id}-note`} className="mt-1 text-s text-ink-3">
            {hint}
          </p>
        )
      )}
    </div>
  );
}

/** The edge of a typed field. */
export function fieldBox({
  error,
  readOnly,
  size = "normal",
}: {
  error?: string;
  readOnly?: boolean;
  size?: "normal" | "large";
}): string {
  return cx(
    "flex w-full items-center overflow-hidden rounded-field border bg-sheet focus-within:border-water-600 focus-within:shadow-[0_0_0_1px_var(--water-600)]",
    size === "large" ? "h-10 px-[9px] max-sm:h-12" : "h-8 px-[9px] max-sm:h-11",
    error ? "border-silt-600 shadow-[0_0_0_1px_var(--silt-600)]" : "border-rule-2",
    readOnly && "bg-sunk text-ink-2",
  );
}

export const bareInput =
  "min-w-0 flex-1 border-0 bg-transparent p-0 outline-none focus-visible:shadow-none max-sm:text-l";
