import type { Result } from '../../result/types.ts';
import type { Frame } from '../frame.ts';
import { fitted, textWidth } from '../glyph-widths.ts';
import { px, type Shape } from '../shapes.ts';
import { mixed } from '../styles.ts';
import { traceOf, visibleSpans, type LayerSpan } from '../traces.ts';
import { throughLayers } from './band-edges.ts';

/** Another result laid over the plate for comparison. */
export interface Variant {
  name: string;
  result: Result;
}

/** A code for each variant, apart from those of the Fermi and the vacuum level; they begin again after the last. */
const DASHES = ['9 3', '2 2', '9 3 2 3', '5 5'];
/** Share of the band's colour: variants step back behind the plate's own bands, each to its own depth, none below a contrast of 3 to 1. */
const STRENGTHS = [0.7, 1, 0.85];
/** Marks on each line, where colours and dashes are lost to a copier; how far apart, px, and how large, of the small letters. */
const APART = 150;
const MARK = 0.36;

/**
 * Band edges of other results on the plate's own axes, thin, each with its dash, tint and mark, and a key of their names.
 *
 * @param base  name of the plate's own result, which then heads the key
 */
export function variantEdges(frame: Frame, variants: Variant[], base?: string): Shape[] {
  const { style, area, small } = frame;
  if (variants.length === 0) return [];
  const rows = [...(base === undefined ? [] : [base]), ...variants.map(({ name }) => name)];
  const key = (row: number, line: { stroke: string; width: number; dash?: string }, mark?: number): Shape[] => keyEntry(frame, rows, row, line, mark);
  const own = base === undefined ? [] : key(0, { stroke: style.ink, width: style.edgeWidth });
  return [...own, ...variants.flatMap(({ name, result }, i): Shape[] => {
    const spans = visibleSpans(result, frame.depth);
    const look = { width: 0.7 * style.edgeWidth, dash: DASHES[i % DASHES.length] };
    const common = { kind: 'path', clip: frame.areaClip, ...look } as const;
    const tint = (colour: string): string => mixed(style.ground, colour, STRENGTHS[i % STRENGTHS.length]);
    const [valence, conduction] = [tint(style.valence), tint(style.conduction)];
    const mark = (at: [number, number][], stroke: string): Shape => ({ kind: 'path', role: 'variant-mark', d: at.map(([x, y]) => markPath(i, x, y, MARK * small)).join(''), fill: style.ground, stroke, width: 0.5 * style.edgeWidth, clip: frame.areaClip });
    const places = markPlaces(area.left, area.right, i, variants.length);
    return [
      { ...common, role: 'variant-valence-edge', title: `valence band edge of ${name}`, d: throughLayers(frame, spans, result.profile.ev_eV), stroke: valence },
      { ...common, role: 'variant-conduction-edge', title: `conduction band edge of ${name}`, d: throughLayers(frame, spans, result.profile.ec_eV), stroke: conduction },
      mark(pointsAt(frame, spans, result.profile.ev_eV, places), valence),
      mark(pointsAt(frame, spans, result.profile.ec_eV, places), conduction),
      ...key(rows.length - variants.length + i, { ...look, stroke: style.ink }, i),
    ];
  })];
}

/** Of a key's entry, px: the piece of line before the name. */
const SAMPLE = 40;

/** An entry of the key: a piece of the line with its mark, and the name. Under each other in the corner of the area; in a full frame beside each other in the line above it. */
function keyEntry({ style, area, small, strip }: Frame, names: readonly string[], row: number, line: { stroke: string; width: number; dash?: string }, mark?: number): Shape[] {
  const beside = strip > 0;
  const room = beside ? (area.right - area.left) / names.length - SAMPLE - 12 : 0.3 * (area.right - area.left);
  const fits = names.map((name) => fitted(name, small, room));
  const widths = fits.map((name) => textWidth(name, small));
  const right = beside ? area.right - widths.slice(row + 1).reduce((sum, w) => sum + w + SAMPLE + 12, 0) : area.right - 8;
  const y = beside ? area.top - 0.7 * small : area.top + (1.2 + 1.5 * row) * small;
  const x = right - widths[row];
  const at = y - 0.35 * small;
  return [
    ...(beside ? [] : [{ kind: 'rect' as const, role: 'variant-key-ground', x: x - SAMPLE - 4, y: y - 1.1 * small, w: right + 4 - (x - SAMPLE - 4), h: 1.5 * small, fill: style.ground, opacity: 0.88 }]),
    { kind: 'line', role: 'variant-key', x1: x - SAMPLE, x2: x - 6, y1: at, y2: at, ...line },
    ...(mark === undefined ? [] : [{ kind: 'path' as const, role: 'variant-key-mark', d: markPath(mark, x - SAMPLE / 2 - 3, at, MARK * small), fill: style.ground, stroke: style.ink, width: 0.5 * style.edgeWidth }]),
    { kind: 'text', role: 'variant-name', x: right, y, size: small, anchor: 'end', runs: [{ text: fits[row] }], fill: style.ink },
  ];
}

/** Depths of the marks, px: evenly, those of one variant between those of the others. */
function markPlaces(left: number, right: number, index: number, of: number): number[] {
  const count = Math.max(2, Math.round((right - left) / APART));
  return Array.from({ length: count }, (_, m) => left + ((right - left) * (m + (index + 0.5) / of)) / count);
}

/** Points of a line at some places, straight between its nodes; none where it has no value. */
function pointsAt(frame: Frame, spans: LayerSpan[], values: number[], places: number[]): [number, number][] {
  return places.flatMap((place): [number, number][] => {
    for (const span of spans) {
      const { x, y } = traceOf(span, values, frame.energy.y);
      const after = x.findIndex((at) => at >= place);
      if (after <= 0 || !(x[after] > x[after - 1])) continue;
      const at = y[after - 1] + ((place - x[after - 1]) / (x[after] - x[after - 1])) * (y[after] - y[after - 1]);
      if (Number.isFinite(at)) return [[place, at]];
    }
    return [];
  });
}

/** A ring, a triangle, a square, a lozenge; of one size for the eye. */
function markPath(kind: number, x: number, y: number, r: number): string {
  const polygon = (corners: [number, number][]): string => `${corners.map(([dx, dy], i) => `${i === 0 ? 'M' : 'L'}${px(x + dx * r)},${px(y + dy * r)}`).join('')}Z`;
  // Four arcs of a circle by cubics: control points at 0.5523 of the radius.
  const k = 0.5523;
  const arc = (points: [number, number][]): string => `C${points.map(([dx, dy]) => `${px(x + dx * r)},${px(y + dy * r)}`).join(' ')}`;
  switch (kind % 4) {
    case 0: return `M${px(x + r)},${px(y)}${arc([[1, k], [k, 1], [0, 1]])}${arc([[-k, 1], [-1, k], [-1, 0]])}${arc([[-1, -k], [-k, -1], [0, -1]])}${arc([[k, -1], [1, -k], [1, 0]])}Z`;
    case 1: return polygon([[0, -1.15], [1.05, 0.8], [-1.05, 0.8]]);
    case 2: return polygon([[-0.9, -0.9], [0.9, -0.9], [0.9, 0.9], [-0.9, 0.9]]);
    default: return polygon([[0, -1.25], [1.1, 0], [0, 1.25], [-1.1, 0]]);
  }
}
