import type { Buffer, Customer, Line, Station, Supplier } from "@/lib/line/types";
import { createDraws, type Draws, quantileOf } from "./reference-draws";
import { ReferenceTotals } from "./reference-totals";

/** The model told over again, slowly and without regard to the kernel: objects, one stream, everything tick by tick. */
type Store = {
  node: Buffer;
  level: number;
  suppliers: Source[];
  feeders: Machine[];
  takers: Machine[];
  buyers: Buyer[];
};
type Order = { units: number; expected: number; planned: number };
type Source = {
  node: Supplier;
  store: Store;
  orders: Order[];
  lastPlanned: number;
  isDisrupted: boolean;
  score: number | null;
};
type Last = "down" | "other" | "none" | { lacked: Store };
type Machine = {
  node: Station;
  inputs: { store: Store; quantity: number }[];
  output: Store;
  /** Work left on the unit in work; null: none. */
  left: number | null;
  upLeft: number;
  downLeft: number;
  last: Last;
};
type Buyer = { node: Customer; store: Store; old: number; fresh: number; due: number; score: number | null };

const round = (x: number) => Math.floor(x + 0.5);

export class ReferenceRun {
  private readonly stores: Store[];
  private readonly sources: Source[];
  private readonly machines: Machine[];
  private readonly buyers: Buyer[];
  private readonly order: Machine[];
  private readonly draws: Draws;
  private readonly tickHours: number;
  private day = 0;
  readonly totals = new ReferenceTotals();

  constructor(
    private readonly line: Line,
    seed: string,
    private readonly targetFillRate: number,
  ) {
    this.draws = createDraws(seed);
    this.tickHours = line.calendar.tickMinutes / 60;
    const of = <K extends Line["nodes"][number]["kind"]>(kind: K) =>
      line.nodes.filter((node): node is Extract<Line["nodes"][number], { kind: K }> => node.kind === kind);
    this.stores = of("buffer").map((node) => ({
      node,
      level: node.startLevel ?? node.size,
      suppliers: [],
      feeders: [],
      takers: [],
      buyers: [],
    }));
    const store = (id: string) => this.stores.find((one) => one.node.id === id)!;
    const into = (id: string) => line.links.filter((link) => link.to === id);
    const outOf = (id: string) => line.links.find((link) => link.from === id)!.to;
    this.sources = of("supplier").map((node) => ({
      node,
      store: store(outOf(node.id)),
      orders: [],
      lastPlanned: 0,
      isDisrupted: false,
      score: null,
    }));
    this.machines = of("station").map((node) => ({
      node,
      inputs: into(node.id).map((link) => ({ store: store(link.from), quantity: link.quantity ?? 1 })),
      output: store(outOf(node.id)),
      left: null,
      upLeft: this.drawUp(node),
      downLeft: 0,
      last: "none",
    }));
    this.buyers = of("customer").map((node) => {
      const own = store(into(node.id)[0].from);
      return { node, store: own, old: 0, fresh: 0, due: 0, score: null };
    });
    for (const one of this.stores) {
      const froms = into(one.node.id).map((link) => link.from);
      one.suppliers = froms.flatMap((id) => this.sources.filter((source) => source.node.id === id));
      one.feeders = froms.flatMap((id) => this.machines.filter((machine) => machine.node.id === id));
      one.takers = this.machines.filter((machine) => machine.inputs.some((input) => input.store === one));
      one.buyers = this.buyers.filter((buyer) => buyer.store === one);
    }
    this.order = [];
    while (this.order.length < this.machines.length)
      this.order.push(
        this.machines.find(
          (machine) =>
            !this.order.includes(machine) && machine.output.takers.every((taker) => this.order.includes(taker)),
        )!,
      );
  }

  run(warmupWeeks: number, weeks: number): ReferenceTotals {
    const { calendar, overtime } = this.line;
    const ticksPerDay = Math.round((calendar.hoursPerDay * 60) / calendar.tickMinutes);
    for (let week = 0; week < warmupWeeks + weeks; week++) {
      this.totals.isRecording = week >= warmupWeeks;
      const owed = this.buyers.reduce((sum, { old, fresh }) => sum + old + fresh, 0);
      const isLong = overtime !== null && owed > overtime.backlogTrigger;
      for (const buyer of this.buyers) {
        const demand = quantileOf(buyer.node.weeklyDemand, this.draws.next(buyer, buyer.node.correlation));
        buyer.due = Math.max(0, round(demand));
      }
      for (let d = 0; d < calendar.daysPerWeek; d++) {
        this.startDay(d);
        for (let t = 0; t < ticksPerDay; t++) this.tick();
        for (const { node, level, suppliers } of this.stores) {
          this.totals.noteDayLevel(node.id, level);
          this.totals.add(
            `onOrder ${node.id}`,
            sumOf(suppliers.flatMap(({ orders }) => orders.map(({ units }) => units))),
          );
        }
        if (d < calendar.daysPerWeek - 1) this.day++;
      }
      if (isLong) {
        const ticks = Math.max(1, round((overtime.hoursPerWeek * 60) / calendar.tickMinutes));
        for (let t = 0; t < ticks; t++) this.tick();
        this.totals.add("overtimeWeeks", 1);
      }
      this.day++;
      this.endWeek();
    }
    return this.totals;
  }

  private drawUp({ stoppages }: Station): number {
    if (stoppages?.pattern !== "upDown") return Infinity;
    return this.draws.geometric(Math.max(1, stoppages.meanUpHours / this.tickHours));
  }

  private drawDown({ stoppages }: Station): number {
    if (stoppages?.pattern !== "upDown") return 0;
    const mean = stoppages.meanDownHours / this.tickHours;
    if (stoppages.downCv === null) return this.draws.geometric(Math.max(1, mean));
    return Math.max(1, round(this.draws.lognormal(mean, stoppages.downCv)));
  }

  private startDay(d: number): void {
    const { draws, totals } = this;
    for (const source of this.sources) {
      const { disruption, id } = source.node;
      if (disruption)
        source.isDisrupted = source.isDisrupted
          ? !draws.chance(1 / disruption.meanDaysLasting)
          : draws.chance(1 / disruption.meanDaysBetween);
      totals.add(`disrupted ${id}`, source.isDisrupted ? 1 : 0);
    }
    for (const source of this.sources) {
      if (source.isDisrupted) continue;
      const { id, lotRejectRate, rejectRate } = source.node;
      for (const order of source.orders.filter(({ planned }) => planned <= this.day)) {
        totals.add(`arrived ${id}`, 1);
        totals.add(`lateness ${id}`, this.day - order.expected);
        totals.add(`late ${id}`, this.day > order.expected ? 1 : 0);
        if (draws.chance(lotRejectRate)) totals.add(`refused ${id}`, order.units);
        else
          for (let i = 0; i < order.units; i++) {
            if (draws.chance(rejectRate)) totals.add(`rejected ${id}`, 1);
            else source.store.level++;
          }
      }
      source.orders = source.orders.filter(({ planned }) => planned > this.day);
    }
    for (const store of this.stores)
      if (store.node.replenishment && this.day % store.node.replenishment.reviewDays === 0) this.review(store);
    const n = this.line.calendar.daysPerWeek;
    for (const buyer of this.buyers) {
      const { due } = buyer;
      if (buyer.node.callOff === "weekly") buyer.fresh += d === 0 ? due : 0;
      else buyer.fresh += Math.floor((due * (d + 1)) / n) - Math.floor((due * d) / n);
    }
  }

  private review(store: Store): void {
    const { size, replenishment } = store.node;
    const { rule, lot, minimumOrder, orderMultiple } = replenishment!;
    const open = sumOf(store.suppliers.flatMap(({ orders }) => orders.map(({ units }) => units)));
    const position = store.level + open - sumOf(store.buyers.map(({ old, fresh }) => old + fresh));
    let need = 0;
    if (rule === "orderUpTo") need = size - position;
    else if (position <= size) while (position + need <= size) need += lot!;
    let left = need;
    store.suppliers.forEach((source, i) => {
      const { node } = source;
      const u = this.draws.next(source, node.correlation);
      const late =
        node.lateness === null || u < node.onTimeShare
          ? 0
          : quantileOf(node.lateness, (u - node.onTimeShare) / (1 - node.onTimeShare));
      if (need <= 0) return;
      const part = i === store.suppliers.length - 1 ? left : Math.min(left, round(need * node.share));
      left -= part;
      if (part <= 0) return;
      const units = Math.ceil(Math.max(part, minimumOrder) / orderMultiple) * orderMultiple;
      let planned = this.day + Math.max(1, round(node.leadTimeDays + late));
      if (node.keepsSequence) planned = Math.max(planned, source.lastPlanned);
      source.lastPlanned = planned;
      source.orders.push({ units, planned, expected: this.day + Math.max(1, round(node.leadTimeDays)) });
      this.totals.add(`orders ${node.id}`, 1);
      this.totals.add(`ordered ${node.id}`, units);
    });
  }

  private tick(): void {
    for (const store of this.stores) if (store.buyers.length > 0) this.serve(store);
    for (const machine of this.order) this.work(machine);
    this.totals.add("ticks", 1);
    for (const store of this.stores) {
      const { id, size, replenishment } = store.node;
      const room = replenishment ? size - store.level : this.roomOf(store);
      this.totals.add(`level ${id}`, store.level);
      this.totals.add(`empty ${id}`, store.level === 0 ? 1 : 0);
      this.totals.add(`full ${id}`, room <= 0 ? 1 : 0);
    }
  }

  private serve(store: Store): void {
    for (const kind of ["old", "fresh"] as const) {
      const all = sumOf(store.buyers.map((buyer) => buyer[kind]));
      if (all === 0) continue;
      const stock = store.level;
      const shares = store.buyers.map((buyer) => (all <= stock ? buyer[kind] : (stock * buyer[kind]) / all));
      const parts = shares.map(Math.floor);
      const rests = store.buyers.map((buyer, i) => (all <= stock ? 0 : (stock * buyer[kind]) % all) - i * 1e-9);
      for (let over = Math.min(stock, all) - sumOf(parts); over > 0; over--) {
        const most = rests.indexOf(Math.max(...rests));
        parts[most]++;
        rests[most] = -Infinity;
      }
      store.buyers.forEach((buyer, i) => (buyer[kind] -= parts[i]));
      store.level -= sumOf(parts);
    }
    if (store.node.replenishment)
      for (const { old, fresh } of store.buyers) if (old + fresh > 0) this.charge(this.causeOf(store), 1);
  }

  private roomOf({ node, level, feeders }: Store): number {
    return node.size - level - feeders.filter(({ left }) => left !== null).length;
  }

  private work(machine: Machine): void {
    const { node, inputs, output } = machine;
    const { stoppages, id } = node;
    const isDown =
      stoppages?.pattern === "perTick" ? !this.draws.chance(stoppages.upProbability) : machine.downLeft > 0;
    if (isDown) {
      this.totals.add(`down ${id}`, 1);
      machine.last = "down";
      if (output.buyers.length > 0) this.charge(`${id} down`, 1);
      if (machine.downLeft > 0 && --machine.downLeft === 0) machine.upLeft = this.drawUp(node);
      return;
    }
    let budget = node.parallel;
    machine.last = "other";
    while (budget > 1e-9) {
      if (machine.left === null) {
        const missing = inputs.find(({ store, quantity }) => store.level < quantity);
        if (missing) {
          this.totals.add(`starved ${id} ${missing.store.node.id}`, budget / node.parallel);
          if (output.buyers.length > 0) this.charge(this.causeOf(missing.store), budget / node.parallel);
          machine.last = { lacked: missing.store };
          break;
        }
        if (this.roomOf(output) <= 0) {
          this.totals.add(`blocked ${id}`, budget / node.parallel);
          break;
        }
        for (const { store, quantity } of inputs) store.level -= quantity;
        machine.left = (node.cycleMinutes / this.line.calendar.tickMinutes) * this.draws.gammaWork(node.cycleCv);
      }
      const spent = Math.min(budget, machine.left);
      if (machine.left - budget > 1e-9) {
        machine.left -= budget;
        budget = 0;
      } else {
        budget -= spent;
        machine.left = null;
        if (this.draws.chance(node.scrapRate)) {
          this.totals.add(`scrap ${id}`, 1);
          this.totals.add("scrapMoney", sumOf(inputs.map(({ store, quantity }) => quantity * store.node.unitValue)));
        } else {
          output.level++;
          this.totals.add(`good ${id}`, 1);
        }
      }
    }
    const hasWorked = budget < node.parallel;
    if (stoppages?.pattern === "upDown" && (hasWorked || stoppages.clock === "always") && --machine.upLeft === 0)
      machine.downLeft = this.drawDown(node);
  }

  private causeOf(store: Store): string {
    if (store.node.replenishment) {
      const disrupted = store.suppliers.find(({ isDisrupted }) => isDisrupted);
      if (disrupted) return `${disrupted.node.id} disrupted`;
      const late = store.suppliers.find(({ orders }) => orders.some(({ expected }) => expected <= this.day));
      return late ? `${late.node.id} late` : `${store.node.id} size`;
    }
    const [feeder] = store.feeders;
    if (feeder.last === "down") return `${feeder.node.id} down`;
    return typeof feeder.last === "object" ? this.causeOf(feeder.last.lacked) : `${feeder.node.id} pace`;
  }

  private charge(cause: string, ticks: number): void {
    this.totals.add(`cause ${cause}`, ticks * this.tickHours);
  }

  private endWeek(): void {
    const { totals } = this;
    totals.add("weeks", 1);
    const shipped = this.buyers.map((buyer) => buyer.due - buyer.fresh);
    totals.noteWeek("", sumOf(shipped), sumOf(this.buyers.map(({ due }) => due)), this.targetFillRate);
    this.buyers.forEach((buyer, i) => {
      totals.noteWeek(buyer.node.id, shipped[i], buyer.due, this.targetFillRate);
      totals.add("fines", buyer.node.lateFine * (buyer.old + buyer.fresh));
      buyer.old = buyer.node.unmet === "lost" ? 0 : buyer.old + buyer.fresh;
      buyer.fresh = 0;
      totals.add("backlog", buyer.old);
    });
  }
}

const sumOf = (values: number[]) => values.reduce((a, b) => a + b, 0);
