"use client";

import { useState, type FormEvent } from "react";
import { Button } from "@/components/ui/button";
import { Dialog, DialogAnswers } from "@/components/ui/dialog";
import { TextField } from "@/components/ui/text-field";
import { noAnswer } from "@/lib/client/no-answer";
import type { ActionResult } from "@/lib/errors";

type Props = {
  title: string;
  intro?: string;
  action: string;
  initialName: string;
  isOpen: boolean;
  onClose(): void;
  /** The dialog closes when it succeeds and shows the message when it does not. */
  submit(name: string): Promise<ActionResult<unknown>>;
};

const mostCharacters = 120;

/** Asks for the name of a scenario. */
export function NameDialog({ isOpen, onClose, ...form }: Props) {
  return (
    <Dialog open={isOpen} onOpenChange={(open) => !open && onClose()} title={form.title} description={form.intro}>
      <NameForm {...form} onClose={onClose} />
    </Dialog>
  );
}

function NameForm({ action, initialName, onClose, submit }: Omit<Props, "isOpen" | "title" | "intro">) {
  const [name, setName] = useState(initialName);
  const [error, setError] = useState<string | null>(null);
  const [isBusy, setBusy] = useState(false);

  async function send(event: FormEvent): Promise<void> {
    event.preventDefault();
    const trimmed = name.trim();
    if (trimmed.length < 1 || trimmed.length > mostCharacters) {
      setError(`A name has 1 to ${mostCharacters} characters.`);
      return;
    }
    setBusy(true);
    const result = await submit(trimmed).catch(() => null);
    setBusy(false);
    if (result === null) setError(noAnswer);
    else if (result.ok) onClose();
    else setError(result.fields?.name ?? result.message);
  }

  return (
    <form onSubmit={(event) => void send(event)} className="mt-4" noValidate>
      <TextField
        label="Name"
        value={name}
        onChange={setName}
        error={error ?? undefined}
        autoFocus
        onFocus={({ target }) => target.select()}
      />
      <DialogAnswers>
        <Button onClick={onClose}>Cancel</Button>
        <Button type="submit" kind="main" disabled={isBusy}>
          {action}
        </Button>
      </DialogAnswers>
    </form>
  );
}
