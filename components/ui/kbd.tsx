import { cx } from "./cx";

/** A key beside the label of what it does. */
export function Kbd({ children, className }: { children: string; className?: string }) {
  return <kbd className={cx("ml-0.5 font-typed text-[11.5px] opacity-70", className)}>{children}</kbd>;
}
