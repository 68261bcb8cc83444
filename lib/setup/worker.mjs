// The worker of a production build in one scope. Next's bundler keeps modules apart and its minifier turns small functions
// into closures made anew at each call; the simulation then runs at less than half its speed.
import { createHash } from "node:crypto";
import { mkdirSync, readdirSync, rmSync, writeFileSync } from "node:fs";
import path from "node:path";
import { fileURLToPath } from "node:url";

const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), "../..");
/** Below `public`; made by each build and left out of what a build depends on. */
export const workerFolder = "worker";

/** Bundles the simulation's worker into `public`. Returns its address, which changes with its content. */
export async function buildWorker() {
  const { build } = await import("vite");
  const output = await build({
    root,
    configFile: false,
    logLevel: "warn",
    publicDir: false,
    define: { "process.env.NODE_ENV": JSON.stringify("production") },
    resolve: { alias: { "@": root } },
    build: {
      write: false,
      minify: "oxc",
      lib: { entry: path.join(root, "workers/simulation.worker.ts"), formats: ["es"], fileName: "simulation" },
    },
  });
  const { code } = [output].flat()[0].output[0];
  const folder = path.join(root, "public", workerFolder);
  const name = `simulation-${createHash("sha256").update(code).digest("hex").slice(0, 16)}.js`;
  mkdirSync(folder, { recursive: true });
  for (const old of readdirSync(folder)) if (old !== name) rmSync(path.join(folder, old));
  writeFileSync(path.join(folder, name), code);
  return `/${workerFolder}/${name}`;
}
