import { act, screen, waitFor } from "@testing-library/react";
import userEvent from "@testing-library/user-event";
import { describe, expect, it } from "vitest";
import { useLine } from "@/lib/client/line-state";
import { encodeResult, simulate } from "@/lib/simulation";
import type { Line } from "@/lib/line/types";
import { address } from "@/tests/helpers/navigation";
import {
  createActions,
  createClient,
  createDraft,
  createRoutes,
  createScenario,
  exampleDocument,
  rename,
  renderLine,
  serve,
  smallOptions,
} from "./line-harness";
import { createProbe } from "./line-probe";

const { probe, Probe } = createProbe(<Shown />);
function Shown() {
  return (
    <>
      <output>{useLine().document.name}</output>
      <input aria-label="Some field" />
    </>
  );
}

const pause = (ms: number) => act(() => new Promise((resolve) => setTimeout(resolve, ms)));

describe("LineProvider", () => {
  it("reads the document: faults, digest, what is not kept", async () => {
    serve(createRoutes("engineer", [createScenario()]));
    renderLine({ children: <Probe /> });
    expect(probe.line).toMatchObject({ faults: [], nEditsNotKept: 0, canUndo: false, mayEdit: true });
    expect(probe.line.digest).toMatch(/^[0-9a-f]{64}$/);
    act(() =>
      probe.line.apply({
        label: "Empty it",
        apply: (state) => ({ ...state, document: { ...state.document, nodes: [], links: [] } }),
      }),
    );
    expect(probe.line.parsed).toBeNull();
    expect(probe.line.faults.length).toBeGreaterThan(0);
    expect(probe.line.nEditsNotKept).toBeGreaterThan(0);
  });

  it("undoes and redoes with the keys, but not while typing in a field", async () => {
    serve(createRoutes("engineer", [createScenario()]));
    const user = userEvent.setup();
    renderLine({ children: <Probe /> });
    act(() => probe.line.apply(rename("Drive unit line, two shifts")));
    await user.click(screen.getByLabelText("Some field"));
    await user.keyboard("{Control>}z{/Control}");
    expect(probe.line.document.name).toBe("Drive unit line, two shifts");
    act(() => (document.activeElement as HTMLElement).blur());
    await user.keyboard("{Control>}z{/Control}");
    expect(probe.line).toMatchObject({
      canUndo: false,
      canRedo: true,
      redoLabel: "Rename to Drive unit line, two shifts",
    });
    expect(probe.line.document.name).toBe("Drive unit line");
    await user.keyboard("{Control>}y{/Control}");
    expect(probe.line.document.name).toBe("Drive unit line, two shifts");
  });

  it("saves an edit soon after it, and says when it was saved", async () => {
    const asked = serve(createRoutes("engineer", [createScenario()]));
    renderLine({ children: <Probe /> });
    act(() => probe.line.apply(rename("Edited")));
    expect(probe.line.saveState.status).toBe("waiting");
    await waitFor(() => expect(probe.line.saveState.status).toBe("saved"), { timeout: 3_000 });
    const saves = asked.filter(({ route }) => route.startsWith("PUT"));
    expect(saves).toHaveLength(1);
    expect(JSON.parse(String(saves[0].init?.body))).toMatchObject({ revision: 1, document: { name: "Edited" } });
  });

  it("warns of leaving only while something is unsaved, and sends it along", async () => {
    const asked = serve(createRoutes("engineer", [createScenario()]));
    renderLine({ children: <Probe /> });
    const leave = () => {
      const event = new Event("beforeunload", { cancelable: true });
      window.dispatchEvent(event);
      return event.defaultPrevented;
    };
    expect(leave()).toBe(false);
    act(() =>
      probe.line.apply({
        label: "Empty it",
        apply: (state) => ({ ...state, document: { ...state.document, nodes: [], links: [] } }),
      }),
    );
    expect(leave()).toBe(true);
    await act(async () => window.dispatchEvent(new Event("pagehide")));
    const [save] = asked.filter(({ route }) => route.startsWith("PUT"));
    expect(save.init?.keepalive).toBe(true);
    await waitFor(() => expect(leave()).toBe(false));
  });

  it("changes and saves nothing for a viewer, who may still run", async () => {
    const asked = serve(createRoutes("viewer", [createScenario()]));
    renderLine({ role: "viewer", children: <Probe /> });
    act(() => probe.line.apply(rename("Edited")));
    act(() => probe.line.runFull());
    await waitFor(() => expect(probe.line.full?.isCurrent).toBe(true));
    await pause(700);
    expect(probe.line.document.name).toBe("Drive unit line");
    expect(asked.filter(({ route }) => !route.startsWith("GET"))).toEqual([]);
  });

  it("saves before it keeps, and keeps that revision", async () => {
    const asked = serve(createRoutes("engineer", [createScenario()]));
    const actions = createActions();
    renderLine({ actions, children: <Probe /> });
    act(() => probe.line.apply(rename("Edited")));
    const kept = await act(() => probe.line.keep());
    expect(kept.ok).toBe(true);
    expect(asked.filter(({ route }) => route.startsWith("PUT"))).toHaveLength(1);
    expect(actions.keepVersion).toHaveBeenCalledWith({ scenarioId: "s-base", revision: 2 });
  });

  it("keeps nothing while the draft cannot be saved", async () => {
    serve({
      ...createRoutes("engineer", [createScenario()]),
      "PUT /api/scenarios/s-base/draft": () => Promise.reject(new TypeError("Failed to fetch")),
    });
    const actions = createActions();
    renderLine({ actions, children: <Probe /> });
    act(() => probe.line.apply(rename("Edited")));
    const kept = await act(() => probe.line.keep());
    expect(kept).toMatchObject({ ok: false, code: "conflict" });
    expect(actions.keepVersion).not.toHaveBeenCalled();
  });

  it("reverts to the kept version as one edit that can be undone", () => {
    const draft = createDraft({ document: { ...exampleDocument, name: "Edited" } });
    const scenario = createScenario({ draft });
    serve(createRoutes("engineer", [scenario]));
    renderLine({ scenarios: [scenario], children: <Probe /> });
    act(() => probe.line.revert());
    expect(probe.line).toMatchObject({ nEditsNotKept: 0, undoLabel: "Revert to version 1" });
    act(() => probe.line.undo());
    expect(probe.line.document.name).toBe("Edited");
  });

  it("takes a live reading after an edit, and none while a full run says the same", async () => {
    serve(createRoutes("engineer", [createScenario()]));
    renderLine({ children: <Probe /> });
    await waitFor(() => expect(probe.line.live).not.toBeNull());
    expect(probe.line.live?.digest).toBe(probe.line.digest);
    act(() => probe.line.runFull());
    await waitFor(() => expect(probe.line.full?.isCurrent).toBe(true));
    expect(probe.line.isLiveRunning).toBe(false);
    act(() => probe.line.setOptions({ seed: "another" }));
    expect(probe.line.full?.isCurrent).toBe(false);
    expect(probe.line.isLiveRunning).toBe(true);
    await waitFor(() => expect(probe.line.live?.options.seed).toBe("another"));
    act(() => probe.line.undo());
    expect(probe.line.full?.isCurrent).toBe(true);
  });

  it("selects nodes, links and notes, and lets go of what an undo takes away", () => {
    serve(createRoutes("engineer", [createScenario()]));
    renderLine({ children: <Probe /> });
    const note = {
      id: "note-1",
      x: 0,
      y: 0,
      text: "Ask for a second source",
      author: "Ines Kallweit",
      at: "2026-11-24T14:02:00Z",
    };
    act(() => probe.line.apply({ label: "Add a note", apply: (state) => ({ ...state, notes: [note] }) }));
    const [{ from, to }] = exampleDocument.links;
    act(() => probe.line.select([from, `${from}>${to}`, "note-1"]));
    expect(probe.line.selection).toEqual([from, `${from}>${to}`, "note-1"]);
    act(() => probe.line.undo());
    expect(probe.line.selection).toEqual([from, `${from}>${to}`]);
  });

  it("stores a full run with the scenario, and says so when that fails", async () => {
    const asked = serve({
      ...createRoutes("engineer", [createScenario()]),
      "POST /api/scenarios/s-base/results": () =>
        Response.json({ code: "too-large", message: "The result is larger than 4 MB." }, { status: 413 }),
    });
    renderLine({ children: <Probe /> });
    act(() => probe.line.runFull());
    await waitFor(() => expect(probe.line.runError).toMatch(/could not be stored: The result is larger than 4 MB/));
    expect(probe.line.full?.isCurrent).toBe(true);
    const [stored] = asked.filter(({ route }) => route.startsWith("POST"));
    expect(new Headers(stored.init?.headers).get("x-document-digest")).toBe(probe.line.digest);
    expect(stored.init?.body).toEqual(encodeResult(probe.line.full!.result));
  });

  it("cancels a run with Esc and starts it with R", async () => {
    serve(createRoutes("engineer", [createScenario()]));
    const { client, pending } = createClient(({ priority }) => priority !== "live");
    const user = userEvent.setup();
    renderLine({ client, children: <Probe /> });
    await user.keyboard("r");
    expect(probe.line.progress).toMatchObject({ doneWeeks: 0, totalWeeks: 12 });
    act(() => pending[0].hooks.onProgress?.({ replications: 2, total: 4, partial: null }));
    expect(probe.line.progress?.doneWeeks).toBe(6);
    await user.keyboard("{Escape}");
    expect(probe.line.progress).toBeNull();
    await pause(0);
    expect(probe.line).toMatchObject({ full: null, runError: null });
    await user.keyboard("r");
    await act(async () => pending[1].finish());
    await waitFor(() => expect(probe.line.full?.isCurrent).toBe(true));
  });

  it("says in words why a run failed", async () => {
    serve(createRoutes("engineer", [createScenario()]));
    const { client, pending } = createClient(({ priority }) => priority !== "live");
    renderLine({ client, children: <Probe /> });
    act(() => probe.line.runFull());
    await act(async () => pending[0].fail(new Error("The run stopped because a worker of this page failed.")));
    expect(probe.line).toMatchObject({
      progress: null,
      runError: "The run stopped because a worker of this page failed.",
    });
  });

  it("reads a stored result back", async () => {
    const { acceptedRisk: _, ...options } = smallOptions;
    const result = simulate(exampleDocument as Line, options);
    const { p05, p10, p50, risk, moneyTiedUp, costPerYear } = result.summary;
    const scenario = createScenario({
      draftReading: {
        ...{
          resultId: "r-1",
          ranAt: "2026-11-24T14:02:00Z",
          engine: result.engine,
          acceptedRisk: 0.1,
          weeks: 12,
          currency: "EUR",
        },
        ...{ atRisk: p10, p05, p10, p50, risk, moneyTiedUp, costPerYear: costPerYear.total },
      },
    });
    serve({
      ...createRoutes("viewer", [scenario]),
      "GET /api/results/r-1": () => new Response(encodeResult(result) as Uint8Array<ArrayBuffer>),
    });
    renderLine({ role: "viewer", scenarios: [scenario], children: <Probe /> });
    await waitFor(() => expect(probe.line.full?.isCurrent).toBe(true));
    expect(probe.line.full?.result).toEqual(result);
    expect(probe.line.live).toBeNull();
  });

  it("offers both drafts after a conflict", async () => {
    const theirs = createDraft({
      revision: 7,
      updatedBy: "Jonas Weber",
      document: { ...exampleDocument, name: "Theirs" },
    });
    serve({
      ...createRoutes("engineer", [createScenario()]),
      "PUT /api/scenarios/s-base/draft": () =>
        Response.json(
          { code: "stale", message: "Saved by Jonas Weber", current: theirs, differs: ["name"] },
          { status: 409 },
        ),
    });
    renderLine({ children: <Probe /> });
    act(() => probe.line.apply(rename("Mine")));
    await waitFor(() => expect(probe.line.saveState.status).toBe("stale"), { timeout: 3_000 });
    act(() => probe.line.resolveStale("theirs"));
    expect(probe.line).toMatchObject({ saveState: { status: "saved" }, canUndo: true });
    expect(probe.line.document.name).toBe("Theirs");
    act(() => probe.line.undo());
    expect(probe.line.document.name).toBe("Mine");
  });

  it("keeps each scenario's history while another is on screen", async () => {
    const other = createScenario({
      id: "s-2",
      name: "Second supplier",
      draft: createDraft({ document: { ...exampleDocument, name: "Other" } }),
    });
    const all = [createScenario(), other];
    serve(createRoutes("engineer", all));
    const view = renderLine({ scenarios: all, children: <Probe /> });
    act(() => probe.line.apply(rename("Edited")));
    act(() => probe.line.selectScenario("s-2"));
    expect(address.push).toHaveBeenCalledWith("/lines/l-1/sketch?scenario=s-2", { scroll: false });
    address.search = "scenario=s-2";
    view.rerender(view.again());
    await waitFor(() => expect(probe.line.document.name).toBe("Other"));
    expect(probe.line.canUndo).toBe(false);
    address.search = "";
    view.rerender(view.again());
    await waitFor(() => expect(probe.line.document.name).toBe("Edited"));
    expect(probe.line.undoLabel).toBe("Rename to Edited");
  });
});
