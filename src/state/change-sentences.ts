import { same, type Json } from './difference.ts';

/** "Thickness of cap: 40 nm, was 30 nm." */
export function turned(what: string, before: unknown, after: unknown): string[] {
  if (same(before as Json | undefined, after as Json | undefined)) return [];
  const start = what[0].toUpperCase() + what.slice(1);
  if (before === undefined) return [`${start}: ${valueText(after)}, was not given.`];
  return after === undefined ? [`${start}: no longer given, was ${valueText(before)}.`] : [`${start}: ${valueText(after)}, was ${valueText(before)}.`];
}

/** A value of a design as it was typed; several in a row. */
export function valueText(value: unknown): string {
  if (typeof value === 'string') return value;
  if (typeof value !== 'object' || value === null) return String(value);
  const { from, to, shape, points, peak, depth } = value as Record<string, unknown>;
  if (points !== undefined) return `${(points as unknown[]).length} points through the depth`;
  if (peak !== undefined) return `${String(peak)} peak at ${String(depth)}`;
  if (from !== undefined) return `${String(from)} to ${String(to)} (${String(shape)})`;
  if (Array.isArray(value)) return value.map(valueText).join(' to ');
  return Object.entries(value).map(([key, part]) => `${key} ${valueText(part)}`).join(', ');
}
