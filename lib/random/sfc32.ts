/** 32-bit words of one generator: a, b, c and the counter. */
export const wordsPerStream = 4;

/**
 * Small fast counting generator, 32-bit variant: 128 bits of state, period at least 2^32, mean about 2^127.
 * @param states - Streams side by side, `wordsPerStream` words each; the stream at `at` is advanced in place by one step.
 * @param at - Index of the stream's first word.
 * @returns A signed 32-bit integer.
 * @remarks Doty-Humphrey, PractRand 0.93 (`sfc32`).
 */
export function nextInt32(states: Int32Array, at: number): number {
  const b = states[at + 1];
  const c = states[at + 2];
  const d = states[at + 3];
  const result = (((states[at] + b) | 0) + d) | 0;
  states[at] = b ^ (b >>> 9);
  states[at + 1] = (c + (c << 3)) | 0;
  states[at + 2] = (((c << 21) | (c >>> 11)) + result) | 0;
  states[at + 3] = (d + 1) | 0;
  return result;
}

/**
 * Uniform number with 52 random bits.
 * @returns In (0, 1), both ends open: odd multiples of 2^-53, so that 1 - u is exact.
 * @remarks Advances the stream by two steps.
 */
export function nextUniform(states: Int32Array, at: number): number {
  const high = nextInt32(states, at) >>> 0;
  const low = nextInt32(states, at) >>> 12;
  return (high * 1048576 + low + 0.5) * 2.220446049250313e-16;
}
