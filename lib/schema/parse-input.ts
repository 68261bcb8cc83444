import type { z } from "zod";
import { AppError } from "@/lib/errors";

/**
 * Input as the schema has it.
 * @throws AppError invalid, with one message for each field by its dotted path.
 */
export function parseInput<S extends z.ZodType>(schema: S, input: unknown): z.infer<S> {
  const parsed = schema.safeParse(input);
  if (parsed.success) return parsed.data;
  const fields: Record<string, string> = {};
  for (const { path, message } of parsed.error.issues) fields[path.join(".")] ??= message;
  const [first] = Object.entries(fields);
  const message = first[0] ? `${first[0]}: ${first[1]}` : first[1];
  throw new AppError("invalid", message, fields);
}
