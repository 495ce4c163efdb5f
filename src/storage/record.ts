import { DESIGN_FORMAT } from '../design/types.ts';
import type { HistoryRecord } from '../state/history.ts';
import type { View } from '../state/view.ts';
import { variantsFault, type KeptVariant } from './kept-variants.ts';

/** A project as it is kept. Name and bin belong to the list of projects; design, history, view and revision to whoever has the project open. */
export interface ProjectRecord {
  id: string;
  name: string;
  /** ms since 1970 */ created: number;
  /** of the design, ms since 1970 */ changed: number;
  /** counts the saves: who saves on top of another revision than the one read is told */ revision: number;
  /** the design file of the open variant, as text */ designText: string;
  history: HistoryRecord;
  view: View;
  /** absent: the design is the only one */ variants?: readonly KeptVariant[];
  /** when it was put in the bin, ms since 1970; null outside */ binned: number | null;
}

/** What the list of projects shows of one. */
export type ProjectEntry = Pick<ProjectRecord, 'id' | 'name' | 'created' | 'changed' | 'binned'>;

/** @returns what makes a stored value no project, in words; null for a good one */
export function recordFault(value: unknown): string | null {
  if (typeof value !== 'object' || value === null) return 'it is no record';
  const record = value as Partial<Record<keyof ProjectRecord, unknown>>;
  for (const key of ['id', 'name', 'designText'] as const) if (typeof record[key] !== 'string') return `its ${key} is no text`;
  for (const key of ['created', 'changed', 'revision'] as const) if (typeof record[key] !== 'number' || !Number.isFinite(record[key])) return `its ${key} is no number`;
  if (record.binned !== null && typeof record.binned !== 'number') return 'its place in the bin is unclear';
  try {
    const design: unknown = JSON.parse(record.designText as string);
    if (typeof design !== 'object' || design === null || Array.isArray(design)) return 'its design is no document';
  } catch {
    return 'its design is cut short or garbled';
  }
  return record.variants === undefined ? null : variantsFault(record.variants);
}

/** Whether a design was written by a newer program than this one: it is whole, and only cannot be read here. */
export function isNewer(designText: string): boolean {
  const version = (format: string): number => Number(/^halfmark-design\/(\d{1,6})$/.exec(format)?.[1] ?? 0);
  try {
    return version(String((JSON.parse(designText) as { format?: unknown } | null)?.format)) > version(DESIGN_FORMAT);
  } catch {
    return false;
  }
}

/** Anything as text, for a person who wants to rescue what a damaged record holds. */
export function rawText(value: unknown): string {
  try {
    return JSON.stringify(value, null, 2) ?? String(value);
  } catch {
    return String(value);
  }
}
