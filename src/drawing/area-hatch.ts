import { px } from './shapes.ts';
import type { PlotArea } from './plot-frame.ts';

/** How finely a hatch line is followed, px: below what the eye tells at the edge of an area. */
const STEP = 1.5;

/**
 * Slanted lines over the part of an area in which something holds, as path data; '' where nothing does.
 *
 * @param spacing  across, px
 * @param lean     1 rises to the right, -1 falls
 */
export function hatched(area: PlotArea, spacing: number, lean: 1 | -1, inside: (x: number, y: number) => boolean): string {
  const { left, right, top, bottom } = area;
  const height = bottom - top;
  const along = spacing * Math.SQRT2;
  let d = '';
  // Lines are counted from the corner of the picture, so that those of neighbouring areas meet.
  for (let start = left - height; start < right; start += along) {
    let from: [number, number] | null = null;
    let last: [number, number] = [0, 0];
    for (let down = 0; down <= height; down += STEP) {
      const x = start + (lean === 1 ? height - down : down);
      const y = top + down;
      const holds = x >= left && x <= right && inside(x, y);
      if (holds) {
        from ??= [x, y];
        last = [x, y];
      }
      if (from !== null && (!holds || down + STEP > height)) {
        if (last[1] - from[1] > STEP) d += `M${px(from[0])},${px(from[1])}L${px(last[0])},${px(last[1])}`;
        from = null;
      }
    }
  }
  return d;
}
