import { simulate } from "@/lib/simulation";
import { type Evaluate, findSizes } from "@/lib/sizing";
import { demoSizing } from "@/tests/helpers/demo-sizing";

/** The search on the demo line on one thread; two idle cores take about half of the time. */
let nReplications = 0;
const evaluate: Evaluate = (lines, options) => {
  nReplications += lines.length * options.replications;
  return Promise.resolve(lines.map((line) => simulate(line, options)));
};
simulate(demoSizing.line, { ...demoSizing, replications: 20 });
const startedAt = process.cpuUsage();
const { frontier, evaluations } = await findSizes(demoSizing, evaluate);
const seconds = process.cpuUsage(startedAt).user / 1e6;
const [{ searched, confirmed, reached }] = frontier;
const percent = (share: number) => `${(100 * share).toFixed(1)} %`;
console.log(
  `sizing the demo line: ${evaluations} evaluations, ${(nReplications / demoSizing.replications).toFixed(1)} runs of all weeks, ${seconds.toFixed(0)} s of one thread's CPU`,
);
console.log(
  `capital ${Math.round(searched.summary.moneyTiedUp.value)} at ${percent(searched.summary.risk.value)} risk, ${percent(confirmed.summary.risk.value)} on unseen weeks (${reached ? "reached" : "not reached"})`,
);
