import { Slot } from "radix-ui";
import type { ComponentProps } from "react";
import { cx } from "./cx";

const base =
  "inline-flex items-center justify-center gap-[7px] rounded-press border font-[520] whitespace-nowrap no-underline select-none transition-colors duration-90 disabled:cursor-default disabled:border-rule disabled:bg-transparent disabled:text-ink-3";

const kinds = {
  main: "border-ink bg-ink text-on-ink hover:enabled:border-water-700 hover:enabled:bg-water-700",
  edge: "border-rule-2 bg-sheet text-ink hover:enabled:border-ink hover:enabled:bg-water-50",
  plain:
    "border-transparent bg-transparent text-ink-2 hover:enabled:bg-water-50 hover:enabled:text-ink disabled:border-transparent",
  bare: "border-transparent bg-transparent px-0 text-ink-2 hover:enabled:bg-water-50 hover:enabled:text-ink disabled:border-transparent",
  stop: "border-silt-600 bg-sheet text-silt-700 hover:enabled:bg-silt-100",
} as const;

const sizes = {
  small: "h-[26px] px-[9px] text-[13px]",
  normal: "h-8 px-[13px]",
  large: "h-10 px-[18px]",
  touch: "h-12 px-[18px] text-l",
} as const;

export type ButtonProps = ComponentProps<"button"> & {
  kind?: keyof typeof kinds;
  size?: keyof typeof sizes;
  /** Gives the look to the one child, for instance a link. */
  asChild?: boolean;
};

/** One `main` a region; `stop` only for what throws work away. The label is a verb and a thing. */
export function Button({ kind = "edge", size = "normal", asChild = false, className, type, ...rest }: ButtonProps) {
  const shape = cx(base, kinds[kind], kind === "bare" ? "h-8 min-w-8" : sizes[size], className);
  if (asChild) return <Slot.Root className={cx(shape, "hover:border-ink")} {...rest} />;
  return <button type={type ?? "button"} className={shape} {...rest} />;
}
