"use client";

import { Button } from "@/components/ui/button";

export type Cell = string | number | null;

/** A cell as CSV text (RFC 4180). Text that a spreadsheet would run as a formula is led by an apostrophe. */
export function writeCell(cell: Cell): string {
  if (cell === null) return "";
  if (typeof cell === "number") return Number.isFinite(cell) ? String(cell) : "";
  const safe = /^[=+\-@\t\r]/.test(cell) ? `'${cell}` : cell;
  return /[",\n\r]/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
}

export function writeCsv(rows: readonly (readonly Cell[])[]): string {
  return rows.map((row) => row.map(writeCell).join(",")).join("\r\n") + "\r\n";
}

/** Gives the figures of a chart or table as a CSV file; they are worked out when asked for. */
export function TakeOutFigures({ name, rows }: { name: string; rows(): readonly (readonly Cell[])[] }) {
  function save() {
    const url = URL.createObjectURL(new Blob(["\ufeff", writeCsv(rows())], { type: "text/csv;charset=utf-8" }));
    const link = document.createElement("a");
    link.href = url;
    link.download = `${
      name
        .replace(/[^\p{L}\p{N}]+/gu, "-")
        .replace(/^-|-$/g, "")
        .toLowerCase() || "figures"
    }.csv`;
    link.click();
    URL.revokeObjectURL(url);
  }
  return (
    <Button size="small" onClick={save}>
      Take out figures
    </Button>
  );
}
