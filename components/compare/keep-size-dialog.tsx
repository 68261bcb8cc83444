"use client";

import { NameDialog } from "@/components/line/name-dialog";
import { useLine } from "@/lib/client/line-state";
import { formatCount } from "@/lib/format";
import type { SweepRun } from "./sweep-store";

type Props = {
  bufferName: string;
  size: number;
  entry: SweepRun["readings"][number] | null;
  onClose(): void;
  onKept(name: string): void;
};

/** Makes a scenario of one size; its run goes along. */
export function KeepSizeDialog({ bufferName, size, entry, onClose, onKept }: Props) {
  const { saveAsScenario } = useLine();
  if (!entry) return null;
  return (
    <NameDialog
      isOpen
      onClose={onClose}
      title={`Keep ${bufferName} at ${formatCount(size)}`}
      intro="A new scenario with this size and the figures of its run."
      action="Save as scenario"
      initialName={`${bufferName} ${size}`}
      submit={async (name) => {
        const result = await saveAsScenario(name, entry.line, entry.reading);
        if (result.ok) onKept(name);
        return result;
      }}
    />
  );
}
