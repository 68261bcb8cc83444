import type { ReactNode } from "react";
import { EmptyGauge } from "@/components/charts/empty-gauge";

/** An empty gauge, what is missing, and the one next step. */
export function Empty({ title, children, action }: { title: string; children?: ReactNode; action?: ReactNode }) {
  return (
    <div className="flex gap-4 py-4">
      <EmptyGauge />
      <div className="max-w-[60ch]">
        <h2 className="figure-title">{title}</h2>
        {children && <div className="mt-1 text-ink-2">{children}</div>}
        {action && <div className="mt-3 flex flex-wrap gap-2">{action}</div>}
      </div>
    </div>
  );
}
