import "server-only";
import type { Ctx } from "@/db/context";
import { AppError, type ErrorCode } from "@/lib/errors";
import type { Right } from "@/lib/schema/roles";
import { getCtx, requireRight, type RowRef } from "./context";
import { requireSameOrigin } from "./same-origin";

const statuses: Record<ErrorCode, number> = {
  unauthenticated: 401,
  forbidden: 403,
  "not-found": 404,
  stale: 409,
  conflict: 409,
  expired: 410,
  "too-large": 413,
  invalid: 422,
  "too-many": 429,
};

const noStore = { "Cache-Control": "private, no-store" };

/** `{ code, message, fields? }` with the status of the code. */
export function answerError({ code, message, fields }: AppError, extra: object = {}): Response {
  return Response.json(
    { code, message, ...(fields && { fields }), ...extra },
    { status: statuses[code], headers: noStore },
  );
}

export function answerJson(value: unknown, status = 200): Response {
  return Response.json(value, { status, headers: noStore });
}

export function answerBytes(bytes: Uint8Array, headers: Record<string, string> = {}): Response {
  return new Response(bytes as Uint8Array<ArrayBuffer>, {
    headers: { "Content-Type": "application/octet-stream", ...noStore, ...headers },
  });
}

type Needs = { right: Right; row?: RowRef };

/** The frame of every signed-in route handler: origin of writes, session, role in the row's workspace, errors as JSON. */
export async function runRoute(
  request: Request,
  { right, row }: Needs,
  handle: (ctx: Ctx) => Promise<Response>,
): Promise<Response> {
  return answerErrors(async () => {
    if (request.method !== "GET" && request.method !== "HEAD") requireSameOrigin(request);
    const ctx = await getCtx(row);
    requireRight(ctx, right);
    return handle(ctx);
  });
}

/** Turns expected failures into answers; anything else is a bug and is thrown. */
export async function answerErrors(handle: () => Promise<Response>): Promise<Response> {
  try {
    return await handle();
  } catch (error) {
    if (!(error instanceof AppError)) throw error;
    return answerError(error);
  }
}
