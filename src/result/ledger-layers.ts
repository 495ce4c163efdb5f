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
  { id: 'material', heading: 'Material', words: 'material and composition', unit: '', kind: 'words', usual: false, cell: (l) => ({ lines: [l.x === null ? l.material : `${l.material}, x = ${figureText(l.x, 2)}`], value: l.x === null ? l.material : `${l.material}, x = ${figureText(l.x, 2)}` }) },
  { id: 'thickness', heading: 'Thickness', words: 'thickness', unit: 'nm', kind: 'figure', usual: false, cell: (l) => figure(l.thickness_nm, 4) },
  { id: 'regime', heading: 'Regime', words: 'type and regime of the neutral layer', unit: '', kind: 'words', usual: true, cell: (l) => ({ lines: [regimeWords(l)], value: regimeWords(l) }) },
  { id: 'ecMinusEf', heading: 'Ec − EF', words: 'conduction band edge above the Fermi level in the neutral layer', unit: 'eV', kind: 'figure', usual: true, cell: (l) => energy(l.ec_minus_ef_eV) },
  { id: 'efMinusEv', heading: 'EF − Ev', words: 'Fermi level above the valence band edge in the neutral layer', unit: 'eV', kind: 'figure', usual: true, cell: (l) => energy(l.ef_minus_ev_eV) },
  { id: 'n', heading: 'n', words: 'electrons in the neutral layer', unit: 'cm⁻³', kind: 'figure', usual: true, cell: (l) => carriers(l, l.n_cm3) },
  { id: 'p', heading: 'p', words: 'holes in the neutral layer', unit: 'cm⁻³', kind: 'figure', usual: true, cell: (l) => carriers(l, l.p_cm3) },
  { id: 'ionised', heading: 'Ionised, neutral / depleted', words: 'share of each active dopant that is ionised: in the neutral layer / where the layer is depleted; copied and sorted: share of all in the neutral layer', unit: '%', kind: 'figure', usual: true, cell: ionised },
  { id: 'textbook', heading: 'Textbook Ec − EF is off by', words: 'what Boltzmann statistics with every dopant ionised would give for Ec − EF, less the figure in force', unit: 'meV', kind: 'figure', usual: true, cell: textbook },
  { id: 'debye', heading: 'Debye length', words: 'screening length of both carriers', unit: 'nm', kind: 'figure', usual: true, cell: (l) => figure(l.debye_nm) },
  { id: 'mobility', heading: 'Mobility', words: 'mobility of the majority carrier', unit: 'cm²/(V s)', kind: 'figure', usual: true, cell: (l) => figure(l.mobility_cm2_Vs) },
  { id: 'resistivity', heading: 'Resistivity', words: 'resistivity of the neutral layer', unit: 'Ω cm', kind: 'figure', usual: true, cell: (l) => figure(l.resistivity_ohm_cm) },
  { id: 'sheet', heading: 'Sheet resistance', words: 'sheet resistance of the neutral layer, depletion left out', unit: 'Ω/sq', kind: 'figure', usual: true, cell: (l) => figure(l.sheet_ohm) },
  { id: 'gap', heading: 'Gap', words: 'band gap', unit: 'eV', kind: 'figure', usual: false, cell: (l) => energy(l.gap_eV) },
  { id: 'affinity', heading: 'Affinity', words: 'electron affinity', unit: 'eV', kind: 'figure', usual: false, cell: (l) => energy(l.affinity_eV) },
  { id: 'ni', heading: 'ni', words: 'intrinsic density', unit: 'cm⁻³', kind: 'figure', usual: false, cell: (l) => carriers(l, l.ni_cm3) },
  { id: 'nc', heading: 'Nc', words: 'effective density of states of the conduction band', unit: 'cm⁻³', kind: 'figure', usual: false, cell: (l) => carriers(l, l.nc_cm3) },
  { id: 'nv', heading: 'Nv', words: 'effective density of states of the valence band', unit: 'cm⁻³', kind: 'figure', usual: false, cell: (l) => carriers(l, l.nv_cm3) },
];
