import { profileAt, type Assumptions, type Layer } from '../../solver/index.ts';
import { localBands, type LocalBands } from '../../solver/bands.ts';
import { chargeAt, netDoping, type ChargeValues, type LocalCharge } from '../../solver/charge.ts';
import { levelInForce } from '../../solver/dopants.ts';
import { neutralLevel } from '../../solver/fermi-level.ts';
import { DEGENERATE_WITHIN, regimeOf } from '../../solver/layer.ts';
import type { Regime } from '../result/types.ts';

const MEV_PER_EV = 1e3;

/** Codes of `regime`. */
export const REGIMES: readonly Regime[] = ['degenerate', 'freeze-out', 'intrinsic', 'extrinsic'];
/** Codes of `degeneracy`: EF inside a band; outside but closer than 3kT; farther. */
export const DEGENERACIES = ['degenerate', 'transitional', 'nondegenerate'] as const;

export interface MapAxes {
  /** active concentration of the layer's leading dopant, cm^-3 [columns], rising */ doping: Float64Array;
  /** K [rows], rising */ temperature: Float64Array;
}

/** What one layer's material would be at every doping and temperature. Matrices are [rows x columns], row by row from the coldest; NaN and code 255 where a gap closes. */
export interface RegimeMap extends MapAxes {
  regime: Uint8Array;
  degeneracy: Uint8Array;
  /** eV */ ecMinusEf: Float64Array;
  /** distance of EF from the nearer band edge, kT; negative inside the band */ bandDistance: Float64Array;
  /** majority carriers over net doping: below 0.9 frozen out */ carrierShare: Float64Array;
  /** minority over majority carriers: above 0.1 intrinsic */ minorityShare: Float64Array;
  /** Ec - EF of Boltzmann statistics with every dopant ionised, less that of the map, meV */ boltzmannError: Float64Array;
  /** doping at which the first of the layer's dopants reaches its Mott density, cm^-3; null where none is known. May lie outside the axis. */ mottDoping: number | null;
}

/** Active concentration of the row that has most of it at the middle of the layer, and its share of each row. */
export interface LeadingDopant {
  row: number;
  /** cm^-3, > 0 */ concentration: number;
}

/** Null in an insulator and in an undoped layer, which a map has nothing to scale in. */
export function leadingDopant(layer: Layer): LeadingDopant | null {
  let best: LeadingDopant | null = null;
  layer.dopants.forEach((dopant, row) => {
    const concentration = profileAt(dopant.concentration, layer.thickness / 2, layer.thickness) * dopant.activation;
    if (concentration > (best?.concentration ?? 0)) best = { row, concentration };
  });
  return best;
}

/** Logarithmic in the doping, linear in the temperature. */
export function mapAxes(columns = 200, rows = 200, doping: readonly [number, number] = [1e12, 1e21], temperature: readonly [number, number] = [4, 1000]): MapAxes {
  return {
    doping: Float64Array.from({ length: columns }, (_, i) => doping[0] * (doping[1] / doping[0]) ** (i / (columns - 1))),
    temperature: Float64Array.from({ length: rows }, (_, i) => temperature[0] + ((temperature[1] - temperature[0]) * i) / (rows - 1)),
  };
}

/**
 * The map of a layer at its middle: all its dopants scaled together, so that the leading one has the doping of the axis.
 *
 * @returns null for an insulator or an undoped layer
 * @throws {RangeError} a material without masses
 *
 * Regimes as in the layer's figures. Boltzmann's level with complete ionisation has a closed form: the majority is half the net doping plus the root of
 * its square with ni^2 (e.g. Sze and Ng, Physics of Semiconductor Devices, 2007, section 1.4).
 */
export function regimeMap(layer: Layer, a: Assumptions, axes: MapAxes = mapAxes()): RegimeMap | null {
  const leading = leadingDopant(layer);
  if (!leading) return null;
  const { doping, temperature } = axes;
  const size = doping.length * temperature.length;
  const array = (): Float64Array => new Float64Array(size).fill(NaN);
  const map: RegimeMap = {
    ...axes, regime: new Uint8Array(size).fill(255), degeneracy: new Uint8Array(size).fill(255), ecMinusEf: array(), bandDistance: array(), carrierShare: array(), minorityShare: array(), boltzmannError: array(),
    mottDoping: mottDoping(layer, leading),
  };
  const x = profileAt(layer.x, layer.thickness / 2, layer.thickness);
  const columns = Array.from(doping, (N) => levelsAt(layer, N / leading.concentration));
  if (a.narrowing) narrow(layer, x, a, temperature[0], columns);
  const v: ChargeValues = { n: 0, p: 0, donors: 0, acceptors: 0, net: 0, slope: 0 };
  for (let r = 0; r < temperature.length; r++) {
    const bands = bandsOrNull(layer, x, temperature[r], a);
    if (bands === null) continue;
    if (bands.insulator) return null;
    for (let c = 0; c < doping.length; c++) {
      const { levels, narrowing } = columns[c];
      // The fall of the gap by doping is the same at every temperature.
      const gap = bands.gap - narrowing;
      if (gap > 0) fill(map, r * doping.length + c, { bands: narrowing === 0 ? bands : { ...bands, gap }, levels, fixed: 0 }, v);
    }
  }
  return map;
}

interface Column {
  levels: LocalCharge['levels'];
  donors: number;
  acceptors: number;
  /** fall of the gap, eV */ narrowing: number;
}

/** The layer's levels with every concentration times a factor, each at the depth that it has at its new concentration. */
function levelsAt(layer: Layer, factor: number): Column {
  const column: Column = { levels: [], donors: 0, acceptors: 0, narrowing: 0 };
  layer.dopants.forEach((d, row) => {
    const density = profileAt(d.concentration, layer.thickness / 2, layer.thickness) * d.activation * factor;
    if (density === 0) return;
    const donor = d.kind === 'donor';
    const { depth, bound } = levelInForce(d, density);
    if (donor) column.donors += density;
    else column.acceptors += density;
    column.levels.push({ donor, density, bound, depth, logG: Math.log(d.degeneracy), row });
    if (d.compensation > 0) column.levels.push({ donor: !donor, density: density * d.compensation, bound: 0, depth: 0, logG: 0, row: -1 });
  });
  return column;
}

/** Sets the narrowing of each column: the gap without it less the gap with it; infinite where nothing of the gap is left. */
function narrow(layer: Layer, x: number, a: Assumptions, T: number, columns: Column[]): void {
  const whole = bandsOrNull(layer, x, T, { ...a, narrowing: false });
  for (const column of columns) column.narrowing = whole === null ? Infinity : whole.gap - (bandsOrNull(layer, x, T, a, column)?.gap ?? -Infinity);
}

/** Bands without narrowing unless the doping of a column is given. Null where the gap closes: there is no semiconductor there to draw. */
function bandsOrNull(layer: Layer, x: number, T: number, a: Assumptions, column?: Column): LocalBands | null {
  try {
    return localBands(layer.material, x, T, { ...a, narrowing: a.narrowing && column !== undefined }, { donors: column?.donors ?? 0, acceptors: column?.acceptors ?? 0 });
  } catch (error) {
    if (error instanceof RangeError && /gap of .* is not positive/.test(error.message)) return null;
    throw error;
  }
}

function fill(map: RegimeMap, i: number, c: LocalCharge, v: ChargeValues): void {
  const { gap, kT, nc, nv } = c.bands;
  const { ecMinusEf } = neutralLevel(c);
  chargeAt(c, ecMinusEf, v);
  const majority = Math.max(v.n, v.p);
  const minority = Math.min(v.n, v.p);
  const signed = netDoping(c);
  const net = Math.abs(signed);
  const distance = Math.min(ecMinusEf, gap - ecMinusEf) / kT;
  map.ecMinusEf[i] = ecMinusEf;
  map.bandDistance[i] = distance;
  map.carrierShare[i] = net > 0 ? majority / net : 1;
  map.minorityShare[i] = majority > 0 ? minority / majority : net > 0 ? 0 : 1;
  map.degeneracy[i] = distance < 0 ? 0 : distance < DEGENERATE_WITHIN ? 1 : 2;
  map.regime[i] = REGIMES.indexOf(regimeOf(distance, majority, minority, net));
  // ln of ni; asinh(net/2ni) is where Boltzmann's two carriers balance the net doping, and beyond its range the logarithm alone is left.
  const logNi = 0.5 * (Math.log(nc * nv) - gap / kT);
  const ratio = 0.5 * net * Math.exp(-logNi);
  const shift = Number.isFinite(ratio) ? Math.asinh(ratio) : Math.log(net) - logNi;
  const textbook = 0.5 * gap + 0.5 * kT * Math.log(nc / nv) - Math.sign(signed) * kT * shift;
  map.boltzmannError[i] = MEV_PER_EV * (textbook - ecMinusEf);
}

function mottDoping(layer: Layer, leading: LeadingDopant): number | null {
  let least: number | null = null;
  layer.dopants.forEach((d) => {
    const mott = d.mottDensity ?? d.screened?.mottDensity;
    const now = profileAt(d.concentration, layer.thickness / 2, layer.thickness) * d.activation;
    if (mott === undefined || now === 0) return;
    const at = (mott / now) * leading.concentration;
    if (least === null || at < least) least = at;
  });
  return least;
}
