import { formatCount, formatNumber, formatPercent, headlineSentence, plural, spreadText } from "@/lib/format";
import type { LineState } from "@/lib/client/line-state";
import type { Figure } from "@/lib/simulation/types";
import type { StripFigures } from "./strip-reading";

/** Half-width of a share in points, "± 0.7"; a share that came out 0 or 1 has a bound instead. */
export function describePoints({ halfWidth, value, bound }: Figure): string | null {
  if (halfWidth !== null) return spreadText(formatNumber(halfWidth * 100, 1));
  if (bound === undefined) return null;
  return value === 0 ? `below ${formatPercent(bound, 1)}` : `above ${formatPercent(bound, 1)}`;
}

export function describeWeeks(weeks: number): string {
  return `${formatCount(weeks)} ${plural(weeks, "week")}`;
}

export function describeFaults(n: number): string {
  return `${n} ${plural(n, "fault")}`;
}

/** Seconds gone and seconds left, "2.1 s gone, about 2.7 s left"; no guess before a twentieth is done. */
export function describeTime(done: number, total: number, goneMs: number): string {
  const gone = `${(goneMs / 1000).toFixed(1)}\u202fs gone`;
  if (done < total / 20) return gone;
  const leftS = (goneMs / 1000) * (total / done - 1);
  return `${gone}, about ${leftS < 10 ? leftS.toFixed(1) : Math.round(leftS)}\u202fs left`;
}

/** The sentence of a figure; a live reading says "about". */
export function sayFigures({ atRisk, acceptedRisk }: StripFigures, isLive = false) {
  const said = headlineSentence(atRisk, acceptedRisk);
  return isLive && Number.isFinite(atRisk.value) ? { ...said, before: `${said.before} about` } : said;
}

/** What the strip tells those who cannot see it, once per change that matters. */
export function announce({ progress, faults, runError }: Pick<LineState, "progress" | "faults" | "runError">): string {
  if (runError) return runError;
  if (progress) return "Running.";
  return faults.length > 0 ? `This line cannot run: ${describeFaults(faults.length)}.` : "";
}
