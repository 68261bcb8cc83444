import type { ReactNode } from "react";
import { cx } from "./cx";
import { WarnIcon } from "./icons";

/** One sentence on what is wrong and what is allowed. */
export function ErrorLine({ id, className, children }: { id?: string; className?: string; children: ReactNode }) {
  return (
    <p id={id} role="alert" className={cx("flex gap-1.5 text-s text-silt-700", className)}>
      <WarnIcon className="mt-0.5 shrink-0" />
      <span>{children}</span>
    </p>
  );
}
