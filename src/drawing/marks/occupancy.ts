import { BOLTZMANN } from '../../../solver/constants.ts';
import { continuedPath } from '../curve.ts';
import type { Frame } from '../frame.ts';
import { px, type Gradient, type Shape } from '../shapes.ts';
import { mixed } from '../styles.ts';
import { traceOf, type LayerSpan } from '../traces.ts';

/** Where the gradient has its stops, in kT from the Fermi level: close where f bends, far where it is flat. */
const STOPS = [-8, -6, -5, -4, -3.5, -3, -2.5, -2, -1.5, -1, -0.5, 0, 0.5, 1, 1.5, 2, 2.5, 3, 3.5, 4, 5, 6, 8];

/** f at u = (E - EF)/kT. */
export function fermi(u: number): number {
  return 1 / (1 + Math.exp(u));
}

/**
 * The tint of a state by its energy: f(E), from the ground's colour where no state is filled to the full tint where all are. With a flat
 * Fermi level f knows energy alone, so that one upright gradient serves the whole plate and stays right at any temperature.
 */
export function occupancyGradient(frame: Frame): Gradient {
  const { energy, style, result, prefix } = frame;
  const kT = BOLTZMANN * result.conditions.temperature_K;
  const ef = result.profile.ef_eV[0] ?? 0;
  // A gradient without length takes its last colour everywhere: near 0 K it stays a sharp edge of a tenth of a px.
  const reach = Math.max(energy.y(ef) - energy.y(ef + STOPS[STOPS.length - 1] * kT), 0.05);
  const [top, bottom] = [energy.y(ef) - reach, energy.y(ef) + reach];
  const stops = [...STOPS].reverse().map((u) => ({
    offset: (STOPS[STOPS.length - 1] - u) / (STOPS[STOPS.length - 1] - STOPS[0]),
    color: mixed(style.ground, style.occupancy, style.fullTint * fermi(u)),
  }));
  return { id: `${prefix}-occupancy`, x1: 0, y1: px(top), x2: 0, y2: px(bottom), stops };
}

/** Both bands filled by the gradient; the gap stays paper. */
export function occupancyShading(frame: Frame, spans: LayerSpan[]): { shapes: Shape[]; gradients: Gradient[] } {
  const gradient = occupancyGradient(frame);
  const common = { kind: 'path', fill: `url(#${gradient.id})`, clip: frame.areaClip } as const;
  const shapes: Shape[] = [
    { ...common, role: 'occupancy-valence', title: 'occupancy of the valence band', d: regionPath(frame, spans, frame.result.profile.ev_eV, frame.area.bottom) },
    { ...common, role: 'occupancy-conduction', title: 'occupancy of the conduction band', d: regionPath(frame, spans, frame.result.profile.ec_eV, frame.area.top) },
  ];
  return { shapes, gradients: [gradient] };
}

/** The region between an edge and a horizontal line, a piece for each layer. */
function regionPath(frame: Frame, spans: LayerSpan[], edge: number[], to: number): string {
  let d = '';
  for (const span of spans) {
    const trace = traceOf(span, edge, frame.energy.y);
    // A region with a hole in its edge has no shape; such a layer stays paper.
    if (!trace.y.every(Number.isFinite)) continue;
    const [x0, x1] = [trace.x[0], trace.x[trace.x.length - 1]];
    d += d === '' ? `M${px(x0)},${px(to)}${continuedPath(trace)}L${px(x1)},${px(to)}` : `L${px(x0)},${px(to)}${continuedPath(trace)}L${px(x1)},${px(to)}`;
  }
  return d === '' ? '' : `${d}Z`;
}
