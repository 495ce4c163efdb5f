import { BOLTZMANN } from '../../../solver/constants.ts';
import type { IonisedResult, LayerResult } from '../../result/types.ts';
import type { Frame } from '../frame.ts';
import type { Shape } from '../shapes.ts';
import { mixed } from '../styles.ts';
import { valueAt, type LayerSpan } from '../traces.ts';

/** px between ticks and size of one. */
const PITCH = 30;
const TICK = { w: 11, h: 3.2 };

/** Short ticks along each dopant's level, filled by the share of its states that hold an electron. */
export function dopantLevels(frame: Frame, spans: LayerSpan[]): Shape[] {
  const { result, depth, area, energy, style } = frame;
  const shapes: Shape[] = [];
  const kT = BOLTZMANN * result.conditions.temperature_K;
  for (const span of spans) {
    const layer = result.layers[span.layer];
    const [left, right] = [Math.max(area.left, depth.edges[span.layer]), Math.min(area.right, depth.edges[span.layer + 1])];
    const count = Math.floor((right - left - 4) / PITCH) || (right - left > TICK.w + 4 ? 1 : 0);
    layer.ionised.forEach((row, index) => {
      for (let i = 0; i < count; i++) {
        const x = left + ((i + 0.5) * (right - left)) / count;
        const z = depth.depth(x);
        const ec = valueAt(result, result.profile.ec_eV, z);
        const ev = valueAt(result, result.profile.ev_eV, z);
        const y = energy.y(row.kind === 'donor' ? ec - row.level_eV : ev + row.level_eV);
        if (!(y > area.top && y < area.bottom)) continue;
        const share = filledShare(layer, row, ec, ev, kT);
        shapes.push({
          kind: 'rect', role: `${row.kind}-level`, x: x - TICK.w / 2, y: y - TICK.h / 2, w: TICK.w, h: TICK.h,
          fill: mixed(style.ground, style.occupancy, share), stroke: style.ink, width: 0.7,
          // One title a row is enough for a reader who cannot see; a hundred would bury it.
          title: i === 0 ? `${row.kind} level of ${row.dopant ?? `row ${index + 1}`} in ${layer.name}` : undefined,
        });
      }
    });
  }
  return shapes;
}

/**
 * Share of a dopant's states that hold an electron, at a depth with the local edges ec and ev.
 *
 * The odds of being ionised in the neutral layer are known from the result; bending multiplies them by exp(shift/kT). That is exact for a level whose states are all
 * bound (share 1 in the reference of the level), whatever its degeneracy, and a tint within the drawing's accuracy for the merged ones.
 */
export function filledShare(layer: LayerResult, row: IonisedResult, ec: number, ev: number, kT: number): number {
  const donor = row.kind === 'donor';
  const shift = donor ? ec - layer.ec_minus_ef_eV : -ev - layer.ef_minus_ev_eV;
  const neutral = 1 - row.fraction;
  // exp of at most 700 stays finite.
  const odds = (row.fraction / Math.max(neutral, 1e-16)) * Math.exp(Math.min(Math.max(shift / kT, -700), 700));
  const ionised = row.fraction >= 1 ? 1 : odds / (1 + odds);
  const share = Number.isFinite(ionised) ? ionised : 1;
  return donor ? 1 - share : share;
}
