"use client";

import type { Route } from "next";
import { useRouter } from "next/navigation";
import { type FormEvent, useState } from "react";
import { Button } from "@/components/ui/button";
import { Dialog, DialogAnswers } from "@/components/ui/dialog";
import { TextField } from "@/components/ui/text-field";
import { noAnswer } from "@/lib/client/no-answer";
import { createLineAction } from "../actions";

const starts = [
  { value: "empty", label: "An empty sheet", hint: "Draw suppliers, buffers, stations and customers yourself." },
  {
    value: "example",
    label: "The example line",
    hint: "The drive unit line of Larkfield Drives, an invented plant, to change as you like.",
  },
] as const;

export function NewLineDialog({ isOpen, onClose }: { isOpen: boolean; onClose(): void }) {
  return (
    <Dialog open={isOpen} onOpenChange={(open) => !open && onClose()} title="What shall the new line begin with?">
      <NewLineForm onClose={onClose} />
    </Dialog>
  );
}

function NewLineForm({ onClose }: { onClose(): void }) {
  const router = useRouter();
  const [name, setName] = useState("");
  const [from, setFrom] = useState<(typeof starts)[number]["value"]>("empty");
  const [error, setError] = useState<string | null>(null);
  const [isBusy, setBusy] = useState(false);

  async function submit(event: FormEvent) {
    event.preventDefault();
    setBusy(true);
    const result = await createLineAction({ name, from }).catch(() => null);
    if (result?.ok) router.push(`/lines/${result.value.id}/sketch` as Route);
    else {
      setError(result ? (result.fields?.name ?? result.message) : noAnswer);
      setBusy(false);
    }
  }

  return (
    <form className="mt-4 space-y-4" onSubmit={(event) => void submit(event)}>
      <fieldset>
        <legend className="sr-only">What it begins with</legend>
        {starts.map(({ value, label, hint }) => (
          <label key={value} className="flex min-h-11 items-start gap-2.5 border-b border-rule py-2">
            <input
              type="radio"
              name="from"
              value={value}
              checked={from === value}
              onChange={() => setFrom(value)}
              className="mt-1 size-4 accent-ink"
            />
            <span>
              {label}
              <span className="block text-s text-ink-3">{hint}</span>
            </span>
          </label>
        ))}
      </fieldset>
      <TextField label="Name" value={name} onChange={setName} error={error ?? undefined} maxLength={120} required />
      <DialogAnswers>
        <Button onClick={onClose}>Cancel</Button>
        <Button kind="main" type="submit" disabled={isBusy}>
          Make the line
        </Button>
      </DialogAnswers>
    </form>
  );
}
