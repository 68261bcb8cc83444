import type { ReactNode } from "react";
import { cx } from "./cx";

const tones = {
  ink: "border-rule-2 text-ink-2",
  water: "border-water-600 text-water-700",
  silt: "border-silt-600 text-silt-700",
} as const;

/** An outlined word: water waits, ink is settled, silt was sent back or refused. */
export function Tag({
  tone = "ink",
  className,
  children,
}: {
  tone?: keyof typeof tones;
  className?: string;
  children: ReactNode;
}) {
  return (
    <span
      className={cx(
        "inline-flex h-5 items-center rounded-field border px-[7px] text-[12px] whitespace-nowrap",
        tones[tone],
        className,
      )}
    >
      {children}
    </span>
  );
}
