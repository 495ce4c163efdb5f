import { offsets, sources } from '../../presets/index.ts';
import { catalogueOf, type Catalogue, type Entry } from '../design/catalogue.ts';
import { readAssumptions } from '../design/stack.ts';
import type { ContactInput, Design, DopantInput, DopantRow } from '../design/types.ts';
import { isPair } from '../design/offset.ts';
import { isOwnBarrier, ownValues } from '../parameters/own-value.ts';
import type { Result } from '../result/types.ts';
import { entryValues, origin, type EntryValue, type ValueOrigin } from '../parameters/entry-values.ts';

/** Values of one entry that share where they stand. */
export interface ParameterRow {
  /** "GaAs", "GaAs:Si", "Ti", "GaAs / AlGaAs" */ of: string;
  values: { path: string; text: string }[];
  origin: ValueOrigin;
  /** the work behind the source's key; of an own value what the person said, or that nothing was said */ work: string;
  /** entered by the person rather than taken from the presets */ own: boolean;
}

/** Which values of an entry count is told from what the solver did with it. */
interface InForce {
  narrowing: boolean;
  nonParabolic: boolean;
  polar: boolean;
  natural: boolean;
  /** there is a metal in the stack */ contact: boolean;
  pinned: boolean;
}

/**
 * Every parameter that the result rests on, entry by entry from the top of the stack down, with where it stands. Left out are values that the assumptions in force do not touch:
 * narrowing and non-parabolicity when they are off, polarisation constants of a stack that is not polar, barrier constants where no metal is.
 */
export function parametersInUse(design: Design, result: Result): ParameterRow[] {
  const catalogue = catalogueOf(design.custom);
  const assumed = readAssumptions(design.assumptions);
  const metal = result.contacts.some((c) => c.kind === 'barrier');
  const inForce: InForce = {
    narrowing: assumed.narrowing, nonParabolic: assumed.nonParabolic, polar: design.crystal !== undefined, natural: result.junctions.some((j) => j.alignment === 'natural'),
    contact: metal, pinned: result.contacts.some((c) => c.barrier_source === 'pinned' || c.barrier_source === 'ideal'),
  };
  const rows: ParameterRow[] = [];
  for (const id of materialsOf(design, catalogue)) {
    const found = catalogue.materials.get(id);
    if (found) rows.push(...grouped(id, entryValues(found.entry).filter(({ path }) => counts(path, inForce)), found.preset ? published : ownValues({ list: 'materials', id })));
  }
  rows.push(...dopantRows(design, catalogue));
  for (const side of ['top', 'bottom'] as const) rows.push(...contactRows(design, side, result, catalogue));
  rows.push(...interfaceRows(design, result), CONSTANTS);
  // One dopant under two laws shares what does not depend on the law.
  const texts = rows.map((row) => JSON.stringify(row));
  return rows.filter((_, i) => texts.indexOf(texts[i]) === i);
}

const CONSTANTS: ParameterRow = {
  of: 'constants',
  values: [{ path: 'Boltzmann constant, elementary charge and Planck constant', text: 'exact' }, { path: 'electric constant, electron mass', text: 'CODATA 2018' }],
  origin: { source: 'CODATA2018', checked: null, confidence: '', note: '' },
  work: 'SI 2019 and CODATA 2018: E. Tiesinga et al., Rev. Mod. Phys. 93, 025010 (2021)',
  own: false,
};

function counts(path: string, inForce: InForce): boolean {
  if (path.startsWith('narrowing')) return inForce.narrowing;
  if (path.startsWith('nonParabolicity')) return inForce.nonParabolic;
  if (path.startsWith('polarisation')) return inForce.polar;
  if (path.startsWith('naturalValence') || path.startsWith('alloy.bowing.naturalValence')) return inForce.natural;
  if (path.startsWith('tunnellingMass') || path.startsWith('richardson') || path.startsWith('outsideContactModel') || path === 'permittivityHighFrequency') return inForce.contact;
  if (path === 'neutralityLevel' || path === 'pinningSlope') return inForce.pinned;
  return true;
}

/** Materials of the layers in their order, the ends of an alloy behind it, the template last. */
function materialsOf(design: Design, catalogue: Catalogue): Set<string> {
  const out = new Set<string>();
  const add = (id: string): void => {
    out.add(id);
    const alloy = catalogue.materials.get(id)?.entry.alloy;
    if (alloy) [alloy.first, alloy.second].forEach((end) => out.add(end));
  };
  design.layers.forEach((layer) => add(layer.material));
  if (design.crystal?.template !== undefined) add(design.crystal.template);
  return out;
}

/** Values that stand in one place in one row, in the order of the entry. */
function grouped(of: string, values: readonly EntryValue[], isOwn: (value: EntryValue) => boolean): ParameterRow[] {
  const rows = new Map<string, ParameterRow>();
  for (const value of values) {
    const { path, text, origin: from } = value;
    const own = isOwn(value);
    const key = JSON.stringify([from, own]);
    const row = rows.get(key) ?? { of, values: [], origin: from, work: workOf(from.source, own), own };
    rows.set(key, { ...row, values: [...row.values, { path, text }] });
  }
  return [...rows.values()];
}

const published = (): boolean => false;

function workOf(source: string, own: boolean): string {
  if (own) return source === '' ? 'own value, no source given' : `own value: ${source}`;
  return Object.hasOwn(sources, source) ? sources[source] : source;
}

const OWN: ValueOrigin = { source: '', checked: null, confidence: '', note: '' };

function ownRow(of: string, values: { path: string; text: string }[]): ParameterRow {
  return { of, values, origin: OWN, work: 'own value, entered in the design', own: true };
}

function dopantRows(design: Design, catalogue: Catalogue): ParameterRow[] {
  const rows: ParameterRow[] = [];
  const seen = new Set<string>();
  for (const layer of design.layers) {
    (layer.dopants ?? []).forEach((row, d) => {
      if (row.dopant === undefined) {
        const values = (['depth', 'degeneracy'] as const).flatMap((key) => (row[key] === undefined ? [] : [{ path: key, text: String(row[key]) }]));
        rows.push(ownRow(`${layer.name}: ${row.kind ?? 'dopant'}${(layer.dopants ?? []).length > 1 ? ` ${d + 1}` : ''}`, values));
        return;
      }
      const found = catalogue.dopants.get(layer.material)?.get(row.dopant);
      // Laws without parameters of their own are one as far as sources go.
      const law = found ? lawOf(row, found) : null;
      const key = JSON.stringify([layer.material, row.dopant, law === 'merging' || law === 'screened' ? law : '']);
      if (!found || seen.has(key)) return;
      seen.add(key);
      rows.push(...grouped(`${layer.material}:${row.dopant}`, entryValues(found.entry).filter(({ path }) => !/^(merging|screened)\b/.test(path) || path.startsWith(String(law))), found.preset ? published : ownValues({ list: 'dopants', id: row.dopant, host: layer.material })));
    });
  }
  return rows;
}

/** The law of the row, as the reader of designs chooses it. */
function lawOf(row: DopantRow, { entry }: Entry<DopantInput>): string {
  return row.model ?? (entry.merging ? 'merging' : 'dilute');
}

function contactRows(design: Design, side: 'top' | 'bottom', result: Result, catalogue: Catalogue): ParameterRow[] {
  const contact: ContactInput = design[side];
  const solved = result.contacts.find((c) => c.side === side);
  const of = `${side} contact`;
  if (contact.kind === 'pinned') return [ownRow(of, [{ path: 'level below Ec', text: contact.level }])];
  if (contact.kind === 'open') return contact.sheetCharge === undefined ? [] : [ownRow(of, [{ path: 'sheet charge', text: contact.sheetCharge }])];
  if (contact.kind !== 'barrier') return [];
  if (contact.barrier !== undefined) return [ownRow(of, [{ path: `barrier for ${contact.carrier === 'p' ? 'holes' : 'electrons'}`, text: contact.barrier }])];
  const metal = contact.metal === undefined ? undefined : catalogue.metals.get(contact.metal);
  if (!metal) return [];
  const own = contact.pinning !== undefined && !['material', 'none', 'full'].includes(String(contact.pinning)) ? [ownRow(of, [{ path: 'pinning slope S', text: String(contact.pinning) }])] : [];
  if (solved?.barrier_source !== 'measured') return [...grouped(metal.entry.id, entryValues(metal.entry), metal.preset ? published : ownValues({ list: 'metals', id: metal.entry.id })), ...own];
  const layer = design.layers[side === 'top' ? 0 : design.layers.length - 1];
  const measured = (metal.entry.barriers ?? []).filter((b) => b.material === layer.material);
  const row = measured.find((b) => b.carrier === (contact.carrier ?? 'n')) ?? measured[0];
  if (!row) return own;
  const value: EntryValue = { path: `barrier for ${row.carrier === 'n' ? 'electrons' : 'holes'}`, text: row.height, origin: origin(row) };
  return [...grouped(`${metal.entry.id} on ${layer.material}`, [value], () => !metal.preset && isOwnBarrier(metal.entry.id, row)), ...own];
}

function interfaceRows(design: Design, result: Result): ParameterRow[] {
  const rows: ParameterRow[] = [];
  const seen = new Set<string>();
  result.junctions.forEach((junction, j) => {
    const [above, below] = [design.layers[j], design.layers[j + 1]];
    if (junction.alignment === 'published') {
      const row = offsets.find((o) => (o.first === above.material && o.second === below.material) || (o.first === below.material && o.second === above.material));
      const of = row ? `${row.first} / ${row.second}` : '';
      if (row && !seen.has(of)) rows.push(...grouped(of, entryValues(row).map((v) => ({ ...v, path: OFFSET_WORDS[v.path] ?? v.path })), published));
      seen.add(of);
    }
    const own = design.interfaces?.find((i) => i.above === above.name);
    const pair = junction.alignment === 'own' && own?.dEc === undefined && own?.dEv === undefined ? design.custom?.offsets?.find((o) => isPair(o, above.material, below.material)) : undefined;
    const pairOf = pair ? `${pair.first} / ${pair.second}` : '';
    if (pair && !seen.has(pairOf)) rows.push(...grouped(pairOf, entryValues(pair).map((v) => ({ ...v, path: OFFSET_WORDS[v.path] ?? v.path })), () => true));
    if (pair) seen.add(pairOf);
    const values = own ? (['dEc', 'dEv', 'sheetCharge'] as const).flatMap((key) => (own[key] === undefined ? [] : [{ path: key === 'sheetCharge' ? 'sheet charge' : key === 'dEc' ? 'ΔEc' : 'ΔEv', text: own[key] }])) : [];
    if (values.length > 0) rows.push(ownRow(`below ${above.name}`, values));
  });
  return rows;
}

const OFFSET_WORDS: Record<string, string> = {
  'deltaEv.constant': 'ΔEv, second less first', 'deltaEc.constant': 'ΔEc, second less first', 'deltaEv.perX': 'ΔEv for each x, second less first', 'deltaEc.perX': 'ΔEc for each x, second less first',
};

