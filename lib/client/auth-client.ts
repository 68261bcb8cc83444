import { createAuthClient } from "better-auth/react";
import { noAnswer } from "./no-answer";

const client = createAuthClient();

/** What went wrong in words, or null. */
export type Outcome = string | null;

const wordsOf: Record<string, string> = {
  INVALID_EMAIL_OR_PASSWORD: "No account has this e-mail address and password. Check both.",
  USER_ALREADY_EXISTS: "There is an account with this e-mail address already. Sign in instead.",
  USER_ALREADY_EXISTS_USE_ANOTHER_EMAIL: "There is an account with this e-mail address already. Sign in instead.",
  PASSWORD_TOO_SHORT: "A password has at least 10 characters.",
  PASSWORD_TOO_LONG: "A password has at most 128 characters.",
  INVALID_EMAIL: "This is not an e-mail address.",
};

type Reply = { error: { code?: string; message?: string; status?: number } | null };

function outcome({ error }: Reply): Outcome {
  if (!error) return null;
  if (error.code && wordsOf[error.code]) return wordsOf[error.code];
  if (error.status === 429) return error.message || "Too many tries. Wait a minute and try again.";
  return error.message || "The server did not answer. Try again.";
}

/** A dropped connection is said like any other failure. */
async function ask(call: Promise<Reply>): Promise<Outcome> {
  return call.then(outcome, () => noAnswer);
}

export const signIn = (email: string, password: string) => ask(client.signIn.email({ email, password }));
export const signUp = (name: string, email: string, password: string) =>
  ask(client.signUp.email({ name, email, password }));
export const signOut = () => ask(client.signOut());
