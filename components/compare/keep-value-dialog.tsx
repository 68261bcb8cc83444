"use client";

import { NameDialog } from "@/components/line/name-dialog";
import { useLine } from "@/lib/client/line-state";
import type { SweepReading } from "./sweep-store";

type Props = {
  /** "Controller boards at 6 000". */
  what: string;
  name: string;
  entry: SweepReading | null;
  onClose(): void;
  onKept(name: string): void;
};

/** Makes a scenario of one value of a sweep; its run goes along. */
export function KeepValueDialog({ what, name, entry, onClose, onKept }: Props) {
  const { saveAsScenario } = useLine();
  if (!entry) return null;
  return (
    <NameDialog
      isOpen
      onClose={onClose}
      title={`Keep ${what}`}
      intro="A new scenario with this value and the figures of its run."
      action="Save as scenario"
      initialName={name}
      submit={async (name) => {
        const result = await saveAsScenario(name, entry.line, entry.reading);
        if (result.ok) onKept(name);
        return result;
      }}
    />
  );
}
