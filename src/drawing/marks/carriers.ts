import { BOLTZMANN } from '../../../solver/constants.ts';
import { thinned } from '../curve.ts';
import type { Frame } from '../frame.ts';
import { energyDistribution, levelInterval, peakOfBand } from '../band-filling.ts';
import { px, type Shape } from '../shapes.ts';
import { mixed } from '../styles.ts';
import { traceOf, type LayerSpan } from '../traces.ts';

/** Levels below the plate's densest spot, decades; drawn from the palest inwards. */
export const DECADES = [4, 3, 2, 1, 0.301];

interface Column {
  x: number;
  /** band edge, eV, and the sign in which states lie from it */ edge: number;
  /** (EF - Ec)/kT or (Ev - EF)/kT */ eta: number;
  /** ln of the largest density per energy in this column */ peak: number;
  /** ln of the factor in front, see band-filling.ts */ front: number;
  /** Kane's alpha kT */ a: number;
}

/**
 * Where the carriers are: electrons f g above Ec, holes (1 - f) g below Ev, as nested areas of equal density per volume and energy, a decade
 * apart, counted from the densest spot of the plate.
 */
export function carrierShading(frame: Frame, spans: LayerSpan[]): Shape[] {
  const electrons = spans.map((span) => columns(frame, span, 'n'));
  const holes = spans.map((span) => columns(frame, span, 'p'));
  let peak = -Infinity;
  for (const column of [...electrons, ...holes].flat()) peak = Math.max(peak, column.peak);
  if (!Number.isFinite(peak)) return [];
  const shapes: Shape[] = [];
  DECADES.forEach((decades, i) => {
    const level = peak - decades * Math.LN10;
    const fill = mixed(frame.style.ground, frame.style.occupancy, ((i + 1) / DECADES.length) * 1.9 * frame.style.fullTint);
    const below = decades < 1 ? 'half of the peak' : `10^-${decades} of the peak`;
    for (const [carrier, sets] of [['electrons', electrons], ['holes', holes]] as const) {
      const d = sets.map((set) => areaAbove(frame, set, level, carrier === 'electrons' ? 1 : -1)).join('');
      if (d !== '') shapes.push({ kind: 'path', role: `${carrier}-density`, title: `${carrier} above ${below}`, d, fill, clip: frame.areaClip });
    }
  });
  return shapes;
}

/** Columns of one layer, no more than the thinned edge needs. */
function columns(frame: Frame, span: LayerSpan, carrier: 'n' | 'p'): Column[] {
  const { result, energy } = frame;
  const layer = result.layers[span.layer];
  const states = carrier === 'n' ? layer.nc_cm3 : layer.nv_cm3;
  if (layer.insulator || !(states > 0)) return [];
  const kT = BOLTZMANN * result.conditions.temperature_K;
  const a = (carrier === 'n' ? layer.kane_n_per_eV : layer.kane_p_per_eV) * kT;
  const sign = carrier === 'n' ? 1 : -1;
  const ef = result.profile.ef_eV[span.first];
  const trace = thinned(traceOf(span, carrier === 'n' ? result.profile.ec_eV : result.profile.ev_eV, energy.y));
  const front = Math.log(states / kT);
  return trace.x.map((x, i) => {
    const edge = energy.energy(trace.y[i]);
    const eta = (sign * (ef - edge)) / kT;
    return { x, edge, eta, front, a, peak: front + energyDistribution(peakOfBand(eta, a), eta, a) };
  });
}

/** Path of where one band's density is at least exp(level): a piece for each stretch of columns that reach it. */
function areaAbove(frame: Frame, set: Column[], level: number, sign: number): string {
  const kT = BOLTZMANN * frame.result.conditions.temperature_K;
  const { energy } = frame;
  let d = '';
  let near: string[] = [];
  let far: string[] = [];
  const flush = (): void => {
    if (near.length > 1) d += `M${near.join('L')}L${far.reverse().join('L')}Z`;
    [near, far] = [[], []];
  };
  const add = (c: Column): void => {
    const [from, to] = levelInterval(level - c.front, c.eta, c.a);
    near.push(`${px(c.x)},${px(energy.y(c.edge + sign * from * kT))}`);
    far.push(`${px(c.x)},${px(energy.y(c.edge + sign * to * kT))}`);
  };
  set.forEach((column, i) => {
    const before = set[i - 1];
    const reaches = column.peak >= level;
    if (before && before.peak >= level !== reaches) {
      // The tip between two columns: where the peak, straight between them, meets the level.
      const tip = between(before, column, (level - before.peak) / (column.peak - before.peak), level);
      add(tip);
      if (!reaches) flush();
    }
    if (reaches) add(column);
  });
  flush();
  return d;
}

function between(p: Column, q: Column, t: number, level: number): Column {
  const mix = (u: number, v: number): number => u + t * (v - u);
  return { x: mix(p.x, q.x), edge: mix(p.edge, q.edge), eta: mix(p.eta, q.eta), front: p.front, a: p.a, peak: level };
}
