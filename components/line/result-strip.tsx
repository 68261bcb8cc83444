"use client";

import { useMemo } from "react";
import { useLine } from "@/lib/client/line-state";
import { ResultStripFigures } from "./result-strip-figures";
import { ResultStripHeadline } from "./result-strip-headline";
import { ResultStripRun } from "./result-strip-run";
import { readStrip } from "./strip-reading";

/** The title block of the sheet, docked at the foot of every view of a line: what was found, and the way to run it. */
export function ResultStrip() {
  const { full, live, liveBase, keptReading, options, scenario } = useLine();
  const reading = useMemo(
    () => readStrip({ full, live, liveBase, keptReading, options, scenario }),
    [full, live, liveBase, keptReading, options, scenario],
  );
  return (
    <section
      aria-label="Result"
      className="relative z-10 grid shrink-0 grid-cols-1 border-t-[1.5px] border-ink bg-sheet sm:grid-cols-[minmax(0,1fr)_auto] lg:min-h-[106px] lg:grid-cols-[minmax(0,1fr)_262px_126px_122px_208px] min-[86.25rem]:grid-cols-[minmax(0,1fr)_300px_140px_136px_232px] print:hidden"
    >
      <ResultStripHeadline reading={reading} />
      <ResultStripFigures reading={reading} />
      <ResultStripRun />
    </section>
  );
}
