"use client";

import { Button } from "@/components/ui/button";
import { Dialog, DialogAnswers } from "@/components/ui/dialog";
import { useLine } from "@/lib/client/line-state";
import { formatDateTime, formatPercent } from "@/lib/format";

type Props = { isOpen: boolean; onClose(): void; onTake(versionId: string): void };

/** The kept versions of the scenario, newest first; any of them can be brought back into the draft. */
export function VersionsDialog({ isOpen, onClose, onTake }: Props) {
  const { scenario, mayEdit } = useLine();
  return (
    <Dialog
      open={isOpen}
      onOpenChange={(open) => !open && onClose()}
      isWide
      title={`Kept versions of ${scenario.name}`}
      description={
        mayEdit
          ? "A version that is brought back replaces the draft; Undo restores it. Kept versions never change."
          : undefined
      }
    >
      <table className="mt-4 w-full text-m">
        <thead className="border-b border-ink text-left text-s text-ink-2">
          <tr>
            <th className="py-1 font-normal">Version</th>
            <th className="py-1 font-normal">Kept</th>
            <th className="py-1 text-right font-normal">Fill rate at accepted risk</th>
            {mayEdit && <th className="sr-only">Action</th>}
          </tr>
        </thead>
        <tbody>
          {scenario.versions.map(({ id, number, createdAt, createdBy, reading }) => (
            <tr key={id} className="border-b border-rule">
              <td className="py-1.5 font-semibold">{number}</td>
              <td className="py-1.5">
                {formatDateTime(createdAt)} <span className="text-ink-3">by {createdBy}</span>
              </td>
              <td className="py-1.5 text-right">
                {reading ? formatPercent(reading.atRisk.value, 1) : <span className="text-ink-3">not run</span>}
              </td>
              {mayEdit && (
                <td className="py-1.5 pl-3 text-right">
                  <Button size="small" onClick={() => onTake(id)} aria-label={`Bring back version ${number}`}>
                    Bring back
                  </Button>
                </td>
              )}
            </tr>
          ))}
        </tbody>
      </table>
      <DialogAnswers>
        <Button onClick={onClose}>Close</Button>
      </DialogAnswers>
    </Dialog>
  );
}
