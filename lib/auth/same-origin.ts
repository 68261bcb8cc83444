import "server-only";
import { env } from "@/lib/env";
import { AppError } from "@/lib/errors";

const ownNames = /^(localhost|127\.0\.0\.1|\[::1\])(:\d+)?$/;

/**
 * Lets a writing request pass only from our own pages: its Origin must be the address it was sent to.
 * @remarks Without APP_URL the host must be a name of this machine, so that no foreign name can be pointed at it.
 * @throws AppError forbidden
 */
export function requireSameOrigin(request: Request): void {
  const origin = request.headers.get("origin");
  const host = request.headers.get("host") ?? new URL(request.url).host;
  const isOurs = env.appUrl
    ? origin === new URL(env.appUrl).origin
    : ownNames.test(host) && (origin === `http://${host}` || origin === `https://${host}`);
  if (!isOurs) throw new AppError("forbidden", "This request did not come from a page of Forebay.");
}
