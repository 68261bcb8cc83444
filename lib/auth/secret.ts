import "server-only";
import { randomBytes } from "node:crypto";
import { mkdirSync, readFileSync, writeFileSync } from "node:fs";
import path from "node:path";
import { env } from "@/lib/env";

/**
 * The secret that signs session cookies: BETTER_AUTH_SECRET, or for the demo and development a file made on first start.
 * @throws Error when it is too short, or missing where neither applies.
 */
export function authSecret(): string {
  const given = env.authSecret;
  if (given) {
    if (given.length < 32) {
      throw new Error(`BETTER_AUTH_SECRET must have at least 32 characters, got ${given.length}`);
    }
    return given;
  }
  if (env.isProduction && !env.isLocal) throw new Error("BETTER_AUTH_SECRET is required");
  const file = path.join(/*turbopackIgnore: true*/ env.dataDir, "secret");
  mkdirSync(path.dirname(file), { recursive: true });
  try {
    writeFileSync(file, randomBytes(32).toString("base64url"), { flag: "wx", mode: 0o600 });
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code !== "EEXIST") throw error;
  }
  return readFileSync(file, "utf8");
}
