import "server-only";
import type { BetterAuthOptions } from "better-auth";
import { organization } from "better-auth/plugins";
import { getDb } from "@/db/client";
import { ensureWorkspace } from "@/db/queries/workspaces";
import { env } from "@/lib/env";
import { accessControl, workspaceRoles } from "./permissions";
import { forgetAttempts, refuseManyAttempts } from "./sign-in-limit";

export const leastPasswordLength = 10;

/** The address is fixed by APP_URL; without one only names of this machine are served, on any port. */
function baseUrl(): BetterAuthOptions["baseURL"] {
  if (env.appUrl) return env.appUrl;
  if (env.isProduction && !env.isLocal) throw new Error("APP_URL is required, such as https://forebay.example");
  return { allowedHosts: ["localhost:*", "127.0.0.1:*"], protocol: "http", fallback: "http://localhost:3000" };
}

/** Limits by address are only as good as the proxy in front: name it in TRUSTED_PROXIES. The limit by account needs none. */
export function authOptions() {
  return {
    appName: "Forebay",
    baseURL: baseUrl(),
    telemetry: { enabled: false },
    logger: { level: env.isTest ? "error" : "warn" },
    emailAndPassword: { enabled: true, minPasswordLength: leastPasswordLength, maxPasswordLength: 128 },
    rateLimit: {
      enabled: !env.isTest,
      storage: "database",
      window: 60,
      max: 200,
      customRules: {
        "/sign-in/email": { window: 60, max: 30 },
        "/sign-up/email": { window: 600, max: 20 },
      },
    },
    session: { cookieCache: { enabled: false } },
    advanced: { ipAddress: { trustedProxies: env.trustedProxies } },
    hooks: { before: refuseManyAttempts, after: forgetAttempts },
    databaseHooks: {
      session: {
        create: {
          before: async (session) => ({
            data: { ...session, activeOrganizationId: await ensureWorkspace(await getDb(), session.userId) },
          }),
        },
      },
    },
    plugins: [organization({ ac: accessControl, roles: workspaceRoles, creatorRole: "owner" })],
  } satisfies BetterAuthOptions;
}
