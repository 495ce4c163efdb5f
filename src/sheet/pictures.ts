import type { Drawing, Part } from '../drawing/shapes.ts';
import type { Piece } from './flow.ts';
import { placed } from './place-drawing.ts';

/** A drawing as something that stands on a page: never cut, told as one figure. Its ids must be its own within the sheet. */
export function picturePiece(drawing: Drawing): Piece {
  const part: Part = { as: 'figure', alt: drawing.description };
  return {
    height: drawing.height,
    draw: (x, y) => placed(drawing, x, y).shapes.map((shape) => ({ ...shape, part })),
    defs: (x, y) => {
      const { gradients, clips } = placed(drawing, x, y);
      return { gradients, clips };
    },
    description: drawing.description,
  };
}
