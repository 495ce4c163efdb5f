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

export function contactWords(contact: ContactResult): string {
  return contact.kind === 'barrier' && contact.metal !== null ? contact.metal : KIND_WORDS[contact.kind];
}

export const contactColumns: Column<ContactResult>[] = [
  { id: 'kind', heading: 'Kind', words: 'kind of contact, or its metal', unit: '', kind: 'words', usual: true, cell: (c) => words(contactWords(c)) },
  { id: 'barrierN', heading: 'φBn', words: 'barrier for electrons, without the image-force lowering', unit: 'eV', kind: 'figure', usual: true, cell: (c) => decimals(c.barrier_n_eV) },
  { id: 'barrierP', heading: 'φBp', words: 'barrier for holes, without the image-force lowering', unit: 'eV', kind: 'figure', usual: true, cell: (c) => decimals(c.barrier_p_eV) },
  { id: 'source', heading: 'Barrier', words: 'where the barrier comes from', unit: '', kind: 'words', usual: true, cell: (c) => words(c.barrier_source === null ? '–' : SOURCE_WORDS[c.barrier_source]) },
  { id: 'lowering', heading: 'Lowering', words: 'image-force lowering', unit: 'eV', kind: 'figure', usual: true, cell: (c) => decimals(c.lowering_eV) },
  { id: 'surfaceField', heading: 'Surface field', words: 'field just inside the semiconductor, along the depth', unit: 'kV/cm', kind: 'figure', usual: true, cell: (c) => ({ lines: [fieldText(c.surface_field_V_cm)], value: c.surface_field_V_cm * KV_PER_V }) },
  { id: 'depletion', heading: 'Depleted', words: 'depletion width under the contact', unit: 'nm', kind: 'figure', usual: true, cell: (c) => figure(c.depletion_nm) },
  { id: 'e00', heading: 'E00', words: 'characteristic energy of tunnelling', unit: 'meV', kind: 'figure', usual: true, cell: (c) => figure(c.e00_meV) },
  { id: 'transport', heading: 'Transport', words: 'how carriers pass the barrier', unit: '', kind: 'words', usual: true, cell: (c) => words(c.transport === null ? '–' : c.transport === 'field' ? 'field emission' : c.transport === 'thermionic' ? 'thermionic emission' : 'thermionic-field emission') },
];
