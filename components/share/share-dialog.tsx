"use client";

import { Button } from "@/components/ui/button";
import { Dialog, DialogAnswers } from "@/components/ui/dialog";
import { useLine } from "@/lib/client/line-state";
import type { Sweep } from "@/lib/schema/lines";
import { NewLinkForm } from "./new-link-form";
import { SharedLinks } from "./shared-links";

type Props = {
  isOpen: boolean;
  onClose(): void;
  /** Kept versions of other scenarios to be shown side by side with this one's. */
  comparison?: readonly { versionId: string; name: string }[];
  /** A comparison of sizes to go with the kept version. */
  sweep?: Sweep | null;
};

/** Makes a link to what is kept, and lists those there are. */
export function ShareDialog({ isOpen, onClose, comparison, sweep }: Props) {
  const { line } = useLine();
  return (
    <Dialog
      open={isOpen}
      onOpenChange={(open) => !open && onClose()}
      title={`Share ${line.name}`}
      description="Whoever has the link can read the figures, the line and its inputs without signing in, and change nothing."
      isWide
    >
      {isOpen && (
        <>
          <NewLinkForm comparison={comparison} sweep={sweep ?? null} />
          <SharedLinks />
        </>
      )}
      <DialogAnswers>
        <Button onClick={onClose}>Close</Button>
      </DialogAnswers>
    </Dialog>
  );
}
