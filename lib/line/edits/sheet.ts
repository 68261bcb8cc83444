import type { Layout, Note } from "../types";
import { type Edit, setPath, type SheetState, withDocument } from "./edit";

/** Sets a field of the line itself by its dotted path, for instance `calendar.hoursPerDay`. */
export function setLineField(path: string, value: unknown): Edit {
  return { label: `change ${path}`, apply: (state) => withDocument(state, setPath(state.document, path, value)) };
}

export function setLayout(layout: Layout): Edit {
  return { label: "arrange the sheet", apply: (state) => ({ ...state, layout }) };
}

export function addNote(note: Note): Edit {
  return { label: "add a note", apply: (state) => ({ ...state, notes: [...state.notes, note] }) };
}

export function editNote(id: string, change: Partial<Omit<Note, "id">>): Edit {
  return {
    label: "change a note",
    apply: (state) => ({
      ...state,
      notes: state.notes.map((note) => (note.id === id ? { ...note, ...change } : note)),
    }),
  };
}

export function deleteNote(id: string): Edit {
  return {
    label: "delete a note",
    apply(state) {
      const notes = state.notes.filter((note) => note.id !== id);
      return notes.length === state.notes.length ? state : { ...state, notes };
    },
  };
}

/** Puts another sheet in place of the whole: an import, a revert, somebody else's draft. */
export function replaceAll(next: SheetState, label: string): Edit {
  return { label, apply: () => next };
}
