import { columnOf } from '../quantity/quantities.ts';
import { decimalText, fieldText, figureText } from './figure-text.ts';
import type { Cell, Column } from './ledger.ts';
import type { ContactResult } from './types.ts';

const KV_PER_V = 1e-3;

const KIND_WORDS: Record<ContactResult['kind'], string> = { neutral: 'neutral', barrier: 'metal', pinned: 'pinned surface', open: 'open surface' };

const SOURCE_WORDS: Record<NonNullable<ContactResult['barrier_source']>, string> = { given: 'given', measured: 'measured', pinned: 'from pinning', ideal: 'work function less affinity' };

function words(text: string): Cell {
  return { lines: [text], value: text === '–' ? null : text };
}

function figure(value: number | null, digits = 3): Cell {
  return { lines: [figureText(value, digits)], value };
}

function decimals(value: number | null): Cell {
  return { lines: [decimalText(value)], value };
}

/** The closed form, with the regime that chose it. */
function closedForm(c: ContactResult): Cell {
  const cell = figure(c.rho_c_closed_form_ohm_cm2);
  return c.rho_c_closed_form_ohm_cm2 === null || c.closed_form === null ? cell : { ...cell, note: c.closed_form };
}

/** What the solved contact resistivity is times that of the closed form; null where one of the two is missing. */
export function closedFormRatio({ rho_c_ohm_cm2: solved, rho_c_closed_form_ohm_cm2: closed }: Pick<ContactResult, 'rho_c_ohm_cm2' | 'rho_c_closed_form_ohm_cm2'>): number | null {
  const ratio = solved === null || closed === null ? null : solved / closed;
  return ratio !== null && Number.isFinite(ratio) && ratio > 0 ? ratio : null;
}

function contactWords(contact: ContactResult): string {
  return contact.kind === 'barrier' && contact.metal !== null ? contact.metal : KIND_WORDS[contact.kind];
}

export const contactColumns: Column<ContactResult>[] = [
  { ...columnOf('contacts', 'kind'), usual: true, cell: (c) => words(contactWords(c)) },
  { ...columnOf('contacts', 'barrierN'), usual: true, cell: (c) => decimals(c.barrier_n_eV) },
  { ...columnOf('contacts', 'barrierP'), usual: true, cell: (c) => decimals(c.barrier_p_eV) },
  { ...columnOf('contacts', 'source'), usual: true, cell: (c) => words(c.barrier_source === null ? '–' : SOURCE_WORDS[c.barrier_source]) },
  { ...columnOf('contacts', 'rhoC'), usual: true, cell: (c) => (c.blocks ? { lines: ['blocks'], value: null, note: 'no finite resistivity' } : figure(c.rho_c_ohm_cm2)) },
  { ...columnOf('contacts', 'rhoCClosed'), usual: true, cell: closedForm },
  { ...columnOf('contacts', 'closedRatio'), usual: true, cell: (c) => figure(closedFormRatio(c)) },
  { ...columnOf('contacts', 'rhoCFloor'), usual: true, cell: (c) => figure(c.rho_c_floor_ohm_cm2) },
  { ...columnOf('contacts', 'rhoCn'), usual: false, cell: (c) => figure(c.rho_c_n_ohm_cm2) },
  { ...columnOf('contacts', 'rhoCp'), usual: false, cell: (c) => figure(c.rho_c_p_ohm_cm2) },
  { ...columnOf('contacts', 'saturation'), usual: false, cell: (c) => figure(c.saturation_A_cm2) },
  { ...columnOf('contacts', 'lowering'), usual: true, cell: (c) => decimals(c.lowering_eV) },
  { ...columnOf('contacts', 'surfaceField'), usual: true, cell: (c) => ({ lines: [fieldText(c.surface_field_V_cm)], value: c.surface_field_V_cm * KV_PER_V }) },
  { ...columnOf('contacts', 'depletion'), usual: true, cell: (c) => figure(c.depletion_nm) },
  { ...columnOf('contacts', 'e00'), usual: true, cell: (c) => figure(c.e00_meV) },
  { ...columnOf('contacts', 'transport'), usual: true, cell: (c) => words(c.transport === null ? '–' : c.transport === 'field' ? 'field emission' : c.transport === 'thermionic' ? 'thermionic emission' : 'thermionic-field emission') },
];
