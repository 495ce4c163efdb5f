import type { Result } from '../../result/types.ts';
import type { Frame } from '../frame.ts';
import { fitted, textWidth } from '../glyph-widths.ts';
import type { Shape } from '../shapes.ts';
import { mixed } from '../styles.ts';
import { visibleSpans } from '../traces.ts';
import { throughLayers } from './band-edges.ts';

/** Another result laid over the plate for comparison. */
export interface Variant {
  name: string;
  result: Result;
}

/** A code for each variant, apart from those of the Fermi and the vacuum level; they begin again after the last. */
const DASHES = ['9 3', '2 2', '9 3 2 3', '5 5'];
/** Share of the ink: variants step back behind the plate's own bands. */
const STRENGTH = 0.65;

/** Band edges of other results on the plate's own axes, thin, each with its dash, and a key of their names in the upper right corner. */
export function variantEdges(frame: Frame, variants: Variant[]): Shape[] {
  const { style, area, small } = frame;
  return variants.flatMap(({ name, result }, i): Shape[] => {
    const spans = visibleSpans(result, frame.depth);
    const dash = DASHES[i % DASHES.length];
    const common = { kind: 'path', clip: frame.areaClip, width: 0.7 * style.edgeWidth, dash } as const;
    const key = fitted(name, small, 0.3 * (area.right - area.left));
    const y = area.top + (1.2 + 1.5 * i) * small;
    const x = area.right - 8 - textWidth(key, small);
    return [
      { ...common, role: 'variant-valence-edge', title: `valence band edge of ${name}`, d: throughLayers(frame, spans, result.profile.ev_eV), stroke: mixed(style.ground, style.valence, STRENGTH) },
      { ...common, role: 'variant-conduction-edge', title: `conduction band edge of ${name}`, d: throughLayers(frame, spans, result.profile.ec_eV), stroke: mixed(style.ground, style.conduction, STRENGTH) },
      { kind: 'rect', role: 'variant-key-ground', x: x - 36, y: y - 1.1 * small, w: area.right - x + 32, h: 1.5 * small, fill: style.ground, opacity: 0.88 },
      { kind: 'line', role: 'variant-key', x1: x - 32, x2: x - 6, y1: y - 0.35 * small, y2: y - 0.35 * small, stroke: style.ink, width: 0.7 * style.edgeWidth, dash },
      { kind: 'text', role: 'variant-name', x: area.right - 8, y, size: small, anchor: 'end', runs: [{ text: key }], fill: style.ink },
    ];
  });
}
