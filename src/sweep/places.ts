import { evaluate, ExpressionError } from '../quantity/expression.ts';
import { KINDS, type KindName } from '../quantity/kinds.ts';
import { inUnit, type Value } from '../quantity/units.ts';
import { didYouMean, quoted } from '../quantity/wording.ts';
import type { Complaint } from '../design/complaint.ts';
import type { Design } from '../design/types.ts';
import { readVariables } from '../design/variables.ts';

/** Something of a design that can be swept: a variable, the temperature, or a quantity at a place. */
export interface SweepPlace {
  /** as it was asked for */ name: string;
  words: string;
  kind: KindName;
  /** how the value goes in: into the run's overrides, or into the design itself */
  put(design: Design, text: string): { design: Design; set: Record<string, string> };
}

/** Quantities that stand at a place of the design, by the pattern of the place; [] is an index or the name of a layer. */
const PATTERNS: readonly { pattern: RegExp; kind: KindName; words: string }[] = [
  { pattern: /^layers\.\d+\.thickness$/, kind: 'length', words: 'thickness' },
  { pattern: /^layers\.\d+\.x(?:\.(?:from|to))?$/, kind: 'number', words: 'composition x' },
  { pattern: /^layers\.\d+\.dopants\.\d+\.concentration(?:\.(?:from|to|peak|background))?$/, kind: 'density', words: 'concentration' },
  { pattern: /^layers\.\d+\.dopants\.\d+\.concentration\.(?:depth|straggle)$/, kind: 'length', words: 'depth in the layer' },
  { pattern: /^layers\.\d+\.dopants\.\d+\.depth$/, kind: 'energy', words: 'depth of the level' },
  { pattern: /^layers\.\d+\.dopants\.\d+\.(?:activation|compensation|degeneracy)$/, kind: 'number', words: 'share' },
  { pattern: /^(?:top|bottom)\.barrier$/, kind: 'energy', words: 'barrier' },
  { pattern: /^(?:top|bottom)\.level$/, kind: 'energy', words: 'level below Ec' },
  { pattern: /^(?:top|bottom)\.sheetCharge$/, kind: 'sheetDensity', words: 'sheet charge' },
  { pattern: /^(?:top|bottom)\.pinning$/, kind: 'number', words: 'pinning slope S' },
  { pattern: /^interfaces\.\d+\.sheetCharge$/, kind: 'sheetDensity', words: 'sheet charge' },
  { pattern: /^interfaces\.\d+\.(?:dEc|dEv)$/, kind: 'energy', words: 'band offset' },
];

/** Keys that may be put where the design is silent; the others have to be there. */
const MAY_BE_ABSENT = /(?:^(?:top|bottom)\.(?:barrier|sheetCharge|pinning)|\.(?:activation|compensation|sheetCharge|dEc|dEv))$/;

/**
 * Finds what a name means: "temperature", a variable of the design, or a place such as layers[0].thickness or layers.cap.dopants[0].concentration.
 *
 * @returns the place, or a complaint whose message says what would do
 */
export function findPlace(design: Design, name: string, path = 'variable'): SweepPlace | Complaint {
  const plain = name.trim();
  if (plain === 'temperature' || plain === 'conditions.temperature') {
    return { name: 'temperature', words: 'temperature', kind: 'temperature', put: (d, text) => ({ design: d, set: { temperature: text } }) };
  }
  const variable = (design.variables ?? []).find((v) => v.name === plain);
  if (variable) return variablePlace(design, plain, path);
  return designPlace(design, plain, path);
}

export function isComplaint(x: object): x is Complaint {
  return 'message' in x && 'path' in x;
}

function variablePlace(design: Design, name: string, path: string): SweepPlace | Complaint {
  const { scope } = readVariables(design.variables ?? []);
  let value: Value | undefined;
  try {
    value = scope.value(name);
  } catch (error) {
    if (!(error instanceof ExpressionError)) throw error;
    return { path, message: `the variable ${quoted(name)} cannot be read; mend its value first` };
  }
  const kind = value === undefined ? null : kindOf(value);
  if (kind === null) return { path, message: `the variable ${quoted(name)} is no quantity that a design asks for; sweep one that is` };
  return { name, words: name, kind, put: (d, text) => ({ design: d, set: { [name]: text } }) };
}

function designPlace(design: Design, name: string, path: string): SweepPlace | Complaint {
  const steps = stepsOf(design, name);
  const dotted = steps.join('.');
  const row = PATTERNS.find(({ pattern }) => pattern.test(dotted));
  const last = steps[steps.length - 1] ?? '';
  const holder = row ? valueAt(design, steps.slice(0, -1)) : undefined;
  if (!row || holder === undefined || holder === null || typeof holder !== 'object') return { path, message: unknownWords(design, name) };
  const now = (holder as Record<string, unknown>)[last];
  if (now === undefined && !MAY_BE_ABSENT.test(dotted)) return { path, message: `${quoted(name)} is not there in this design${whatIsThere(holder)}` };
  if (typeof now === 'object') return { path, message: `${quoted(name)} is graded; sweep one of ${Object.keys(now as object).filter((k) => k !== 'shape' && k !== 'points').map((k) => `${name}.${k}`).join(', ') || 'its points as variables'}` };
  const misfit = contactMisfit(design, steps, name);
  if (misfit !== null) return { path, message: misfit };
  return { name, words: `${placeWords(design, steps)}${row.words}`, kind: row.kind, put: (d, text) => ({ design: replaced(d, steps, row.kind === 'number' ? numberOf(text) : text) as Design, set: {} }) };
}

/** A contact takes the keys of its own kind only. */
function contactMisfit(design: Design, [side, key]: string[], name: string): string | null {
  if (side !== 'top' && side !== 'bottom') return null;
  const { kind } = design[side];
  const fits = kind === 'barrier' ? ['barrier', 'pinning'] : kind === 'pinned' ? ['level'] : kind === 'open' ? ['sheetCharge'] : [];
  if (fits.includes(key)) return null;
  return `${quoted(name)} does not go with a ${side} contact of kind "${kind}"${fits.length > 0 ? `; ${fits.map((k) => `${side}.${k}`).join(' or ')} would do` : ''}`;
}

/** "layers[0].x" and "layers.cap.x" as steps, a layer's name as its index. */
function stepsOf(design: Design, name: string): string[] {
  const steps = name.replace(/\[(\d+)\]/g, '.$1').split('.');
  if (steps[0] === 'layers' && steps.length > 2 && !/^\d+$/.test(steps[1])) {
    // A name may itself hold dots: the longest that fits is meant.
    const layers = design.layers.map((layer, l) => ({ name: layer.name, l })).sort((a, b) => b.name.length - a.name.length);
    const found = layers.find((layer) => name.startsWith(`layers.${layer.name}.`));
    if (found) return ['layers', String(found.l), ...name.slice(`layers.${found.name}.`.length).replace(/\[(\d+)\]/g, '.$1').split('.')];
  }
  return steps;
}

function valueAt(root: unknown, steps: readonly string[]): unknown {
  let at = root;
  for (const step of steps) {
    if (at === null || typeof at !== 'object' || !Object.hasOwn(at, step)) return undefined;
    at = (at as Record<string, unknown>)[step];
  }
  return at;
}

/** A copy with one value put at its place; what does not change is shared. */
function replaced(root: unknown, [step, ...rest]: readonly string[], value: unknown): unknown {
  if (step === undefined) return value;
  const copy = Array.isArray(root) ? [...root] : { ...(root as object) };
  (copy as Record<string, unknown>)[step] = replaced((root as Record<string, unknown>)[step], rest, value);
  return copy;
}

const numberOf = (text: string): number | string => (Number.isFinite(Number(text)) ? Number(text) : text);

function placeWords(design: Design, [first, index, third, row]: string[]): string {
  if (first === 'layers') {
    const layer = design.layers[Number(index)];
    const dopant = third === 'dopants' ? layer.dopants?.[Number(row)] : undefined;
    return `${layer.name}${dopant ? ` ${dopant.dopant ?? dopant.kind ?? 'dopant'}` : ''} `;
  }
  if (first === 'interfaces') return `below ${design.interfaces?.[Number(index)]?.above ?? ''} `;
  return `${first} `;
}

function whatIsThere(holder: object): string {
  const keys = Object.keys(holder);
  return keys.length > 0 ? `; there are ${keys.join(', ')}` : '';
}

/** Every name that can be swept in this design, likeliest first; for a menu and for what a mistyped name may have meant. */
export function sweepNames(design: Design): string[] {
  const out = ['temperature', ...(design.variables ?? []).map((v) => v.name)];
  const add = (name: string): void => {
    if (!isComplaint(designPlace(design, name, ''))) out.push(name);
  };
  design.layers.forEach((layer, l) => {
    add(`layers[${l}].thickness`);
    for (const part of gradedParts(layer.x)) add(`layers[${l}].x${part}`);
    (layer.dopants ?? []).forEach((row, d) => {
      for (const part of gradedParts(row.concentration)) add(`layers[${l}].dopants[${d}].concentration${part}`);
      add(`layers[${l}].dopants[${d}].activation`);
    });
  });
  for (const side of ['top', 'bottom']) for (const key of ['barrier', 'level', 'sheetCharge']) add(`${side}.${key}`);
  (design.interfaces ?? []).forEach((_, i) => {
    for (const key of ['sheetCharge', 'dEc', 'dEv']) add(`interfaces[${i}].${key}`);
  });
  return out;
}

function gradedParts(value: unknown): string[] {
  if (value === undefined) return [];
  if (typeof value !== 'object' || value === null) return [''];
  return Object.keys(value).filter((k) => k !== 'shape' && k !== 'points').map((k) => `.${k}`);
}

function unknownWords(design: Design, name: string): string {
  const names = sweepNames(design);
  const mend = didYouMean(name, names) || `; one of ${names.slice(0, 6).join(', ')} would do`;
  return `there is nothing called ${quoted(name)} that can be swept in this design${mend}`;
}

/** The kind of a value; energies and lengths come first where two kinds share a dimension. */
export function kindOf(value: Value): KindName | null {
  return (Object.keys(KINDS) as KindName[]).find((k) => inUnit(value, KINDS[k].unit) !== null) ?? null;
}

/** Factor from a unit to the solver's unit of a kind; null for no such unit. */
export function unitFactor(unit: string, kind: KindName): number | null {
  if (unit === KINDS[kind].unit) return 1;
  try {
    return inUnit(evaluate(`1 ${unit}`, { value: () => undefined, names: [] }), KINDS[kind].unit);
  } catch (error) {
    if (error instanceof ExpressionError) return null;
    throw error;
  }
}
