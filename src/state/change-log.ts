import type { ContactInput, Design, DopantRow, LayerInput } from '../design/types.ts';
import { interfaceChanges, ownEntryChanges } from './change-log-entries.ts';
import { turned, valueText } from './change-sentences.ts';
import { difference, same, type Json } from './difference.ts';

/**
 * What leads from one design to another, in plain words for a review: layers that came, went, moved or were renamed, and each of their values; contacts, variables,
 * conditions, assumptions, requirements, interfaces, own entries. Layers are the same ones by name; one whose name alone changed is known by all the rest. No words: the designs are equal.
 */
export function changeLog(before: Design, after: Design): string[] {
  return [
    ...layerChanges(before.layers, after.layers),
    ...interfaceChanges(before.interfaces ?? [], after.interfaces ?? [], renames(before.layers, after.layers)),
    ...contactChange('top', before.top, after.top),
    ...contactChange('bottom', before.bottom, after.bottom),
    ...named('variable', before.variables ?? [], after.variables ?? [], (row) => row.name, (row) => row.value),
    ...listed('requirement', before.requirements ?? [], after.requirements ?? []),
    ...ownEntryChanges(before.custom ?? {}, after.custom ?? {}),
    ...rest(before, after),
  ];
}

function layerChanges(before: readonly LayerInput[], after: readonly LayerInput[]): string[] {
  const renamed = renames(before, after);
  const nameAfter = (layer: LayerInput): string => renamed.get(layer.name) ?? layer.name;
  const gone = before.filter((layer) => !after.some(({ name }) => name === nameAfter(layer)));
  const come = after.filter((layer) => !before.some((old) => nameAfter(old) === layer.name));
  const stay = before.filter((layer) => !gone.includes(layer));
  const order = after.filter((layer) => !come.includes(layer)).map(({ name }) => name);
  const moved = stay.length > 1 && !same(stay.map(nameAfter), order);
  return [
    ...gone.map(({ name }) => `Layer ${name} was taken out.`),
    ...come.map((layer) => `Layer ${layer.name} was put in ${placeOf(after, layer)}: ${layerWords(layer)}.`),
    ...[...renamed].map(([old, now]) => `Layer ${old} is called ${now} now.`),
    ...(moved ? [`The layers stand in another order: ${order.join(', ')}.`] : []),
    ...stay.flatMap((old) => valueChanges(old, after.find(({ name }) => name === nameAfter(old))!)),
  ];
}

/** Layers that are the same but for their names, one to one. */
function renames(before: readonly LayerInput[], after: readonly LayerInput[]): Map<string, string> {
  const names = (list: readonly LayerInput[]): string[] => list.map(({ name }) => name);
  const free = after.filter(({ name }) => !names(before).includes(name));
  const map = new Map<string, string>();
  for (const old of before) {
    if (names(after).includes(old.name)) continue;
    const twin = free.find((layer) => same({ ...layer, name: old.name } as unknown as Json, old as unknown as Json));
    if (twin === undefined) continue;
    free.splice(free.indexOf(twin), 1);
    map.set(old.name, twin.name);
  }
  return map;
}

function placeOf(layers: readonly LayerInput[], layer: LayerInput): string {
  const above = layers[layers.indexOf(layer) - 1];
  return above === undefined ? 'on top' : `below ${above.name}`;
}

function layerWords({ material, x, thickness, dopants = [] }: LayerInput): string {
  const doping = dopants.map((row) => `${dopantName(row)} ${valueText(row.concentration)}`).join(', ');
  return [`${material}${x === undefined ? '' : ` x = ${valueText(x)}`}`, thickness, doping === '' ? 'undoped' : doping].join(', ');
}

function valueChanges(before: LayerInput, after: LayerInput): string[] {
  const of = after.name;
  return [
    ...turned(`Material of ${of}`, before.material, after.material),
    ...turned(`Composition x of ${of}`, before.x, after.x),
    ...turned(`Thickness of ${of}`, before.thickness, after.thickness),
    ...dopantChanges(of, before.dopants ?? [], after.dopants ?? []),
  ];
}

function dopantChanges(of: string, before: readonly DopantRow[], after: readonly DopantRow[]): string[] {
  const length = Math.max(before.length, after.length);
  return Array.from({ length }, (_, i) => i).flatMap((i): string[] => {
    const [old, now] = [before[i], after[i]];
    if (old === undefined) return [`Dopant ${dopantName(now)} of ${of} was put in: ${valueText(now.concentration)}.`];
    if (now === undefined) return [`Dopant ${dopantName(old)} of ${of} was taken out.`];
    const name = dopantName(now);
    const { concentration: a, ...others } = old;
    const { concentration: b, ...laterOthers } = now;
    const more = difference({ ...others } as unknown as Json, { ...laterOthers } as unknown as Json).flatMap((change) => ('at' in change ? [] : turned(change.path[0] === 'dopant' ? `dopant of ${of}` : `${String(change.path.at(-1))} of ${name} in ${of}`, change.before, change.after)));
    return [...more, ...turned(`Concentration of ${name} in ${of}`, a, b)];
  });
}

const dopantName = ({ dopant, kind }: DopantRow): string => dopant ?? kind ?? 'dopant';

function contactChange(side: 'top' | 'bottom', before: ContactInput, after: ContactInput): string[] {
  return difference(before as unknown as Json, after as unknown as Json).flatMap((change) => ('at' in change ? [] : turned(`${change.path.join('.') || 'kind'} of the ${side} contact`, change.before, change.after)));
}

function named<T>(what: string, before: readonly T[], after: readonly T[], nameOf: (row: T) => string, valueOf: (row: T) => string): string[] {
  const find = (list: readonly T[], name: string): T | undefined => list.find((row) => nameOf(row) === name);
  return [
    ...before.filter((row) => find(after, nameOf(row)) === undefined).map((row) => `The ${what} ${nameOf(row)} was taken out.`),
    ...after.flatMap((row): string[] => {
      const old = find(before, nameOf(row));
      if (old === undefined) return [`The ${what} ${nameOf(row)} was put in: ${valueOf(row)}.`];
      const changes = difference(old as unknown as Json, row as unknown as Json).map(({ path }) => String(path[0]));
      const first = turned(`The ${what} ${nameOf(row)}`, valueOf(old), valueOf(row));
      const other = [...new Set(changes)].filter((key) => key !== 'value');
      return [...first, ...(other.length === 0 ? [] : [`The ${what} ${nameOf(row)} has another ${other.join(' and ')}.`])];
    }),
  ];
}

type Requirements = NonNullable<Design['requirements']>;

function listed(what: string, before: Requirements, after: Requirements): string[] {
  const text = ({ quantity, of, max, min, over }: Requirements[number]): string => `${quantity} of ${of} ${max !== undefined ? `at most ${String(max)}` : `at least ${String(min)}`}${over === 'temperatureRange' ? ' over the temperature range' : ''}`;
  const [old, now] = [before.map(text), after.map(text)];
  return [...old.filter((row) => !now.includes(row)).map((row) => `The ${what} "${row}" was taken out.`), ...now.filter((row) => !old.includes(row)).map((row) => `The ${what} "${row}" was put in.`)];
}

/** Places of a design in words. */
const WORDS: Readonly<Record<string, string>> = {
  'conditions.temperature': 'temperature', 'conditions.bias': 'bias', 'conditions.temperatureRange': 'temperature range', 'conditions.temperatureRange.0': 'lower end of the temperature range', 'conditions.temperatureRange.1': 'upper end of the temperature range',
};

/** What the sentences above do not speak of. */
function rest(before: Design, after: Design): string[] {
  const others = ({ layers: _l, top: _t, bottom: _b, variables: _v, requirements: _r, interfaces: _i, custom: _c, ...more }: Design): Json => more as unknown as Json;
  return difference(others(before), others(after)).flatMap((change): string[] => {
    const path = change.path.join('.');
    const words = WORDS[path] ?? path;
    return 'at' in change ? [`The list ${words} was changed.`] : turned(words[0].toUpperCase() + words.slice(1), change.before, change.after);
  });
}
