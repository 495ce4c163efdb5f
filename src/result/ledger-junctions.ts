import { columnOf } from '../quantity/quantities.ts';
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
  { ...columnOf('junctions', 'builtin'), usual: true, cell: (j) => decimals(j.builtin_V) },
  { ...columnOf('junctions', 'deltaEc'), usual: true, cell: (j) => decimals(j.delta_ec_eV) },
  { ...columnOf('junctions', 'deltaEv'), usual: true, cell: (j) => decimals(j.delta_ev_eV) },
  { ...columnOf('junctions', 'class'), usual: true, cell: (j) => words(j.alignment === 'same' ? 'one material' : `${j.class}, ${ALIGNMENT_WORDS[j.alignment]}`) },
  { ...columnOf('junctions', 'sheetCharge'), usual: true, cell: (j) => figure(j.sheet_charge_cm2) },
  { ...columnOf('junctions', 'peakField'), usual: true, cell: (j) => ({ lines: [fieldText(j.peak_field_V_cm)], value: j.peak_field_V_cm * KV_PER_V }) },
  { ...columnOf('junctions', 'depletionAbove'), usual: true, cell: (j) => depletion(j.depletion_above_nm, j.depletion_approximation_above_nm) },
  { ...columnOf('junctions', 'depletionBelow'), usual: true, cell: (j) => depletion(j.depletion_below_nm, j.depletion_approximation_below_nm) },
  { ...columnOf('junctions', 'capacitance'), usual: true, cell: (j) => figure(j.capacitance_F_cm2 === null ? null : j.capacitance_F_cm2 * NF_PER_F) },
];
