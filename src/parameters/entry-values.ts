/** Where a value stands. */
export interface ValueOrigin {
  /** key of presets/sources.json, or the words of the person who entered it; empty where nobody said */ source: string;
  /** null for a value of the design's own */ checked: 'page' | 'memory' | 'computed' | null;
  confidence: string;
  note: string;
}

export interface EntryValue {
  /** "mobility.electron.min", "otherValleys.X.gap.zeroK" */ path: string;
  /** as it stands in the entry, "0.067", "9400 cm^2/(V s)" */ text: string;
  origin: ValueOrigin;
}

/** Keys that name or arrange rather than measure, at the top of an entry and everywhere in it. */
const NOT_VALUES: ReadonlySet<string> = new Set(['id', 'name', 'kind', 'host', 'centre', 'model', 'insulator', 'source', 'sources', 'barriers', 'law', 'scale', 'carrier', 'first', 'second', 'checked', 'confidence', 'note']);

/** An entry of the catalogue, preset or custom, as its values one by one, each with where it stands. */
export function entryValues(entry: object): EntryValue[] {
  const { source, sources } = entry as { source?: unknown; sources?: unknown };
  return leaves(entry, '').map(({ path, text }) => ({ path, text, origin: originOf(path, sources, source) }));
}

function leaves(value: unknown, path: string): { path: string; text: string }[] {
  if (typeof value === 'string' || typeof value === 'number') return [{ path, text: String(value) }];
  if (Array.isArray(value)) {
    if (path.endsWith('.points')) return value.map((row, i) => ({ path: `${path}.${i}`, text: `${String((row as unknown[])[1])} at x = ${String((row as unknown[])[0])}` }));
    if (value.every((item) => typeof item === 'string' || typeof item === 'number')) return [{ path, text: path.startsWith('validity') ? value.join(' to ') : value.join('; ') }];
    return value.flatMap((item, i) => leaves(item, `${path}.${(item as { name?: string }).name ?? i}`));
  }
  if (value === null || typeof value !== 'object') return [];
  return Object.entries(value).flatMap(([key, inner]) => (NOT_VALUES.has(key) ? [] : leaves(inner, path === '' ? key : `${path}.${key}`)));
}

/** The provenance of the path itself, else of the nearest part above it that has one, else of the entry. */
function originOf(path: string, sources: unknown, whole: unknown): ValueOrigin {
  const rows = sources !== null && typeof sources === 'object' ? (sources as Record<string, unknown>) : {};
  for (let at = path; at !== ''; at = at.includes('.') ? at.slice(0, at.lastIndexOf('.')) : '') {
    if (Object.hasOwn(rows, at)) return origin(rows[at]);
  }
  return origin(whole);
}

export function origin(found: unknown): ValueOrigin {
  if (found === null || typeof found !== 'object') return { source: typeof found === 'string' ? found : '', checked: null, confidence: '', note: '' };
  const { source, checked, confidence, note } = found as Record<string, unknown>;
  const words = (text: unknown): string => (typeof text === 'string' ? text : '');
  return { source: words(source), checked: checked === 'page' || checked === 'memory' || checked === 'computed' ? checked : null, confidence: words(confidence), note: words(note) };
}
