import { AppError } from "@/lib/errors";

const uniqueViolation = "23505";

/** Runs a write whose only unique value a user can clash with is the name. */
export async function refuseDuplicateName<T>(message: string, write: () => Promise<T>): Promise<T> {
  try {
    return await write();
  } catch (error) {
    const cause = error instanceof Error ? (error.cause as { code?: string } | undefined) : undefined;
    if (cause?.code !== uniqueViolation) throw error;
    throw new AppError("conflict", message, { name: message });
  }
}
