"use client";

import { type FormEvent, useState } from "react";
import { Button } from "@/components/ui/button";
import { ErrorLine } from "@/components/ui/error-line";
import { PasswordField, TextField } from "@/components/ui/text-field";
import { signUp } from "@/lib/client/auth-client";
import { loadPage } from "@/lib/client/load-page";

const shortest = 10;

/** Makes an account with a workspace of one's own. */
export function SignUpForm() {
  const [name, setName] = useState("");
  const [email, setEmail] = useState("");
  const [password, setPassword] = useState("");
  const [isTried, setTried] = useState(false);
  const [error, setError] = useState<string | null>(null);
  const [isBusy, setBusy] = useState(false);
  const faults = {
    name: name.trim() ? undefined : "Type your name: others see it beside your edits.",
    email: /^\S+@\S+\.\S+$/.test(email.trim()) ? undefined : "Type an e-mail address, such as ines@plant.example.",
    password: password.length >= shortest ? undefined : `A password has at least ${shortest} characters.`,
  };

  async function submit(event: FormEvent) {
    event.preventDefault();
    setTried(true);
    if (Object.values(faults).some(Boolean)) return;
    setBusy(true);
    const problem = await signUp(name.trim(), email.trim(), password);
    setError(problem);
    if (problem === null) loadPage("/lines");
    else setBusy(false);
  }

  const shown: Partial<typeof faults> = isTried ? faults : {};
  return (
    <form className="mt-6 space-y-4" onSubmit={(event) => void submit(event)} noValidate>
      <TextField
        label="Your name"
        autoComplete="name"
        size="large"
        value={name}
        onChange={setName}
        error={shown.name}
      />
      <TextField
        label="Work e-mail"
        type="email"
        autoComplete="username"
        size="large"
        value={email}
        onChange={setEmail}
        error={shown.email}
      />
      <PasswordField
        label="Password"
        autoComplete="new-password"
        value={password}
        onChange={setPassword}
        error={shown.password}
        hint={`At least ${shortest} characters.`}
      />
      {error && <ErrorLine>{error}</ErrorLine>}
      <Button kind="main" size="large" type="submit" disabled={isBusy} className="w-full max-sm:h-12">
        {isBusy ? "Making the account" : "Make an account"}
      </Button>
    </form>
  );
}
