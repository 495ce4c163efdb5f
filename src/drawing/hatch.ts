import { px, type Clip, type Paint, type PathShape } from './shapes.ts';

/** Distance of the hatch lines along a box's sides, px. */
const SPACING = 6;

/**
 * Slanted lines over a box, rising to the right, with the clip that keeps them inside it.
 *
 * @param clip  id of the clip, unique within the drawing
 */
export function hatched(box: { x: number; y: number; w: number; h: number }, paint: Paint, clip: string): { shape: PathShape; clip: Clip } {
  const { x, y, w, h } = box;
  let d = '';
  for (let start = x - h + SPACING; start < x + w; start += SPACING) d += `M${px(start)},${px(y + h)}L${px(start + h)},${px(y)}`;
  return { shape: { kind: 'path', ...paint, d, clip }, clip: { id: clip, x, y, w, h } };
}
