import { describe, expect, it } from "vitest";
import { coalesceMs, record, redo, startHistory, undo, type History, type Snapshot } from "@/lib/client/draft-history";
import { createSnapshot, nameOf } from "./sample";

const rename =
  (name: string) =>
  (snapshot: Snapshot): Snapshot => ({ ...snapshot, document: { ...snapshot.document, name } });
const edit = (history: History, name: string, atMs: number, coalesce?: string): History =>
  record(history, { label: `Rename to ${name}`, apply: rename(name), atMs, coalesce });

describe("record, undo and redo", () => {
  it("goes back step by step and forward again", () => {
    const start = startHistory(createSnapshot("a"));
    const edited = edit(edit(start, "b", 0), "c", 1);
    const back = undo(undo(edited));
    expect([edited, undo(edited), back, redo(back), redo(redo(back))].map(({ present }) => nameOf(present))).toEqual([
      "c",
      "b",
      "a",
      "b",
      "c",
    ]);
    expect(back.present).toBe(start.present);
    expect(back.future.map(({ label }) => label)).toEqual(["Rename to b", "Rename to c"]);
  });

  it("forgets what was undone once another edit is made", () => {
    const history = edit(undo(edit(startHistory(createSnapshot("a")), "b", 0)), "c", 1);
    expect(redo(history)).toBe(history);
    expect(nameOf(undo(history).present)).toBe("a");
  });

  it("folds typing in one field into one step", () => {
    const typed = ["b", "bo", "box"].reduce(
      (history, name, i) => edit(history, name, i * 200, "name"),
      startHistory(createSnapshot("a")),
    );
    expect(typed.past).toHaveLength(1);
    expect(nameOf(undo(typed).present)).toBe("a");
  });

  it("starts a new step in another field, after a pause and after an undo", () => {
    const start = edit(startHistory(createSnapshot("a")), "b", 0, "name");
    expect(edit(start, "c", 1, "other").past).toHaveLength(2);
    expect(edit(start, "c", coalesceMs + 1, "name").past).toHaveLength(2);
    expect(edit(undo(edit(start, "c", 9_000, "name")), "d", 9_001, "name").past).toHaveLength(2);
  });

  it("takes an edit that changes nothing for no edit", () => {
    const history = undo(edit(startHistory(createSnapshot("a")), "b", 0));
    expect(record(history, { label: "Nothing", apply: (snapshot) => snapshot, atMs: 1 })).toBe(history);
    expect(undo(startHistory(createSnapshot())).past).toEqual([]);
  });
});
