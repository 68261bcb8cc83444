// npm test: every check there is, each run even when an earlier one failed; the last line counts them.
// `npm test -- vitest lint` runs the named steps only.
import { mkdtempSync, readFileSync, rmSync } from "node:fs";
import os from "node:os";
import path from "node:path";
import { bin, ensureBuild, ensureChromium, ensureModules, run } from "./ensure.mjs";

const wanted = process.argv.slice(2);
const scratch = mkdtempSync(path.join(os.tmpdir(), "forebay-test-"));
const totals = { passed: 0, failed: 0 };

ensureModules();

/** A step that passes or fails as one. */
function check(name, ...commands) {
  step(name, () => {
    const code = commands.reduce((worst, command) => worst || run(process.execPath, command), 0);
    return code === 0 ? { passed: 1, failed: 0 } : { passed: 0, failed: 1 };
  });
}

function step(name, work) {
  if (wanted.length > 0 && !wanted.includes(name)) return;
  const startedAt = performance.now();
  const { passed, failed } = work();
  totals.passed += passed;
  totals.failed += failed;
  const seconds = ((performance.now() - startedAt) / 1000).toFixed(1);
  console.log(`${name}: ${passed} passed, ${failed} failed in ${seconds} s\n`);
}

/** Counts of a runner that writes a JSON report; a runner that ends badly without a failed test counts as one failure. */
function count(code, read) {
  let counts = { passed: 0, failed: 0 };
  try {
    counts = read();
  } catch (error) {
    console.error(`no report was written: ${error instanceof Error ? error.message : error}`);
  }
  if (counts.passed === 0 && counts.failed === 0) counts.failed = 1;
  if (code !== 0 && counts.failed === 0) counts.failed = 1;
  return counts;
}

check("typecheck", [bin.next, "typegen"], [bin.tsc, "--noEmit"]);
check("lint", [bin.eslint, ".", "--max-warnings", "0"]);

step("vitest", () => {
  const report = path.join(scratch, "vitest.json");
  const code = run(process.execPath, [
    bin.vitest,
    "run",
    "--reporter=default",
    "--reporter=json",
    `--outputFile.json=${report}`,
  ]);
  return count(code, () => {
    const { numPassedTests, numFailedTests, numFailedTestSuites } = JSON.parse(readFileSync(report, "utf8"));
    return {
      passed: numPassedTests,
      failed: Math.max(numFailedTests, code === 0 ? 0 : Math.min(1, numFailedTestSuites)),
    };
  });
});

let isBuilt = false;
step("build", () => {
  isBuilt = ensureBuild() === 0;
  return isBuilt ? { passed: 1, failed: 0 } : { passed: 0, failed: 1 };
});

step("e2e", () => {
  if (!isBuilt && ensureBuild() !== 0) return { passed: 0, failed: 1 };
  const report = path.join(scratch, "e2e.json");
  const code = run(process.execPath, [bin.playwright, "test"], {
    CHROMIUM_PATH: ensureChromium(),
    E2E_DATA_DIR: path.join(scratch, "data"),
    PLAYWRIGHT_JSON_OUTPUT_NAME: report,
  });
  return count(code, () => {
    const { stats } = JSON.parse(readFileSync(report, "utf8"));
    return { passed: stats.expected, failed: stats.unexpected + stats.flaky };
  });
});

rmSync(scratch, { recursive: true, force: true });
console.log(`${totals.passed} passed, ${totals.failed} failed`);
process.exit(totals.failed === 0 && totals.passed > 0 ? 0 : 1);
