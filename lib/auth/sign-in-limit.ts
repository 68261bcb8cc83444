import "server-only";
import { APIError, createAuthMiddleware } from "better-auth/api";
import { getDb } from "@/db/client";
import { clearSignInAttempts, countSignInAttempt } from "@/db/queries/sign-in-attempts";

const signIn = "/sign-in/email";
const emailOf = (body: unknown): string | null => {
  const email = (body as { email?: unknown } | undefined)?.email;
  return typeof email === "string" ? email : null;
};

/** Stops guessing at one account from many addresses. Says the same whether or not the account exists. */
export const refuseManyAttempts = createAuthMiddleware(async (ctx) => {
  const email = ctx.path === signIn ? emailOf(ctx.body) : null;
  if (email === null) return;
  const waitSeconds = await countSignInAttempt(await getDb(), email, new Date());
  if (waitSeconds === 0) return;
  const minutes = Math.ceil(waitSeconds / 60);
  throw new APIError(
    "TOO_MANY_REQUESTS",
    {
      code: "too-many",
      message: `Too many attempts for this e-mail address. Try again in ${minutes} ${minutes === 1 ? "minute" : "minutes"}.`,
    },
    { "Retry-After": String(waitSeconds) },
  );
});

export const forgetAttempts = createAuthMiddleware(async (ctx) => {
  const email = ctx.path === signIn && ctx.context.newSession ? emailOf(ctx.body) : null;
  if (email !== null) await clearSignInAttempts(await getDb(), email);
});
