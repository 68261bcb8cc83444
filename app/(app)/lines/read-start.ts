import exampleLine from "@/lib/line/example.json";
import { autoLayout } from "@/lib/line/auto-layout";
import { emptyLine } from "@/lib/line/example";
import { readLineFile } from "@/lib/line/file";
import type { DraftLine, LineFile } from "@/lib/line/types";
import { AppError } from "@/lib/errors";
import { DraftLineInput, LayoutInput, NotesInput } from "@/lib/line/draft-schema";
import { parseInput } from "@/lib/schema/parse-input";

export type Sheet = { document: DraftLine; layout: LineFile["layout"]; notes: LineFile["notes"] };

/**
 * What a new line starts from.
 * @param from - "empty", "example", or the text of an exported file or of a bare line document.
 * @throws AppError invalid, saying what about the file cannot be read
 */
export function readStart(name: string, from: string): Sheet {
  if (from === "empty") return { document: emptyLine(name), layout: { positions: {} }, notes: [] };
  if (from === "example") {
    const document: DraftLine = parseInput(DraftLineInput, { ...exampleLine, name });
    return { document, layout: autoLayout(document), notes: [] };
  }
  const file = readLineFile(readJsonText(from));
  return {
    document: parseInput(DraftLineInput, file.line),
    layout: parseInput(LayoutInput, file.layout),
    notes: parseInput(NotesInput, file.notes),
  };
}

function readJsonText(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch (error) {
    throw new AppError("invalid", `The file is no JSON: ${error instanceof Error ? error.message : error}`);
  }
}
