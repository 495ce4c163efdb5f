/**
 * Numbers that look random and come out the same for the same seed: a Weyl sequence through a 32-bit mixer (the finalizer of MurmurHash3,
 * A. Appleby, public domain; constants from memory). Good enough to place points, not for statistics.
 *
 * @returns the next number, 0 <= x < 1
 */
export function seeded(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x9e3779b9) >>> 0;
    let h = state;
    h = Math.imul(h ^ (h >>> 16), 0x85ebca6b);
    h = Math.imul(h ^ (h >>> 13), 0xc2b2ae35);
    return ((h ^ (h >>> 16)) >>> 0) / 2 ** 32;
  };
}
