import seedrandom from "seedrandom";
import { nextInt32 } from "./sfc32";

/** What a stream is drawn for; part of its key. */
export type Purpose = "demand" | "lateness" | "disruption" | "reject" | "lot" | "work" | "scrap" | "stoppage";

/** Four 32-bit words. */
export type Key = readonly [number, number, number, number];

/** Turns a seed phrase into key words. */
export function createSeedKey(seed: string): Key {
  const source = seedrandom(seed);
  return [source.int32(), source.int32(), source.int32(), source.int32()];
}

/**
 * Key of the streams of one node and purpose; knows neither the node's place nor its name.
 * @returns Hash of (seed key, node id, purpose) over all UTF-16 units.
 */
export function createStreamKey(seedKey: Key, nodeId: string, purpose: Purpose): Key {
  let [a, b, c, d] = seedKey;
  const text = `${purpose}\u0000${nodeId}`;
  for (let i = 0; i < text.length; i++) {
    const unit = text.charCodeAt(i) + 1;
    a = Math.imul(a ^ unit, 0x9e3779b1);
    b = Math.imul(b ^ unit ^ (a >>> 15), 0x85ebca6b);
    c = Math.imul(c ^ unit ^ (b >>> 13), 0xc2b2ae35);
    d = Math.imul(d ^ unit ^ (c >>> 16), 0x27d4eb2f);
    a ^= d >>> 14;
  }
  return [mix(a ^ text.length), mix(b ^ a), mix(c ^ b), mix(d ^ c)];
}

/**
 * Sets the stream at `at` to its start in one replication.
 * @param states - See `nextInt32`; four words are written.
 * @param replication - Whole, >= 0.
 */
export function seedStream(states: Int32Array, at: number, key: Key, replication: number): void {
  const r = mix((replication + 1) | 0);
  states[at] = mix(key[0] ^ r);
  states[at + 1] = mix(key[1] ^ Math.imul(r, 0x85ebca6b) ^ states[at]);
  states[at + 2] = mix(key[2] ^ Math.imul(r, 0xc2b2ae35) ^ states[at + 1]);
  states[at + 3] = key[3];
  // Rounds that let every bit of the key reach every word, as PractRand seeds it.
  for (let i = 0; i < 15; i++) nextInt32(states, at);
}

/** Finalizer of MurmurHash3 (Appleby, public domain): a bijection of 32-bit integers. */
function mix(x: number): number {
  x = Math.imul(x ^ (x >>> 16), 0x85ebca6b);
  x = Math.imul(x ^ (x >>> 13), 0xc2b2ae35);
  return x ^ (x >>> 16);
}
