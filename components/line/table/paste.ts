import { readPath } from "@/components/forms/field-scope";
import type { FieldChange } from "@/lib/line/edits";
import type { DraftNode } from "@/lib/line/types";
import { type Column, readCell } from "./columns";

export type Pasted = { changes: FieldChange[]; refusals: string[] };

/**
 * What a block of cells changes when its upper left corner is put on one cell of a table.
 * @param cells - Row by row, as `readCells` gives them.
 */
export function pasteBlock(
  nodes: readonly DraftNode[],
  columns: readonly Column[],
  row: number,
  column: number,
  cells: readonly (readonly string[])[],
): Pasted {
  const changes: FieldChange[] = [];
  const refusals: string[] = [];
  cells.forEach((line, r) =>
    line.forEach((text, c) => {
      const node = nodes[row + r];
      const target = columns[column + c];
      const where = `Row ${r + 1}, column ${c + 1}`;
      if (!node || !target) return void (text && refusals.push(`${where}: outside the table.`));
      if (target.has && !target.has(node))
        return void (text && refusals.push(`${where}: ${node.name} has no ${target.label.toLowerCase()}.`));
      const read = readCell(target, text);
      if ("refusal" in read) refusals.push(`${where}: ${read.refusal}.`);
      else if (!Object.is(readPath(node, target.path), read.value))
        changes.push({ nodeId: node.id, path: target.path, value: read.value });
    }),
  );
  return { changes, refusals };
}
