import { sha256 } from "@noble/hashes/sha2.js";
import { bytesToHex, utf8ToBytes } from "@noble/hashes/utils.js";
import type { Line } from "./types";

/** SHA-256 of the line's canonical JSON (keys sorted, no white space), as 64 hex digits: the same for every order of keys. */
export function digestLine(line: Line): string {
  return bytesToHex(sha256(utf8ToBytes(writeCanonical(line))));
}

/** JSON with sorted keys; array order counts. Numbers as JSON.stringify writes them (ECMA-262), as in RFC 8785. */
export function writeCanonical(value: unknown): string {
  if (Array.isArray(value)) return `[${value.map(writeCanonical).join(",")}]`;
  if (typeof value !== "object" || value === null) return JSON.stringify(value);
  const fields = Object.entries(value)
    .filter(([, field]) => field !== undefined)
    .sort(([a], [b]) => (a < b ? -1 : 1))
    .map(([key, field]) => `${JSON.stringify(key)}:${writeCanonical(field)}`);
  return `{${fields.join(",")}}`;
}
