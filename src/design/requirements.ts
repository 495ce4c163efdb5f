import { didYouMean, quoted } from '../quantity/wording.ts';
import type { Asker } from './ask.ts';
import { REQUIREMENT_QUANTITIES, requirementQuantity, type RequirementOf, type RequirementQuantityName } from './requirement-quantities.ts';
import type { Design, Requirement } from './types.ts';

/** One limit, with its texts read. A row of the design with both "max" and "min" is two of these. */
export interface ReadRequirement {
  /** index in the design's list */ row: number;
  quantity: RequirementQuantityName;
  /** as the design names it */ of: string;
  /** what that is: the layer, the interface below layer `index`, or the contact (0 top, 1 bottom) */ target: { kind: RequirementOf; index: number };
  bound: 'max' | 'min';
  /** in the quantity's result unit; of a flag, the value that it has to have */ limit: number | boolean;
  over: 'temperature' | 'temperatureRange';
}

/** Reads the requirements; what is wrong with them goes to `ask`. */
export function readRequirements(design: Design, ask: Asker): ReadRequirement[] {
  return (design.requirements ?? []).flatMap((row, r) => readRow(row, r, design, ask));
}

function readRow(row: Requirement, r: number, design: Design, ask: Asker): ReadRequirement[] {
  const path = `requirements[${r}]`;
  const before = ask.complaints.length;
  if (row.over === 'temperatureRange' && design.conditions.temperatureRange === undefined) {
    ask.wrong(`${path}.over`, 'is "temperatureRange", but conditions has none; give one, such as ["-40 degC", "125 degC"], or hold the requirement over "temperature"');
  }
  const names = Object.keys(REQUIREMENT_QUANTITIES);
  if (!names.includes(row.quantity)) {
    ask.wrong(`${path}.quantity`, `there is no quantity ${quoted(row.quantity)}${didYouMean(row.quantity, names) || `; one of ${names.join(', ')} would do`}`);
    return [];
  }
  const quantity = row.quantity as RequirementQuantityName;
  const target = targetOf(row, quantity, path, design, ask);
  if (row.max === undefined && row.min === undefined) ask.wrong(path, 'has no limit; give "max", the largest value allowed, or "min", the smallest');
  const out: ReadRequirement[] = [];
  for (const bound of ['max', 'min'] as const) {
    const text = row[bound];
    if (text === undefined) continue;
    const limit = readLimit(text, bound, quantity, `${path}.${bound}`, ask);
    if (target) out.push({ row: r, quantity, of: row.of, target, bound, limit, over: row.over ?? 'temperature' });
  }
  if (out.length === 2 && out[0].limit < out[1].limit) ask.wrong(path, `has a "max" below its "min", which nothing can meet`);
  return ask.complaints.length > before ? [] : out;
}

function targetOf(row: Requirement, quantity: RequirementQuantityName, path: string, design: Design, ask: Asker): ReadRequirement['target'] | null {
  const { of, words } = requirementQuantity(quantity);
  const isEnd = row.of === 'top' || row.of === 'bottom';
  if (isEnd) {
    if (of.includes('contact')) return { kind: 'contact', index: row.of === 'top' ? 0 : 1 };
    ask.wrong(`${path}.of`, `${quoted(row.of)} is a contact, which has no ${words}; name ${wanted(of, design)}`);
    return null;
  }
  const index = design.layers.findIndex((layer) => layer.name === row.of);
  const known = [...(of.includes('contact') ? ['top', 'bottom'] : []), ...(of.includes('layer') || of.includes('junction') ? design.layers.map((l) => l.name) : [])];
  if (index < 0) {
    ask.wrong(`${path}.of`, `there is nothing called ${quoted(row.of)}${didYouMean(row.of, known) || `; name ${wanted(of, design)}`}`);
    return null;
  }
  if (of.includes('layer')) return { kind: 'layer', index };
  if (of.includes('junction')) {
    if (index < design.layers.length - 1) return { kind: 'junction', index };
    ask.wrong(`${path}.of`, `${quoted(row.of)} is the last layer, with no junction below it; name ${wanted(of, design)}`);
    return null;
  }
  ask.wrong(`${path}.of`, `${quoted(row.of)} is a layer, which has no ${words}; name ${wanted(of, design)}`);
  return null;
}

function wanted(of: readonly RequirementOf[], design: Design): string {
  const list = (names: readonly string[]): string => (names.length === 0 ? 'none here' : names.slice(0, 8).map(quoted).join(', '));
  const words: Record<RequirementOf, string> = {
    contact: 'a contact ("top" or "bottom")',
    layer: `a layer (${list(design.layers.map((l) => l.name))})`,
    junction: `the layer above a junction (${list(design.layers.slice(0, -1).map((l) => l.name))})`,
  };
  return of.map((kind) => words[kind]).join(' or ');
}

function readLimit(text: string | boolean, bound: 'max' | 'min', quantity: RequirementQuantityName, path: string, ask: Asker): number | boolean {
  const { kind, perKind, margin } = requirementQuantity(quantity);
  if (kind === 'flag') {
    // False lies below true: only these two ask for anything.
    if (text === (bound === 'min')) return text;
    ask.wrong(path, `${quoted(text)} asks for nothing; write "min": true where ${quantity} has to hold, "max": false where it must not`);
    return false;
  }
  if (typeof text === 'boolean') {
    ask.wrong(path, `is ${String(text)}, but ${quantity} is a figure; write its limit with its unit`);
    return NaN;
  }
  return ask.quantity(text, kind, path, margin === 'ratio' ? { positive: true } : {}) * perKind;
}
