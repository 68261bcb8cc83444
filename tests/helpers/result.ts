import { digestLine, parseLine } from "@/lib/line";
import type { DraftLine } from "@/lib/line/types";
import type { ScenarioOptions } from "@/lib/schema/lines";
import { encodeResult, simulate } from "@/lib/simulation";
import type { RunResult } from "@/lib/simulation/types";

/** Runs a document as a browser would: the encoded result and the digest sent with it. */
export function runDocument(document: DraftLine, { acceptedRisk: _, ...options }: ScenarioOptions) {
  const parsed = parseLine(document);
  if ("faults" in parsed) throw new Error(parsed.faults.map(({ message }) => message).join("; "));
  const run: RunResult = simulate(parsed.line, options);
  return { run, bytes: encodeResult(run), digest: digestLine(parsed.line) };
}
