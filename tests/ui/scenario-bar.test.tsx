import { act, screen, waitFor, within } from "@testing-library/react";
import userEvent from "@testing-library/user-event";
import { describe, expect, it } from "vitest";
import { BarSlots, BarTools } from "@/components/line/bar-slot";
import { ScenarioBar } from "@/components/line/scenario-bar";
import { StaleDialog } from "@/components/line/stale-dialog";

import type { Role } from "@/lib/schema/roles";
import {
  createActions,
  createDraft,
  createRoutes,
  createScenario,
  exampleDocument,
  rename,
  renderLine,
  serve,
} from "./line-harness";
import { createProbe } from "./line-probe";

const { probe, Probe } = createProbe(
  <BarSlots>
    <ScenarioBar />
    <BarTools>
      <button type="button">A tool of the view</button>
    </BarTools>
    <StaleDialog />
  </BarSlots>,
);

function show(role: Role = "engineer") {
  serve(createRoutes(role, [createScenario()]));
  const actions = createActions();
  renderLine({ role, actions, children: <Probe /> });
  return { actions, user: userEvent.setup() };
}

describe("ScenarioBar", () => {
  it("counts the edits that are not kept, undoes them and says what it would undo", async () => {
    const { user } = show();
    expect(screen.queryByText(/not kept/)).toBeNull();
    act(() => probe.line.apply(rename("Two shifts")));
    expect(screen.getByText("1 edit not kept")).toBeInTheDocument();
    await user.click(screen.getByRole("button", { name: "Undo: Rename to Two shifts" }));
    expect(screen.queryByText(/not kept/)).toBeNull();
    expect(screen.getByRole("button", { name: "Redo: Rename to Two shifts" })).toBeEnabled();
    expect(screen.getByRole("button", { name: "Nothing to undo" })).toBeDisabled();
  });

  it("keeps the edits in the scenario after saving them", async () => {
    const { user, actions } = show();
    act(() => probe.line.apply(rename("Two shifts")));
    await user.click(screen.getByRole("button", { name: "Keep in As run today" }));
    await waitFor(() => expect(actions.keepVersion).toHaveBeenCalledWith({ scenarioId: "s-base", revision: 2 }));
  });

  it("shows why keeping failed", async () => {
    const { user, actions } = show();
    actions.keepVersion.mockResolvedValue({ ok: false, code: "stale", message: "Jonas Weber has saved this draft." });
    act(() => probe.line.apply(rename("Two shifts")));
    await user.click(screen.getByRole("button", { name: "Keep in As run today" }));
    expect(await screen.findByRole("alert")).toHaveTextContent("Jonas Weber has saved this draft.");
  });

  it("saves what is on screen as a scenario of its own, under a free name", async () => {
    const { user, actions } = show();
    act(() => probe.line.apply(rename("Two shifts")));
    await user.click(screen.getByRole("button", { name: "Save as scenario" }));
    const dialog = await screen.findByRole("dialog");
    expect(within(dialog).getByLabelText("Name")).toHaveValue("As run today, variant");
    await user.clear(within(dialog).getByLabelText("Name"));
    await user.click(within(dialog).getByRole("button", { name: "Save as scenario" }));
    expect(dialog).toHaveTextContent("A name has 1 to 120 characters.");
    await user.type(within(dialog).getByLabelText("Name"), "Larger boards stock");
    await user.click(within(dialog).getByRole("button", { name: "Save as scenario" }));
    await waitFor(() => expect(screen.queryByRole("dialog")).toBeNull());
    expect(actions.saveAsScenario.mock.calls[0][0]).toMatchObject({
      lineId: "l-1",
      fromScenarioId: "s-base",
      name: "Larger boards stock",
      document: { name: "Two shifts" },
    });
  });

  it("lists faults and selects what they are about", async () => {
    const { user } = show();
    const [link] = exampleDocument.links;
    act(() =>
      probe.line.apply({
        label: "Cut a link",
        apply: (state) => ({ ...state, document: { ...state.document, links: state.document.links.slice(1) } }),
      }),
    );
    await user.click(screen.getByRole("button", { name: /^Checked: \d+ faults?/ }));
    const fault = probe.line.faults.find(({ node }) => node === link.from || node === link.to)!;
    await user.click(await screen.findByRole("button", { name: (name) => name.endsWith(fault.message) }));
    expect(probe.line.selection).toEqual([fault.node]);
  });

  it("imports a file as one edit that can be undone", async () => {
    const { user } = show();
    const text = JSON.stringify({ ...exampleDocument, name: "Another plant" });
    await user.upload(
      screen.getByLabelText("Line file"),
      new File([text], "another.json", { type: "application/json" }),
    );
    await waitFor(() => expect(probe.line.document.name).toBe("Another plant"));
    expect(probe.line.undoLabel).toBe("Import another.json");
    act(() => probe.line.undo());
    expect(probe.line.document.name).toBe("Drive unit line");
  });

  it("says what is wrong with a file and changes nothing", async () => {
    const { user } = show();
    await user.upload(screen.getByLabelText("Line file"), new File(["{"], "broken.json", { type: "application/json" }));
    const dialog = await screen.findByRole("dialog");
    expect(dialog).toHaveTextContent("broken.json was not imported");
    expect(dialog).toHaveTextContent(/is not a JSON file.*Nothing was changed\./);
    expect(probe.line.canUndo).toBe(false);
  });

  it("has a place for the tools of the view", () => {
    show();
    expect(screen.getByRole("button", { name: "A tool of the view" })).toBeInTheDocument();
  });

  it("offers a viewer nothing that changes the line", () => {
    show("viewer");
    expect(screen.queryByRole("button", { name: /undo|redo|keep|save|revert/i })).toBeNull();
  });
});

describe("StaleDialog", () => {
  it("says who saved and what differs, and takes the choice", async () => {
    const theirs = createDraft({
      revision: 7,
      updatedBy: "Jonas Weber",
      document: { ...exampleDocument, name: "Theirs" },
    });
    serve({
      ...createRoutes("engineer", [createScenario()]),
      "PUT /api/scenarios/s-base/draft": () =>
        Response.json(
          { code: "stale", message: "", current: theirs, differs: ["Name: Theirs → Mine"] },
          { status: 409 },
        ),
    });
    const user = userEvent.setup();
    renderLine({ children: <Probe /> });
    act(() => probe.line.apply(rename("Mine")));
    const dialog = await screen.findByRole("dialog", {}, { timeout: 3_000 });
    expect(dialog).toHaveTextContent("Jonas Weber edited As run today meanwhile.");
    expect(dialog).toHaveTextContent("Name: Theirs → Mine");
    await user.keyboard("{Escape}");
    expect(screen.getByRole("dialog")).toBeInTheDocument();
    await user.click(screen.getByRole("button", { name: "Take theirs" }));
    expect(probe.line.document.name).toBe("Theirs");
    await waitFor(() => expect(screen.queryByRole("dialog")).toBeNull());
  });
});
