"use client";

import { NameDialog } from "@/components/line/name-dialog";
import { toast } from "@/components/ui/toast";
import { useLine } from "@/lib/client/line-state";
import type { SizingSearch } from "@/lib/client/use-sizing";
import { formatChosenPercent } from "@/lib/format";
import { digestLine } from "@/lib/line";
import type { RunResult } from "@/lib/simulation/types";
import { withSizes } from "@/lib/sizing";

type Props = {
  search: SizingSearch;
  sizes: Record<string, number>;
  acceptedRisk: number;
  /** Its run over the search's weeks, which goes along. */
  searched?: RunResult;
  onClose(): void;
};

/** Makes a scenario of a set of sizes. */
export function KeepSetDialog({ search, sizes, acceptedRisk, searched, onClose }: Props) {
  const { saveAsScenario } = useLine();
  const line = withSizes(search.line, sizes);
  const percent = formatChosenPercent(acceptedRisk);
  return (
    <NameDialog
      isOpen
      onClose={onClose}
      title={`Keep the set for ${percent} risk?`}
      intro={
        searched
          ? "A new scenario with these sizes and their run over the weeks of the search, so that it can be held against the others week by week."
          : "A new scenario with these sizes. It has no run of its own yet."
      }
      action="Save as scenario"
      initialName={`Sized for ${percent} risk`}
      submit={async (name) => {
        const result = await saveAsScenario(
          name,
          line,
          searched && {
            result: searched,
            digest: digestLine(line),
            options: { ...search.options, acceptedRisk },
            ranAt: new Date().toISOString(),
            engine: searched.engine,
          },
        );
        if (result.ok) toast(`Kept as ${name}.`);
        return result;
      }}
    />
  );
}
