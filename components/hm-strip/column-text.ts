import type { ContactInput, DopantRow, LayerInput } from '../../src/design/types.ts';
import type { ContactResult } from '../../src/result/types.ts';
import { shortText } from '../shared/graded.ts';

/** Units as they are read, not as they are typed: cm^-3 gives cm⁻³. */
export function readable(text: string): string {
  return text.replace(/\^(-?\d+)/g, (_, power: string) => [...power].map((c) => SUPERSCRIPT[c] ?? c).join(''));
}

const SUPERSCRIPT: Record<string, string> = { '-': '⁻', '0': '⁰', '1': '¹', '2': '²', '3': '³', '4': '⁴', '5': '⁵', '6': '⁶', '7': '⁷', '8': '⁸', '9': '⁹' };

export function materialText(layer: LayerInput): string {
  return layer.x === undefined ? layer.material : `${layer.material}, x = ${shortText(layer.x)}`;
}

export function dopantName(row: DopantRow): string {
  return row.dopant ?? row.kind ?? 'dopant';
}

export function dopantText(row: DopantRow): string {
  return `${dopantName(row)} ${readable(shortText(row.concentration))}`;
}

/** Two short lines for a contact: what it is, and its barrier where the result has one. */
export function contactText(contact: ContactInput, solved: ContactResult | undefined): string[] {
  if (contact.kind === 'neutral') return ['neutral'];
  if (contact.kind === 'pinned') return ['pinned', readable(contact.level)];
  if (contact.kind === 'open') return contact.sheetCharge === undefined ? ['open'] : ['open', readable(contact.sheetCharge)];
  if (contact.barrier !== undefined) return ['barrier', readable(contact.barrier)];
  const barrier = solved?.kind === 'barrier' && solved.metal === contact.metal ? solved.barrier_n_eV : null;
  return [contact.metal ?? 'metal', ...(barrier === null || barrier === undefined ? [] : [`φBn ${barrier.toFixed(2)} eV`])];
}

/** A layer in one sentence, for readers who cannot see the column. */
export function layerSentence(layer: LayerInput, index: number, of: number, complaints: readonly string[]): string {
  const dopants = layer.dopants ?? [];
  const parts = [`layer ${index + 1} of ${of}: ${layer.name}`, materialText(layer), layer.thickness, dopants.length === 0 ? 'undoped' : dopants.map(dopantText).join(' and ')];
  return [parts.join(', '), ...complaints].join('; ');
}
