import { presetCatalogue } from '../design/catalogue.ts';
import type { EntryKey } from '../design/entry-key.ts';
import type { MetalInput } from '../design/types.ts';
import { entryValues, type EntryValue } from './entry-values.ts';

/**
 * Which values of a design's own entry are its own: an entry that was made to change one value keeps the published ones, with where they stand.
 *
 * @param key  of the entry; one without a preset has own values only
 */
export function ownValues(key: EntryKey): (value: EntryValue) => boolean {
  const { list, id, host } = key;
  const preset = (list === 'dopants' ? presetCatalogue.dopants.get(host ?? '')?.get(id) : presetCatalogue[list].get(id))?.entry;
  if (preset === undefined) return () => true;
  const rows = entryValues(preset);
  return ({ path, text, origin }) => !rows.some((row) => row.path === path && row.text === text && row.origin.source === origin.source && row.origin.checked === origin.checked);
}

/** The same of a barrier of a metal: one that the preset of that name has, word for word, is published. */
export function isOwnBarrier(metal: string, barrier: NonNullable<MetalInput['barriers']>[number]): boolean {
  const published = presetCatalogue.metals.get(metal)?.entry.barriers ?? [];
  return !published.some((b) => b.material === barrier.material && b.carrier === barrier.carrier && b.height === barrier.height && b.source === barrier.source && b.checked === barrier.checked);
}
