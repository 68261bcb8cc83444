import { limits, sayCount } from "./limits";
import { type Checker, isRecord, join, type NumberRule, type Place, rule } from "./parse-fields";

const any = rule.any;
const numberFields: Record<string, Record<string, (what: string) => NumberRule>> = {
  fixed: { value: any },
  normal: { mean: any, sd: rule.atLeastZero },
  lognormal: { mean: rule.aboveZero, sd: rule.atLeastZero },
  gamma: { mean: rule.aboveZero, sd: rule.atLeastZero },
  weibull: { shape: rule.aboveZero, scale: rule.aboveZero },
  exponential: { mean: rule.aboveZero },
  uniform: { min: any, max: any },
  triangular: { min: any, mode: any, max: any },
  poisson: { mean: rule.aboveZero },
  negativeBinomial: { mean: rule.aboveZero, sd: rule.aboveZero },
};

const fieldNames: Record<string, string> = {
  value: "the value",
  mean: "the mean",
  sd: "the standard deviation",
  shape: "the shape",
  scale: "the scale",
  min: "the least value",
  mode: "the most likely value",
  max: "the largest value",
};

/** All distribution types of the model, in the order in which they are offered. */
export const distributionTypes = [...Object.keys(numberFields), "empirical"] as const;

/** Checks one distribution; `what` names its quantity, as in "Weekly demand". */
export function checkDistribution(check: Checker, value: unknown, place: Place, path: string, what: string): void {
  if (!isRecord(value)) {
    check.add(place, path, `${what} is missing. Choose how it is distributed.`);
    return;
  }
  if (typeof value.type !== "string" || !distributionTypes.includes(value.type)) {
    check.add(
      place,
      join(path, "type"),
      `${what} has no known distribution. Choose one of: ${distributionTypes.join(", ")}.`,
    );
    return;
  }
  if (value.type === "empirical") {
    checkEmpirical(check, value, place, path, what);
    return;
  }
  const fields = numberFields[value.type];
  check.keys(value, place, path, what, ["type", ...Object.keys(fields)]);
  const sound = Object.entries(fields).map(([key, makeRule]) => {
    const name = `${what}: ${fieldNames[key]}`;
    return check.number(value[key], place, join(path, key), name, within(makeRule(name), name));
  });
  if (sound.every(Boolean)) checkTogether(check, value as Record<string, number> & { type: string }, place, path, what);
}

/** Nothing in a line is drawn from beyond the limit of counts. */
function within(own: NumberRule, name: string): NumberRule {
  const isSmall = (v: number) => Math.abs(v) < limits.count;
  return {
    allows: (v) => isSmall(v) && own.allows(v),
    sentence: `${own.sentence.slice(0, -1)}, and ${name.split(": ")[1]} below ${sayCount(limits.count)}.`,
  };
}

function checkTogether(
  check: Checker,
  d: Record<string, number> & { type: string },
  place: Place,
  path: string,
  what: string,
) {
  if (d.type === "uniform" && !(d.min < d.max))
    check.add(place, join(path, "max"), `${what}: the largest value has to be above the least value.`);
  if (d.type === "triangular") {
    if (!(d.min < d.max))
      check.add(place, join(path, "max"), `${what}: the largest value has to be above the least value.`);
    else if (d.mode < d.min || d.mode > d.max)
      check.add(
        place,
        join(path, "mode"),
        `${what}: the most likely value has to lie between the least and the largest.`,
      );
  }
  if (d.type === "negativeBinomial" && !(d.sd * d.sd > d.mean))
    check.add(
      place,
      join(path, "sd"),
      `${what}: a negative binomial needs a standard deviation above the square root of its mean. Raise it, or choose poisson.`,
    );
}

function checkEmpirical(check: Checker, value: Record<string, unknown>, place: Place, path: string, what: string) {
  check.keys(value, place, path, what, ["type", "values"]);
  const values = value.values;
  if (!Array.isArray(values) || values.length === 0) {
    check.add(place, join(path, "values"), `${what} needs at least one observed value.`);
    return;
  }
  if (values.length > limits.empiricalValues) {
    check.add(
      place,
      join(path, "values"),
      `${what} lists ${sayCount(values.length)} values; the limit is ${sayCount(limits.empiricalValues)}.`,
    );
    return;
  }
  const bad = values.findIndex((v) => typeof v !== "number" || !Number.isFinite(v) || Math.abs(v) >= limits.count);
  if (bad >= 0)
    check.add(
      place,
      join(path, "values"),
      `${what}: value ${bad + 1} of the list is not a number below ${sayCount(limits.count)}.`,
    );
}
