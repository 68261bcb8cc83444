import { eq, lt, sql } from "drizzle-orm";
import { createHash } from "node:crypto";
import type { Db } from "../context";
import { signInAttempt } from "../schema";

export const mostAttempts = 10;
export const windowMinutes = 15;

const keyOf = (email: string) => createHash("sha256").update(email.trim().toLowerCase()).digest("hex");

/**
 * Counts an attempt before its password is looked at, so that attempts made at the same time count too.
 * @returns Seconds until the account may be tried again, or 0 when this attempt may go on. The same for accounts that do not exist.
 */
export async function countSignInAttempt(db: Db, email: string, now: Date): Promise<number> {
  await db.delete(signInAttempt).where(lt(signInAttempt.windowEndsAt, now));
  const windowEndsAt = new Date(now.getTime() + windowMinutes * 60_000);
  const [row] = await db
    .insert(signInAttempt)
    .values({ accountKey: keyOf(email), nAttempts: 1, windowEndsAt })
    .onConflictDoUpdate({
      target: signInAttempt.accountKey,
      set: { nAttempts: sql`${signInAttempt.nAttempts} + 1` },
    })
    .returning();
  if (row.nAttempts <= mostAttempts) return 0;
  return Math.max(1, Math.ceil((row.windowEndsAt.getTime() - now.getTime()) / 1000));
}

/** Forgets the attempts of an account whose owner has signed in. */
export async function clearSignInAttempts(db: Db, email: string): Promise<void> {
  await db.delete(signInAttempt).where(eq(signInAttempt.accountKey, keyOf(email)));
}
