import type { Graded, Implanted, Pure, Text } from '../../src/design/types.ts';

/** The shapes that a value through the depth of a layer can have, as the forms offer them. */
export type Shape = 'constant' | 'linear' | 'gaussian' | 'erfc' | 'implanted' | 'points';
export type DepthValue = Graded<Text> | Graded<Pure> | Implanted;

export function shapeOf(value: DepthValue): Shape {
  if (typeof value !== 'object') return 'constant';
  if ('points' in value) return 'points';
  return 'peak' in value ? 'implanted' : value.shape;
}

/** The value at the top of the layer as text, or the peak of an implant: what a change of shape starts from. */
export function leadingText(value: DepthValue): string {
  if (typeof value !== 'object') return String(value);
  if ('points' in value) return String(value.points[0]?.[1] ?? '');
  return 'peak' in value ? value.peak : String(value.from);
}

function trailingText(value: DepthValue): string {
  if (typeof value !== 'object') return String(value);
  if ('points' in value) return String(value.points[value.points.length - 1]?.[1] ?? '');
  return 'peak' in value ? (value.background ?? value.peak) : String(value.to);
}

/**
 * The value in another shape, starting from the one it had.
 *
 * @param thickness  of the layer, as typed: an implant starts with its peak at the surface of the layer
 */
export function reshaped(value: DepthValue, shape: Shape, thickness: string): DepthValue {
  const [first, last] = [leadingText(value), trailingText(value)];
  switch (shape) {
    case 'constant': return first;
    case 'implanted': return { peak: first, depth: '0 nm', straggle: `(${thickness})/4`, shape: 'gaussian' };
    case 'points': return { points: [['0 nm', first], [thickness, last]] };
    default: return { from: first, to: last, shape };
  }
}

/** One short line for a narrow column: "1e19 → 1e17 cm^-3". */
export function shortText(value: DepthValue): string {
  if (typeof value !== 'object') return String(value);
  if ('points' in value) return `${leadingText(value)} … ${trailingText(value)}`;
  if ('peak' in value) return `${value.peak} peak`;
  return `${value.from} → ${value.to}`;
}

/** "0 nm; 1e20 cm^-3", a line a point. */
export function pointsText(points: readonly (readonly [Text, Pure])[]): string {
  return points.map(([depth, value]) => `${depth}; ${value}`).join('\n');
}

/** Lines of "depth; value" (a tab or the last comma will do too, as pasted from a table); a bare number gets its unit. */
export function pointsFrom(text: string, complete: (typed: string, unit: string) => string, unit: string): [Text, Text][] {
  return text
    .split(/\r?\n/)
    .map((line) => line.trim())
    .filter((line) => line !== '')
    .map((line) => {
      const [depth, ...rest] = line.split(/\s*[;\t,]\s*/);
      return [complete(depth, 'nm'), complete(rest.join(' '), unit)];
    });
}
