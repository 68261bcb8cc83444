import { readLineFile } from "@/lib/line/file";
import type { Edit } from "@/lib/line/edits";
import { AppError } from "@/lib/errors";

const mostBytes = 2 * 1024 * 1024;

/**
 * Reads a line file that the user picked, as one edit that replaces the draft.
 * @throws AppError that says what is wrong with the file.
 */
export async function readImport(file: File): Promise<Edit> {
  if (file.size > mostBytes) {
    throw new AppError("too-large", `${file.name} is larger than 2 MB, the most that a line may have.`);
  }
  const { line, layout, notes } = readLineFile(readJson(await file.text(), file.name));
  const state = { document: line, layout, notes };
  return { label: `Import ${file.name}`, apply: () => state };
}

function readJson(text: string, name: string): unknown {
  try {
    return JSON.parse(text);
  } catch (error) {
    if (!(error instanceof SyntaxError)) throw error;
    throw new AppError("invalid", `${name} is not a JSON file: ${error.message}`);
  }
}
