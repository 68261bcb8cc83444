/** A stretch of equal values: from its first index to before `to`. */
export type Run = { from: number; to: number; value: number };

export function listRuns(values: ArrayLike<number>): Run[] {
  const runs: Run[] = [];
  for (let i = 0; i < values.length; i++) {
    const last = runs[runs.length - 1];
    if (last && last.value === values[i]) last.to = i + 1;
    else runs.push({ from: i, to: i + 1, value: values[i] });
  }
  return runs;
}

/** At most `most` columns of equally many ticks each, so that a drawing has no more points than it can show. */
export function foldColumns(
  values: ArrayLike<number>,
  most: number,
  fold: (from: number, to: number) => number,
): { ticksPerColumn: number; columns: number[] } {
  const ticksPerColumn = Math.max(1, Math.ceil(values.length / most));
  const columns = Array.from({ length: Math.ceil(values.length / ticksPerColumn) }, (_, i) =>
    fold(i * ticksPerColumn, Math.min(values.length, (i + 1) * ticksPerColumn)),
  );
  return { ticksPerColumn, columns };
}

/** The value that stands most often from `from` to before `to`, the least of equals. */
export function mostOften(values: ArrayLike<number>, from: number, to: number): number {
  const counts: number[] = [];
  for (let i = from; i < to; i++) counts[values[i]] = (counts[values[i]] ?? 0) + 1;
  return counts.reduce((best, n, value) => (n > (counts[best] ?? 0) ? value : best), values[from]);
}
