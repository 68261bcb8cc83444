import { z } from "zod";
import { AppError } from "@/lib/errors";
import { DraftLineInput, LayoutInput, NotesInput } from "./draft-schema";
import { limits, sayCount } from "./limits";
import { isRecord, join, shorten } from "./parse-fields";
import type { LineFile } from "./types";

/**
 * Reads what an export wrote, or a bare line document. Gaps in numbers are fine; the shape has to be that of a line.
 * @throws AppError "invalid" or "too-large" with a sentence for the user.
 */
export function readLineFile(json: unknown): LineFile {
  if (!isRecord(json))
    throw new AppError("invalid", "This file holds no line: it has to be a line document or an export of one.");
  const isExport = "line" in json && !("nodes" in json);
  const line = isExport ? json.line : json;
  if (!isRecord(line) || line.format !== "forebay.line/1")
    throw new AppError("invalid", 'This file holds no line: its format has to read "forebay.line/1".');
  if (Array.isArray(line.nodes) && line.nodes.length > limits.nodes)
    throw new AppError(
      "too-large",
      `The file's line has ${sayCount(line.nodes.length)} nodes; the limit is ${sayCount(limits.nodes)}.`,
    );
  if (Array.isArray(line.links) && line.links.length > limits.links)
    throw new AppError(
      "too-large",
      `The file's line has ${sayCount(line.links.length)} links; the limit is ${sayCount(limits.links)}.`,
    );
  const nothing = { layout: { positions: {} }, notes: [] };
  if (!isExport) return read({ line, ...nothing });
  return read({ ...json, layout: json.layout ?? nothing.layout, notes: json.notes ?? nothing.notes });
}

const FileInput = z.object({ line: DraftLineInput, layout: LayoutInput, notes: NotesInput });

/** A draft may have gaps, but a field that nobody knows would be lost without a word. */
function read(file: Record<string, unknown>): LineFile {
  const result = FileInput.safeParse(file);
  if (!result.success) return refuse(result.error.issues.map(({ path, message }) => `${path.join(".")}: ${message}.`));
  const lost = findLost(file, result.data);
  return lost.length === 0 ? result.data : refuse(lost.map((path) => `${path}: unknown field. Take it out.`));
}

/** Paths of fields that reading has left out. */
function findLost(before: unknown, after: unknown, path = ""): string[] {
  if (Array.isArray(before))
    return before.flatMap((item, i) => findLost(item, (after as unknown[])[i], `${path}.${i}`));
  if (!isRecord(before)) return [];
  return Object.entries(before).flatMap(([key, value]) => {
    const own = join(path, shorten(key));
    return Object.hasOwn(after as object, key) ? findLost(value, (after as Record<string, unknown>)[key], own) : [own];
  });
}

function refuse(sentences: readonly string[]): never {
  const more = sentences.length > 3 ? ` There are ${sentences.length - 3} more faults.` : "";
  throw new AppError("invalid", `This file cannot be opened. ${sentences.slice(0, 3).join(" ")}${more}`);
}

/** The export file's text. */
export function writeLineFile(file: LineFile): string {
  return `${JSON.stringify({ line: file.line, layout: file.layout, notes: file.notes }, null, 1)}\n`;
}
