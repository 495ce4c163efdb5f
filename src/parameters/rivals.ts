import { sources } from '../../presets/index.ts';
import { rivals, type RivalOffset, type RivalPreset } from '../../presets/rivals.ts';
import { sameKey, type AnyEntry, type EntryKey } from '../design/entry-key.ts';
import { textAtPath } from '../design/entry-path.ts';
import { isPair } from '../design/offset.ts';
import type { Design, OffsetInput } from '../design/types.ts';
import { setCustomValue } from '../state/commands/index.ts';

/** Another published value, or law, beside the one in use. */
export interface Rival {
  /** the value in whose row it is shown */ path: string;
  values: readonly { path: string; text: string }[];
  /** author, title, journal */ work: string;
  checked: RivalPreset['checked'];
  confidence: RivalPreset['confidence'];
  note: string;
  /** the design uses it now */ chosen: boolean;
}

/** Rivals of an entry's values. One that differs in nothing from the entry as it is counts as chosen. */
export function rivalsOf(key: EntryKey, entry: AnyEntry): Rival[] {
  return rivals.values
    .filter(({ of }) => sameKey({ ...of }, key))
    .map(({ values, source, checked, confidence, note = '' }) => {
      const rows = Object.entries(values).map(([path, text]) => ({ path, text }));
      return { path: rows[0].path, values: rows, work: sources[source], checked, confidence, note, chosen: rows.every(({ path, text }) => textAtPath(entry, path) === text) };
    });
}

/** The design with a rival in the place of what it used: an own value, or several, whose source is the rival's work. */
export function chooseRival(design: Design, key: EntryKey, entry: AnyEntry, rival: Rival): Design {
  return rival.values.reduce((next, { path, text }) => setCustomValue(next, key, entry, path, text, sourceWords(rival)), design);
}

/** What the sheet and the workings say of it; how it was checked does not get lost on the way. */
export function sourceWords({ work, checked, note }: Pick<Rival, 'work' | 'checked' | 'note'>): string {
  const how = { page: '', memory: ' (from memory of the work)', computed: ' (derived from the work)' }[checked];
  return `${work}${how}${note === '' ? '' : `; ${note}`}`;
}

/** Other published offsets of a pair, either way round. */
export function rivalOffsets(first: string, second: string): RivalOffset[] {
  return rivals.offsets.filter((row) => isPair(row, first, second));
}

export function offsetOf({ first, second, deltaEv, deltaEc, source, checked, note = '' }: RivalOffset): OffsetInput {
  return { first, second, ...(deltaEv ? { deltaEv } : {}), ...(deltaEc ? { deltaEc } : {}), source: sourceWords({ work: sources[source], checked, note }) };
}
