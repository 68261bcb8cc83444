import { exp, ln } from "@/lib/random/elementary";
import { cutSections, sectionHalfWidth } from "@/lib/statistics/sections";
import type { Figure } from "./types";

/** Something computed once over all replications and once in each section. */
export type Sectioned<T> = { total: T; sections: T[]; nReplications: number };

/**
 * @param compute - Given rows `from` .. `to - 1`, in ascending order of replications.
 */
export function computeSections<T>(nReplications: number, compute: (from: number, to: number) => T): Sectioned<T> {
  const bounds = cutSections(nReplications);
  const sections = bounds.slice(1).map((to, i) => compute(bounds[i], to));
  return { total: compute(0, nReplications), sections, nReplications };
}

/** A figure with its half-width by sectioning. */
export function figureOf<T>(data: Sectioned<T>, value: (part: T) => number): Figure {
  return { value: value(data.total), halfWidth: sectionHalfWidth(data.sections.map(value)) };
}

/** The same for a share of weeks or deliveries: at 0 and 1 a one-sided 95 % bound stands in for the half-width. */
export function shareOf<T>(data: Sectioned<T>, value: (part: T) => number): Figure {
  const figure = figureOf(data, value);
  if (figure.value !== 0 && figure.value !== 1) return figure;
  const bound = exp(ln(0.05) / data.nReplications);
  return { value: figure.value, halfWidth: null, bound: figure.value === 0 ? 1 - bound : bound };
}
