import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import type { DraftAnswer, DraftToSave } from "@/lib/client/api";
import type { Snapshot } from "@/lib/client/draft-history";
import { createDraftSheet } from "@/lib/client/draft-sheet";
import { createDraft, nameOf } from "./sample";

beforeEach(() => void vi.useFakeTimers());
afterEach(() => void vi.useRealTimers());

const rename = (name: string) => ({
  label: `Rename to ${name}`,
  apply: (snapshot: Snapshot): Snapshot => ({ ...snapshot, document: { ...snapshot.document, name } }),
});

function openSheet(answers: DraftAnswer[] = [], mayEdit = true) {
  const sent: DraftToSave[] = [];
  const sheet = createDraftSheet({
    draft: createDraft(3, "start"),
    mayEdit,
    now: () => 0,
    async put(draft) {
      sent.push(draft);
      return answers.shift() ?? { status: "saved", revision: draft.revision + 1, updatedAt: "now", updatedBy: "me" };
    },
  });
  const name = () => nameOf(sheet.getView().history.present);
  return { sheet, sent, name };
}

async function openConflict() {
  const theirs = createDraft(8, "theirs");
  const opened = openSheet([{ status: "stale", current: theirs, differs: ["name"] }]);
  opened.sheet.change(rename("mine"));
  await vi.advanceTimersByTimeAsync(600);
  expect(opened.sheet.getView().saveState.status).toBe("stale");
  return opened;
}

describe("createDraftSheet", () => {
  it("saves edits, undo and redo alike", async () => {
    const { sheet, sent } = openSheet();
    sheet.change(rename("mine"));
    await vi.advanceTimersByTimeAsync(600);
    sheet.undo();
    await vi.advanceTimersByTimeAsync(600);
    expect(sent.map((draft) => [nameOf(draft), draft.revision])).toEqual([
      ["mine", 3],
      ["start", 4],
    ]);
  });

  it("changes nothing for somebody who may not edit", async () => {
    const { sheet, sent, name } = openSheet([], false);
    sheet.change(rename("mine"));
    await vi.advanceTimersByTimeAsync(5_000);
    expect([name(), sent.length]).toEqual(["start", 0]);
  });

  it("saves mine over theirs at their revision, with theirs one undo away", async () => {
    const { sheet, sent, name } = await openConflict();
    sheet.resolve("mine");
    await vi.advanceTimersByTimeAsync(600);
    expect([name(), nameOf(sent[1]), sent[1].revision]).toEqual(["mine", "mine", 8]);
    sheet.undo();
    expect(name()).toBe("theirs");
  });

  it("takes theirs without saving anything, with mine one undo away", async () => {
    const { sheet, sent, name } = await openConflict();
    sheet.resolve("theirs");
    await vi.advanceTimersByTimeAsync(5_000);
    expect([name(), sent.length, sheet.getView().saveState.status]).toEqual(["theirs", 1, "saved"]);
    sheet.undo();
    await vi.advanceTimersByTimeAsync(600);
    expect([name(), sent[1].revision]).toEqual(["mine", 8]);
  });

  it("takes what somebody else saved while nothing waits here", () => {
    const { sheet, name } = openSheet();
    sheet.adopt(createDraft(3, "same revision"));
    expect(name()).toBe("start");
    sheet.adopt(createDraft(5, "theirs"));
    expect([name(), sheet.saver.revision]).toEqual(["theirs", 5]);
    sheet.undo();
    expect(name()).toBe("start");
  });

  it("keeps its own edits that wait, whatever somebody else saved", () => {
    const { sheet, name } = openSheet();
    sheet.change(rename("mine"));
    sheet.adopt(createDraft(5, "theirs"));
    expect([name(), sheet.saver.revision]).toEqual(["mine", 3]);
  });
});
