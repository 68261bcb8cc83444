import type { ReactNode } from "react";
import { WarnIcon } from "./icons";

/** What stopped and where, what is safe, and a way there. */
export function ErrorBox({ title, children, action }: { title: string; children?: ReactNode; action?: ReactNode }) {
  return (
    <div role="alert" className="border border-silt-600 bg-sheet p-4">
      <p className="flex items-center gap-2 font-[620] text-silt-700">
        <WarnIcon />
        {title}
      </p>
      {children && <div className="mt-1">{children}</div>}
      {action && <div className="mt-3 flex flex-wrap gap-2">{action}</div>}
    </div>
  );
}
