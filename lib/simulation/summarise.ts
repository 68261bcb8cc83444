import { layoutColumns } from "./columns";
import { engineVersion } from "./engine";
import { computeSections, type Sectioned } from "./figures";
import { readBuffers, readCauses, readCustomers, readStations, readSuppliers } from "./readings";
import { addUnits, sectionWeeks } from "./rates";
import { summariseRun } from "./summary";
import type { Tallies } from "./tallies";
import type { RunOptions, RunResult } from "./types";

/** Computes every figure of a run from its tallies; model.md, section 4. */
export function summarise(options: RunOptions, tallies: Tallies): RunResult {
  const sums = sumSections(tallies);
  const units = addUnits(tallies, -1);
  return {
    format: "forebay.result/1",
    engine: engineVersion,
    options,
    fillRates: Float32Array.from(units.demand, (demand, i) => (demand > 0 ? units.onTime[i] / demand : NaN)),
    summary: summariseRun(tallies.shape, sums, sectionWeeks(units, options.targetFillRate), options.weeks),
    buffers: readBuffers(tallies, sums, options.weeks),
    stations: readStations(tallies, sums, options.weeks),
    suppliers: readSuppliers(tallies, sums, options.weeks),
    customers: readCustomers(tallies, options.targetFillRate),
    causes: readCauses(tallies, sums, options.weeks),
    tallies,
  };
}

/** Sums over replications of a row of `Tallies.sums`, with the number of replications. */
export type Sums = { row: Float64Array; nReplications: number };

/** Rows of `Tallies.sums` added up, over all replications and in each section. */
export function sumSections(tallies: Tallies): Sectioned<Sums> {
  const { count } = layoutColumns(tallies.shape);
  return computeSections(tallies.replications.length, (from, to) => {
    const row = new Float64Array(count);
    for (let r = from; r < to; r++) {
      for (let c = 0; c < count; c++) row[c] += tallies.sums[r * count + c];
    }
    return { row, nReplications: to - from };
  });
}
