// npm run bench: bundles the benchmarks into node_modules/.cache and runs it. C_REFERENCE names a yardstick's binary.
import { mkdirSync } from "node:fs";
import path from "node:path";
import { pathToFileURL } from "node:url";
import { ensureModules, root } from "./ensure.mjs";

ensureModules();
const { build } = await import("vite");
const outDir = path.join(root, "node_modules/.cache/bench");
mkdirSync(outDir, { recursive: true });
for (const name of ["simulation", "sizing"]) {
  await build({
    root,
    configFile: false,
    logLevel: "error",
    publicDir: false,
    resolve: { alias: { "@": root } },
    build: { ssr: path.join(root, `tests/bench/${name}.ts`), outDir, emptyOutDir: false, minify: false },
  });
  await import(pathToFileURL(path.join(outDir, `${name}.js`)).href);
}
