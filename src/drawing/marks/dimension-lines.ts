import type { Frame } from '../frame.ts';
import { runsWidth } from '../glyph-widths.ts';
import { SYMBOL_GAP, type PlacedDimension } from '../place-dimensions.ts';
import { px, type Shape } from '../shapes.ts';

/** Length and half width of an arrow head, of the font size. */
const HEAD = { length: 0.55, half: 0.2 };
/** Lines shorter than this carry their arrows outside, pointing in, as on a mechanical drawing, px. */
const SHORT = 26;

/** Extension lines, the line with its two arrows, and the figure on a patch of paper. */
export function dimensionLine(frame: Frame, d: PlacedDimension): Shape[] {
  const { energy, style } = frame;
  const [top, bottom] = [energy.y(d.high), energy.y(d.low)];
  const ink = { stroke: style.ink, width: style.thinWidth } as const;
  const id = `${frame.prefix}-${d.id.replace(':', '-')}`;
  const shapes: Shape[] = [];
  for (const [x, y] of [[d.highX, top], [d.lowX, bottom]]) {
    if (Math.abs(d.x - x) < 1) continue;
    shapes.push({ kind: 'line', role: 'dimension-extension', x1: x, x2: d.x + 4 * Math.sign(d.x - x), y1: y, y2: y, stroke: style.faint, width: 0.75 * style.thinWidth });
  }
  const short = bottom - top < SHORT;
  const lines = short ? upright(d.x, top - 12, top) + upright(d.x, bottom, bottom + 12) : upright(d.x, top, bottom);
  shapes.push({ kind: 'path', role: 'dimension-line', id, title: `${d.meaning}: ${d.value}`, d: lines, ...ink });
  shapes.push({ kind: 'path', role: 'dimension-arrow', d: head(d.x, top, (short ? -1 : 1) * frame.small) + head(d.x, bottom, (short ? 1 : -1) * frame.small), fill: style.ink });
  shapes.push({ kind: 'rect', role: 'dimension-ground', x: d.box.x - 2, y: d.box.y, w: d.box.w + 4, h: d.box.h, fill: style.ground, opacity: 0.88 });
  shapes.push(...figure(frame, d));
  return shapes;
}

function upright(x: number, from: number, to: number): string {
  return `M${px(x)},${px(from)}L${px(x)},${px(to)}`;
}

/** A filled head with its tip at y, for a font size; a positive size points up, a negative one down. */
function head(x: number, y: number, size: number): string {
  const base = px(y + size * HEAD.length);
  const half = Math.abs(size) * HEAD.half;
  return `M${px(x)},${px(y)}L${px(x - half)},${base}L${px(x + half)},${base}Z`;
}

function figure(frame: Frame, d: PlacedDimension): Shape[] {
  const { small, style } = frame;
  const common = { kind: 'text', role: 'dimension-figure', size: small, fill: style.ink } as const;
  const { x, y, w } = d.box;
  if (d.stacked) {
    return [
      { ...common, x: x + w / 2, y: y + 1.0 * small, anchor: 'middle', runs: d.symbol },
      { ...common, x: x + w / 2, y: y + 2.2 * small, anchor: 'middle', runs: [{ text: d.value }] },
    ];
  }
  // Two texts: the symbol's width differs between fonts, and the value must keep its place.
  return [
    { ...common, x, y: y + 1.0 * small, anchor: 'start', runs: d.symbol },
    { ...common, x: x + runsWidth(d.symbol, small) + SYMBOL_GAP * small, y: y + 1.0 * small, anchor: 'start', runs: [{ text: d.value }] },
  ];
}
