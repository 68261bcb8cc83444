"use client";

import { Popover } from "radix-ui";
import { useLine } from "@/lib/client/line-state";
import { isRunSizeAllowed, totalWeeks } from "@/lib/client/run-size";
import { ScenarioOptions } from "@/lib/schema/lines";
import { formatCount } from "@/lib/format";
import { StripField } from "./strip-field";

type Field = {
  label: string;
  unit: string;
  hint: string;
  show(options: ScenarioOptions): string;
  /** Null for what cannot be read as a number. */
  read(text: string): Partial<ScenarioOptions> | null;
  range: string;
};

const readNumber = (text: string): number | null => {
  const value = Number(text.replace(/[\s\u202f%]/g, "").replace(",", "."));
  return text.trim() !== "" && Number.isFinite(value) ? value : null;
};
const whole = (key: "replications" | "weeks" | "warmupWeeks") => (text: string) => {
  const value = readNumber(text);
  return value === null ? null : { [key]: value };
};
const share = (key: "targetFillRate" | "acceptedRisk") => (text: string) => {
  const value = readNumber(text);
  return value === null ? null : { [key]: Math.round(value * 1000) / 100_000 };
};
const percent = (value: number): string => String(Math.round(value * 100_000) / 1000);

const fields: Field[] = [
  {
    label: "Replications",
    unit: "runs",
    hint: "Independent runs of the line, each with its own draws.",
    show: ({ replications }) => formatCount(replications),
    read: whole("replications"),
    range: "Replications: a whole number from 1 to 20\u202f000.",
  },
  {
    label: "Weeks in each",
    unit: "weeks",
    hint: "Recorded weeks of one replication.",
    show: ({ weeks }) => formatCount(weeks),
    read: whole("weeks"),
    range: "Weeks in each: a whole number from 1 to 5\u202f000.",
  },
  {
    label: "Warm-up",
    unit: "weeks",
    hint: "Weeks run before recording starts, so that the starting levels do not count.",
    show: ({ warmupWeeks }) => formatCount(warmupWeeks),
    read: whole("warmupWeeks"),
    range: "Warm-up: a whole number from 0 to 5\u202f000.",
  },
  {
    label: "Target fill rate",
    unit: "%",
    hint: "A week below it counts as a week at risk.",
    show: ({ targetFillRate }) => percent(targetFillRate),
    read: share("targetFillRate"),
    range: "Target fill rate: 0 to 100\u202f%.",
  },
  {
    label: "Accepted risk",
    unit: "%",
    hint: "Share of weeks that may ship less than the headline says.",
    show: ({ acceptedRisk }) => percent(acceptedRisk),
    read: share("acceptedRisk"),
    range: "Accepted risk: more than 0 and less than 100\u202f%.",
  },
];

/** The split behind the weeks, the warm-up, the target and the accepted risk. */
export function RunDetails() {
  const { options, setOptions, mayEdit } = useLine();
  return (
    <Popover.Root>
      <Popover.Trigger className="text-water-700 underline underline-offset-3 hover:decoration-2">
        Details
      </Popover.Trigger>
      <Popover.Portal>
        <Popover.Content
          side="top"
          align="end"
          sideOffset={10}
          collisionPadding={8}
          aria-label="How it is run"
          className="z-40 w-[21rem] border-[1.5px] border-ink bg-sheet p-4 shadow-dialog"
        >
          <h3 className="text-l font-[620]">How it is run</h3>
          <p className="mb-3 text-s text-ink-3">
            {formatCount(totalWeeks(options))} weeks, {formatCount(options.replications)} replications of{" "}
            {formatCount(options.weeks)} weeks each. Equal settings and an equal seed phrase give equal figures.
          </p>
          <div className="grid gap-2.5">
            {fields.map(({ label, unit, hint, show, read, range }) => (
              <div key={label} className="grid grid-cols-[9rem_1fr] items-start gap-3">
                <StripField
                  label={unit === "%" ? `${label}, %` : label}
                  value={show(options)}
                  isReadOnly={!mayEdit}
                  inputMode="numeric"
                  read={(text) => {
                    const changed = read(text);
                    const next = ScenarioOptions.safeParse({ ...options, ...changed });
                    if (!changed || !next.success) return range;
                    if (!isRunSizeAllowed(next.data))
                      return "At most 1\u202f000\u202f000 weeks in all, warm-up included.";
                    setOptions(changed);
                    return null;
                  }}
                />
                <p className="pt-5 text-s text-ink-3">{hint}</p>
              </div>
            ))}
          </div>
        </Popover.Content>
      </Popover.Portal>
    </Popover.Root>
  );
}
