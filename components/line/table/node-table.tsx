"use client";

import { type ClipboardEvent, type KeyboardEvent, type ReactNode, useRef } from "react";
import { faultOf } from "@/components/forms/fault-lookup";
import { readPath } from "@/components/forms/field-scope";
import { useLine } from "@/lib/client/line-state";
import { readCells } from "@/lib/line/clipboard";
import { setField, setFields } from "@/lib/line/edits";
import type { DraftNode } from "@/lib/line/types";
import type { Column } from "./columns";
import { pasteBlock } from "./paste";
import { TableCell } from "./table-cell";

type Props = {
  caption: string;
  note?: string;
  nodes: readonly DraftNode[];
  columns: readonly Column[];
  /** Reading columns right of the fields. */
  heads?: readonly string[];
  readings?(node: DraftNode): readonly ReactNode[];
  foot?: ReactNode;
  onRefusals(refusals: readonly string[]): void;
};

/** Nodes of one kind as rows of fields. Arrow keys and Enter move, a block pasted from a spreadsheet is one step of undo. */
export function NodeTable({ caption, note, nodes, columns, heads = [], readings, foot, onRefusals }: Props) {
  const { faults, mayEdit, apply, selection, select, scenario } = useLine();
  const table = useRef<HTMLTableElement>(null);
  const before = new Map(scenario.kept.document.nodes.map((node) => [node.id, node]));

  function focusCell(row: number, column: number) {
    table.current?.querySelector<HTMLInputElement>(`[data-cell="${row}:${column}"]`)?.focus();
  }

  function placeOf(target: EventTarget): [number, number] | null {
    const at = target instanceof HTMLElement ? target.dataset.cell : undefined;
    if (!at) return null;
    const [row, column] = at.split(":").map(Number);
    return [row, column];
  }

  function onKeyDown(event: KeyboardEvent) {
    const place = placeOf(event.target);
    if (!place || event.ctrlKey || event.metaKey) return;
    const step: Record<string, [number, number]> = {
      ArrowUp: [-1, 0],
      ArrowDown: [1, 0],
      Enter: [event.shiftKey ? -1 : 1, 0],
    };
    const input = event.target as HTMLInputElement;
    const isAll = input.selectionStart === 0 && input.selectionEnd === input.value.length;
    if (event.key === "ArrowLeft" && (isAll || input.selectionEnd === 0)) step.ArrowLeft = [0, -1];
    if (event.key === "ArrowRight" && (isAll || input.selectionStart === input.value.length)) step.ArrowRight = [0, 1];
    const by = step[event.key];
    if (!by) return;
    event.preventDefault();
    focusCell(place[0] + by[0], place[1] + by[1]);
  }

  function onPaste(event: ClipboardEvent) {
    const place = placeOf(event.target);
    const cells = readCells(event.clipboardData.getData("text/plain"));
    if (!place || !mayEdit || (cells.length === 1 && cells[0].length === 1)) return;
    event.preventDefault();
    const { changes, refusals } = pasteBlock(nodes, columns, place[0], place[1], cells);
    if (changes.length > 0) apply(setFields(changes, `paste ${changes.length} cells`));
    onRefusals(refusals);
    (event.target as HTMLElement).blur();
  }

  if (nodes.length === 0) return null;
  return (
    <table ref={table} className="sheet-table mb-5" onKeyDown={onKeyDown} onPaste={onPaste}>
      <caption className="pb-1 text-left font-[620]">
        {caption} {note && <span className="text-s font-text text-ink-3">{note}</span>}
      </caption>
      <thead>
        <tr>
          {columns.map(({ path, label, unit, isText }) => (
            <th key={path} scope="col" className={isText ? "w-[210px]" : "w-[104px] text-right!"}>
              {label}
              {unit && <span className="text-ink-3">, {unit}</span>}
            </th>
          ))}
          {heads.map((head) => (
            <th key={head} scope="col" className="text-right! whitespace-nowrap">
              {head}
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {nodes.map((node, row) => (
          <tr key={node.id} data-selected={selection.includes(node.id)}>
            {columns.map((column, c) => (
              <td key={column.path} className="p-1! first:pl-0!">
                <TableCell
                  node={node}
                  column={column}
                  value={readPath(node, column.path)}
                  former={before.has(node.id) ? readPath(before.get(node.id), column.path) : undefined}
                  fault={faultOf(faults, node.id, column.path)}
                  readOnly={!mayEdit}
                  at={`${row}:${c}`}
                  onChange={(value) => apply(setField(node.id, column.path, value), `${node.id}.${column.path}`)}
                  onFocus={() => selection[0] !== node.id && select([node.id])}
                />
              </td>
            ))}
            {readings?.(node).map((reading, i) => (
              <td key={heads[i]} className="text-right whitespace-nowrap">
                {reading}
              </td>
            ))}
          </tr>
        ))}
        {foot}
      </tbody>
    </table>
  );
}
