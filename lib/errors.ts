export const errorCodes = [
  "unauthenticated",
  "forbidden",
  "not-found",
  "invalid",
  "stale",
  "conflict",
  "too-large",
  "too-many",
  "expired",
] as const;
export type ErrorCode = (typeof errorCodes)[number];

/** A failure that a user can cause and that the page can explain. Everything else is a bug and is thrown as `Error`. */
export class AppError extends Error {
  constructor(
    readonly code: ErrorCode,
    message: string,
    readonly fields?: Record<string, string>,
  ) {
    super(message);
    this.name = "AppError";
  }
}

/** What a server action or worker hands back for an expected failure. */
export type Failure = { ok: false; code: ErrorCode; message: string; fields?: Record<string, string> };
export type ActionResult<T> = { ok: true; value: T } | Failure;
