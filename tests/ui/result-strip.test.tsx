import { act, screen, waitFor, within } from "@testing-library/react";
import userEvent from "@testing-library/user-event";
import { describe, expect, it } from "vitest";
import { ResultStrip } from "@/components/line/result-strip";

import { simulate, type RunOptions } from "@/lib/simulation";
import type { Line } from "@/lib/line/types";
import {
  createClient,
  createRoutes,
  createScenario,
  exampleDocument,
  renderLine,
  serve,
  smallOptions,
} from "./line-harness";
import { createProbe } from "./line-probe";

const { probe, Probe } = createProbe(<ResultStrip />);

const heldFull = () => createClient(({ priority }) => priority !== "live");
const held = () => createClient(() => true);
const strip = () => screen.getByRole("region", { name: "Result" });
const percentText = (value: number) => `${(value * 100).toFixed(1)}\u202f%`;

describe("ResultStrip", () => {
  it("says that nothing was run yet while the first reading is taken", () => {
    serve(createRoutes("engineer", [createScenario()]));
    renderLine({ client: held().client, children: <Probe /> });
    expect(strip()).toHaveTextContent("Not run yet.");
    expect(strip()).toHaveTextContent("Taking a first reading");
    expect(screen.getByRole("button", { name: /Run 12 weeks/ })).toBeEnabled();
  });

  it("reads the live run as about, and says that the full one is missing", async () => {
    serve(createRoutes("engineer", [createScenario()]));
    renderLine({ client: heldFull().client, children: <Probe /> });
    await waitFor(() => expect(strip()).toHaveTextContent(/at least about/));
    expect(strip()).toHaveTextContent("live reading, 12 weeks");
    expect(strip()).toHaveTextContent("Not run in full yet.");
  });

  it("puts the sentence of the full run first, then what an edit does to it", async () => {
    serve(createRoutes("engineer", [createScenario()]));
    renderLine({ children: <Probe /> });
    act(() => probe.line.runFull());
    await waitFor(() => expect(probe.line.full?.isCurrent).toBe(true));
    const { p10 } = probe.line.full!.result.summary;
    expect(strip()).toHaveTextContent(`In 9 of 10 weeks we ship at least ${percentText(p10.value)}`, {
      normalizeWhitespace: false,
    });
    expect(screen.getByRole("button", { name: /Run again/ })).toBeInTheDocument();
    act(() => probe.line.setOptions({ seed: "another" }));
    expect(strip()).toHaveTextContent("Reading your edit");
    await waitFor(() => expect(strip()).toHaveTextContent(/With your edit, about/));
    expect(strip()).toHaveTextContent(/if kept/);
  });

  it("shows how far a run is, with what it found so far, and cancels it", async () => {
    serve(createRoutes("engineer", [createScenario()]));
    const { client, pending } = heldFull();
    const user = userEvent.setup();
    renderLine({ client, children: <Probe /> });
    await user.click(screen.getByRole("button", { name: /Run 12 weeks/ }));
    expect(strip()).toHaveTextContent("So far too few weeks to read.");
    const { acceptedRisk: _, ...options } = smallOptions;
    const partial = simulate(exampleDocument as Line, { ...options, replications: 2 } satisfies RunOptions);
    act(() => pending[0].hooks.onProgress?.({ replications: 2, total: 4, partial }));
    expect(screen.getByRole("progressbar", { name: "Weeks simulated" })).toHaveAttribute("aria-valuenow", "50");
    expect(strip()).toHaveTextContent(/So far, in 9 of 10 weeks/);
    expect(strip()).toHaveTextContent("6 of 12 weeks");
    await user.click(screen.getByRole("button", { name: /Cancel run/ }));
    expect(screen.queryByRole("progressbar")).toBeNull();
  });

  it("names the first fault, leads to its node, and cannot be run", async () => {
    serve(createRoutes("engineer", [createScenario()]));
    const user = userEvent.setup();
    renderLine({ children: <Probe /> });
    const station = exampleDocument.nodes.find(({ kind }) => kind === "station")!;
    act(() =>
      probe.line.apply({
        label: "Clear the cycle",
        apply: (state) => ({
          ...state,
          document: {
            ...state.document,
            nodes: state.document.nodes.map((node) =>
              node.id === station.id && node.kind === "station" ? { ...node, cycleMinutes: null } : node,
            ),
          },
        }),
      }),
    );
    expect(strip()).toHaveTextContent("Cannot run: 1 fault.");
    expect(screen.getByRole("button", { name: /Run 12 weeks/ })).toBeDisabled();
    await user.click(within(strip()).getByRole("button", { name: `${station.name}: ${probe.line.faults[0].message}` }));
    expect(probe.line.selection).toEqual([station.id]);
  });

  it("says what stopped a run, and lets it be started again", async () => {
    serve(createRoutes("engineer", [createScenario()]));
    const { client, pending } = heldFull();
    renderLine({ client, children: <Probe /> });
    await waitFor(() => expect(probe.line.live).not.toBeNull());
    act(() => probe.line.runFull());
    await act(async () => pending[0].fail(new Error("The run stopped because a worker of this page failed.")));
    expect(strip()).toHaveTextContent("The run stopped because a worker of this page failed.");
    expect(screen.getByRole("button", { name: /Run 12 weeks/ })).toBeEnabled();
  });

  it("rounds weeks up to whole replications and refuses what is no number", async () => {
    serve(createRoutes("engineer", [createScenario()]));
    const user = userEvent.setup();
    renderLine({ client: held().client, children: <Probe /> });
    const weeks = screen.getByLabelText("Weeks");
    await user.clear(weeks);
    await user.type(weeks, "13{Enter}");
    expect(probe.line.options).toMatchObject({ replications: 5, weeks: 3 });
    expect(weeks).toHaveValue("15");
    await user.clear(weeks);
    await user.type(weeks, "many{Enter}");
    expect(screen.getByRole("alert")).toHaveTextContent("Weeks are a whole number of at least 1.");
    await user.type(weeks, "{Escape}");
    expect(weeks).toHaveValue("15");
  });

  it("lets a manager run, but change nothing", async () => {
    serve(createRoutes("manager", [createScenario()]));
    renderLine({ role: "manager", client: held().client, children: <Probe /> });
    expect(screen.getByLabelText("Weeks")).toHaveAttribute("readonly");
    expect(screen.getByLabelText("Seed phrase")).toHaveAttribute("readonly");
    expect(screen.getByRole("button", { name: /Run 12 weeks/ })).toBeEnabled();
  });
});
