/**
 * Random numbers by counter: block (a, b, c, d) of a seed is the same whoever asks, whenever and in whatever order. Philox4x32 with ten rounds; Salmon, Moraes, Dror and Shaw, Proc.
 * SC'11, article 16 (2011).
 */
const MULTIPLIER_0 = 0xd2511f53;
const MULTIPLIER_1 = 0xcd9e8d57;
const WEYL_0 = 0x9e3779b9;
const WEYL_1 = 0xbb67ae85;
const ROUNDS = 10;

/** Upper half of the 64-bit product of two 32-bit numbers. */
function upperHalf(a: number, b: number): number {
  const ah = a >>> 16;
  const al = a & 0xffff;
  const bh = b >>> 16;
  const bl = b & 0xffff;
  const first = ah * bl + ((al * bl) >>> 16);
  const second = al * bh + (first & 0xffff);
  return (ah * bh + (first >>> 16) + (second >>> 16)) >>> 0;
}

/**
 * One block of four 32-bit numbers into `out`.
 *
 * @param counter  four whole numbers of 32 bits
 * @param key      two of them: the seed
 */
export function philox(counter: readonly [number, number, number, number], key: readonly [number, number], out: Uint32Array): void {
  let [c0, c1, c2, c3] = counter;
  let [k0, k1] = key;
  for (let round = 0; round < ROUNDS; round++) {
    const high0 = upperHalf(MULTIPLIER_0, c0);
    const low0 = Math.imul(MULTIPLIER_0, c0) >>> 0;
    const high1 = upperHalf(MULTIPLIER_1, c2);
    const low1 = Math.imul(MULTIPLIER_1, c2) >>> 0;
    c0 = (high1 ^ c1 ^ k0) >>> 0;
    c1 = low1;
    c2 = (high0 ^ c3 ^ k1) >>> 0;
    c3 = low0;
    k0 = (k0 + WEYL_0) >>> 0;
    k1 = (k1 + WEYL_1) >>> 0;
  }
  out[0] = c0;
  out[1] = c1;
  out[2] = c2;
  out[3] = c3;
}

const TWO_32 = 2 ** 32;
const block = new Uint32Array(4);

/**
 * Two even numbers, 0 < u < 1, of 53 bits each.
 *
 * @param seed     0 to 2^53 - 1
 * @param index    of the variation, 0 to 2^53 - 1
 * @param input    of the variation's inputs
 * @param attempt  a further pair of the same input
 */
export function evenPair(seed: number, index: number, input: number, attempt: number): [number, number] {
  philox([index % TWO_32, Math.floor(index / TWO_32), input, attempt], [seed % TWO_32, Math.floor(seed / TWO_32)], block);
  return [unit(block[0], block[1]), unit(block[2], block[3])];
}

/** In the middle of one of 2^53 even parts of 0..1: never 0, never 1. */
function unit(high: number, low: number): number {
  return Math.min(1 - 2 ** -53, ((high >>> 5) * 2 ** 26 + (low >>> 6) + 0.5) / 2 ** 53);
}
