import type { Line } from "@/lib/line/types";
import type { RunResult } from "@/lib/simulation/types";

/** Sums over recorded weeks, by a name; of one or of several replications. */
export class ReferenceTotals {
  isRecording = true;
  private readonly sums = new Map<string, number>();
  private readonly rates = new Map<string, number[]>();
  private readonly levels = new Map<string, number[]>();

  add(name: string, value: number): void {
    if (this.isRecording && value !== 0) this.sums.set(name, (this.sums.get(name) ?? 0) + value);
  }

  noteDayLevel(buffer: string, level: number): void {
    if (!this.isRecording) return;
    this.add("days", 0);
    this.levels.set(buffer, [...(this.levels.get(buffer) ?? []), level]);
  }

  /** `customer` is "" for all together. */
  noteWeek(customer: string, onTime: number, due: number, target: number): void {
    if (!this.isRecording || due === 0) return;
    this.rates.set(customer, [...(this.rates.get(customer) ?? []), onTime / due]);
    this.add(`bad ${customer}`, onTime < target * due - 1e-9 ? 1 : 0);
    this.add(`inFull ${customer}`, onTime === due ? 1 : 0);
  }

  join(other: ReferenceTotals): void {
    for (const [name, sum] of other.sums) this.add(name, sum);
    for (const [map, more] of [
      [this.rates, other.rates],
      [this.levels, other.levels],
    ] as const)
      for (const [name, values] of more) map.set(name, [...(map.get(name) ?? []), ...values]);
  }

  /** Figures of the model page, section 4, by name; NaN where there is none. */
  figures(line: Line): Record<string, number> {
    const sum = (name: string) => this.sums.get(name) ?? 0;
    const weeks = sum("weeks");
    const ticks = sum("ticks");
    const rates = (customer: string) => this.rates.get(customer) ?? [];
    const mean = (values: number[]) => values.reduce((a, b) => a + b, 0) / values.length;
    const found: Record<string, number> = {
      mean: mean(rates("")),
      p10: pick(rates(""), 0.1),
      p50: pick(rates(""), 0.5),
      risk: sum("bad ") / rates("").length,
      weeksInFull: sum("inFull ") / rates("").length,
      backlog: sum("backlog") / weeks,
      overtimeWeeks: sum("overtimeWeeks") / weeks,
    };
    let money = 0;
    for (const node of line.nodes) {
      const { id } = node;
      if (node.kind === "buffer") {
        const levels = this.levels.get(id) ?? [];
        found[`${id} mean`] = sum(`level ${id}`) / ticks;
        found[`${id} empty`] = sum(`empty ${id}`) / ticks;
        found[`${id} full`] = sum(`full ${id}`) / ticks;
        for (const p of [10, 50, 90]) found[`${id} p${p}`] = pick(levels, p / 100);
        if (node.replenishment) found[`${id} onOrder`] = sum(`onOrder ${id}`) / levels.length;
        money += (node.unitValue * sum(`level ${id}`)) / ticks;
      } else if (node.kind === "station") {
        found[`${id} down`] = sum(`down ${id}`) / ticks;
        found[`${id} blocked`] = sum(`blocked ${id}`) / ticks;
        for (const { from } of line.links.filter(({ to }) => to === id))
          found[`${id} starved by ${from}`] = sum(`starved ${id} ${from}`) / ticks;
        found[`${id} good`] = sum(`good ${id}`) / weeks;
        found[`${id} scrap`] = sum(`scrap ${id}`) / weeks;
      } else if (node.kind === "supplier") {
        found[`${id} orders`] = sum(`orders ${id}`) / weeks;
        found[`${id} ordered`] = sum(`ordered ${id}`) / weeks;
        found[`${id} late`] = sum(`late ${id}`) / sum(`arrived ${id}`);
        found[`${id} lateness`] = sum(`lateness ${id}`) / sum(`arrived ${id}`);
        found[`${id} rejected`] = sum(`rejected ${id}`) / weeks;
        found[`${id} refused`] = sum(`refused ${id}`) / weeks;
        found[`${id} disrupted`] = sum(`disrupted ${id}`) / (weeks * line.calendar.daysPerWeek);
      } else {
        found[`${id} mean`] = mean(rates(id));
        found[`${id} p10`] = pick(rates(id), 0.1);
        found[`${id} risk`] = sum(`bad ${id}`) / rates(id).length;
      }
    }
    found.moneyTiedUp = money;
    found.carrying = line.money.carryingRate * money;
    const { weeksPerYear } = line.calendar;
    found.fines = (weeksPerYear * sum("fines")) / weeks;
    found.scrapCost = (weeksPerYear * sum("scrapMoney")) / weeks;
    found.overtimeCost = line.overtime
      ? weeksPerYear * line.overtime.hoursPerWeek * line.overtime.costPerHour * found.overtimeWeeks
      : 0;
    for (const [name, hours] of this.sums) if (name.startsWith("cause ")) found[name] = hours / weeks;
    return found;
  }
}

function pick(values: number[], p: number): number {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted.length === 0 ? Number.NaN : sorted[Math.min(sorted.length - 1, Math.floor(sorted.length * p + 1e-9))];
}

/** The same figures of a result of the kernel. */
export function figuresOf({
  summary,
  buffers,
  stations,
  suppliers,
  customers,
  causes,
}: RunResult): Record<string, number> {
  const { mean, p10, p50, risk, weeksInFull, backlog, overtimeWeeks, moneyTiedUp, costPerYear } = summary;
  const found: Record<string, number> = {
    mean: mean.value,
    p10: p10.value,
    p50: p50.value,
    risk: risk.value,
    weeksInFull: weeksInFull.value,
    backlog: backlog.value,
    overtimeWeeks: overtimeWeeks.value,
    moneyTiedUp: moneyTiedUp.value,
    carrying: costPerYear.carrying.value,
    fines: costPerYear.fines.value,
    scrapCost: costPerYear.scrap.value,
    overtimeCost: costPerYear.overtime.value,
  };
  for (const [id, buffer] of Object.entries(buffers)) {
    found[`${id} mean`] = buffer.mean.value;
    found[`${id} empty`] = buffer.empty.value;
    found[`${id} full`] = buffer.full.value;
    found[`${id} p10`] = buffer.p10;
    found[`${id} p50`] = buffer.p50;
    found[`${id} p90`] = buffer.p90;
    if (buffer.meanOnOrder !== null) found[`${id} onOrder`] = buffer.meanOnOrder;
  }
  for (const [id, station] of Object.entries(stations)) {
    found[`${id} down`] = station.down.value;
    found[`${id} blocked`] = station.blocked.value;
    for (const [from, { value }] of Object.entries(station.starvedBy)) found[`${id} starved by ${from}`] = value;
    found[`${id} good`] = station.goodPerWeek.value;
    found[`${id} scrap`] = station.scrapPerWeek.value;
  }
  for (const [id, supplier] of Object.entries(suppliers)) {
    found[`${id} orders`] = supplier.ordersPerWeek.value;
    found[`${id} ordered`] = supplier.unitsOrderedPerWeek.value;
    found[`${id} late`] = supplier.lateShare.value;
    found[`${id} lateness`] = supplier.meanLateness.value;
    found[`${id} rejected`] = supplier.rejectedPerWeek.value;
    found[`${id} refused`] = supplier.refusedPerWeek.value;
    found[`${id} disrupted`] = supplier.disruptedShare.value;
  }
  for (const [id, customer] of Object.entries(customers)) {
    found[`${id} mean`] = customer.mean.value;
    found[`${id} p10`] = customer.p10.value;
    found[`${id} risk`] = customer.risk.value;
  }
  for (const { node, reason, hoursPerWeek } of causes) found[`cause ${node} ${reason}`] = hoursPerWeek.value;
  return found;
}
