import type { Clip, Drawing, Gradient, Shape } from '../drawing/shapes.ts';
import { px } from '../drawing/shapes.ts';

/** A drawing as part of a larger one, moved by (dx, dy) px. */
export function placed(drawing: Drawing, dx: number, dy: number): { shapes: Shape[]; gradients: Gradient[]; clips: Clip[] } {
  return {
    shapes: drawing.shapes.map((shape) => movedShape(shape, dx, dy)),
    gradients: drawing.gradients.map((g) => ({ ...g, x1: g.x1 + dx, x2: g.x2 + dx, y1: g.y1 + dy, y2: g.y2 + dy })),
    clips: drawing.clips.map((c) => ({ ...c, x: c.x + dx, y: c.y + dy })),
  };
}

function movedShape(shape: Shape, dx: number, dy: number): Shape {
  switch (shape.kind) {
    case 'line': return { ...shape, x1: shape.x1 + dx, x2: shape.x2 + dx, y1: shape.y1 + dy, y2: shape.y2 + dy };
    case 'path': return { ...shape, d: movedPath(shape.d, dx, dy) };
    default: return { ...shape, x: shape.x + dx, y: shape.y + dy };
  }
}

/** Path data of absolute M, L, C, Z: its numbers are x and y in turn. */
function movedPath(d: string, dx: number, dy: number): string {
  let isX = false;
  return d.replace(/[A-Za-z]|[-+]?(?:\d+\.?\d*|\.\d+)(?:[eE][-+]?\d+)?/g, (token) => {
    if (/^[A-Za-z]$/.test(token)) {
      isX = false;
      return token;
    }
    isX = !isX;
    // A space keeps a number apart from the one before it where only its sign did.
    const value = px(Number(token) + (isX ? dx : dy));
    return value < 0 || token.startsWith('-') || token.startsWith('+') ? ` ${value}` : String(value);
  });
}
