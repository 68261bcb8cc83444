import path from "node:path";

const flag = (name: string) => process.env[name] === "1";
const text = (name: string) => process.env[name]?.trim() || undefined;

/** The one reader of the process environment. Read when asked, so that a build needs none of it. */
export const env = {
  /** Folder of the database, its lock and the local secret; kept out of the build's file tracing. */
  get dataDir(): string {
    return text("DATA_DIR") ?? path.join(/*turbopackIgnore: true*/ process.cwd(), ".data");
  },
  /** True for the demo and local development: demo plant, shown passwords, a secret made on first start. */
  get isLocal(): boolean {
    return flag("APP_LOCAL");
  },
  get isProduction(): boolean {
    return process.env.NODE_ENV === "production";
  },
  get isDevelopment(): boolean {
    return process.env.NODE_ENV === "development";
  },
  get isTest(): boolean {
    return process.env.NODE_ENV === "test";
  },
  get isBuild(): boolean {
    return process.env.NEXT_PHASE === "phase-production-build";
  },
  /** Public address, e.g. `https://forebay.example`; without one only this machine's own names are served. */
  get appUrl(): string | undefined {
    return text("APP_URL");
  },
  get authSecret(): string | undefined {
    return text("BETTER_AUTH_SECRET");
  },
  /** Addresses or ranges of reverse proxies whose X-Forwarded-For is believed. */
  get trustedProxies(): string[] {
    return (text("TRUSTED_PROXIES") ?? "")
      .split(",")
      .map((entry) => entry.trim())
      .filter(Boolean);
  },
};
