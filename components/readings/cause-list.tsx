import { CauseBars } from "@/components/charts/cause-bars";
import type { DraftLine } from "@/lib/line/types";
import type { RunResult } from "@/lib/simulation/types";
import { causeRows } from "./cause-words";

export function CauseList({ result, document }: { result: RunResult; document: DraftLine }) {
  const rows = causeRows(result, document);
  return (
    <section>
      <h2 className="figure-title flex items-baseline gap-3 border-b border-ink pb-1">
        What holds the last station up <span className="ml-auto text-s font-text text-ink-3">hours a week</span>
      </h2>
      {rows.length === 0 ? <p className="py-2 text-ink-2">Nothing did in these weeks.</p> : <CauseBars rows={rows} />}
      <p className="mt-2 text-s text-ink-3">
        Hours in which a station that fills customers’ stock was stopped or short of parts, each charged to one root
        cause.
      </p>
    </section>
  );
}
