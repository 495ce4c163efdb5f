import { dopants as presetDopants, materials as presetMaterials, metals as presetMetals, offsets as presetOffsets } from '../../presets/index.ts';
import type { Complaint } from './complaint.ts';
import type { Custom, DopantInput, MaterialInput, MetalInput } from './types.ts';

/** An entry with the place where a complaint about it belongs. */
export interface Entry<T> {
  entry: T;
  path: string;
  preset: boolean;
}

/** What a design can name: the presets, and the design's own entries, which win over them. */
export interface Catalogue {
  materials: ReadonlyMap<string, Entry<MaterialInput>>;
  /** by host, then by id */ dopants: ReadonlyMap<string, ReadonlyMap<string, Entry<DopantInput>>>;
  metals: ReadonlyMap<string, Entry<MetalInput>>;
}

/** A published band offset of two materials: edge of `second` less that of `first`, constant + perX x, x of the alloy of the two. */
export interface PublishedOffset {
  first: string;
  second: string;
  deltaEv?: { constant?: string; perX?: string };
  deltaEc?: { constant?: string; perX?: string };
  source: unknown;
}

// JSON gives each entry a type of its own; the presets' test holds them against the document's shape.
const MATERIALS = presetMaterials as unknown as MaterialInput[];
const DOPANTS = presetDopants as unknown as DopantInput[];
const METALS = presetMetals as unknown as MetalInput[];
export const OFFSETS = presetOffsets as unknown as PublishedOffset[];

export const presetCatalogue: Catalogue = {
  materials: new Map(MATERIALS.map((entry) => [entry.id, { entry, path: `preset ${entry.id}`, preset: true }])),
  dopants: byHost(DOPANTS.map((entry) => ({ entry, path: `preset ${entry.host}:${entry.id}`, preset: true }))),
  metals: new Map(METALS.map((entry) => [entry.id, { entry, path: `preset ${entry.id}`, preset: true }])),
};

function byHost(entries: Entry<DopantInput>[]): Map<string, Map<string, Entry<DopantInput>>> {
  const hosts = new Map<string, Map<string, Entry<DopantInput>>>();
  for (const e of entries) {
    const host = hosts.get(e.entry.host) ?? new Map<string, Entry<DopantInput>>();
    hosts.set(e.entry.host, host.set(e.entry.id, e));
  }
  return hosts;
}

/** Nothing is said of where a value stands. */
export function isUnsourced(source: unknown): boolean {
  if (source !== null && typeof source === 'object') return 'source' in source ? isUnsourced(source.source) : Object.keys(source).length === 0;
  return source === undefined || source === null || (typeof source === 'string' && source.trim() === '');
}

/** The presets with a design's own entries over them. */
export function catalogueOf(custom: Custom | undefined, complaints: Complaint[] = []): Catalogue {
  if (!custom) return presetCatalogue;
  const own = <T extends { id: string }>(rows: T[] | undefined, key: string, name: (row: T) => string): Entry<T>[] => {
    const seen = new Set<string>();
    return (rows ?? []).map((entry, i) => {
      const path = `custom.${key}[${i}]`;
      if (seen.has(name(entry))) complaints.push({ path: `${path}.id`, message: `'${entry.id}' is there twice; each entry needs an id of its own` });
      seen.add(name(entry));
      if (isUnsourced((entry as { source?: unknown }).source)) complaints.push({ path: `${path}.source`, message: 'is empty; say where the values stand: author, year, table, or the measurement' });
      return { entry, path, preset: false };
    });
  };
  const materials = new Map(presetCatalogue.materials);
  for (const e of own(custom.materials, 'materials', (m) => m.id)) materials.set(e.entry.id, e);
  const metals = new Map(presetCatalogue.metals);
  for (const e of own(custom.metals, 'metals', (m) => m.id)) metals.set(e.entry.id, e);
  const dopants = new Map([...presetCatalogue.dopants].map(([host, rows]) => [host, new Map(rows)]));
  for (const e of own(custom.dopants, 'dopants', (d) => `${d.host}\n${d.id}`)) dopants.set(e.entry.host, (dopants.get(e.entry.host) ?? new Map()).set(e.entry.id, e));
  return { materials, dopants, metals };
}
