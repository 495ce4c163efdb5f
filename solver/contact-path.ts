import { localCharge } from './charge.ts';
import { BOLTZMANN, ELEMENTARY_CHARGE, EPSILON_0 } from './constants.ts';
import type { SpaceCharge } from './depletion.ts';
import { neutralLevel } from './fermi-level.ts';
import type { Profiles } from './solution.ts';
import type { Stack } from './stack.ts';

/** A place counts as neutral when its net charge is below this share of its carriers or dopants, as at a depletion edge. */
const NEUTRAL = 0.5;
/** The path ends where the net charge has fallen to this share of the carriers: there the bands lie within kT/1000 of their neutral place. */
const SETTLED = 1e-3;

/** What a carrier crosses between the metal and the neutral layer under it. Arrays [nodes], from the metal inwards, an interface twice. */
export interface ContactPath {
  side: 'top' | 'bottom';
  /** from the metal, cm */ s: Float64Array;
  layer: Int32Array;
  /** V */ psi: Float64Array;
  /** d psi/ds, V/cm */ slope: Float64Array;
  /** Ec + psi: the conduction edge before charge moved, eV */ conduction: Float64Array;
  /** Ev + psi, eV */ valence: Float64Array;
  /** the layer that holds the carriers */ reservoir: number;
  /** Ec - EF of that layer by itself, eV */ ecMinusEf: number;
  /** its EF - Ev */ efMinusEv: number;
  /** whether electrons are its majority */ electrons: boolean;
}

/**
 * The way from a metal to the first layer that is neutral somewhere. A layer that is depleted (or flooded) throughout is passed on, as an insulator is.
 *
 * @returns null where no layer of the stack is neutral, nor its other end an ideal ohmic contact
 *
 * Neutral means that the net charge is small beside the carriers *and* that the bands bend by less than kT over a Debye length (or the layer, if that is thinner): where donors give way to
 * acceptors the charge crosses zero in a strong field, and nothing is neutral there.
 */
export function contactPath(stack: Stack, profiles: Profiles, space: SpaceCharge, side: 'top' | 'bottom'): ContactPath | null {
  const { temperature: T, assumptions } = stack;
  const total = profiles.z.length;
  const top = side === 'top';
  const node = (i: number): number => (top ? i : total - 1 - i);
  let end = -1;
  for (let step = 0; step < stack.layers.length && end < 0; step++) {
    const l = top ? step : stack.layers.length - 1 - step;
    const [first, last] = space.ranges[l];
    const middle = localCharge(stack.layers[l], stack.layers[l].thickness / 2, T, assumptions).bands;
    if (middle.insulator) continue;
    const eps = middle.permittivity * EPSILON_0;
    let least = Infinity;
    for (let i = 0; i <= last - first; i++) {
      const s = top ? first + i : last - i;
      const n = profiles.n[s];
      const p = profiles.p[s];
      const charge = Math.abs(profiles.charge[s]);
      const carriers = Math.max(n, p);
      if (carriers === 0 || charge > NEUTRAL * Math.max(carriers, Math.abs(space.net[s]))) continue;
      const debye = Math.sqrt((eps * BOLTZMANN * T) / (ELEMENTARY_CHARGE * (n + p)));
      // A frozen layer has next to no carriers and a Debye length beyond all bounds: there its own thickness is the measure.
      if (Math.abs(profiles.field[s]) * Math.min(debye, stack.layers[l].thickness) > BOLTZMANN * T) continue;
      if (charge < least * carriers) {
        least = charge / carriers;
        end = s;
      }
      if (least <= SETTLED) break;
    }
  }
  // An ideal ohmic contact takes up carriers whatever the layer before it looks like.
  if (end < 0 && stack[top ? 'bottom' : 'top'].kind === 'neutral') end = node(total - 1);
  if (end < 0) return null;
  const reservoir = profiles.layer[end];
  const layer = stack.layers[reservoir];
  const [first] = space.ranges[reservoir];
  const c = localCharge(layer, profiles.z[end] - profiles.z[first], T, assumptions);
  const { ecMinusEf } = neutralLevel(c);
  const nodes = (top ? end : total - 1 - end) + 1;
  const array = (): Float64Array => new Float64Array(nodes);
  const path: ContactPath = {
    side, s: array(), layer: new Int32Array(nodes), psi: array(), slope: array(), conduction: array(), valence: array(),
    reservoir, ecMinusEf, efMinusEv: c.bands.gap - ecMinusEf, electrons: profiles.n[end] >= profiles.p[end],
  };
  const origin = profiles.z[node(0)];
  for (let i = 0; i < nodes; i++) {
    const s = node(i);
    path.s[i] = Math.abs(profiles.z[s] - origin);
    path.layer[i] = profiles.layer[s];
    path.psi[i] = profiles.psi[s];
    path.slope[i] = top ? -profiles.field[s] : profiles.field[s];
    path.conduction[i] = profiles.ec[s] + profiles.psi[s];
    path.valence[i] = profiles.ev[s] + profiles.psi[s];
  }
  return path;
}
