import { loadsOf } from "./capacity";
import { meanOf } from "./distribution-mean";
import type { Line } from "./types";

/** Something that does not keep the line from running but that its user should know. */
export type Caution = { message: string; node?: string };

/** Hours a week above which work-time law of many countries sets limits; common practice, not a legal statement. */
const usualWeeklyHours = 48;

/** All cautions on a sound line, the line's own first. */
export function cautionsOf(line: Line): Caution[] {
  return [...cautionHours(line), ...cautionLoads(line), ...line.nodes.flatMap((node) => cautionNode(line, node))];
}

function cautionHours({ calendar, overtime }: Line): Caution[] {
  if (!overtime) return [];
  const week = calendar.hoursPerDay * calendar.daysPerWeek;
  const total = week + overtime.hoursPerWeek;
  if (total > 168)
    return [
      {
        message: `The week's ${say(week)} h and ${say(overtime.hoursPerWeek)} h of overtime are more hours than a week has.`,
      },
    ];
  if (overtime.hoursPerWeek <= usualWeeklyHours / 6 && total <= usualWeeklyHours) return [];
  return [
    {
      message: `Overtime adds ${say(overtime.hoursPerWeek)} h to a week of ${say(week)} h. Hours for each person, rest and breaks are set by local working-time rules and agreements: check them before you rely on it.`,
    },
  ];
}

function cautionLoads(line: Line): Caution[] {
  return loadsOf(line)
    .filter(({ due, capacity }) => due > capacity * 0.97)
    .map(({ station, due, capacity }) => ({
      node: station.id,
      message:
        due > capacity
          ? `${station.name} can make about ${say(capacity)} good units a week and ${say(due)} are due: without overtime the backlog grows.`
          : `${station.name} can make about ${say(capacity)} good units a week for ${say(due)} due: hardly any time to catch up.`,
    }));
}

function cautionNode(line: Line, node: Line["nodes"][number]): Caution[] {
  if (node.kind === "buffer") {
    const found: Caution[] = [];
    if (node.unitValue === 0)
      found.push({
        node: node.id,
        message: `${node.name} has no value, so it ties up no money in the figures. Fill in the value of a unit.`,
      });
    if (node.replenishment === null && node.size === 1)
      found.push({
        node: node.id,
        message: `${node.name} has room for one unit: the stations around it stop each other. Fill in its places.`,
      });
    return found;
  }
  if (node.kind === "supplier") {
    const mean = node.lateness ? (1 - node.onTimeShare) * (meanOf(node.lateness) ?? 0) : 0;
    if (mean > Math.max(1, node.leadTimeDays))
      return [
        {
          node: node.id,
          message: `${node.name} comes ${say(mean)} days late on average, more than the lead time itself. Check the lateness.`,
        },
      ];
  }
  return [];
}

/** Said wherever figures leave the sheet: on shared pages and prints. */
export const generalCautions = [
  "Figures are estimates from the inputs shown, not a promise; they are no better than the records and judgements behind them.",
  "Overtime hours follow local working-time rules and agreements.",
  "Floor loads, rack loads, fire load and the storage of hazardous stock follow local codes; have larger stocks checked by qualified people before they are built up.",
  "For parts critical to safety, a buffer does not replace inspection or release.",
] as const;

function say(value: number): string {
  const rounded = value >= 20 ? Math.round(value) : Math.round(value * 10) / 10;
  return String(rounded).replace(/\B(?=(\d{3})+$)/g, "\u202f");
}
