import type { Levels, Place } from "./problem";
import { lowShares, type Reading, type Search } from "./runs";

/** Shares of their range at which buffers between stations are tried. */
const betweenShares = [0.1, 0.2, 0.35, 0.5, 0.75];
/** Of the shares of days in which purchased stock may run dry, the first so many; with more, no set keeps to a risk. */
const nLowShares = 4;
/** Halvings of the range of the stock that customers draw on. */
const nHalvings = 5;
/** First sets run over all weeks. */
const nFinalists = 3;
/** Part of its worth by which a set to begin with is dearer for each share of weeks that it is too risky by: it is soon mended. */
const dearness = 10;

/**
 * A set to begin with: purchased stock less what is never needed of it, stock between stations by parts of its range, and
 * for each such pair the least finished stock with which the risk is kept to. Which of the three is better short differs
 * from line to line, and moving one buffer at a time does not find out.
 * @param ample - The run with all buffers at their top. Purchased stock falls one for one with its size, so that what
 * lay on hand in nearly all days of this run can be spared.
 */
export async function findFirstSet(search: Search, ample: Reading, accepted: number): Promise<Reading> {
  const { problem, runs, places, tops, whole, few } = search;
  const has = (place: Place) => places.includes(place);
  // The stock customers draw on is halved, else the stock between stations; purchased stock alone is looked at once.
  const halved: Place = has("last") ? "last" : "between";
  const nRounds = has(halved) ? nHalvings : 1;
  const between = has("between") && halved === "last" ? betweenShares : [1];
  const bought = has("bought") ? lowShares.map((_, i) => i).slice(0, nLowShares) : [0];
  const starts = between.flatMap((share) => bought.map((low) => ({ share, low })));
  const setAt = ({ share, low }: (typeof starts)[number], part: number): Levels =>
    tops.map((top, b) => {
      if (places[b] !== "bought") return Math.round(top * (places[b] === halved ? part : share));
      return Math.max(0, top - Math.round(ample.lows[b][low] / problem.buffers[b].step));
    });
  const ranges = starts.map(() => ({ low: 0, high: 1 }));
  const found: (Reading | null)[] = starts.map(() => null);
  for (let round = 0; round < nRounds; round++) {
    const middles = ranges.map(({ low, high }) => (low + high) / 2);
    const sets = starts.map((start, i) => setAt(start, middles[i]));
    (await runs.read(sets, few)).forEach((reading, i) => {
      if (reading.risk > accepted) {
        ranges[i].low = middles[i];
        return;
      }
      ranges[i].high = middles[i];
      const best = found[i];
      if (!best || reading.value < best.value) found[i] = reading;
    });
  }
  const finalists = found
    .flatMap((reading) => (reading ? [reading] : []))
    .sort((one, other) => one.value - other.value)
    .slice(0, nFinalists);
  const readings = await runs.read(
    finalists.map(({ levels }) => levels),
    whole,
  );
  const merit = ({ value, risk }: Reading) => value * (1 + dearness * Math.max(0, risk - accepted));
  return [...readings, ...runs.known(whole)].reduce((one, other) => (merit(other) < merit(one) ? other : one));
}
