"use client";

import { Progress } from "@/components/ui/progress";
import { useLine } from "@/lib/client/line-state";
import { formatChosenPercent, formatPercent } from "@/lib/format";
import { engineVersion } from "@/lib/simulation/engine";
import { describeAbout, idsOf } from "./fault-text";
import { figuresOf, type StripReading } from "./strip-reading";
import { announce, describeFaults, describePoints, describeWeeks, sayFigures } from "./strip-text";

/** The sentence first: what is shipped in so many weeks of ten, and what the last edit does to it. */
export function ResultStripHeadline({ reading }: { reading: StripReading }) {
  const line = useLine();
  return (
    <div className="min-w-0 px-3 pt-2 pb-1.5 sm:px-5 lg:pt-[11px] lg:pb-2.5">
      <Sentence reading={reading} />
      <p role="status" className="sr-only">
        {announce(line)}
      </p>
    </div>
  );
}

function Sentence({ reading: { settled, live, edited } }: { reading: StripReading }) {
  const { scenario, progress, faults, isLiveRunning, options, full } = useLine();
  const risk = `accepted risk ${formatChosenPercent(options.acceptedRisk)}`;
  if (progress) return <Running risk={risk} />;
  if (settled) {
    const points = describePoints(settled.atRisk);
    const isOld = full !== null && full.engine !== engineVersion;
    return (
      <>
        <Caption
          parts={[
            scenario.name,
            settled.of === "before" && "last full run",
            isOld && `made by engine ${full.engine}`,
            risk,
            points && `${points} points`,
          ]}
        />
        <Say {...sayFigures(settled)} />
        <Second edited={edited} live={live} source={settled.of} />
      </>
    );
  }
  if (live && faults.length === 0) {
    const points = describePoints(live.atRisk);
    return (
      <>
        <Caption
          parts={[scenario.name, `live reading, ${describeWeeks(live.weeks)}`, risk, points && `${points} points`]}
        />
        <Say {...sayFigures(live, true)} isLive />
        <Second edited={null} live={null} source={null} />
      </>
    );
  }
  return (
    <>
      <Caption parts={[scenario.name, risk]} />
      <p className={say}>{faults.length > 0 ? "This line cannot run yet." : "Not run yet."}</p>
      {isLiveRunning ? <Pulse text="Taking a first reading" /> : <Second edited={null} live={null} source={null} />}
    </>
  );
}

function Running({ risk }: { risk: string }) {
  const { progress, options, scenario } = useLine();
  if (!progress) return null;
  const { partial, doneWeeks, totalWeeks } = progress;
  const figures = partial && figuresOf({ result: partial }, options.acceptedRisk);
  const said = figures && sayFigures(figures);
  return (
    <>
      <Caption parts={[`Running: ${scenario.name}`, risk]} />
      <p className={say}>
        {said && figures ? (
          <>
            So far, {said.before.charAt(0).toLowerCase() + said.before.slice(1)}{" "}
            <b className="font-bold">{said.value}</b> <span className="text-l">{describePoints(figures.atRisk)}</span>
          </>
        ) : (
          "So far too few weeks to read."
        )}
      </p>
      <div className="mt-2">
        <Progress share={doneWeeks / totalWeeks} label="Weeks simulated" />
      </div>
    </>
  );
}

type Source = NonNullable<StripReading["settled"]>["of"];

/** The line below the sentence: trouble first, then what the edit does. */
function Second({ edited, live, source }: Pick<StripReading, "edited" | "live"> & { source: Source | null }) {
  const { document, faults, runError, isLiveRunning, select } = useLine();
  if (runError) return <p className="mt-1 border-l-[3px] border-silt-600 pl-2 text-m text-silt-700">{runError}</p>;
  if (faults.length > 0) {
    const ids = idsOf(faults[0]);
    const text = describeAbout(faults[0], document);
    return (
      <p className="mt-1 flex min-w-0 gap-1.5 text-m text-silt-700">
        <b className="font-[620] whitespace-nowrap">Cannot run: {describeFaults(faults.length)}.</b>
        {ids.length > 0 ? (
          <button type="button" className="truncate text-left underline underline-offset-3" onClick={() => select(ids)}>
            {text}
          </button>
        ) : (
          <span className="truncate">{text}</span>
        )}
      </p>
    );
  }
  if (source === "now") return null;
  if (source === null) return <p className="mt-1 text-m text-ink-2">Not run in full yet.</p>;
  const now = edited ?? live;
  if (!now) return isLiveRunning ? <Pulse text="Reading your edit" /> : null;
  if (!edited && isLiveRunning) return <Pulse text="Reading your edit" />;
  return (
    <p className="mt-[3px] flex flex-wrap items-baseline gap-x-1.5 text-[15px]/5">
      <Ring isMoving={isLiveRunning} />
      <b className="font-bold text-water-700">
        {edited ? "With your edit" : "As it is on screen"}, about {formatPercent(now.atRisk.value, 1)}
      </b>
      <span>{describePoints(now.atRisk)}</span>
      <span className="ml-0.5 text-s text-ink-3">
        {isLiveRunning ? "reading again" : `live reading, ${describeWeeks(now.weeks)}`}
      </span>
    </p>
  );
}

const say = "text-l font-[330] tracking-[-.015em] text-balance lg:text-[21px]/7 min-[86.25rem]:text-2xl";
/** A live reading says one word more and is set smaller, so that it stays on one line. */
const sayLive = "text-l font-[330] tracking-[-.015em] text-balance lg:text-xl min-[86.25rem]:text-[21px]/7";

type SayProps = { before: string; value: string; after: string; isLive?: boolean };

function Say({ before, value, after, isLive = false }: SayProps) {
  return (
    <p className={isLive ? sayLive : say}>
      {before} <b className="font-bold whitespace-nowrap">{value}</b> {after}
    </p>
  );
}

function Caption({ parts }: { parts: (string | null | false)[] }) {
  return <p className="mb-[3px] truncate text-s text-ink-2">{parts.filter(Boolean).join(" · ")}</p>;
}

function Pulse({ text }: { text: string }) {
  return (
    <p className="mt-[3px] flex items-baseline gap-1.5 text-m text-ink-2">
      <Ring isMoving />
      {text}
    </p>
  );
}

function Ring({ isMoving }: { isMoving: boolean }) {
  return (
    <span
      aria-hidden
      className={`size-[9px] shrink-0 self-center rounded-full border-2 border-water-600 ${isMoving ? "motion-safe:animate-pulse" : ""}`}
    />
  );
}
