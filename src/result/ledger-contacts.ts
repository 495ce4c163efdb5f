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

/** Solved contact resistivity, with what the closed form of its regime would give for comparison. */
function resistivity(c: ContactResult): Cell {
  const cell = figure(c.rho_c_ohm_cm2);
  return c.rho_c_ohm_cm2 === null || c.rho_c_closed_form_ohm_cm2 === null ? cell : { ...cell, note: `closed form ${figureText(c.rho_c_closed_form_ohm_cm2, 2)}` };
}

export function contactWords(contact: ContactResult): string {
  return contact.kind === 'barrier' && contact.metal !== null ? contact.metal : KIND_WORDS[contact.kind];
}

export const contactColumns: Column<ContactResult>[] = [
  { id: 'kind', heading: 'Kind', words: 'kind of contact, or its metal', unit: '', kind: 'words', usual: true, cell: (c) => words(contactWords(c)) },
  { id: 'barrierN', heading: 'φBn', words: 'barrier for electrons, without the image-force lowering', unit: 'eV', kind: 'figure', usual: true, cell: (c) => decimals(c.barrier_n_eV) },
  { id: 'barrierP', heading: 'φBp', words: 'barrier for holes, without the image-force lowering', unit: 'eV', kind: 'figure', usual: true, cell: (c) => decimals(c.barrier_p_eV) },
  { id: 'source', heading: 'Barrier', words: 'where the barrier comes from', unit: '', kind: 'words', usual: true, cell: (c) => words(c.barrier_source === null ? '–' : SOURCE_WORDS[c.barrier_source]) },
  { id: 'rhoC', heading: 'Contact resistivity', words: 'specific contact resistivity at zero bias through the solved barrier, both carriers; the closed form of the depletion approximation beside it', unit: 'Ω cm²', kind: 'figure', usual: true, cell: resistivity },
  { id: 'rhoCFloor', heading: 'Its floor', words: 'least contact resistivity that the majority carriers allow, without any barrier (ballistic limit)', unit: 'Ω cm²', kind: 'figure', usual: true, cell: (c) => figure(c.rho_c_floor_ohm_cm2) },
  { id: 'rhoCn', heading: 'of electrons', words: 'contact resistivity of electrons alone', unit: 'Ω cm²', kind: 'figure', usual: false, cell: (c) => figure(c.rho_c_n_ohm_cm2) },
  { id: 'rhoCp', heading: 'of holes', words: 'contact resistivity of holes alone', unit: 'Ω cm²', kind: 'figure', usual: false, cell: (c) => figure(c.rho_c_p_ohm_cm2) },
  { id: 'saturation', heading: 'Saturation current', words: 'thermionic emission of the majority carriers over the lowered barrier', unit: 'A/cm²', kind: 'figure', usual: false, cell: (c) => figure(c.saturation_A_cm2) },
  { id: 'lowering', heading: 'Lowering', words: 'image-force lowering', unit: 'eV', kind: 'figure', usual: true, cell: (c) => decimals(c.lowering_eV) },
  { id: 'surfaceField', heading: 'Surface field', words: 'field just inside the semiconductor, along the depth', unit: 'kV/cm', kind: 'figure', usual: true, cell: (c) => ({ lines: [fieldText(c.surface_field_V_cm)], value: c.surface_field_V_cm * KV_PER_V }) },
  { id: 'depletion', heading: 'Depleted', words: 'depletion width under the contact', unit: 'nm', kind: 'figure', usual: true, cell: (c) => figure(c.depletion_nm) },
  { id: 'e00', heading: 'E00', words: 'characteristic energy of tunnelling', unit: 'meV', kind: 'figure', usual: true, cell: (c) => figure(c.e00_meV) },
  { id: 'transport', heading: 'Transport', words: 'how carriers pass the barrier', unit: '', kind: 'words', usual: true, cell: (c) => words(c.transport === null ? '–' : c.transport === 'field' ? 'field emission' : c.transport === 'thermionic' ? 'thermionic emission' : 'thermionic-field emission') },
];
