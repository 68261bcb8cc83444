import { act, fireEvent, screen, waitFor, within } from "@testing-library/react";
import userEvent from "@testing-library/user-event";
import { describe, expect, it } from "vitest";
import { listWeekChoices } from "@/components/readings/bad-week-choices";
import { traceRows } from "@/components/readings/bad-week-rows";
import { explainWeek } from "@/components/readings/bad-week-sentence";
import { sayEvent } from "@/components/readings/bad-week-words";
import { ReadingsView } from "@/components/readings/readings-view";
import type { SimulationClient } from "@/lib/client/simulation-client";
import { setField } from "@/lib/line/edits";
import { exampleLine } from "@/lib/line/example";
import type { Line, Station, Supplier } from "@/lib/line/types";
import { simulate, type RunOptions } from "@/lib/simulation";
import { traceWeek } from "@/lib/simulation/trace";
import { buffer, customer, line, purchased, station, supplier } from "@/tests/helpers/small-lines";
import {
  createClient,
  createDraft,
  createRoutes,
  createScenario,
  exampleDocument,
  renderLine,
  serve,
  smallOptions,
} from "./line-harness";
import { createProbe } from "./line-probe";

const { probe, Probe } = createProbe();
const options = { ...smallOptions, replications: 12, weeks: 20, warmupWeeks: 4 };

type Trace = SimulationClient["traceWeek"];
const traceHere: Trace = async (own, runOptions, replication, week) => traceWeek(own, runOptions, replication, week);

/** Opens the readings of the drive unit line after a run, with the given way to trace. */
async function openReadings(trace: Trace) {
  const { client } = createClient();
  const scenario = createScenario({ draft: createDraft({ options }) });
  serve(createRoutes("engineer", [scenario]));
  renderLine({
    client: { ...client, traceWeek: trace },
    scenarios: [scenario],
    children: (
      <>
        <Probe />
        <ReadingsView />
      </>
    ),
  });
  act(() => probe.line.runFull());
  await waitFor(() => expect(probe.line.full?.isCurrent).toBe(true));
  const section = screen.getByText("Why a week went wrong").closest("section")!;
  return { section: within(section), result: probe.line.full!.result };
}

/** As the queries read text: any white space as one blank. */
const plain = (text: string) => text.replace(/\s+/g, " ");
const openButton = { name: "Open this week" };

describe("BadWeek", () => {
  it("opens the worst week: a sentence, levels, stations and events", async () => {
    const asked: unknown[] = [];
    const { section, result } = await openReadings((...args) => {
      asked.push(args.slice(1, 4));
      return traceHere(...args);
    });
    const [worst] = listWeekChoices(result, 0.1);
    expect(section.getByRole("combobox", { name: `Week: ${worst.label}` })).toBeTruthy();
    fireEvent.click(section.getByRole("button", openButton));
    const trace = traceWeek(exampleDocument as Line, result.options, worst.replication, worst.week);
    const why = explainWeek(trace, exampleDocument as Line);
    expect(await section.findByText(plain(why.sentence))).toBeTruthy();
    expect(asked).toEqual([[result.options, worst.replication, worst.week]]);
    expect(section.queryByRole("button", openButton)).toBeNull();
    expect(section.getAllByRole("img", { name: /^Level of .*: in this week / }).length).toBeLessThanOrEqual(4);
    for (const { id } of trace.stations) {
      const { name } = exampleDocument.nodes.find((node) => node.id === id)!;
      expect(section.getByRole("img", { name: new RegExp(`^${name} in this week: working`) })).toBeTruthy();
    }
    const user = userEvent.setup();
    await user.click(section.getByRole("button", { name: `Show all ${trace.buffers.length} buffers` }));
    expect(section.getAllByRole("img", { name: /^Level of / })).toHaveLength(trace.buffers.length);
    await user.click(section.getByRole("radio", { name: "All" }));
    const said = section.getAllByRole("listitem").map(({ textContent }) => textContent);
    for (const event of trace.events) {
      const words = sayEvent(trace, exampleDocument as Line, event);
      expect(said.some((text) => text?.endsWith(words))).toBe(true);
    }
  });

  it("opens another week when it is picked", async () => {
    const { section, result } = await openReadings(traceHere);
    fireEvent.click(section.getByRole("button", openButton));
    await section.findByText("In order of events");
    const choices = listWeekChoices(result, 0.1);
    const user = userEvent.setup();
    await user.click(section.getByRole("combobox"));
    await user.click(await screen.findByRole("option", { name: new RegExp(`^${choices[3].label}`) }));
    expect(section.getByText(/^Shown is week/)).toBeTruthy();
    await user.click(section.getByRole("button", openButton));
    const { replication, week } = choices[3];
    const trace = traceWeek(exampleDocument as Line, result.options, replication, week);
    expect(await section.findByText(plain(explainWeek(trace, exampleDocument as Line).sentence))).toBeTruthy();
    expect(section.queryByText(/^Shown is week/)).toBeNull();
  });

  it("can be cancelled, and says what failed", async () => {
    let answer: Trace = (_, __, ___, ____, { signal } = {}) =>
      new Promise((_resolve, reject) =>
        signal?.addEventListener("abort", () => reject(new DOMException("x", "AbortError"))),
      );
    const { section } = await openReadings((...args) => answer(...args));
    fireEvent.click(section.getByRole("button", openButton));
    expect((await section.findByRole("status")).textContent).toMatch(/^Running up to week \d+ of replication \d+/);
    fireEvent.click(section.getByRole("button", { name: "Cancel" }));
    expect(section.queryByRole("status")).toBeNull();
    answer = () => Promise.reject(new Error("a worker stopped"));
    fireEvent.click(section.getByRole("button", openButton));
    expect(await section.findByText("The week could not be opened: a worker stopped")).toBeTruthy();
    expect(section.getByRole("button", openButton)).toBeTruthy();
    // The same week of another seed stands for what another engine would make of it.
    answer = (own, runOptions, ...rest) => traceHere(own, { ...runOptions, seed: "other" }, ...rest);
    fireEvent.click(section.getByRole("button", openButton));
    expect(await section.findByText(/it came out at .*, not at .* as in the run/)).toBeTruthy();
    expect(section.queryByText("In order of events")).toBeNull();
  });

  it("does not open weeks of a run whose line has changed since", async () => {
    const { section } = await openReadings(traceHere);
    fireEvent.click(section.getByRole("button", openButton));
    await section.findByText("In order of events");
    act(() => probe.line.apply(setField("stator", "size", 100)));
    expect(section.getByText(/^The line has changed since this week was opened/)).toBeTruthy();
    expect(section.getByText("In order of events")).toBeTruthy();
    act(() => probe.line.undo());
    await waitFor(() => expect(section.queryByText(/^The line has changed/)).toBeNull());
  });
});

describe("listWeekChoices", () => {
  it("lists the worst weeks, then the one at the percentile, by replication and week", () => {
    const result = simulate(exampleLine, { ...options, firstReplication: 5 });
    const choices = listWeekChoices(result, 0.1);
    expect(choices).toHaveLength(21);
    const sorted = [...result.fillRates].sort((a, b) => a - b);
    expect(choices.slice(0, 20).map(({ rate }) => rate)).toEqual(sorted.slice(0, 20));
    expect(choices[20]).toMatchObject({ rate: sorted[24], hint: "P10" });
    for (const { replication, week, rate } of choices)
      expect(result.fillRates[(replication - 5) * options.weeks + week]).toBe(rate);
    const few = listWeekChoices({ ...result, fillRates: Float32Array.of(NaN, 0.5, 1, 0.25) }, 0.25);
    expect(few.map(({ rate, hint }) => [rate, hint])).toEqual([
      [0.25, "P25"],
      [0.5, undefined],
      [1, undefined],
    ]);
  });
});

/** Two days of four hours; one board an hour. */
function plant(source: Partial<Supplier> = {}, maker: Partial<Station> = {}): Line {
  const rule = { rule: "orderUpTo" as const, reviewDays: 2, lot: null, minimumOrder: 0, orderMultiple: 1 };
  return line(
    [
      supplier("sup", 2, { name: "Board maker", ...source }),
      purchased("boards", 6, { name: "Controller boards", replenishment: rule }),
      station("final", { name: "Final assembly", ...maker }),
      buffer("units", 1000, { name: "Drive units" }),
      customer("north", { type: "fixed", value: 8 }, { name: "Bike maker North", unmet: "lost" }),
    ],
    [
      ["sup", "boards"],
      ["boards", "final"],
      ["final", "units"],
      ["units", "north"],
    ],
    { calendar: { tickMinutes: 60, hoursPerDay: 4, daysPerWeek: 2, weeksPerYear: 48 } },
  );
}
const short: RunOptions = { seed: "larkfield", replications: 1, weeks: 6, warmupWeeks: 0, targetFillRate: 0.9 };
const explain = (own: Line, week: number) => plain(explainWeek(traceWeek(own, short, 0, week), own).sentence);
const late = { lateness: { type: "fixed", value: 1 }, onTimeShare: 0 } as const;

describe("explainWeek", () => {
  it("names the buffer, when it ran dry and the late delivery", () => {
    expect(explain(plant(late), 2)).toBe(
      "In week 3 of replication 1 we shipped 37.5 % of what was due: Controller boards ran dry on Tuesday 01:00 two weeks before and stayed so, in all 15.0 h, because the delivery due on Monday came 1 day late.",
    );
  });

  it("says that a delivery has not come", () => {
    expect(explain(plant({ ...late, lateness: { type: "fixed", value: 9 } }), 2)).toContain(
      "because the delivery due on Monday had not come by the week’s end, planned 9 days late.",
    );
  });

  it("puts it on the size where nothing was late", () => {
    expect(explain(plant(), 1)).toContain(
      "Controller boards ran dry on Tuesday 01:00 of the week before for 11.0 h, although no delivery was late: a size of 6 units was too small.",
    );
  });

  it("names refused lots, disruptions and stoppages", () => {
    expect(explain(plant({ lotRejectRate: 1 - 1e-9 }), 2)).toContain(
      "because a delivery of 6 units on Monday was refused.",
    );
    expect(explain(plant({ disruption: { meanDaysBetween: 1, meanDaysLasting: 30_000 } }), 2)).toContain(
      "because of Board maker, disrupted from Monday two weeks before.",
    );
    const stoppages = { pattern: "upDown", meanUpHours: 1, meanDownHours: 3, downCv: 0, clock: "always" } as const;
    expect(explain(plant({}, { stoppages }), 0)).toBe(
      "In week 1 of replication 1 we shipped 25.0 % of what was due: Final assembly was stopped for 6.0 h.",
    );
  });

  it("says so when nothing was short", () => {
    const own = plant();
    const calm = {
      ...own,
      nodes: own.nodes.map((node) =>
        node.kind === "customer" ? { ...node, weeklyDemand: { type: "fixed" as const, value: 2 } } : node,
      ),
    };
    expect(explain(calm, 0)).toBe("In week 1 of replication 1 all that was due shipped on time.");
    const fast = plant({}, { cycleMinutes: 120 });
    expect(explain(fast, 0)).toContain("so more was due than the line makes in a week");
  });

  it("says first what was owed from before", () => {
    const own = plant(late);
    const owing = {
      ...own,
      nodes: own.nodes.map((node) => (node.kind === "customer" ? { ...node, unmet: "backorder" as const } : node)),
    };
    expect(explain(owing, 2)).toContain(
      "10 units owed from earlier weeks went out first. The most hours of these weeks",
    );
  });
});

describe("traceRows", () => {
  it("has a row for each tick", () => {
    const own = plant(late);
    const rows = traceRows(traceWeek(own, short, 0, 2), own);
    expect(rows).toHaveLength(25);
    expect(rows[0]).toEqual(["week", "time", "Controller boards", "Drive units", "Final assembly"]);
    expect(rows[7]).toEqual(["two weeks before", "Tuesday 02:00", 0, 0, "short of parts"]);
    expect(rows[24]).toEqual(["week 3", "Tuesday 03:00", 2, 1, "working"]);
  });
});
