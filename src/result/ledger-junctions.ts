import { decimalText, fieldText, figureText } from './figure-text.ts';
import type { Cell, Column } from './ledger.ts';
import type { JunctionResult } from './types.ts';

const KV_PER_V = 1e-3;
const NF_PER_F = 1e9;

const ALIGNMENT_WORDS: Record<JunctionResult['alignment'], string> = {
  published: 'published offset',
  natural: 'natural offsets',
  affinity: 'affinity rule',
  own: 'own offset',
  same: 'one material',
};

function words(text: string): Cell {
  return { lines: [text], value: text };
}

function figure(value: number | null, digits = 3): Cell {
  return { lines: [figureText(value, digits)], value };
}

function decimals(value: number | null): Cell {
  return { lines: [decimalText(value)], value };
}

/** A depletion width, with the depletion approximation's beside it for comparison. */
function depletion(solved: number | null, approximated: number | null): Cell {
  const cell = figure(solved);
  return solved === null || approximated === null ? cell : { ...cell, note: `approx. ${figureText(approximated)}` };
}

export const junctionColumns: Column<JunctionResult>[] = [
  { id: 'builtin', heading: 'Built-in', words: 'built-in potential: neutral potential below less that above', unit: 'V', kind: 'figure', usual: true, cell: (j) => decimals(j.builtin_V) },
  { id: 'deltaEc', heading: 'ΔEc', words: 'step of the conduction band edge, below less above', unit: 'eV', kind: 'figure', usual: true, cell: (j) => decimals(j.delta_ec_eV) },
  { id: 'deltaEv', heading: 'ΔEv', words: 'step of the valence band edge, below less above', unit: 'eV', kind: 'figure', usual: true, cell: (j) => decimals(j.delta_ev_eV) },
  { id: 'class', heading: 'Line-up', words: 'line-up of the two gaps', unit: '', kind: 'words', usual: true, cell: (j) => words(j.alignment === 'same' ? 'one material' : `${j.class}, ${ALIGNMENT_WORDS[j.alignment]}`) },
  { id: 'sheetCharge', heading: 'Sheet charge', words: 'fixed charge on the interface, polarisation included, in units of +q', unit: 'q cm⁻²', kind: 'figure', usual: true, cell: (j) => figure(j.sheet_charge_cm2) },
  { id: 'peakField', heading: 'Peak field', words: 'largest field beside the interface', unit: 'kV/cm', kind: 'figure', usual: true, cell: (j) => ({ lines: [fieldText(j.peak_field_V_cm)], value: j.peak_field_V_cm * KV_PER_V }) },
  { id: 'depletionAbove', heading: 'Depleted above', words: 'depletion width in the layer above; the depletion approximation beside it', unit: 'nm', kind: 'figure', usual: true, cell: (j) => depletion(j.depletion_above_nm, j.depletion_approximation_above_nm) },
  { id: 'depletionBelow', heading: 'Depleted below', words: 'depletion width in the layer below; the depletion approximation beside it', unit: 'nm', kind: 'figure', usual: true, cell: (j) => depletion(j.depletion_below_nm, j.depletion_approximation_below_nm) },
  { id: 'capacitance', heading: 'Capacitance', words: 'depletion capacitance at zero bias', unit: 'nF/cm²', kind: 'figure', usual: true, cell: (j) => figure(j.capacitance_F_cm2 === null ? null : j.capacitance_F_cm2 * NF_PER_F) },
];
