import { nextUniform, wordsPerStream } from "@/lib/random/sfc32";
import type { Model } from "./model";
import { countRejects } from "./start-day";
import type { State } from "./state";
import type { TraceEvent } from "./trace-types";

type Order = { planned: number; expected: number; units: number };

/**
 * Tells what the suppliers did at the start of a day, from the order books of the evening before.
 * @remarks The day's start is over when it is looked at, so inspections are drawn once more, from streams as they stood before.
 */
export function createSupplyTrace(model: Model, tell: (event: TraceEvent) => void) {
  let books: Order[][] = model.suppliers.map(() => []);
  let wasDisrupted = new Uint8Array(model.suppliers.length);
  let before: State | null = null;
  let firstDay = -1;

  function receive(eve: State, i: number, order: Order, tick: number, day: number): void {
    const { lotRejectRate, rejectRate, streams, buffer } = model.suppliers[i];
    const { units } = order;
    const expectedDay = order.expected - firstDay;
    const common = { tick, day, node: model.shape.suppliers[i].id, buffer: model.shape.buffers[buffer].id, units };
    const lateDays = day - expectedDay;
    if (lotRejectRate > 0 && nextUniform(eve.streams, streams.lot * wordsPerStream) < lotRejectRate) {
      return tell({ kind: "refused", ...common, expectedDay, lateDays });
    }
    const rejected = rejectRate > 0 ? countRejects(eve, i, units) : 0;
    tell({ kind: "delivery", ...common, rejected, expectedDay, lateDays });
  }

  return {
    /** @param tick - First of the day. */
    startDay(s: State, tick: number): void {
      const isFirst = firstDay === -1;
      if (isFirst) firstDay = s.day;
      const day = s.day - firstDay;
      for (let i = 0; i < model.suppliers.length; i++) {
        const node = model.shape.suppliers[i].id;
        const isDisrupted = s.isDisrupted[i] === 1;
        const hasTurned = s.isDisrupted[i] !== wasDisrupted[i];
        if (hasTurned || (isFirst && isDisrupted)) {
          tell({ kind: isDisrupted ? "disrupted" : "recovered", node, tick, day, isCarried: !hasTurned });
        }
        const [arrived, open] = part(books[i], ({ planned }) => !isDisrupted && planned <= s.day);
        for (const order of arrived) if (before) receive(before, i, order, tick, day);
        for (const { planned, expected, units } of open) {
          if (expected !== s.day && !(isFirst && expected < s.day)) continue;
          const buffer = model.shape.buffers[model.suppliers[i].buffer].id;
          const [expectedDay, plannedDay] = [expected - firstDay, planned - firstDay];
          tell({ kind: "overdue", node, tick, day, buffer, units, expectedDay, plannedDay });
        }
      }
    },
    /** Keeps what the next day's start changes. */
    remember(s: State): void {
      books = s.orders.map(({ planned, expected, units, count }) =>
        Array.from({ length: count }, (_, k) => ({ planned: planned[k], expected: expected[k], units: units[k] })),
      );
      wasDisrupted = s.isDisrupted.slice();
      before = { ...s, streams: s.streams.slice(), rejectGaps: s.rejectGaps.slice() };
    },
  };
}

function part<T>(all: T[], holds: (one: T) => boolean): [T[], T[]] {
  return [all.filter(holds), all.filter((one) => !holds(one))];
}
