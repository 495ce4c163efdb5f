import { chargeAt, distance, localCharge, netDoping, type ChargeValues, type LocalCharge } from './charge.ts';
import { ELEMENTARY_CHARGE, EPSILON_0 } from './constants.ts';
import { carrierLog, type CarrierLog } from './carriers.ts';
import { logNeutralShare } from './dopants.ts';
import { neutralLevel } from './fermi-level.ts';
import { carrierMobility } from './mobility.ts';
import { isUniform, profileAt } from './profile.ts';
import type { IonisedRow, LayerFigures, Regime } from './solution.ts';
import type { Assumptions, Layer } from './stack.ts';

/** EF closer to its band than this, in kT, is degenerate (common practice, no source). */
export const DEGENERATE_WITHIN = 3;
/** Majority carriers below this share of the net doping: freeze-out (common practice, no source). */
const FROZEN_BELOW = 0.9;
/** Minority over majority above this: intrinsic (common practice, no source). */
const INTRINSIC_ABOVE = 0.1;
/** Cells of the depth integral of a graded layer's conductance: doubled from the first until the integral settles, or no figure. */
const FIRST_CELLS = 32;
const MOST_CELLS = 2048;
const CONDUCTANCE_TOLERANCE = 1e-3;

const blank = (): ChargeValues => ({ n: 0, p: 0, donors: 0, acceptors: 0, net: 0, slope: 0 });

/**
 * Figures of one layer by itself, from charge neutrality at its middle.
 *
 * @param T              K, > 0
 * @param fullyDepleted  found by the solution of the whole stack; passed through
 *
 * n_i = sqrt(Nc Nv) exp(-Eg/2kT) whatever the statistics. Debye length sqrt(eps/(q d(n - p)/dEF)), both carriers (e.g. Ashcroft and
 * Mermin, Solid State Physics, 1976, chapter 17, Thomas-Fermi screening, for the degenerate form). Sheet resistance of a graded layer: one over its conductance,
 * integrated over depth with the carriers of local neutrality.
 */
export function layerFigures(layer: Layer, T: number, a: Assumptions, fullyDepleted: boolean): LayerFigures {
  const z = layer.thickness / 2;
  const c = localCharge(layer, z, T, a);
  const b = c.bands;
  const { ecMinusEf } = neutralLevel(c);
  const v = blank();
  chargeAt(c, ecMinusEf, v);
  const mobilities = mobilitiesAt(layer, z, c);
  const sigma = b.insulator ? null : conductivity(v, mobilities);
  const sheet = b.insulator ? null : sheetConductance(layer, T, a, sigma);
  return {
    name: layer.name,
    gap: b.gap,
    affinity: b.affinity,
    nc: b.nc,
    nv: b.nv,
    ecMinusEf,
    efMinusEv: b.gap - ecMinusEf,
    n: v.n,
    p: v.p,
    ni: b.insulator ? 0 : Math.exp(0.5 * (Math.log(b.nc) + Math.log(b.nv) - b.gap / b.kT)),
    ionised: ionisedRows(layer, z, c, ecMinusEf),
    regime: regimeAt(c, ecMinusEf, v),
    type: typeOf(c, v),
    debyeLength: b.insulator ? null : debyeLength(c, ecMinusEf),
    mobilityN: mobilities.n,
    mobilityP: mobilities.p,
    resistivity: sigma === null ? null : 1 / sigma,
    sheetResistance: sheet === null ? null : 1 / sheet,
    fullyDepleted,
    boltzmann: textbook(c),
    insulator: b.insulator,
  };
}

function ionisedRows(layer: Layer, z: number, c: LocalCharge, ecMinusEf: number): IonisedRow[] {
  return layer.dopants.map((d, row) => {
    const level = c.levels.find((l) => l.row === row);
    if (!level) {
      return { dopant: d.id, kind: d.kind, concentration: profileAt(d.concentration, z, layer.thickness) * d.activation, ionised: 0, fraction: 1, fractionDepleted: 1, depth: d.depth };
    }
    const fraction = c.bands.insulator ? 0 : chargedShare(c, level, ecMinusEf);
    return {
      dopant: d.id,
      kind: d.kind,
      concentration: level.density,
      ionised: fraction * level.density,
      fraction,
      fractionDepleted: c.bands.insulator ? 0 : chargedShare(c, level, level.donor ? c.bands.gap : 0),
      depth: level.depth,
    };
  });
}

/** Charged share; near freeze-out summed without cancellation. */
function chargedShare(c: LocalCharge, level: LocalCharge['levels'][number], ecMinusEf: number): number {
  if (level.bound === 0) return 1;
  return 1 - level.bound + level.bound * Math.exp(logNeutralShare(-distance(c.bands, level, ecMinusEf), -level.logG));
}

/**
 * Regime of one point of a semiconductor, by the first that holds: degenerate before all, since a degenerate layer conducts like a metal whatever its dopants hold.
 *
 * @param bandDistance  of EF from the nearer band edge, kT; negative inside the band
 * @param majority      the larger carrier density, cm^-3
 * @param minority      the smaller, cm^-3
 * @param net           size of the net doping, every dopant charged, cm^-3
 */
export function regimeOf(bandDistance: number, majority: number, minority: number, net: number): Regime {
  if (bandDistance < DEGENERATE_WITHIN) return 'degenerate';
  // Both carriers may be below the smallest number: then the doping decides.
  if (minority > INTRINSIC_ABOVE * majority || (majority === 0 && net === 0)) return 'intrinsic';
  return majority < FROZEN_BELOW * net ? 'freeze-out' : 'extrinsic';
}

function regimeAt(c: LocalCharge, ecMinusEf: number, v: ChargeValues): Regime {
  const { insulator, gap, kT } = c.bands;
  return insulator ? 'intrinsic' : regimeOf(Math.min(ecMinusEf, gap - ecMinusEf) / kT, Math.max(v.n, v.p), Math.min(v.n, v.p), Math.abs(netDoping(c)));
}

/** By the carrier that is more than the other; by the doping where both underflow. */
function typeOf(c: LocalCharge, v: ChargeValues): 'n' | 'p' | 'i' {
  if (c.bands.insulator) return 'i';
  const net = netDoping(c);
  const majority = Math.max(v.n, v.p);
  if (majority === 0) return net > 0 ? 'n' : net < 0 ? 'p' : 'i';
  if (Math.min(v.n, v.p) > INTRINSIC_ABOVE * majority) return 'i';
  return v.n > v.p ? 'n' : 'p';
}

const electrons: CarrierLog = { log: 0, slope: 0 };
const holes: CarrierLog = { log: 0, slope: 0 };

/** cm; in logarithms, since at low temperature both carriers may be below the smallest number. */
function debyeLength(c: LocalCharge, ecMinusEf: number): number | null {
  const b = c.bands;
  const boltzmann = b.statistics === 'boltzmann';
  carrierLog(-ecMinusEf / b.kT, b.kaneN * b.kT, boltzmann, electrons);
  carrierLog((ecMinusEf - b.gap) / b.kT, b.kaneP * b.kT, boltzmann, holes);
  const ln = Math.log(b.nc * electrons.slope) + electrons.log;
  const lp = Math.log(b.nv * holes.slope) + holes.log;
  const logSum = Math.max(ln, lp) + Math.log1p(Math.exp(-Math.abs(ln - lp)));
  const length = Math.exp(0.5 * (Math.log((b.permittivity * EPSILON_0 * b.kT) / ELEMENTARY_CHARGE) - logSum));
  return Number.isFinite(length) ? length : null;
}

interface Mobilities {
  n: number | null;
  p: number | null;
}

function mobilitiesAt(layer: Layer, z: number, c: LocalCharge): Mobilities {
  if (c.bands.insulator) return { n: null, p: null };
  let total = 0;
  for (const level of c.levels) if (level.row >= 0) total += level.density;
  const x = profileAt(layer.x, z, layer.thickness);
  return { n: carrierMobility(layer.material, 'electron', x, total), p: carrierMobility(layer.material, 'hole', x, total) };
}

/** 1/(ohm cm); null when the mobility of a carrier that counts is unknown, or when nothing conducts. */
function conductivity(v: ChargeValues, m: Mobilities): number | null {
  const majority = Math.max(v.n, v.p);
  // A minority below a millionth may lack its mobility: no mobility ratio makes it count.
  if ((m.n === null && v.n > 1e-6 * majority) || (m.p === null && v.p > 1e-6 * majority)) return null;
  const sigma = ELEMENTARY_CHARGE * (v.n * (m.n ?? 0) + v.p * (m.p ?? 0));
  return sigma > 0 && Number.isFinite(1 / sigma) ? sigma : null;
}

/** 1/ohm. */
function sheetConductance(layer: Layer, T: number, a: Assumptions, middle: number | null): number | null {
  if (isUniform(layer)) return middle === null ? null : middle * layer.thickness;
  let last = sliced(layer, T, a, FIRST_CELLS);
  for (let cells = 2 * FIRST_CELLS; last !== null && cells <= MOST_CELLS; cells *= 2) {
    const next = sliced(layer, T, a, cells);
    // The midpoint rule's error is a third of the last change or less on a smooth profile.
    if (next !== null && Math.abs(next - last) <= CONDUCTANCE_TOLERANCE * next) return next > 0 && Number.isFinite(1 / next) ? next : null;
    last = next;
  }
  return null;
}

/** Conductance by the midpoint rule, 1/ohm; midpoints, since the ends of a profile may be zero, where nothing conducts. */
function sliced(layer: Layer, T: number, a: Assumptions, cells: number): number | null {
  const v = blank();
  let sum = 0;
  for (let k = 0; k < cells; k++) {
    const z = (layer.thickness * (k + 0.5)) / cells;
    const c = localCharge(layer, z, T, a);
    chargeAt(c, neutralLevel(c).ecMinusEf, v);
    const m = mobilitiesAt(layer, z, c);
    const sigma = conductivity(v, m);
    if (sigma !== null) sum += (sigma * layer.thickness) / cells;
    else if (Math.max(v.n, v.p) > 0 && (m.n === null || m.p === null)) return null;
  }
  return sum;
}

/** The same point with Boltzmann statistics and every dopant charged, deep ones too. */
function textbook(c: LocalCharge): { ecMinusEf: number; n: number; p: number } {
  const plain: LocalCharge = {
    bands: { ...c.bands, statistics: 'boltzmann', kaneN: 0, kaneP: 0 },
    levels: c.levels.map((l) => ({ ...l, bound: 0 })),
    fixed: c.fixed,
  };
  const { ecMinusEf } = neutralLevel(plain);
  const v = blank();
  chargeAt(plain, ecMinusEf, v);
  return { ecMinusEf, n: v.n, p: v.p };
}
