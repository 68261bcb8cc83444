import { stationStates, type TraceEvent, type WeekTrace } from "./trace-types";

/** Spells shorter than this are left out, and gaps shorter than this between two spells are taken for flicker. */
const leastMinutes = 60;

const short = stationStates.indexOf("short");
const stopped = stationStates.indexOf("stopped");

type Spell = { from: number; to: number };
type SpellAt = { tick: number; day: number; ticks: number; isCarried: boolean };

/**
 * Stretches of ticks in which something holds, flicker apart.
 * @param nLeast - A gap of fewer ticks, and no longer than what came before it, is joined; a spell that holds in fewer is left out.
 * @returns `to` is the first tick after the spell; ascending.
 */
export function listSpells(n: number, nLeast: number, holds: (t: number) => boolean): Spell[] {
  const spells: (Spell & { held: number })[] = [];
  for (let t = 0; t < n; t++) {
    if (!holds(t)) continue;
    const last = spells[spells.length - 1];
    const gap = last ? t - last.to : Infinity;
    if (gap === 0 || (gap < nLeast && gap <= last.held)) {
      last.to = t + 1;
      last.held++;
    } else spells.push({ from: t, to: t + 1, held: 1 });
  }
  return spells.filter(({ held }) => held >= nLeast).map(({ from, to }) => ({ from, to }));
}

/** When buffers ran dry and stations stopped or were short of parts. In no order. */
export function listSpellEvents(trace: Omit<WeekTrace, "events">): TraceEvent[] {
  const { weeks, tickMinutes, buffers, stations } = trace;
  const n = weeks.reduce((sum, { nTicks }) => sum + nTicks, 0);
  const nLeast = Math.max(1, Math.ceil(leastMinutes / tickMinutes));
  const events: TraceEvent[] = [];
  const add = (spells: Spell[], wasSo: boolean, tell: (begins: boolean, at: SpellAt) => TraceEvent): void => {
    for (const { from, to } of spells) {
      const spell = { ticks: to - from, isCarried: from === 0 && wasSo };
      events.push(tell(true, { ...spell, ...placeOf(trace, from) }));
      if (to < n) events.push(tell(false, { ...spell, ...placeOf(trace, to) }));
    }
  };
  for (const { id: node, levels, startLevel } of buffers) {
    const spells = listSpells(n, nLeast, (t) => levels[t] === 0);
    add(spells, startLevel === 0, (begins, at) => ({ kind: begins ? "dry" : "restocked", node, ...at }));
  }
  for (const { id: node, states, lacking } of stations) {
    const stops = listSpells(n, nLeast, (t) => states[t] === stopped);
    add(stops, true, (begins, at) => ({ kind: begins ? "stopped" : "running", node, ...at }));
    buffers.forEach(({ id: buffer }, b) => {
      const spells = listSpells(n, nLeast, (t) => states[t] === short && lacking[t] === b);
      add(spells, true, (begins, at) => ({ kind: begins ? "short" : "supplied", node, buffer, ...at }));
    });
  }
  return events;
}

/** The regular day of a tick; overtime counts to the last one before it. */
function placeOf(
  { weeks, ticksPerDay, daysPerWeek }: Omit<WeekTrace, "events">,
  tick: number,
): { tick: number; day: number } {
  const at = weeks.findIndex(({ firstTick, nTicks }) => tick < firstTick + nTicks);
  const day = Math.min(Math.floor((tick - weeks[at].firstTick) / ticksPerDay), daysPerWeek - 1);
  return { tick, day: at * daysPerWeek + day };
}
