import { spawnSync } from "node:child_process";
import path from "node:path";
import { exampleLine } from "@/lib/line/example";
import type { Line, LineNode, NodeKind } from "@/lib/line/types";
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

/**
 * A serial line of `n` stations that behave like one of the demo line. One customer for every four stations: a customer's
 * visit costs less than a station's, so lines of different lengths compare only where the mix is the same.
 */
function serialLine(n: number): Line {
  const find = <K extends NodeKind>(kind: K, id: string) => {
    const found = exampleLine.nodes.find(
      (node): node is Extract<LineNode, { kind: K }> => node.kind === kind && node.id === id,
    );
    if (!found) throw new Error(`the demo line has no ${kind} "${id}"`);
    return found;
  };
  const supplier = find("supplier", "sup-lam");
  const bought = find("buffer", "lam");
  const between = find("buffer", "stator");
  const station = find("station", "wind");
  const customer = find("customer", "cus-a");
  const customers = Array.from({ length: Math.max(1, Math.round(n / 4)) }, (_, i) => ({
    ...customer,
    id: `customer-${i}`,
    weeklyDemand: { type: "poisson" as const, mean: 2000 / n },
  }));
  const steps = Array.from({ length: n }, (_, i) => i);
  return {
    ...exampleLine,
    overtime: null,
    nodes: [
      { ...supplier, share: 1 },
      bought,
      ...steps.flatMap((i): LineNode[] => [
        { ...station, id: `station-${i}`, scrapRate: 0.001 },
        { ...between, id: `buffer-${i}` },
      ]),
      ...customers,
    ],
    links: [
      { from: supplier.id, to: bought.id },
      ...steps.flatMap((i) => [
        { from: i === 0 ? bought.id : `buffer-${i - 1}`, to: `station-${i}` },
        { from: `station-${i}`, to: `buffer-${i}` },
      ]),
      ...customers.map(({ id }) => ({ from: `buffer-${n - 1}`, to: id })),
    ],
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
/** As many node-updates whatever the length, so that one length is measured as well as the other. */
function measureSerial(n: number): { nodes: number; ns: number } {
  const line = serialLine(n);
  const replications = Math.max(1, Math.round(1_200 / n));
  const run = () => simulate(line, { ...options, replications });
  run();
  const used = median(Array.from({ length: turns }, () => cpuSeconds(run)));
  return { nodes: line.nodes.length, ns: (used / ((countUpdates(line) * replications) / options.replications)) * 1e9 };
}

const perUpdate = [4, 12, 48, 132].map(measureSerial);
for (const { nodes, ns } of perUpdate)
  console.log(
    `serial line of ${nodes} nodes: ${ns.toFixed(1)} ns a node-update, ${(ns / perUpdate[0].ns).toFixed(2)} of the first`,
  );
