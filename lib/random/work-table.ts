import { gammaQuantile } from "./gamma";

const nCells = 2048;
const nFine = 256;

/**
 * Quantiles of a gamma variate of mean 1 for drawing by interpolation. `cells`: at i / 2048; `low` and `high`: the
 * first and the last cell cut again into 256, whose outermost parts are inverted exactly at each draw.
 * Interpolation leaves mean and sd off by relatively 5e-6 and 1e-4 up to cv 0.35, 4e-5 and 3e-4 at 1, 1e-3 and 2e-3 at 5.
 */
export type WorkTable = { shape: number; cells: Float32Array; low: Float32Array; high: Float32Array };

/** Tables are alike for every line with the same variation; at most this many are kept. */
const nKept = 256;
const kept = new Map<number, WorkTable>();

/**
 * The table for a coefficient of variation.
 * @param cv - > 0.
 */
export function getWorkTable(cv: number): WorkTable {
  const known = kept.get(cv);
  if (known) return known;
  if (kept.size >= nKept) kept.clear();
  const table = createWorkTable(cv);
  kept.set(cv, table);
  return table;
}

function createWorkTable(cv: number): WorkTable {
  const shape = 1 / (cv * cv);
  const cells = new Float32Array(nCells + 1);
  const low = new Float32Array(nFine + 1);
  const high = new Float32Array(nFine + 1);
  let x = 0;
  for (let i = 1; i <= nFine; i++) {
    const p = i / nCells / nFine;
    x = gammaQuantile(shape, p, 1 - p, x);
    low[i] = x / shape;
  }
  for (let i = 1; i < nCells; i++) {
    x = gammaQuantile(shape, i / nCells, 1 - i / nCells, x);
    cells[i] = x / shape;
  }
  for (let i = 0; i < nFine; i++) {
    const q = (nFine - i) / nCells / nFine;
    x = gammaQuantile(shape, 1 - q, q, x);
    high[i] = x / shape;
  }
  high[nFine] = high[nFine - 1];
  cells[nCells] = high[0];
  return { shape, cells, low, high };
}

/**
 * Fills a block of work amounts.
 * @param states - The stream at `at` is advanced by one step a variate.
 * @param mean - Work of a mean unit, > 0.
 * @param from - Index of the first variate in `out`.
 * @param n - Variates to draw.
 * @param out - Written in place.
 */
export function fillWork(
  table: WorkTable,
  states: Int32Array,
  at: number,
  mean: number,
  from: number,
  n: number,
  out: Float64Array,
): void {
  const cells = table.cells;
  let a = states[at];
  let b = states[at + 1];
  let c = states[at + 2];
  let d = states[at + 3];
  for (let i = from; i < from + n; i++) {
    // The step of `nextInt32`, with the state held in registers.
    const bits = (((a + b) | 0) + d) | 0;
    d = (d + 1) | 0;
    a = b ^ (b >>> 9);
    b = (c + (c << 3)) | 0;
    c = (((c << 21) | (c >>> 11)) + bits) | 0;
    const cell = bits >>> 21;
    const share = ((bits & 0x1fffff) + 0.5) * (1 / 2097152);
    if (cell === 0 || cell === nCells - 1) out[i] = mean * findFine(table, cell === 0, share);
    else out[i] = mean * (cells[cell] + share * (cells[cell + 1] - cells[cell]));
  }
  states[at] = a;
  states[at + 1] = b;
  states[at + 2] = c;
  states[at + 3] = d;
}

function findFine(table: WorkTable, isLow: boolean, share: number): number {
  const fine = Math.floor(share * nFine);
  const rest = share * nFine - fine;
  if (isLow && fine === 0) {
    const p = rest / nFine / nCells;
    return gammaQuantile(table.shape, p, 1 - p) / table.shape;
  }
  if (!isLow && fine === nFine - 1) {
    const q = (1 - rest) / nFine / nCells;
    return gammaQuantile(table.shape, 1 - q, q) / table.shape;
  }
  const quantiles = isLow ? table.low : table.high;
  return quantiles[fine] + rest * (quantiles[fine + 1] - quantiles[fine]);
}
