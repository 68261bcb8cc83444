"use client";

import { Button } from "@/components/ui/button";
import { Dialog, DialogAnswers } from "@/components/ui/dialog";

export type Problem = { title: string; message: string };

/** Says what did not work and that nothing was changed; stays until it is read. */
export function ProblemDialog({ problem, onClose }: { problem: Problem | null; onClose(): void }) {
  return (
    <Dialog
      open={problem !== null}
      onOpenChange={(open) => !open && onClose()}
      title={problem?.title ?? ""}
      description={problem ? `${problem.message} Nothing was changed.` : undefined}
    >
      <DialogAnswers>
        <Button onClick={onClose}>Close</Button>
      </DialogAnswers>
    </Dialog>
  );
}
