"use client";

import { Handle, type Node, type NodeProps, Position } from "@xyflow/react";
import { useState } from "react";
import { editNote, setField } from "@/lib/line/edits";
import { useLine } from "@/lib/client/line-state";
import type { Note } from "@/lib/line/types";
import { LocalTime } from "../local-time";
import { NodeDrawing } from "../drawing/node-drawing";
import type { Point } from "@/lib/line/sheet-sizes";
import type { Drawing } from "../drawing/use-sheet";

export type PlateData = { drawing: Drawing; inlet: Point; outlet: Point; size: { width: number; height: number } };
export type PlateNode = Node<PlateData, "plate">;
export type NoteNode = Node<{ note: Note }, "note">;
export type SheetNode = PlateNode | NoteNode;

const port =
  "!size-3 !min-h-0 !min-w-0 !rounded-full !border-[1.5px] !border-water-600 !bg-paper opacity-0 group-hover:opacity-100 group-focus-within:opacity-100";

/** A node of the line: its drawing, and ports from which channels are drawn. */
export function PlateView({ id, data, selected }: NodeProps<PlateNode>) {
  const { mayEdit, apply } = useLine();
  const { drawing, inlet, outlet, size } = data;
  const { kind } = drawing.node;
  return (
    <div className="group relative" style={size}>
      {selected && <SelectionFrame />}
      <NodeDrawing
        {...drawing}
        onSizeChange={
          mayEdit && kind === "buffer" && selected
            ? (next) => apply(setField(id, "size", next), `size ${id}`)
            : undefined
        }
      />
      {kind !== "supplier" && (
        <Handle
          type="target"
          position={Position.Left}
          className={port}
          style={{ left: inlet.x, top: inlet.y }}
          isConnectable={mayEdit}
        />
      )}
      {kind !== "customer" && (
        <Handle
          type="source"
          position={Position.Right}
          className={port}
          style={{ left: outlet.x, top: outlet.y, right: "auto", transform: "translate(-50%, -50%)" }}
          isConnectable={mayEdit}
        />
      )}
    </div>
  );
}

/** Water wash and a frame with four square corners. */
function SelectionFrame() {
  return (
    <span
      aria-hidden
      className="pointer-events-none absolute -inset-2 -z-10 border-[1.5px] border-water-600 bg-water-100"
    >
      {["-left-1 -top-1", "-right-1 -top-1", "-left-1 -bottom-1", "-right-1 -bottom-1"].map((place) => (
        <span key={place} className={`absolute size-[7px] border border-water-600 bg-paper ${place}`} />
      ))}
    </span>
  );
}

/** A remark on the sheet; typed in place. */
export function NoteView({ id, data: { note }, selected }: NodeProps<NoteNode>) {
  const { mayEdit, apply } = useLine();
  const [isTyping, setTyping] = useState(note.text === "");
  return (
    <div
      className={`w-60 border-l-2 border-ink py-0.5 pl-3 ${selected ? "bg-water-100 outline-[1.5px] outline-water-600" : ""}`}
    >
      <p className="text-s font-[620]">
        Note by {note.author}, <LocalTime at={note.at} format="date" />
      </p>
      {isTyping && mayEdit ? (
        <textarea
          autoFocus
          aria-label="Text of the note"
          className="nodrag nowheel nopan mt-1 block w-full resize-y border border-rule-2 bg-sheet p-1.5 text-s"
          rows={4}
          maxLength={2_000}
          value={note.text}
          onChange={(event) => apply(editNote(id, { text: event.target.value }), `note ${id}`)}
          onBlur={() => setTyping(false)}
          onKeyDown={(event) => {
            event.stopPropagation();
            if (event.key === "Escape") setTyping(false);
          }}
        />
      ) : (
        <button
          type="button"
          disabled={!mayEdit}
          className="block w-full text-left text-s whitespace-pre-wrap text-ink-2 [overflow-wrap:anywhere]"
          onDoubleClick={() => setTyping(true)}
          onKeyDown={(event) => event.key === "Enter" && setTyping(true)}
          title={mayEdit ? "Double-click to change" : undefined}
        >
          {note.text || "Empty note"}
        </button>
      )}
    </div>
  );
}

export const nodeTypes = { plate: PlateView, note: NoteView };
