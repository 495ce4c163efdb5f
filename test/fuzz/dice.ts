/** A small generator of even numbers in 0..1 from a seed: the same seed, the same designs, on every machine. Mulberry32 (public domain). */
export function randomFrom(seed: number): () => number {
  let a = seed >>> 0;
  return () => {
    a = (a + 0x6d2b79f5) >>> 0;
    let t = a;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

/** What random designs are drawn with. */
export class Dice {
  constructor(readonly random: () => number) {}

  chance(share: number): boolean {
    return this.random() < share;
  }

  /** A whole number from 0 to `count` - 1. */
  whole(count: number): number {
    return Math.min(count - 1, Math.floor(this.random() * count));
  }

  pick<T>(list: readonly T[]): T {
    return list[this.whole(list.length)];
  }

  between(low: number, high: number): number {
    return low + (high - low) * this.random();
  }

  /** Evenly spread in the logarithm. */
  logBetween(low: number, high: number): number {
    return Math.exp(this.between(Math.log(low), Math.log(high)));
  }
}
