import { BOLTZMANN } from '../../solver/constants.ts';
import { columnOf } from '../quantity/quantities.ts';
import { BELOW_NUMBERS, decimalText, differenceText, figureText, percentText } from './figure-text.ts';
import type { Cell, Column } from './ledger.ts';
import type { LayerResult, Regime, Result } from './types.ts';

/** The regime as a device engineer says it. */
const REGIME_WORDS: Record<Regime, string> = {
  degenerate: 'degenerate',
  'freeze-out': 'frozen out',
  intrinsic: 'intrinsic',
  extrinsic: 'extrinsic',
};

const MEV_PER_EV = 1000;

/** A figure of a semiconductor; an insulator has none. */
function figure(value: number | null, digits = 3): Cell {
  return { lines: [figureText(value, digits)], value };
}

function energy(value: number): Cell {
  return { lines: [decimalText(value)], value };
}

function densityOfStates(layer: LayerResult, value: number): Cell {
  return layer.insulator ? { lines: ['–'], value: null } : figure(value);
}

/**
 * Carriers of a band. What is below the smallest number is told as a power of ten, from the effective density of states and the distance of the Fermi level: so far from a band the
 * exponential law is exact.
 *
 * @param states   effective density of states, cm^-3
 * @param away_eV  of the band's edge from the Fermi level
 */
function carriers(layer: LayerResult, value: number, states: number, away_eV: number, { conditions }: Result): Cell {
  if (layer.insulator || value !== 0) return densityOfStates(layer, value);
  const power = Math.log10(states) - away_eV / (BOLTZMANN * conditions.temperature_K * Math.LN10);
  return { lines: [Number.isFinite(power) ? `≈ 1e${Math.round(power)}`.replace('e-', 'e−') : BELOW_NUMBERS], value, note: 'below any count' };
}

/** A screening length above this says that nothing screens, nm: a metre. */
const LONGEST_SCREENING = 1e9;

function debye(layer: LayerResult): Cell {
  const { insulator, debye_nm } = layer;
  if (insulator || (debye_nm !== null && debye_nm <= LONGEST_SCREENING)) return figure(debye_nm);
  return { lines: ['–'], value: debye_nm, note: 'over 1 m: hardly a free carrier' };
}

/** A resistivity or a sheet resistance; without free carriers there is none. */
function resistance(layer: LayerResult, value: number | null): Cell {
  return value === null && !layer.insulator && Math.max(layer.n_cm3, layer.p_cm3) === 0 ? { lines: ['–'], value: null, note: 'no free carriers' } : figure(value);
}

export function regimeWords(layer: LayerResult): string {
  if (layer.insulator) return 'insulator';
  const words = layer.type === 'i' ? REGIME_WORDS[layer.regime] : `${layer.type}, ${REGIME_WORDS[layer.regime]}`;
  return layer.fully_depleted ? `${words}; fully depleted in the stack` : words;
}

/** What Boltzmann statistics with every dopant ionised would put Ec - EF at, less the figure in force, meV. */
export function textbookError_meV(layer: LayerResult): number {
  return MEV_PER_EV * (layer.boltzmann.ec_minus_ef_eV - layer.ec_minus_ef_eV);
}

function ionised(layer: LayerResult): Cell {
  if (layer.ionised.length === 0) return { lines: ['–'], value: null };
  const total = layer.ionised.reduce((sum, d) => sum + d.concentration_cm3, 0);
  const lines = layer.ionised.map((d) => `${d.dopant ?? d.kind} ${percentText(d.fraction)} / ${percentText(d.fraction_depleted)}`);
  // Sorted by the share of all active dopants that is ionised in the neutral layer.
  return { lines, value: total > 0 ? (100 * layer.ionised.reduce((sum, d) => sum + d.ionised_cm3, 0)) / total : 100 };
}

function textbook(layer: LayerResult): Cell {
  if (layer.insulator) return { lines: ['–'], value: null };
  const error = textbookError_meV(layer);
  // Below a hundredth of a millielectronvolt the two agree for every purpose of this table.
  const off = Math.abs(error) < 0.01 ? 'agrees' : `${differenceText(error)} meV`;
  return { lines: [off], value: error, note: `${decimalText(layer.boltzmann.ec_minus_ef_eV)} eV` };
}

export const layerColumns: Column<LayerResult>[] = [
  { ...columnOf('layers', 'material'), usual: false, cell: (l) => ({ lines: [l.x === null ? l.material : `${l.material}, x = ${figureText(l.x, 2)}`], value: l.x === null ? l.material : `${l.material}, x = ${figureText(l.x, 2)}` }) },
  { ...columnOf('layers', 'thickness'), usual: false, cell: (l) => figure(l.thickness_nm, 4) },
  { ...columnOf('layers', 'regime'), usual: true, cell: (l) => ({ lines: [regimeWords(l)], value: regimeWords(l) }) },
  { ...columnOf('layers', 'ecMinusEf'), usual: true, cell: (l) => energy(l.ec_minus_ef_eV) },
  { ...columnOf('layers', 'efMinusEv'), usual: true, cell: (l) => energy(l.ef_minus_ev_eV) },
  { ...columnOf('layers', 'n'), usual: true, cell: (l, r) => carriers(l, l.n_cm3, l.nc_cm3, l.ec_minus_ef_eV, r) },
  { ...columnOf('layers', 'p'), usual: true, cell: (l, r) => carriers(l, l.p_cm3, l.nv_cm3, l.ef_minus_ev_eV, r) },
  { ...columnOf('layers', 'ionised'), usual: true, cell: ionised },
  { ...columnOf('layers', 'textbook'), usual: true, cell: textbook },
  { ...columnOf('layers', 'debye'), usual: true, cell: debye },
  { ...columnOf('layers', 'mobility'), usual: true, cell: (l) => figure(l.mobility_cm2_Vs) },
  { ...columnOf('layers', 'resistivity'), usual: true, cell: (l) => resistance(l, l.resistivity_ohm_cm) },
  { ...columnOf('layers', 'sheet'), usual: true, cell: (l) => resistance(l, l.sheet_ohm) },
  { ...columnOf('layers', 'gap'), usual: false, cell: (l) => energy(l.gap_eV) },
  { ...columnOf('layers', 'affinity'), usual: false, cell: (l) => energy(l.affinity_eV) },
  { ...columnOf('layers', 'ni'), usual: false, cell: (l, r) => carriers(l, l.ni_cm3, Math.sqrt(l.nc_cm3 * l.nv_cm3), l.gap_eV / 2, r) },
  { ...columnOf('layers', 'nc'), usual: false, cell: (l) => densityOfStates(l, l.nc_cm3) },
  { ...columnOf('layers', 'nv'), usual: false, cell: (l) => densityOfStates(l, l.nv_cm3) },
];
