import { spawnSync } from "node:child_process";
import path from "node:path";
import { exampleLine } from "@/lib/line/example";
import type { Line } from "@/lib/line/types";
import { simulate } from "@/lib/simulation";

const options = { seed: "1", replications: 200, weeks: 50, warmupWeeks: 12, targetFillRate: 0.95 };
const turns = 3;

/** CPU seconds of this process that some work takes. */
function cpuSeconds(work: () => void): number {
  const before = process.cpuUsage();
  work();
  const { user, system } = process.cpuUsage(before);
  return (user + system) / 1e6;
}

const median = (values: number[]) => [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)];

/** Visits of stations and customers, one each tick, warm-up and no overtime counted. */
function countUpdates(line: Line): number {
  const { hoursPerDay, daysPerWeek, tickMinutes } = line.calendar;
  const ticks = Math.round((hoursPerDay * daysPerWeek * 60) / tickMinutes);
  const visited = line.nodes.filter(({ kind }) => kind === "station" || kind === "customer").length;
  return options.replications * (options.weeks + options.warmupWeeks) * ticks * visited;
}

/** CPU seconds that the C yardstick says its own run took, or null where it is not there. */
function referenceSeconds(): number | null {
  const binary = process.env.C_REFERENCE;
  if (!binary) return null;
  const file = path.resolve(process.cwd(), "lib/line/example.json");
  const args = [
    file,
    "--seed",
    "1",
    "--replications",
    "200",
    "--weeks",
    "50",
    "--warmup",
    "12",
    "--target",
    "0.95",
    "--bench",
  ];
  const done = spawnSync(binary, args, { encoding: "utf8", maxBuffer: 1 << 26 });
  if (done.status !== 0) throw new Error(`the reference failed: ${done.stderr || done.error}`);
  const found = /"cpuSeconds":\s*([\d.]+)/.exec(done.stdout) ?? /"cpu[A-Za-z_]*":\s*([\d.]+)/.exec(done.stdout);
  if (!found) throw new Error("the reference printed no CPU seconds");
  return Number(found[1]);
}

/** So many copies of the demo line side by side, each with nodes of its own. */
function copies(n: number): Line {
  const rename = (id: string, i: number) => `${id}-${i}`;
  return {
    ...exampleLine,
    nodes: Array.from({ length: n }, (_, i) =>
      exampleLine.nodes.map((node) => ({ ...node, id: rename(node.id, i) })),
    ).flat(),
    links: Array.from({ length: n }, (_, i) =>
      exampleLine.links.map((link) => ({ ...link, from: rename(link.from, i), to: rename(link.to, i) })),
    ).flat(),
  };
}

simulate(exampleLine, { ...options, replications: 20 });
const own: number[] = [];
const reference: number[] = [];
for (let turn = 0; turn < turns; turn++) {
  own.push(cpuSeconds(() => simulate(exampleLine, options)));
  const seconds = referenceSeconds();
  if (seconds !== null) reference.push(seconds);
}
const weeks = options.replications * (options.weeks + options.warmupWeeks);
const seconds = median(own);
console.log(
  `demo line, one thread: ${Math.round(weeks / seconds)} weeks/s, ${(countUpdates(exampleLine) / seconds / 1e6).toFixed(1)} million node-updates/s (CPU)`,
);
if (reference.length > 0)
  console.log(`C reference, in turns: ratio ${(median(reference) / seconds).toFixed(2)} of its speed`);
const perUpdate = [1, 4, 10].map((n) => {
  const line = copies(n);
  const used = cpuSeconds(() => simulate(line, { ...options, replications: 20 }));
  return { nodes: line.nodes.length, ns: (used / (countUpdates(line) / 10)) * 1e9 };
});
for (const { nodes, ns } of perUpdate)
  console.log(`${nodes} nodes: ${ns.toFixed(1)} ns a node-update, ${(ns / perUpdate[0].ns).toFixed(2)} of the first`);
