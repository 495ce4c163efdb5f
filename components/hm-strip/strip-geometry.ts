import type { DepthAxis } from '../../src/drawing/depth-axis.ts';

/** px from the left end of the strip. */
export interface Span {
  left: number;
  right: number;
}

export interface StripGeometry {
  top: Span;
  layers: Span[];
  bottom: Span;
  /** boundaries [layers + 1]; null where outside of the part in view */ edges: (number | null)[];
}

/** Most room for the column of a contact, px. */
const CONTACT = 88;
/** Room left and right where there is no axis yet, px. */
const MARGIN = 64;

/**
 * Where the columns stand. Layers lie under their place on the plate's depth axis; a design with another number of layers than the solved one
 * (a layer was just put in) is dealt out evenly until the axis follows.
 *
 * @param width  of the strip, px
 */
export function stripGeometry(axis: DepthAxis | null, layers: number, width: number): StripGeometry {
  const follows = axis !== null && axis.edges.length === layers + 1;
  const range: [number, number] = axis ? axis.range : [MARGIN, Math.max(MARGIN + 1, width - MARGIN)];
  const raw = follows ? axis.edges : Array.from({ length: layers + 1 }, (_, i) => range[0] + ((range[1] - range[0]) * i) / layers);
  const held = raw.map((x) => Math.min(Math.max(x, range[0]), range[1]));
  return {
    top: { left: Math.max(0, range[0] - CONTACT), right: range[0] },
    layers: Array.from({ length: layers }, (_, i) => ({ left: held[i], right: held[i + 1] })),
    bottom: { left: range[1], right: Math.min(width, range[1] + CONTACT) },
    edges: raw.map((x) => (x < range[0] - 0.5 || x > range[1] + 0.5 ? null : Math.min(Math.max(x, range[0]), range[1]))),
  };
}

/**
 * Places nearest to the wished ones that keep a distance: least squares with pooled neighbours (isotonic regression, pool adjacent violators).
 *
 * @param wished  rising, px
 * @returns       rising, px, `gap` apart, within low..high; null where there is no room for all
 */
export function spread(wished: readonly number[], gap: number, low: number, high: number): number[] | null {
  const n = wished.length;
  if (n > 0 && (n - 1) * gap > high - low) return null;
  const pools: { sum: number; count: number }[] = [];
  wished.forEach((x, i) => {
    pools.push({ sum: x - i * gap, count: 1 });
    while (pools.length > 1) {
      const [a, b] = [pools[pools.length - 2], pools[pools.length - 1]];
      if (a.sum / a.count <= b.sum / b.count) break;
      pools.splice(-2, 2, { sum: a.sum + b.sum, count: a.count + b.count });
    }
  });
  const placed = pools.flatMap((pool) => Array.from({ length: pool.count }, () => pool.sum / pool.count));
  return placed.map((x, i) => Math.min(Math.max(x + i * gap, low + i * gap), high - (n - 1 - i) * gap));
}

/** Where a dragged layer would land: the place among the layers after the move, for a pointer at x. */
export function landing(x: number, layers: readonly Span[], from: number): number {
  let to = 0;
  layers.forEach((span, i) => {
    if (i !== from && x > (span.left + span.right) / 2) to++;
  });
  return to;
}
