"use client";

import { useState } from "react";
import { cx } from "@/components/ui/cx";
import type { DraftNode } from "@/lib/line/types";
import { type Column, readCell, showCell } from "./columns";

type Props = {
  node: DraftNode;
  column: Column;
  value: unknown;
  former: unknown;
  fault?: string;
  readOnly: boolean;
  /** "row:column" within its table, by which the arrow keys find it. */
  at: string;
  onChange(value: unknown): void;
  onFocus(): void;
};

/** One field of one node. What cannot be read stays in the cell, marked, and changes nothing. */
export function TableCell({ node, column, value, former, fault, readOnly, at, onChange, onFocus }: Props) {
  const [typed, setTyped] = useState<string | null>(null);
  if (column.has && !column.has(node)) return <span className="block pr-2 text-right text-ink-3">–</span>;
  const read = typed === null ? null : readCell(column, typed);
  const refusal = read && "refusal" in read ? read.refusal : undefined;
  const isFormer = former !== undefined && !Object.is(former, value);
  return (
    <input
      data-cell={at}
      aria-label={`${node.name}: ${column.label}${column.unit ? `, ${column.unit}` : ""}`}
      aria-invalid={Boolean(refusal ?? fault)}
      title={refusal ?? fault ?? (isFormer ? `was ${showCell(column, former) || "empty"}` : undefined)}
      inputMode={column.isText ? "text" : "decimal"}
      autoComplete="off"
      readOnly={readOnly}
      value={typed ?? showCell(column, value)}
      placeholder={column.path === "startLevel" ? "full" : undefined}
      className={cx(
        "h-7 w-full min-w-0 rounded-field border bg-sheet px-2 read-only:border-transparent read-only:bg-transparent focus:border-water-600 focus-visible:shadow-[0_0_0_1px_var(--water-600)]",
        column.isText ? "font-[560]" : "typed text-right",
        (refusal ?? fault) ? "border-silt-600" : isFormer ? "border-water-600 bg-water-50" : "border-rule",
      )}
      onFocus={(event) => {
        event.target.select();
        onFocus();
      }}
      onChange={(event) => {
        setTyped(event.target.value);
        const next = readCell(column, event.target.value);
        if ("value" in next) onChange(next.value);
      }}
      onBlur={() => setTyped(null)}
    />
  );
}
