// Plain Node, no packages: these run before node_modules exists.
import { spawn, spawnSync } from "node:child_process";
import { createHash } from "node:crypto";
import { existsSync, readdirSync, readFileSync, statSync, writeFileSync } from "node:fs";
import path from "node:path";
import { fileURLToPath } from "node:url";

export const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), "../..");
export const bin = {
  next: "node_modules/next/dist/bin/next",
  tsc: "node_modules/typescript/bin/tsc",
  eslint: "node_modules/eslint/bin/eslint.js",
  vitest: "node_modules/vitest/vitest.mjs",
  playwright: "node_modules/@playwright/test/cli.js",
};

const buildInputs = [
  "app",
  "components",
  "db",
  "lib",
  "public",
  "workers",
  "instrumentation.ts",
  "next.config.ts",
  "package-lock.json",
  "package.json",
  "postcss.config.mjs",
  "proxy.ts",
  "tsconfig.json",
];
const buildStamp = path.join(root, ".next/sources.sha256");

/** Environment for child processes: telemetry off, and none of the variables that `npm run` hands down and that change a nested npm. */
export function childEnv(extra = {}) {
  const kept = Object.entries(process.env).filter(
    ([key]) => !/^npm_(?!config_(registry|cafile|cache|userconfig|globalconfig))/i.test(key),
  );
  const env = { ...Object.fromEntries(kept), NEXT_TELEMETRY_DISABLED: "1", ...extra };
  // NODE_ENV=production would drop the development packages; each tool sets its own.
  delete env.NODE_ENV;
  return env;
}

/** Runs a command to its end with inherited output. Returns its exit code. */
export function run(command, args, env = {}) {
  const done = spawnSync(command, args, {
    stdio: "inherit",
    cwd: root,
    env: childEnv(env),
    shell: process.platform === "win32" && command === "npm",
  });
  if (done.error) throw done.error;
  return done.status ?? 1;
}

export function runOrExit(command, args, env = {}) {
  const code = run(command, args, env);
  if (code === 0) return;
  console.error(`failed: ${command} ${args.join(" ")} (exit ${code})`);
  process.exit(code);
}

/** Installs the locked packages unless the last complete install was of this lock file and Node version. */
export function ensureModules() {
  const [major, minor] = process.versions.node.split(".").map(Number);
  if (major < 20 || (major === 20 && minor < 19)) {
    console.error(`Node.js 20.19 or newer is needed; this is ${process.version}`);
    process.exit(1);
  }
  const lock = readFileSync(path.join(root, "package-lock.json"));
  const wanted = createHash("sha256").update(lock).update(process.version).digest("hex");
  const stamp = path.join(root, "node_modules/.installed");
  if (existsSync(stamp) && readFileSync(stamp, "utf8") === wanted) return;
  console.log("Installing packages");
  runOrExit("npm", ["ci", "--no-audit", "--no-fund", "--loglevel=error"]);
  writeFileSync(stamp, wanted);
}

function findChromium() {
  const places = [
    process.env.CHROMIUM_PATH,
    "/usr/bin/chromium",
    "/usr/bin/chromium-browser",
    "/usr/bin/google-chrome",
  ];
  return places.find((place) => place && existsSync(place));
}

/** Path of a Chromium; on Debian as root it is installed when missing. */
export function ensureChromium() {
  const found = findChromium();
  if (found) return found;
  if (process.platform === "linux" && process.getuid?.() === 0 && existsSync("/usr/bin/apt-get")) {
    console.log("Installing Chromium");
    const env = { DEBIAN_FRONTEND: "noninteractive" };
    runOrExit("apt-get", ["update", "-qq"], env);
    runOrExit("apt-get", ["install", "-y", "-qq", "--no-install-recommends", "chromium"], env);
  }
  const installed = findChromium();
  if (installed) return installed;
  console.error("Chromium was not found. Install it, or name its path in CHROMIUM_PATH.");
  process.exit(1);
}

function hashInto(hash, place) {
  if (!existsSync(place)) return;
  if (statSync(place).isDirectory()) {
    for (const name of readdirSync(place).sort()) hashInto(hash, path.join(place, name));
    return;
  }
  hash.update(path.relative(root, place)).update("\0").update(readFileSync(place));
}

function sourcesHash() {
  const hash = createHash("sha256").update(process.version);
  for (const input of buildInputs) hashInto(hash, path.join(root, input));
  return hash.digest("hex");
}

/** Builds unless the finished build is of exactly these sources. Returns the exit code. */
export function ensureBuild() {
  const wanted = sourcesHash();
  if (existsSync(buildStamp) && readFileSync(buildStamp, "utf8") === wanted) return 0;
  console.log("Building");
  const code = run(process.execPath, [bin.next, "build"]);
  if (code === 0) writeFileSync(buildStamp, wanted);
  return code;
}

/** Starts a long-lived child, hands it SIGINT and SIGTERM, and ends with its exit code. */
export function startChild(args, env) {
  const child = spawn(process.execPath, args, { cwd: root, env: childEnv(env), stdio: "inherit" });
  for (const signal of ["SIGINT", "SIGTERM"]) process.on(signal, () => child.kill(signal));
  child.on("exit", (code, signal) => process.exit(code ?? (signal ? 0 : 1)));
  return child;
}

/** Resolves when the health route answers; rejects after `timeoutMs`. */
export async function waitForHealth(port, timeoutMs) {
  const end = Date.now() + timeoutMs;
  while (Date.now() < end) {
    const ok = await fetch(`http://127.0.0.1:${port}/api/health`).then(
      (answer) => answer.ok,
      () => false,
    );
    if (ok) return;
    await new Promise((resolve) => setTimeout(resolve, 250));
  }
  throw new Error(`the server did not answer within ${timeoutMs / 1000} s`);
}

/** Port from PORT or 3000; ends with a plain message when it is taken. */
export async function choosePort() {
  const port = Number(process.env.PORT ?? 3000);
  const { createServer } = await import("node:net");
  await new Promise((resolve) => {
    const probe = createServer();
    probe.once("error", () => {
      console.error(`Port ${port} is taken. Stop what uses it, or choose another: PORT=3001 npm run demo`);
      process.exit(1);
    });
    probe.listen(port, "127.0.0.1", () => probe.close(resolve));
  });
  return port;
}
