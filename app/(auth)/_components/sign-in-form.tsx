"use client";

import { type FormEvent, useState } from "react";
import { Button } from "@/components/ui/button";
import { ErrorLine } from "@/components/ui/error-line";
import { PasswordField, TextField } from "@/components/ui/text-field";
import { signIn } from "@/lib/client/auth-client";
import { loadPage } from "@/lib/client/load-page";

export type DemoEntry = { name: string; email: string; role: string; password: string };

/** Signs in and goes on to `next`, a path of this site. */
export function SignInForm({ next, demo }: { next: string; demo: readonly DemoEntry[] }) {
  const [email, setEmail] = useState("");
  const [password, setPassword] = useState("");
  const [error, setError] = useState<string | null>(null);
  const [isBusy, setBusy] = useState(false);

  async function submit(event: FormEvent) {
    event.preventDefault();
    if (!email.trim() || !password) {
      setError("Type your e-mail address and your password.");
      return;
    }
    setBusy(true);
    const problem = await signIn(email.trim(), password);
    setError(problem);
    if (problem === null) loadPage(next);
    else setBusy(false);
  }

  return (
    <>
      <form className="mt-6 space-y-4" onSubmit={(event) => void submit(event)} noValidate>
        <TextField
          label="Work e-mail"
          type="email"
          autoComplete="username"
          size="large"
          value={email}
          onChange={setEmail}
        />
        <PasswordField label="Password" autoComplete="current-password" value={password} onChange={setPassword} />
        {error && <ErrorLine>{error}</ErrorLine>}
        <Button kind="main" size="large" type="submit" disabled={isBusy} className="w-full max-sm:h-12">
          {isBusy ? "Signing in" : "Sign in"}
        </Button>
      </form>
      {demo.length > 0 && (
        <DemoAccounts
          demo={demo}
          onTake={(entry) => {
            setEmail(entry.email);
            setPassword(entry.password);
            setError(null);
          }}
        />
      )}
    </>
  );
}

function DemoAccounts({ demo, onTake }: { demo: readonly DemoEntry[]; onTake(entry: DemoEntry): void }) {
  return (
    <section className="mt-7" aria-labelledby="demo-accounts">
      <h2 id="demo-accounts" className="border-b border-ink pb-1 text-s font-[520] text-ink-2">
        Demo accounts of Larkfield Drives: choose one to fill in the form
      </h2>
      <ul>
        {demo.map((entry) => (
          <li key={entry.email} className="border-b border-rule">
            <button
              type="button"
              className="flex min-h-11 w-full items-center gap-3 py-1 text-left hover:bg-water-50"
              onClick={() => onTake(entry)}
            >
              <span className="min-w-0 flex-1">
                <b className="block font-[620]">{entry.name}</b>
                <span className="text-s text-ink-3">{entry.role}</span>
              </span>
              <code className="typed text-s text-ink-2">{entry.password}</code>
            </button>
          </li>
        ))}
      </ul>
    </section>
  );
}
