import { render, screen, within } from "@testing-library/react";
import { expect, it } from "vitest";
import { SharedSheet } from "@/components/shared-page/shared-sheet";
import { generalCautions } from "@/lib/line/cautions";
import type { Line } from "@/lib/line/types";
import type { ReadingSummary, SharedPage, SharedVersion } from "@/lib/schema/lines";
import { percentile, type RunResult, simulate } from "@/lib/simulation";
import { withSize } from "@/lib/sizing/with-size";
import { createScenario, exampleDocument, smallOptions } from "./line-harness";

const options = { ...smallOptions, replications: 20, weeks: 10, acceptedRisk: 0.025 };
const { acceptedRisk, ...runOptions } = options;
const document = exampleDocument as unknown as Line;

function summarise(result: RunResult): ReadingSummary {
  const { p05, p10, p50, risk, moneyTiedUp, costPerYear } = result.summary;
  const atRisk = percentile(result, acceptedRisk);
  const rest = { resultId: "r", ranAt: "2026-11-24T14:02:00Z", engine: result.engine, weeks: 200, currency: "EUR" };
  return { ...rest, acceptedRisk, atRisk, p05, p10, p50, risk, moneyTiedUp, costPerYear: costPerYear.total };
}

function version(line: Line, scenarioName: string): { version: SharedVersion; result: RunResult } {
  const result = simulate(line, runOptions);
  const { kept } = createScenario();
  return {
    result,
    version: { ...kept, document: line, options, digest: "ab".repeat(32), reading: summarise(result), scenarioName },
  };
}

function show(versions: SharedVersion[], results: (RunResult | null)[]) {
  const page: SharedPage = {
    kind: versions.length > 1 ? "comparison" : "version",
    lineName: document.name,
    workspaceName: "Larkfield Drives",
    sharedBy: "Ines Kallweit",
    sharedAt: "2026-11-24T14:02:00Z",
    expiresAt: "2026-12-24T14:02:00Z",
    versions,
    sweep: null,
  };
  render(<SharedSheet page={page} results={results} />);
}

it("leads with the sentence of the accepted risk, then money, causes, assumptions and cautions", () => {
  const { version: one, result } = version(document, "As run today");
  show([one], [result]);
  const atRisk = percentile(result, acceptedRisk);
  const heading = screen.getByRole("heading", { level: 1 }).textContent!;
  expect(heading).toMatch(/39 of 40 weeks/);
  expect(Math.abs(Number(/([\d.]+)\u202f%/.exec(heading)![1]) - atRisk.value * 100)).toBeLessThan(0.5001);
  expect(screen.getByText(/Accepted risk 2\.5\s%/)).toBeTruthy();
  expect(screen.getByRole("region", { name: `Drawing of ${document.name}` })).toBeTruthy();
  for (const caution of generalCautions) expect(screen.getByText(caution)).toBeTruthy();
  expect(screen.queryByRole("button", { name: /edit|keep|run/i })).toBeNull();
});

it("sets several scenarios on one scale with what differs from the first", () => {
  const base = version(document, "As run today");
  const other = version(withSize(document, "stator", 60), "Sixty stators");
  show([base.version, other.version], [base.result, null]);
  const rows = screen.getAllByRole("listitem").filter((item) => within(item).queryByRole("heading", { level: 2 }));
  expect(rows).toHaveLength(2);
  expect(rows[0].textContent).toContain("what the others are held against");
  expect(rows[1].textContent).toMatch(/size 48 → 60/);
});

it("shows a version without a result as such", () => {
  const { version: one } = version(document, "As run today");
  show([{ ...one, reading: null }], [null]);
  expect(screen.getByText("No result was kept with As run today.")).toBeTruthy();
});
