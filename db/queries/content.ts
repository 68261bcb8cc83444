import { digestLine, parseLine } from "@/lib/line";
import { describeAbout } from "@/lib/line/describe-fault";
import type { DraftLine, Layout, Note } from "@/lib/line/types";
import { AppError } from "@/lib/errors";
import { documentBytes, draftBytes } from "@/lib/schema/line-inputs";
import type { ScenarioOptions } from "@/lib/schema/lines";

/** What a draft and a kept version both hold. */
export type Content = { document: DraftLine; layout: Layout; notes: Note[]; options: ScenarioOptions };

const mostFaults = 3;

/** Run options that a result depends on, as text; the accepted risk only says which percentile is read off. */
export function optionsKeyOf(options: Omit<ScenarioOptions, "acceptedRisk">): string {
  const { seed, replications, weeks, warmupWeeks, targetFillRate } = options;
  return JSON.stringify([seed, replications, weeks, warmupWeeks, targetFillRate]);
}

/**
 * What the server itself finds in a content: never taken from a client.
 * @returns `digest` null and the first faults in words while the document cannot run.
 * @throws AppError too-large
 */
export function examineContent({ document, layout, notes, options }: Content) {
  const nDocument = Buffer.byteLength(JSON.stringify(document));
  if (nDocument > documentBytes) {
    throw new AppError("too-large", `A line document may take 2 MB; this one takes ${nDocument} bytes.`);
  }
  const nBeside = Buffer.byteLength(JSON.stringify([layout, notes]));
  if (nDocument + nBeside > draftBytes) {
    throw new AppError("too-large", `Layout and notes take too much room: ${nBeside} bytes.`);
  }
  const parsed = parseLine(document);
  const optionsKey = optionsKeyOf(options);
  if ("faults" in parsed) {
    const faults = parsed.faults.slice(0, mostFaults).map((fault) => describeAbout(fault, document));
    return { digest: null, optionsKey, faults };
  }
  return { digest: digestLine(parsed.line), optionsKey, faults: [] as string[] };
}
