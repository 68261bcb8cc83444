import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import type { DraftAnswer, DraftToSave } from "@/lib/client/api";
import { createDraftSaver } from "@/lib/client/draft-saver";
import type { SaveState } from "@/lib/client/line-state";
import { AppError } from "@/lib/errors";
import { createDraft, createSnapshot, nameOf } from "./sample";

beforeEach(() => void vi.useFakeTimers());
afterEach(() => void vi.useRealTimers());

/** A server that answers when told to. */
function createServer(revision = 3) {
  const sent: { draft: DraftToSave; isLeaving: boolean; answer(result: DraftAnswer | Error): void }[] = [];
  const states: SaveState[] = [];
  const saver = createDraftSaver({
    revision,
    savedAt: "2026-11-24T14:00:00Z",
    put: (draft, isLeaving) =>
      new Promise((resolve, reject) =>
        sent.push({
          draft,
          isLeaving,
          answer: (result) => (result instanceof Error ? reject(result) : resolve(result)),
        }),
      ),
    onState: (state) => states.push(state),
  });
  const settle = () => vi.advanceTimersByTimeAsync(0);
  return { saver, sent, states, settle };
}

const saved = (revision: number): DraftAnswer => ({
  status: "saved",
  revision,
  updatedAt: "2026-11-24T14:02:00Z",
  updatedBy: "Ines Kallweit",
});

describe("createDraftSaver", () => {
  it("sends the last of several edits once, a moment after it", async () => {
    const { saver, sent, settle } = createServer();
    saver.queue(createSnapshot("a"));
    await vi.advanceTimersByTimeAsync(500);
    saver.queue(createSnapshot("b"));
    await vi.advanceTimersByTimeAsync(599);
    expect(sent).toHaveLength(0);
    await vi.advanceTimersByTimeAsync(1);
    expect(sent.map(({ draft }) => [nameOf(draft), draft.revision])).toEqual([["b", 3]]);
    sent[0].answer(saved(4));
    await settle();
    expect(saver.state).toEqual({ status: "saved", at: "2026-11-24T14:02:00Z" });
    expect(saver.revision).toBe(4);
  });

  it("has one save in flight, and then sends what came meanwhile on top of the new revision", async () => {
    const { saver, sent, settle } = createServer();
    saver.queue(createSnapshot("a"));
    await vi.advanceTimersByTimeAsync(600);
    saver.queue(createSnapshot("b"));
    await vi.advanceTimersByTimeAsync(5_000);
    expect(sent).toHaveLength(1);
    sent[0].answer(saved(4));
    await settle();
    expect(saver.state.status).toBe("waiting");
    expect(saver.hasUnsaved).toBe(true);
    await vi.advanceTimersByTimeAsync(600);
    expect(sent[1].draft).toMatchObject({ revision: 4, document: { name: "b" } });
  });

  it("stops at a conflict until it is answered, then saves over their revision", async () => {
    const { saver, sent, settle } = createServer();
    saver.queue(createSnapshot("mine"));
    await vi.advanceTimersByTimeAsync(600);
    const theirs = createDraft(9, "theirs");
    sent[0].answer({ status: "stale", current: theirs, differs: ["name"] });
    await settle();
    expect(saver.state).toEqual({ status: "stale", theirs, differs: ["name"] });
    saver.queue(createSnapshot("mine, edited"));
    await vi.advanceTimersByTimeAsync(10_000);
    expect(await saver.flush()).toBe(false);
    expect(sent).toHaveLength(1);
    saver.acceptRevision(theirs);
    saver.queue(createSnapshot("mine, edited"));
    await vi.advanceTimersByTimeAsync(600);
    expect(sent[1].draft).toMatchObject({ revision: 9, document: { name: "mine, edited" } });
  });

  it("tries again by itself without a connection, and sends the newest edit then", async () => {
    const { saver, sent, settle } = createServer();
    saver.queue(createSnapshot("a"));
    await vi.advanceTimersByTimeAsync(600);
    sent[0].answer(new TypeError("Failed to fetch"));
    await settle();
    expect(saver.state).toEqual({ status: "failed", message: "No connection to the server." });
    expect(saver.hasUnsaved).toBe(true);
    await vi.advanceTimersByTimeAsync(2_000);
    expect(nameOf(sent[1].draft)).toBe("a");
    sent[1].answer(saved(4));
    await settle();
    expect(saver.state.status).toBe("saved");
  });

  it("leaves a refusal to the user, who can try again", async () => {
    const { saver, sent, settle } = createServer();
    saver.queue(createSnapshot("a"));
    await vi.advanceTimersByTimeAsync(600);
    sent[0].answer(new AppError("too-large", "The document is larger than 2 MB."));
    await settle();
    await vi.advanceTimersByTimeAsync(120_000);
    expect(sent).toHaveLength(1);
    expect(saver.state).toEqual({ status: "failed", message: "The document is larger than 2 MB." });
    void saver.retry();
    await settle();
    expect(sent).toHaveLength(2);
  });

  it("flushes without waiting, and says whether all is saved", async () => {
    const { saver, sent, settle } = createServer();
    saver.queue(createSnapshot("a"));
    const flushed = saver.flush();
    await settle();
    sent[0].answer(saved(4));
    expect(await flushed).toBe(true);
    await vi.advanceTimersByTimeAsync(5_000);
    expect(sent).toHaveLength(1);
  });

  it("flushes what was queued behind a save in flight", async () => {
    const { saver, sent, settle } = createServer();
    saver.queue(createSnapshot("a"));
    await vi.advanceTimersByTimeAsync(600);
    saver.queue(createSnapshot("b"));
    const flushed = saver.flush();
    sent[0].answer(saved(4));
    await settle();
    expect(nameOf(sent[1].draft)).toBe("b");
    sent[1].answer(saved(5));
    expect(await flushed).toBe(true);
  });

  it("sends a small draft with a page that goes away, and keeps a large one for the warning", async () => {
    const small = createServer();
    small.saver.queue({ ...createSnapshot("a"), document: { ...createSnapshot("a").document, nodes: [], links: [] } });
    small.saver.leave();
    expect(small.sent.map(({ isLeaving }) => isLeaving)).toEqual([true]);
    const large = createServer();
    const text = "x".repeat(61_000);
    large.saver.queue({
      ...createSnapshot("a"),
      notes: [{ id: "n", x: 0, y: 0, text, author: "Ines Kallweit", at: "2026-11-24T14:00:00Z" }],
    });
    large.saver.leave();
    expect(large.sent).toHaveLength(0);
    expect(large.saver.hasUnsaved).toBe(true);
  });
});
