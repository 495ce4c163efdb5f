import { readDesign } from '../design/read.ts';
import type { Complaint } from '../design/complaint.ts';
import type { Design } from '../design/types.ts';
import { writeDesign } from '../design/write.ts';
import type { HistoryRecord } from '../state/history.ts';
import type { VariantList } from '../state/variants.ts';

/** A variant as it is kept. The design and the history of the open one stand in the project's own record, and nowhere else. */
export interface KeptVariant {
  id: string;
  name: string;
  removed: boolean;
  /** null: the open one */ kept: { designText: string; history: HistoryRecord } | null;
}

/** Before variants were known a project was one design. */
export const LONE: readonly KeptVariant[] = [{ id: 'base', name: 'base', removed: false, kept: null }];

export function keptVariants({ open, list }: VariantList): KeptVariant[] {
  return list.map(({ id, name, removed, design, history }) => ({ id, name, removed, kept: id === open ? null : { designText: writeDesign(design), history } }));
}

/**
 * @param present  the design of the open one, as read from the project's own record
 * @returns the first complaint about a variant that cannot be read, with its text
 */
export function readVariants(kept: readonly KeptVariant[], present: Design): { ok: true; all: VariantList } | { ok: false; designText: string; complaint: Complaint } {
  const list: VariantList['list'][number][] = [];
  for (const { id, name, removed, kept: own } of kept) {
    if (own === null) {
      list.push({ id, name, removed, design: present, history: { past: [], future: [] } });
      continue;
    }
    const reading = readDesign(own.designText);
    if (!reading.ok) return { ok: false, designText: own.designText, complaint: reading.complaints[0] };
    list.push({ id, name, removed, design: reading.design, history: own.history });
  }
  return { ok: true, all: { open: kept.find((variant) => variant.kept === null)!.id, list } };
}

interface Work {
  designText: string;
  variants?: readonly KeptVariant[];
}

/** What a person has made of a project, as one text to compare: designs and names, without the ways that led there. */
export function workOf({ designText, variants = LONE }: Work): string {
  return JSON.stringify([designText, variants.map(({ id, name, removed, kept }) => [id, name, removed, kept?.designText ?? null])]);
}

/** @param id  absent: the open one. @returns the design of a variant, or of the open one where it is not known, as text */
export function textOfVariant({ designText, variants = LONE }: Work, id: string | undefined): string {
  return variants.find((variant) => variant.id === id)?.kept?.designText ?? designText;
}

/** @returns what makes a stored value no list of variants, in words; null for a good one */
export function variantsFault(value: unknown): string | null {
  if (!Array.isArray(value) || value.length === 0) return 'its variants are no list';
  const rows = value as Partial<Record<keyof KeptVariant, unknown>>[];
  for (const row of rows) {
    if (typeof row !== 'object' || row === null || typeof row.id !== 'string' || typeof row.name !== 'string' || typeof row.removed !== 'boolean') return 'one of its variants is garbled';
    if (row.kept === null) continue;
    const kept = row.kept as Partial<NonNullable<KeptVariant['kept']>> | undefined;
    if (typeof kept !== 'object' || typeof kept.designText !== 'string' || !isDocument(kept.designText)) return 'the design of one of its variants is cut short or garbled';
  }
  if (new Set(rows.map(({ id }) => id)).size < rows.length) return 'two of its variants are confused';
  const open = rows.filter(({ kept }) => kept === null);
  return open.length === 1 && open[0].removed === false ? null : 'it does not say which of its variants is open';
}

function isDocument(text: string): boolean {
  try {
    const design: unknown = JSON.parse(text);
    return typeof design === 'object' && design !== null && !Array.isArray(design);
  } catch {
    return false;
  }
}
