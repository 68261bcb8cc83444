import { t975 } from "./student";

/** Sections at most; replications hang not together, so each section is a run of its own. */
const mostSections = 20;

/**
 * Bounds of the sections of n replications: section i is rows bounds[i] .. bounds[i + 1] - 1.
 * @param n - Whole, >= 1.
 */
export function cutSections(n: number): number[] {
  const k = Math.min(mostSections, n);
  return Array.from({ length: k + 1 }, (_, i) => Math.floor((i * n) / k));
}

/**
 * 95 % half-width of a figure from its values in the sections.
 * @param values - One a section; those without the figure are NaN and left out.
 * @returns Null where fewer than two are left.
 * @remarks Sectioning; Asmussen and Glynn, Stochastic Simulation (2007), chapter III.5.
 */
export function sectionHalfWidth(values: ArrayLike<number>): number | null {
  let n = 0;
  let sum = 0;
  for (let i = 0; i < values.length; i++) {
    if (values[i] === values[i]) {
      n++;
      sum += values[i];
    }
  }
  if (n < 2) return null;
  const mean = sum / n;
  let squares = 0;
  for (let i = 0; i < values.length; i++) {
    if (values[i] === values[i]) squares += (values[i] - mean) * (values[i] - mean);
  }
  return (t975(n - 1) * Math.sqrt(squares / (n - 1))) / Math.sqrt(n);
}
