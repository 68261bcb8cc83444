import { spawn } from "node:child_process";
import { existsSync, mkdirSync, mkdtempSync, readFileSync, rmSync, statSync, writeFileSync } from "node:fs";
import os from "node:os";
import path from "node:path";
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { openDatabase } from "@/db/client";
import { takeLock } from "@/db/lock";
import { organization } from "@/db/schema";
import { authSecret } from "@/lib/auth/secret";

let folder: string;
beforeEach(() => {
  folder = mkdtempSync(path.join(os.tmpdir(), "forebay-client-"));
});
afterEach(() => {
  vi.unstubAllEnvs();
  rmSync(folder, { recursive: true, force: true });
});

describe("takeLock", () => {
  const file = () => path.join(folder, "lock");

  it("names the living process that holds the folder", async () => {
    const other = spawn(process.execPath, ["-e", "setInterval(() => {}, 1000)"]);
    try {
      writeFileSync(file(), String(other.pid));
      expect(() => takeLock(file())).toThrow(`in use by process ${other.pid}`);
      expect(readFileSync(file(), "utf8")).toBe(String(other.pid));
    } finally {
      other.kill();
    }
  });

  it("takes over from a process that is gone and frees the lock again", async () => {
    const gone = spawn(process.execPath, ["-e", ""]);
    await new Promise((resolve) => gone.once("exit", resolve));
    writeFileSync(file(), String(gone.pid));

    const free = takeLock(file());
    expect(readFileSync(file(), "utf8")).toBe(String(process.pid));
    free();
    expect(existsSync(file())).toBe(false);
  });

  it("takes over a file that was cut short", () => {
    writeFileSync(file(), "");
    takeLock(file())();
    expect(existsSync(file())).toBe(false);
  });
});

describe("openDatabase", () => {
  it("is refused during a build", () => {
    vi.stubEnv("NEXT_PHASE", "phase-production-build");
    expect(() => openDatabase()).toThrow("during the build");
  });

  it("makes the folder over a half-made one, migrates, and finds the rows again", async () => {
    vi.stubEnv("DATA_DIR", path.join(folder, "data"));
    mkdirSync(path.join(folder, "data/pg.new"), { recursive: true });
    writeFileSync(path.join(folder, "data/pg.new/left-over"), "");

    const first = await openDatabase();
    await first.db.insert(organization).values({ id: "w", name: "W", slug: "w", createdAt: new Date() });
    expect(existsSync(path.join(folder, "data/lock"))).toBe(true);
    expect(existsSync(path.join(folder, "data/pg.new"))).toBe(false);
    await first.close();
    expect(existsSync(path.join(folder, "data/lock"))).toBe(false);

    const second = await openDatabase();
    expect(await second.db.select().from(organization)).toHaveLength(1);
    await second.close();
  }, 240_000);
});

describe("authSecret", () => {
  it("makes a file for its owner alone, once, for the demo", () => {
    vi.stubEnv("DATA_DIR", folder);
    const secret = authSecret();
    expect(secret.length).toBeGreaterThanOrEqual(32);
    expect(authSecret()).toBe(secret);
    expect(statSync(path.join(folder, "secret")).mode & 0o777).toBe(0o600);
  });

  it("refuses a short secret, and none in production", () => {
    vi.stubEnv("BETTER_AUTH_SECRET", "short");
    expect(() => authSecret()).toThrow("at least 32 characters");
    vi.stubEnv("BETTER_AUTH_SECRET", "");
    vi.stubEnv("NODE_ENV", "production");
    expect(() => authSecret()).toThrow("required");
  });
});
