import { columnOf } from '../quantity/quantities.ts';
import { decimalText, differenceText, figureText, percentText } from './figure-text.ts';
import type { Cell, Column } from './ledger.ts';
import type { LayerResult, Regime } from './types.ts';

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

function carriers(layer: LayerResult, value: number): Cell {
  return layer.insulator ? { lines: ['–'], value: null } : figure(value);
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
  { ...columnOf('layers', 'n'), usual: true, cell: (l) => carriers(l, l.n_cm3) },
  { ...columnOf('layers', 'p'), usual: true, cell: (l) => carriers(l, l.p_cm3) },
  { ...columnOf('layers', 'ionised'), usual: true, cell: ionised },
  { ...columnOf('layers', 'textbook'), usual: true, cell: textbook },
  { ...columnOf('layers', 'debye'), usual: true, cell: (l) => figure(l.debye_nm) },
  { ...columnOf('layers', 'mobility'), usual: true, cell: (l) => figure(l.mobility_cm2_Vs) },
  { ...columnOf('layers', 'resistivity'), usual: true, cell: (l) => figure(l.resistivity_ohm_cm) },
  { ...columnOf('layers', 'sheet'), usual: true, cell: (l) => figure(l.sheet_ohm) },
  { ...columnOf('layers', 'gap'), usual: false, cell: (l) => energy(l.gap_eV) },
  { ...columnOf('layers', 'affinity'), usual: false, cell: (l) => energy(l.affinity_eV) },
  { ...columnOf('layers', 'ni'), usual: false, cell: (l) => carriers(l, l.ni_cm3) },
  { ...columnOf('layers', 'nc'), usual: false, cell: (l) => carriers(l, l.nc_cm3) },
  { ...columnOf('layers', 'nv'), usual: false, cell: (l) => carriers(l, l.nv_cm3) },
];
