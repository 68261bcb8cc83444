"use client";

import { type ComponentProps, type ReactNode, useId, useState } from "react";
import { cx } from "./cx";
import { bareInput, fieldBox, FieldFrame } from "./field-frame";

type Props = Omit<ComponentProps<"input">, "value" | "onChange" | "size"> & {
  label: string;
  value: string;
  onChange(value: string): void;
  error?: string;
  hint?: ReactNode;
  size?: "normal" | "large";
  isTyped?: boolean;
};

export function TextField({
  label,
  value,
  onChange,
  error,
  hint,
  size,
  isTyped = false,
  className,
  readOnly,
  ...rest
}: Props) {
  const id = useId();
  return (
    <FieldFrame id={id} label={label} error={error} hint={hint} className={className}>
      <span className={fieldBox({ error, readOnly, size })}>
        <input
          id={id}
          value={value}
          readOnly={readOnly}
          aria-invalid={error !== undefined}
          aria-describedby={error || hint ? `${id}-note` : undefined}
          className={cx(bareInput, isTyped && "typed")}
          onChange={(event) => onChange(event.target.value)}
          {...rest}
        />
      </span>
    </FieldFrame>
  );
}

/** A password, which can be shown while it is typed. */
export function PasswordField({ label, value, onChange, error, hint, size = "large", ...rest }: Props) {
  const id = useId();
  const [isShown, setShown] = useState(false);
  return (
    <FieldFrame id={id} label={label} error={error} hint={hint}>
      <span className={fieldBox({ error, size })}>
        <input
          id={id}
          type={isShown ? "text" : "password"}
          value={value}
          aria-invalid={error !== undefined}
          aria-describedby={error || hint ? `${id}-note` : undefined}
          className={bareInput}
          onChange={(event) => onChange(event.target.value)}
          {...rest}
        />
        <button
          type="button"
          className="min-h-8 pl-2 text-s text-water-700 underline underline-offset-3"
          aria-pressed={isShown}
          aria-label={isShown ? "Hide password" : "Show password"}
          onClick={() => setShown(!isShown)}
        >
          {isShown ? "Hide" : "Show"}
        </button>
      </span>
    </FieldFrame>
  );
}
