"use client";

import { useState } from "react";
import { noAnswer } from "@/lib/client/no-answer";
import { Button } from "./button";
import { Dialog, DialogAnswers } from "./dialog";
import { ErrorLine } from "./error-line";

type Props = {
  open: boolean;
  onClose(): void;
  title: string;
  description: string;
  action: string;
  keep?: string;
  /** Null when done, else why it was not. */
  onConfirm(): Promise<string | null>;
};

/** Asks before work is thrown away; stays open and says why when it did not succeed. */
export function ConfirmDialog({ open, onClose, title, description, action, keep = "Leave it", onConfirm }: Props) {
  const [error, setError] = useState<string | null>(null);
  const [isBusy, setBusy] = useState(false);

  async function confirm() {
    setBusy(true);
    const problem = await onConfirm().catch(() => noAnswer);
    setBusy(false);
    if (problem === null) close();
    else setError(problem);
  }

  // What went wrong last time says nothing about the next.
  function close() {
    setError(null);
    onClose();
  }

  return (
    <Dialog open={open} onOpenChange={(isOpen) => !isOpen && close()} title={title} description={description}>
      {error && <ErrorLine className="mt-3">{error}</ErrorLine>}
      <DialogAnswers>
        <Button onClick={close}>{keep}</Button>
        <Button kind="stop" disabled={isBusy} onClick={() => void confirm()}>
          {action}
        </Button>
      </DialogAnswers>
    </Dialog>
  );
}
