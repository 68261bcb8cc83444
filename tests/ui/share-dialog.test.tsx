import { act, fireEvent, screen, waitFor, within } from "@testing-library/react";
import { expect, it, vi } from "vitest";
import { ShareActionsContext, type ShareActions } from "@/components/share/share-actions";
import { ShareDialog } from "@/components/share/share-dialog";
import { setField } from "@/lib/line/edits";
import type { ReadingSummary, ShareSummary } from "@/lib/schema/lines";
import { createActions, createRoutes, createScenario, renderLine, type Route, serve } from "./line-harness";
import { createProbe } from "./line-probe";

const { probe, Probe } = createProbe();
const share = (changed: Partial<ShareSummary>): ShareSummary =>
  ({
    id: "x-1",
    kind: "version",
    title: "As run today, version 1",
    createdAt: "2026-11-24T14:02:00Z",
    createdBy: "Ines Kallweit",
    expiresAt: "2126-12-24T14:02:00Z",
    revokedAt: null,
    nViews: 3,
    ...changed,
  }) as ShareSummary;

const read = () => {
  const scenario = createScenario();
  return { ...scenario, kept: { ...scenario.kept, reading: { resultId: "r-9" } as ReadingSummary } };
};

type Settings = {
  scenario?: ReturnType<typeof createScenario>;
  actions?: Partial<ShareActions>;
  shares?: Route;
  comparison?: { versionId: string; name: string }[];
};

function open({ scenario = read(), actions, shares = () => Response.json([]), comparison }: Settings = {}) {
  const created = vi.fn<ShareActions["createShare"]>(async () => ({
    ok: true,
    value: { id: "x-9", url: "/s/secret" },
  }));
  const revoked = vi.fn<ShareActions["revokeShare"]>(async () => ({ ok: true, value: null }));
  const line = createActions();
  serve({ ...createRoutes("engineer", [scenario]), "GET /api/lines/l-1/shares": shares });
  renderLine({
    scenarios: [scenario],
    actions: line,
    children: (
      <ShareActionsContext value={{ createShare: created, revokeShare: revoked, ...actions }}>
        <Probe />
        <ShareDialog isOpen onClose={() => undefined} comparison={comparison} />
      </ShareActionsContext>
    ),
  });
  return { created, revoked, line };
}
const button = (name: string) => screen.getByRole<HTMLButtonElement>("button", { name });

it("makes a link of the kept version for thirty days and shows its address once", async () => {
  const { created } = open();
  expect(screen.getByText(/The link shows As run today, version 1, as kept/)).toBeTruthy();
  fireEvent.click(button("Make a link"));
  await screen.findByText(/Its address is shown only now/);
  expect(created).toHaveBeenCalledExactlyOnceWith({ kind: "version", versionIds: ["s-base-v1"], days: 30 });
  expect(screen.getByLabelText<HTMLInputElement>("Address of the link").value).toMatch(/^https?:\/\/.+\/s\/secret$/);
});

it("refuses a span it cannot grant before asking the server", () => {
  const { created } = open();
  for (const days of ["0", "366", ""]) {
    fireEvent.change(screen.getByLabelText("Works for"), { target: { value: days } });
    expect(screen.getByText("1 to 365 days.")).toBeTruthy();
    expect(button("Make a link").disabled).toBe(true);
  }
  fireEvent.click(button("Make a link"));
  expect(created).not.toHaveBeenCalled();
});

it("says what the server said when it refuses, and can be tried again", async () => {
  const createShare = vi
    .fn<ShareActions["createShare"]>()
    .mockResolvedValueOnce({ ok: false, code: "forbidden", message: "A viewer cannot share." })
    .mockResolvedValueOnce({ ok: true, value: { id: "x", url: "/s/later" } });
  open({ actions: { createShare } });
  fireEvent.click(button("Make a link"));
  expect(await screen.findByText("A viewer cannot share.")).toBeTruthy();
  fireEvent.click(button("Make a link"));
  expect(await screen.findByLabelText("Address of the link")).toBeTruthy();
});

it("says that edits not kept will not be shown", () => {
  open();
  act(() => probe.line.apply(setField("stator", "size", 100)));
  expect(screen.getByText(/^1 edit of the draft is not kept/)).toBeTruthy();
});

it("leads through a full run and keeping where there is nothing to share", async () => {
  const { line } = open({ scenario: createScenario() });
  expect(screen.queryByRole("button", { name: "Make a link" })).toBeNull();
  expect(button("2. Keep the result").disabled).toBe(true);
  fireEvent.click(button("1. Run the full weeks"));
  await waitFor(() => expect(button("2. Keep the result").disabled).toBe(false));
  fireEvent.click(button("2. Keep the result"));
  await waitFor(() => expect(line.keepVersion).toHaveBeenCalledOnce());
});

it("makes one link of several scenarios side by side", async () => {
  const comparison = [
    { versionId: "v-a", name: "As run today" },
    { versionId: "v-b", name: "More rotors" },
  ];
  const { created } = open({ comparison });
  expect(screen.getByText(/shows As run today, More rotors side by side/)).toBeTruthy();
  fireEvent.click(button("Make a link"));
  await screen.findByLabelText("Address of the link");
  expect(created).toHaveBeenCalledExactlyOnceWith({ kind: "comparison", versionIds: ["v-a", "v-b"], days: 30 });
});

it("lists links with their state and revokes one when that is confirmed", async () => {
  let all = [
    share({}),
    share({ id: "x-2", title: "Old", expiresAt: "2020-01-01T00:00:00Z" }),
    share({ id: "x-3", title: "Gone", revokedAt: "2026-11-25T00:00:00Z" }),
  ];
  const revokeShare = vi.fn<ShareActions["revokeShare"]>(async ({ shareId }) => {
    all = all.map((one) => (one.id === shareId ? { ...one, revokedAt: "2026-11-26T00:00:00Z" } : one));
    return { ok: true, value: null };
  });
  open({ shares: () => Response.json(all), actions: { revokeShare } });
  const row = (title: string) => screen.getByText(title).closest("li")!;
  await screen.findByText("Gone");
  expect(row("Gone").textContent).toContain("revoked");
  expect(within(row("Gone")).queryByRole("button", { name: "Revoke" })).toBeNull();
  expect(row("Old").textContent).toContain("expired");
  fireEvent.click(within(row("As run today, version 1")).getByRole("button", { name: "Revoke" }));
  fireEvent.click(button("Keep it"));
  expect(revokeShare).not.toHaveBeenCalled();
  fireEvent.click(within(row("As run today, version 1")).getByRole("button", { name: "Revoke" }));
  fireEvent.click(button("Revoke link"));
  await waitFor(() => expect(row("As run today, version 1").textContent).toContain("revoked"));
  expect(revokeShare).toHaveBeenCalledExactlyOnceWith({ shareId: "x-1" });
});

it("says when the links cannot be read", async () => {
  open({ shares: () => Response.json({ code: "server", message: "The server is restarting." }, { status: 503 }) });
  expect(await screen.findByText("The links could not be read: The server is restarting.")).toBeTruthy();
});
