import "server-only";
import { betterAuth } from "better-auth";
import { drizzleAdapter } from "better-auth/adapters/drizzle";
import { nextCookies } from "better-auth/next-js";
import { getDb } from "@/db/client";
import * as schema from "@/db/schema";
import { authOptions } from "./options";
import { authSecret } from "./secret";

async function make() {
  const options = authOptions();
  return betterAuth({
    ...options,
    secret: authSecret(),
    database: drizzleAdapter(await getDb(), { provider: "pg", schema }),
    // nextCookies has to come last.
    plugins: [...options.plugins, nextCookies()],
  });
}

type Auth = Awaited<ReturnType<typeof make>>;
const shared = globalThis as unknown as { forebayAuth?: Promise<Auth> };

/** Made on first use, since it needs the database. */
export function getAuth(): Promise<Auth> {
  shared.forebayAuth ??= make().catch((error) => {
    shared.forebayAuth = undefined;
    throw error;
  });
  return shared.forebayAuth;
}
