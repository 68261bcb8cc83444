import { exp } from "@/lib/random/elementary";
import { lnGamma } from "@/lib/random/gamma-function";
import type { DraftDistribution } from "./types";

const gamma = (x: number) => exp(lnGamma(x));

/** Mean of a distribution, or null while one of its numbers is missing. Weibull: scale x Gamma(1 + 1/shape). */
export function meanOf(d: DraftDistribution | null): number | null {
  if (d === null) return 0;
  switch (d.type) {
    case "fixed":
      return d.value;
    case "uniform":
      return d.min === null || d.max === null ? null : (d.min + d.max) / 2;
    case "triangular":
      return d.min === null || d.mode === null || d.max === null ? null : (d.min + d.mode + d.max) / 3;
    case "weibull":
      return d.shape === null || d.scale === null || d.shape <= 0 ? null : d.scale * gamma(1 + 1 / d.shape);
    case "empirical": {
      if (d.values.length === 0 || d.values.some((value) => value === null)) return null;
      return (d.values as number[]).reduce((sum, value) => sum + value, 0) / d.values.length;
    }
    default:
      return d.mean;
  }
}

/** Standard deviation, or null while one of its numbers is missing. */
export function sdOf(d: DraftDistribution | null): number | null {
  if (d === null) return 0;
  switch (d.type) {
    case "fixed":
      return 0;
    case "exponential":
      return d.mean;
    case "poisson":
      return d.mean === null ? null : Math.sqrt(d.mean);
    case "uniform":
      return d.min === null || d.max === null ? null : (d.max - d.min) / Math.sqrt(12);
    case "triangular": {
      const { min: a, mode: c, max: b } = d;
      if (a === null || b === null || c === null) return null;
      return Math.sqrt((a * a + b * b + c * c - a * b - a * c - b * c) / 18);
    }
    case "weibull": {
      if (d.shape === null || d.scale === null || d.shape <= 0) return null;
      const first = gamma(1 + 1 / d.shape);
      return d.scale * Math.sqrt(Math.max(0, gamma(1 + 2 / d.shape) - first * first));
    }
    case "empirical": {
      const mean = meanOf(d);
      if (mean === null) return null;
      const sum = (d.values as number[]).reduce((total, value) => total + (value - mean) ** 2, 0);
      return Math.sqrt(sum / d.values.length);
    }
    default:
      return d.sd;
  }
}
