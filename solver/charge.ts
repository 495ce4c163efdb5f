import { localBands, type LocalBands } from './bands.ts';
import { carrierLog, type CarrierLog } from './carriers.ts';
import { levelInForce } from './dopants.ts';
import { fermiHalfInto } from './fermi-integral.ts';
import { profileAt } from './profile.ts';
import type { Assumptions, Layer } from './stack.ts';

/** One level at one point. */
export interface LocalLevel {
  donor: boolean;
  /** active, cm^-3 */ density: number;
  /** b */ bound: number;
  /** below Ec (donor) or above Ev (acceptor), eV */ depth: number;
  /** ln g */ logG: number;
  /** index of the layer's dopant row; -1 for the compensating charge of a row */ row: number;
}

/** Everything of one point that its charge depends on besides the Fermi level. */
export interface LocalCharge {
  bands: LocalBands;
  levels: LocalLevel[];
  /** further charge that nothing moves, +q, cm^-3 */ fixed: number;
}

/** All cm^-3. */
export interface ChargeValues {
  n: number;
  p: number;
  /** ionised, compensating charge included */ donors: number;
  acceptors: number;
  /** p - n + N_D+ - N_A- */ net: number;
  /** d net/d(Ec - EF), eV^-1 cm^-3, >= 0 */ slope: number;
}

/**
 * Bands and levels at one depth of a layer.
 *
 * @param z  from the layer's top, cm
 * @param T  K, > 0
 * @throws {RangeError} a concentration that is negative or not finite, or what `localBands` refuses
 *
 * A compensation ratio theta leaves the row all its N and adds theta N of the opposite kind, always ionised.
 */
export function localCharge(layer: Layer, z: number, T: number, a: Assumptions): LocalCharge {
  const levels: LocalLevel[] = [];
  let donors = 0;
  let acceptors = 0;
  layer.dopants.forEach((d, row) => {
    const density = profileAt(d.concentration, z, layer.thickness) * d.activation;
    if (!(density >= 0) || !Number.isFinite(density)) throw new RangeError(`concentration must be finite and not negative: ${density}`);
    if (density === 0) return;
    const donor = d.kind === 'donor';
    const { depth, bound } = levelInForce(d, density);
    if (donor) donors += density;
    else acceptors += density;
    levels.push({ donor, density, bound, depth, logG: Math.log(d.degeneracy), row });
    if (d.compensation > 0) levels.push({ donor: !donor, density: density * d.compensation, bound: 0, depth: 0, logG: 0, row: -1 });
  });
  const x = profileAt(layer.x, z, layer.thickness);
  return { bands: localBands(layer.material, x, T, a, { donors, acceptors }), levels, fixed: 0 };
}

/** All donors less all acceptors, charged or not, with fixed charge: what is left when every level is charged, cm^-3. */
export function netDoping(c: LocalCharge): number {
  let donors = 0;
  let acceptors = 0;
  for (const level of c.levels) {
    if (level.donor) donors += level.density;
    else acceptors += level.density;
  }
  return donors - acceptors + c.fixed;
}

/** How far, in kT, the level lies on its charged side of EF. */
export function distance(bands: LocalBands, level: LocalLevel, ecMinusEf: number): number {
  return (level.donor ? ecMinusEf - level.depth : bands.gap - ecMinusEf - level.depth) / bands.kT;
}

const carrier: CarrierLog = { log: 0, slope: 0 };
/** F_1/2 and its derivative. */
const pair = new Float64Array(2);
/** Boltzmann statistics can overflow, far inside a band where they mean nothing; kept finite for the iteration's sake. */
const LARGEST_EXPONENT = 600;

/** F = density over density of states into pair[0], dF/deta into pair[1]. */
function carriersInto(eta: number, a: number, boltzmann: boolean): void {
  if (a > 0) {
    carrierLog(eta, a, boltzmann, carrier);
    pair[0] = Math.exp(Math.min(carrier.log, LARGEST_EXPONENT));
    pair[1] = pair[0] * carrier.slope;
  } else if (boltzmann) pair[0] = pair[1] = Math.exp(Math.min(eta, LARGEST_EXPONENT));
  else fermiHalfInto(eta, pair);
}

/**
 * Charge at a given Fermi level, into `out` (nothing is allocated). An insulator carries none: all zero, whatever is in it.
 *
 * @param ecMinusEf  eV, any size
 *
 * `net` keeps its digits in exact compensation and in freeze-out alike (see the sum).
 */
export function chargeAt(c: LocalCharge, ecMinusEf: number, out: ChargeValues): void {
  const b = c.bands;
  out.n = out.p = out.donors = out.acceptors = out.net = out.slope = 0;
  if (b.insulator) return;
  const boltzmann = b.statistics === 'boltzmann';
  carriersInto(-ecMinusEf / b.kT, b.kaneN * b.kT, boltzmann);
  out.n = b.nc * pair[0];
  let slope = b.nc * pair[1];
  carriersInto((ecMinusEf - b.gap) / b.kT, b.kaneP * b.kT, boltzmann);
  out.p = b.nv * pair[0];
  slope += b.nv * pair[1];
  // Levels on their charged side enter as N less what they hold, the others by their charge itself: equal donors and acceptors
  // cancel exactly, and near freeze-out no digit is lost to N - (N - small).
  let whole = c.fixed;
  let small = 0;
  for (let i = 0; i < c.levels.length; i++) {
    const level = c.levels[i];
    let charged = level.density;
    let signed = charged;
    if (level.bound > 0) {
      // The larger share is 1/(1 + e), the smaller e/(1 + e): each computed for itself, since near freeze-out one minus the other has no
      // digits left, with one exponential for both.
      const v = distance(b, level, ecMinusEf) - level.logG;
      const e = Math.exp(v > 0 ? -v : v);
      const larger = 1 / (1 + e);
      const smaller = e * larger;
      charged = level.density * (1 - level.bound + level.bound * (v > 0 ? larger : smaller));
      const held = level.density * level.bound * (v > 0 ? smaller : larger);
      if (held < charged) small -= level.donor ? held : -held;
      else {
        small += level.donor ? charged : -charged;
        signed = 0;
      }
      slope += level.density * level.bound * larger * smaller;
    }
    if (level.donor) {
      whole += signed;
      out.donors += charged;
    } else {
      whole -= signed;
      out.acceptors += charged;
    }
  }
  out.net = out.p - out.n + small + whole;
  out.slope = slope / b.kT;
}
