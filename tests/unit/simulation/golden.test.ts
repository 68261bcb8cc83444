import { createHash } from "node:crypto";
import { describe, expect, it } from "vitest";
import { exampleLine } from "@/lib/line/example";
import { simulate } from "@/lib/simulation";
import golden from "../../golden/drive-unit.json";

/** Exact bits of a small run. May change only together with `engineVersion`, because the draws or the model changed. */
describe("the drive unit line", () => {
  it("gives the pinned bits", () => {
    const { tallies, fillRates, ...figures } = simulate(exampleLine, {
      seed: "1",
      replications: 8,
      weeks: 20,
      warmupWeeks: 4,
      targetFillRate: 0.95,
    });
    const hash = createHash("sha256");
    for (const array of [tallies.sums, tallies.demand, tallies.onTime, tallies.weekSums, fillRates]) {
      hash.update(new Uint8Array(array.buffer, array.byteOffset, array.byteLength));
    }
    expect({ engine: figures.engine, summary: figures.summary, sha256: hash.digest("hex") }).toEqual(golden);
  });
});
