/** Cells of a block copied out of a spreadsheet, row by row: tab-separated text, cells with tabs or line ends in quotes. */
export function readCells(text: string): string[][] {
  const rows: string[][] = [[]];
  let cell = "";
  let isQuoted = false;
  const source = text.replace(/\r\n?/g, "\n").replace(/\n$/, "");
  for (let i = 0; i < source.length; i++) {
    const sign = source[i];
    if (isQuoted) {
      if (sign !== '"') cell += sign;
      else if (source[i + 1] === '"') {
        cell += '"';
        i++;
      } else isQuoted = false;
    } else if (sign === '"' && cell === "") isQuoted = true;
    else if (sign === "\t" || sign === "\n") {
      rows[rows.length - 1].push(cell.trim());
      cell = "";
      if (sign === "\n") rows.push([]);
    } else cell += sign;
  }
  rows[rows.length - 1].push(cell.trim());
  return rows;
}

/**
 * A number as people and spreadsheets write it: decimal point or comma, thousands parted by spaces, points, commas or
 * apostrophes, a percent sign (divides by 100), a leading or typographic minus.
 * @returns Null for an empty cell, NaN for what is no finite number or may be one of two, as "1,250" is. "1,5" is 1.5;
 * where `isWhole` asks for a count, a single comma or point before exactly three digits parts thousands.
 */
export function readNumber(text: string, isWhole = false): number | null {
  const plain = text.replace(/[\s\u00a0\u202f'’]/g, "").replace("\u2212", "-");
  if (plain === "") return null;
  if (isAmbiguous(plain, isWhole)) return NaN;
  const isPercent = plain.endsWith("%");
  const digits = isPercent ? plain.slice(0, -1) : plain;
  const normal = normalise(digits, isWhole);
  const value = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i.test(normal) ? Number(normal) : NaN;
  if (!Number.isFinite(value)) return NaN;
  return isPercent ? value / 100 : value;
}

/**
 * Whether a comma may part thousands as well as decimals: "1,250" is 1250 to some and 1.25 to others. Counts are whole,
 * so that there it parts thousands.
 */
function isAmbiguous(text: string, isWhole = false): boolean {
  return !isWhole && /^[+-\u2212]?[1-9]\d{0,2},\d{3}%?$/.test(text.replace(/\s/g, ""));
}

/** Why a text is no number that can be used. */
export function explainNumber(text: string, isWhole = false): string {
  const shown = `“${text.trim().slice(0, 20)}”`;
  return isAmbiguous(text, isWhole)
    ? `${shown} may have a thousands mark or a decimal comma: type it without the one or with a decimal point`
    : `${shown} is not a number`;
}

function normalise(digits: string, isWhole: boolean): string {
  const lastPoint = digits.lastIndexOf(".");
  const lastComma = digits.lastIndexOf(",");
  if (lastPoint >= 0 && lastComma >= 0) {
    const [decimal, group] = lastPoint > lastComma ? [".", ","] : [",", "."];
    // "1.2.3,4" and "1,23.5" part no thousands: such a cell is refused, not guessed at.
    const pieces = digits.slice(0, Math.max(lastPoint, lastComma)).split(group);
    if (!isGrouped(pieces)) return "";
    return digits.split(group).join("").replace(decimal, ".");
  }
  const mark = lastComma >= 0 ? "," : ".";
  const pieces = digits.split(mark);
  if (isGrouped(pieces) && (pieces.length > 2 || isWhole)) return pieces.join("");
  return digits.replace(",", ".");
}

const isGrouped = ([first, ...rest]: readonly string[]) =>
  rest.length > 0 && /^[+-]?[1-9]\d{0,2}$/.test(first) && rest.every((piece) => /^\d{3}$/.test(piece));
