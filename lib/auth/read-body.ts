import "server-only";
import { AppError } from "@/lib/errors";

function requireType(request: Request, type: string): void {
  const given = request.headers.get("content-type")?.split(";")[0].trim().toLowerCase();
  if (given !== type) throw new AppError("invalid", `The content type must be ${type}, got ${given || "none"}.`);
}

const tooLarge = (limit: number) =>
  new AppError("too-large", `This is larger than ${Math.floor(limit / 1_000_000)} MB.`);

/**
 * Body of a request, counted as it comes in.
 * @param limit - Bytes.
 * @throws AppError too-large as soon as the limit is passed; invalid for another content type.
 */
export async function readBytes(request: Request, limit: number, type: string): Promise<Uint8Array> {
  requireType(request, type);
  if (Number(request.headers.get("content-length") ?? 0) > limit) throw tooLarge(limit);
  if (!request.body) return new Uint8Array();
  const parts: Uint8Array[] = [];
  let length = 0;
  const reader = request.body.getReader();
  for (let part = await reader.read(); !part.done; part = await reader.read()) {
    length += part.value.length;
    if (length > limit) {
      await reader.cancel();
      throw tooLarge(limit);
    }
    parts.push(part.value);
  }
  return new Uint8Array(Buffer.concat(parts, length));
}

/** @throws AppError invalid for text that is no JSON. */
export async function readJson(request: Request, limit: number): Promise<unknown> {
  const bytes = await readBytes(request, limit, "application/json");
  try {
    return JSON.parse(new TextDecoder("utf-8", { fatal: true }).decode(bytes));
  } catch (error) {
    throw new AppError("invalid", `The body is no JSON: ${error instanceof Error ? error.message : error}`);
  }
}
