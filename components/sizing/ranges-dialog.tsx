"use client";

import { Button } from "@/components/ui/button";
import { Dialog, DialogAnswers } from "@/components/ui/dialog";
import { ErrorLine } from "@/components/ui/error-line";
import { NumberField } from "@/components/ui/number-field";
import { useLine } from "@/lib/client/line-state";
import { useSizing } from "@/lib/client/use-sizing";
import { formatCount } from "@/lib/format";
import { refuseRange } from "@/lib/sizing";

/** Which sizes a search may change, and between what. */
export function RangesDialog({ isOpen, onClose }: { isOpen: boolean; onClose(): void }) {
  const { parsed } = useLine();
  const { question, ask, search } = useSizing();
  const isLocked = search?.status === "running";
  const { ranges } = question;
  const change = (id: string, next: Partial<(typeof ranges)[number]>) =>
    ask({ ranges: ranges.map((range) => (range.id === id ? { ...range, ...next } : range)) });
  return (
    <Dialog
      open={isOpen}
      onOpenChange={(open) => !open && onClose()}
      title="Which sizes may change?"
      description="A size that is held fixed stays as it is on the sheet. The others are looked for between the least and the largest, in steps."
      isWide
    >
      <ul className="mt-3 border-t border-ink">
        {ranges.map((range) => {
          const node = parsed?.nodes.find(({ id }) => id === range.id);
          if (node?.kind !== "buffer") return null;
          const fault = range.isFixed ? null : refuseRange(range);
          return (
            <li key={range.id} className="border-b border-rule py-2">
              <div className="grid grid-cols-3 items-end gap-x-3 gap-y-1 sm:grid-cols-[minmax(0,1fr)_repeat(3,7rem)]">
                <label className="col-span-3 flex min-h-8 items-center gap-2 sm:col-span-1">
                  <input
                    type="checkbox"
                    className="size-4 accent-ink"
                    checked={!range.isFixed}
                    disabled={isLocked}
                    onChange={() => change(range.id, { isFixed: !range.isFixed })}
                  />
                  <span className="min-w-0">
                    {node.name} <span className="text-s text-ink-3">now {formatCount(node.size)}</span>
                  </span>
                </label>
                {(["min", "max", "step"] as const).map((field) => (
                  <NumberField
                    key={field}
                    label={{ min: "Least", max: "Largest", step: "Step" }[field]}
                    isWhole
                    readOnly={range.isFixed || isLocked}
                    value={range[field]}
                    onChange={(value) => change(range.id, { [field]: value })}
                  />
                ))}
              </div>
              {fault && <ErrorLine className="mt-1">{fault}</ErrorLine>}
            </li>
          );
        })}
      </ul>
      <DialogAnswers>
        <Button onClick={() => ask({ ranges: [] })} disabled={isLocked}>
          As suggested
        </Button>
        <Button kind="main" onClick={onClose}>
          Done
        </Button>
      </DialogAnswers>
    </Dialog>
  );
}
