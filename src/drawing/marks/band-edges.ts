import { continuedPath, curvePath } from '../curve.ts';
import type { Frame } from '../frame.ts';
import { px, type Shape } from '../shapes.ts';
import { traceOf, type LayerSpan } from '../traces.ts';

/** One line through all layers; an interface, whose node stands twice, becomes a vertical step. */
export function throughLayers(frame: Frame, spans: LayerSpan[], values: number[]): string {
  let d = '';
  for (const span of spans) {
    const trace = traceOf(span, values, frame.energy.y);
    // A gap in the data must stay a gap: the step is drawn only from a drawn end to a drawn beginning.
    const joins = d !== '' && Number.isFinite(trace.y[0]) && Number.isFinite(values[span.first - 1] ?? Number.NaN);
    d += joins ? continuedPath(trace) : curvePath(trace);
  }
  return d;
}

/** Ec and Ev, solid. */
export function bandEdges(frame: Frame, spans: LayerSpan[]): Shape[] {
  const { style, result } = frame;
  const common = { kind: 'path', clip: frame.areaClip, join: 'round' } as const;
  return [
    { ...common, role: 'valence-edge', title: 'valence band edge Ev', d: throughLayers(frame, spans, result.profile.ev_eV), stroke: style.valence, width: style.valenceWidth },
    { ...common, role: 'conduction-edge', title: 'conduction band edge Ec', d: throughLayers(frame, spans, result.profile.ec_eV), stroke: style.conduction, width: style.edgeWidth },
  ];
}

/** The Fermi level, a long dash. */
export function fermiLevel(frame: Frame, spans: LayerSpan[]): Shape[] {
  const { style, result } = frame;
  return [{ kind: 'path', role: 'fermi-level', title: 'Fermi level', d: throughLayers(frame, spans, result.profile.ef_eV), stroke: style.ink, width: style.fermiWidth, dash: style.fermiDash, clip: frame.areaClip }];
}

/** The local vacuum level, dotted. */
export function vacuumLevel(frame: Frame, spans: LayerSpan[]): Shape[] {
  const { style, result } = frame;
  return [{ kind: 'path', role: 'vacuum-level', title: 'vacuum level', d: throughLayers(frame, spans, result.profile.vacuum_eV), stroke: style.ink, width: style.fermiWidth, dash: style.vacuumDash, clip: frame.areaClip }];
}

/** Thin lines where layers meet, and the two ends of the stack. */
export function interfaces(frame: Frame): Shape[] {
  const { area, depth, style, result } = frame;
  const shapes: Shape[] = [];
  depth.edges.forEach((x, i) => {
    if (x < area.left - 0.01 || x > area.right + 0.01) return;
    const inner = i > 0 && i < depth.edges.length - 1;
    const title = inner ? `interface of ${result.layers[i - 1].name} and ${result.layers[i].name}` : i === 0 ? 'top of the stack' : 'bottom of the stack';
    shapes.push({ kind: 'line', role: 'interface', title, x1: px(x), x2: px(x), y1: area.top, y2: area.bottom + frame.strip, stroke: style.faint, width: inner ? style.thinWidth : 1.5 * style.thinWidth });
  });
  return shapes;
}
