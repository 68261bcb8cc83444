import { sha256 } from "@noble/hashes/sha2.js";
import type { Tallies } from "./tallies";
import type { RunResult } from "./types";

const magic = 0x46_42_52_31;
const headerBytes = 16;
const checksumAt = 12;

type View = { kind: "Float32" | "Float64" | "Int32"; length: number };
type Header = { result: Omit<RunResult, "fillRates" | "tallies">; shape: Tallies["shape"]; views: View[] };

const types = { Float32: Float32Array, Float64: Float64Array, Int32: Int32Array } as const;

/**
 * A whole result as bytes: "FBR1", the lengths of header and body, a checksum of all other bytes, the figures as JSON,
 * then the arrays in the machine's byte order, each from a multiple of 8.
 * @remarks Figures that are NaN are written as null and come back as NaN.
 */
export function encodeResult(result: RunResult): Uint8Array<ArrayBuffer> {
  const { fillRates, tallies, ...figures } = result;
  const { shape, replications, sums, demand, onTime, weekSums, dayLevels } = tallies;
  const arrays = [
    fillRates,
    replications,
    sums,
    demand,
    onTime,
    weekSums,
    ...dayLevels.flatMap(({ levels, counts }) => [levels, counts]),
  ];
  const views = arrays.map((array): View => ({ kind: kindOf(array), length: array.length }));
  const header: Header = { result: figures, shape, views };
  const text = new TextEncoder().encode(JSON.stringify(header));
  const start = align(headerBytes + text.length);
  const bodyBytes = arrays.reduce((sum, { byteLength }) => sum + align(byteLength), 0);
  const bytes = new Uint8Array(start + bodyBytes);
  new DataView(bytes.buffer).setUint32(0, magic);
  new DataView(bytes.buffer).setUint32(4, text.length);
  new DataView(bytes.buffer).setUint32(8, bodyBytes);
  bytes.set(text, headerBytes);
  let at = start;
  for (const array of arrays) {
    bytes.set(new Uint8Array(array.buffer, array.byteOffset, array.byteLength), at);
    at += align(array.byteLength);
  }
  new DataView(bytes.buffer).setUint32(checksumAt, checksumOf(bytes));
  return bytes;
}

/**
 * Reads what `encodeResult` wrote.
 * @throws RangeError for bytes of another format, cut short, changed since, or whose parts contradict one another.
 */
export function decodeResult(bytes: Uint8Array): RunResult {
  const { header, start } = readHeader(bytes);
  let at = start;
  const arrays = header.views.map(({ kind, length }) => {
    const type = types[kind];
    const byteLength = length * type.BYTES_PER_ELEMENT;
    if (at + byteLength > bytes.length) throw damaged("an array");
    const array = new type(bytes.slice(at, at + byteLength).buffer);
    at += align(byteLength);
    return array;
  });
  const { result, shape } = header;
  const [fillRates, replications, sums, demand, onTime, weekSums, ...levels] = arrays;
  const { replications: nReps, weeks } = result.options;
  if (result.format !== "forebay.result/1") throw new RangeError("the bytes are of another result format");
  if (
    !(fillRates instanceof Float32Array) ||
    !(replications instanceof Int32Array) ||
    !(sums instanceof Float64Array) ||
    !(demand instanceof Int32Array) ||
    !(onTime instanceof Int32Array) ||
    !(weekSums instanceof Float64Array) ||
    fillRates.length !== nReps * weeks ||
    replications.length !== nReps ||
    demand.length !== nReps * weeks * shape.customers.length ||
    onTime.length !== demand.length ||
    levels.length !== 2 * shape.buffers.length
  )
    throw damaged("the arrays");
  const dayLevels = shape.buffers.map((_, i) => {
    const [level, count] = [levels[2 * i], levels[2 * i + 1]];
    if (!(level instanceof Int32Array) || !(count instanceof Float64Array) || level.length !== count.length)
      throw damaged("the levels");
    return { levels: level, counts: count };
  });
  const tallies: Tallies = { shape, replications, sums, demand, onTime, weekSums, dayLevels };
  return { ...(restoreNaN(result) as typeof result), fillRates, tallies };
}

function readHeader(bytes: Uint8Array): { header: Header; start: number } {
  if (bytes.length < headerBytes) throw damaged("the start");
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  if (view.getUint32(0) !== magic) throw new RangeError("the bytes are not a result");
  const textBytes = view.getUint32(4);
  const start = align(headerBytes + textBytes);
  if (start + view.getUint32(8) !== bytes.length) throw damaged("the length");
  const checksum = view.getUint32(checksumAt);
  // Results stored before there was a checksum have 0 in its place.
  if (checksum !== 0 && checksum !== checksumOf(bytes)) throw damaged("it has changed since it was written");
  let header: unknown;
  try {
    header = JSON.parse(new TextDecoder().decode(bytes.subarray(headerBytes, headerBytes + textBytes)));
  } catch (error) {
    throw new RangeError("the result is damaged: the figures", { cause: error });
  }
  if (!isHeader(header)) throw damaged("the figures");
  return { header, start };
}

const isObject = (value: unknown): value is object => typeof value === "object" && value !== null;

function isView(value: unknown): value is View {
  if (!isObject(value)) return false;
  const { kind, length } = value as Partial<View>;
  return kind !== undefined && Object.hasOwn(types, kind) && Number.isInteger(length) && (length ?? -1) >= 0;
}

function isHeader(value: unknown): value is Header {
  if (!isObject(value)) return false;
  const { result, shape, views } = value as Partial<Header>;
  return (
    Array.isArray(views) &&
    views.length >= 6 &&
    views.every(isView) &&
    isObject(result) &&
    isObject(result.options) &&
    isObject(result.summary) &&
    typeof result.engine === "string" &&
    isObject(shape) &&
    Array.isArray(shape.customers) &&
    Array.isArray(shape.buffers) &&
    Array.isArray(shape.stations) &&
    Array.isArray(shape.suppliers)
  );
}

/** JSON has no NaN: a figure's value that came out null had none. */
function restoreNaN(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(restoreNaN);
  if (typeof value !== "object" || value === null) return value;
  return Object.fromEntries(
    Object.entries(value).map(([key, field]) => [key, key === "value" && field === null ? NaN : restoreNaN(field)]),
  );
}

const kindOf = (array: Float32Array | Float64Array | Int32Array): View["kind"] =>
  array instanceof Float32Array ? "Float32" : array instanceof Float64Array ? "Float64" : "Int32";

/** First word of the SHA-256 of everything but the checksum itself; never 0. */
function checksumOf(bytes: Uint8Array): number {
  const hash = sha256.create().update(bytes.subarray(0, checksumAt)).update(bytes.subarray(headerBytes)).digest();
  return new DataView(hash.buffer, hash.byteOffset).getUint32(0) || 1;
}

const align = (length: number) => Math.ceil(length / 8) * 8;

const damaged = (what: string) => new RangeError(`the result is damaged: ${what}`);
