import "server-only";
import type { z } from "zod";
import type { Ctx } from "@/db/context";
import { AppError, type ActionResult } from "@/lib/errors";
import { parseInput } from "@/lib/schema/parse-input";
import type { Right } from "@/lib/schema/roles";
import { getCtx, requireRight, type RowRef } from "./context";

/** `row` names the row whose workspace decides; without it the active workspace does. */
export type Needs<T> = { right: Right; row?: (input: T) => RowRef };

/**
 * The frame of every server action: session, input, membership and role in the row's workspace, then the query.
 * @returns Expected failures as values; anything else is a bug and is thrown.
 */
export async function runAction<S extends z.ZodType, T>(
  schema: S,
  input: unknown,
  { right, row }: Needs<z.infer<S>>,
  query: (ctx: Ctx, input: z.infer<S>) => Promise<T>,
): Promise<ActionResult<T>> {
  try {
    // Without a session nothing is said about the input.
    const own = await getCtx();
    const parsed = parseInput(schema, input);
    const ctx = row ? await getCtx(row(parsed)) : own;
    requireRight(ctx, right);
    return { ok: true, value: await query(ctx, parsed) };
  } catch (error) {
    if (!(error instanceof AppError)) throw error;
    const { code, message, fields } = error;
    return { ok: false, code, message, ...(fields && { fields }) };
  }
}
