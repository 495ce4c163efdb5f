import { formulaAt, type Formula } from '../../solver/formula.ts';
import { isAlloy, profileAt, type Layer, type Material } from '../../solver/index.ts';
import type { KindName } from '../quantity/kinds.ts';
import { readFormula, type Over } from '../quantity/read-formula.ts';
import { quoted } from '../quantity/wording.ts';
import type { Asker } from './ask.ts';
import type { Catalogue } from './catalogue.ts';
import type { FormulaInput } from './types.ts';

/** What a property may come to, in the solver's unit, with the words for it. */
interface Within {
  above: number;
  most: number;
  words: string;
}

const GAP: Within = { above: 0, most: 30, words: 'a gap lies above 0 and up to 30 eV' };
const AFFINITY: Within = { above: -10, most: 20, words: 'an affinity lies between -10 and 20 eV' };
const MASS: Within = { above: 0, most: 1000, words: 'a mass lies above 0 and up to 1000' };
const PERMITTIVITY: Within = { above: 0.999999, most: 1e6, words: 'a relative permittivity lies between 1 and 1e6' };
const OF_MATERIAL: Readonly<Record<string, Within>> = { gap: GAP, affinity: AFFINITY, electronMass: MASS, holeMass: MASS, permittivity: PERMITTIVITY, permittivityHighFrequency: PERMITTIVITY };

/** Temperatures across a range and places across a layer at which a formula is tried before anything is solved. */
const TEMPERATURES = 65;
const PLACES = 9;
/** Affinities and offsets refer to it, K. */
const REFERENCE = 300;

export function isFormula(value: unknown): value is FormulaInput {
  return typeof value === 'object' && value !== null && 'formula' in value;
}

/** Reads a formula of an entry; its values are asked about by `tryFormulas`, once it is known where it counts. Without steps where it is wrong. */
export function askFormula({ formula: text }: FormulaInput, kind: KindName, path: string, over: readonly Over[], ask: Asker): Formula {
  const reading = readFormula(text, kind, over, ask.scope);
  if (reading.ok) return reading.formula;
  const foreign = (['T', 'x'] as const).find((name) => !over.includes(name) && new RegExp(`(?<![A-Za-z0-9_])${name}(?![A-Za-z0-9_])`).test(text) && ask.scope.value(name) === undefined);
  const why = foreign === undefined ? reading.message : `${quoted(text)} uses ${foreign}, which does not count here; ${over.length === 0 ? 'write a value' : `it may use ${over.join(' and ')}`}`;
  ask.wrong(`${path}.formula`, why);
  return { steps: [Number.NaN] };
}

/**
 * Tries every formula that the layers come by at the temperatures at hand and at the compositions of the layers, and complains of the first place where one has no
 * value that can be.
 *
 * @param range  of the temperature, K, coldest first; null where there is none
 */
export function tryFormulas(layers: readonly Layer[], temperature: number, range: readonly [number, number] | null, catalogue: Catalogue, ask: Asker): void {
  const [low, high] = [Math.min(temperature, range?.[0] ?? temperature), Math.max(temperature, range?.[1] ?? temperature)];
  const tried = [temperature, REFERENCE, low, high, ...Array.from({ length: range === null ? 0 : TEMPERATURES }, (_, i) => low + ((high - low) * i) / (TEMPERATURES - 1))].filter((T) => T > 0);
  const temperatures = tried.sort((a, b) => a - b);
  const said = new Set<string>();
  for (const layer of layers) {
    const compositions = layer.x.kind === 'constant' ? [layer.x.value] : Array.from({ length: PLACES }, (_, i) => profileAt(layer.x, (layer.thickness * i) / (PLACES - 1), layer.thickness));
    for (const { id, key, place, formula } of formulasOf(layer.material)) {
      const path = `${catalogue.materials.get(id)?.path ?? id}.${place}.formula`;
      const trouble = said.has(path) ? null : troubleOf(formula, OF_MATERIAL[key], temperatures, isAlloy(layer.material) && id === layer.material.id ? compositions : [Number.NaN]);
      if (trouble === null) continue;
      said.add(path);
      ask.wrong(path, trouble);
    }
  }
}

function troubleOf(formula: Formula, within: Within, temperatures: readonly number[], compositions: readonly number[]): string | null {
  for (const T of temperatures) {
    for (const x of compositions) {
      const value = formulaAt(formula, T, x);
      if (value > within.above && value <= within.most) continue;
      const at = `at ${Number(T.toPrecision(6))} K${Number.isNaN(x) ? '' : ` and x = ${Number(x.toPrecision(4))}`}`;
      const what = Number.isFinite(value) ? `comes to ${Number(value.toPrecision(4))}` : 'has no finite value';
      return `${what} ${at}, within the temperatures and compositions of this design; ${within.words}. Mend the formula, or narrow the temperature range`;
    }
  }
  return null;
}

interface Found {
  /** of the material that holds it */ id: string;
  key: string;
  /** behind the entry's own place */ place: string;
  formula: Formula;
}

/** Formulas of a material and of the ends that it is made of. */
function formulasOf(material: Material): Found[] {
  const own = Object.entries(material.formulas ?? {}).map(([key, formula]): Found => ({ id: material.id, key, place: key, formula: formula as Formula }));
  if (isAlloy(material)) return [...own, ...formulasOf(material.first), ...formulasOf(material.second)];
  const gaps = [{ gap: material.gap, place: 'gap' }, ...(material.otherValleys ?? []).map(({ gap }, i) => ({ gap, place: `otherValleys[${i}].gap` }))];
  return [...own, ...gaps.flatMap(({ gap, place }): Found[] => (gap.law === 'formula' ? [{ id: material.id, key: 'gap', place, formula: gap.formula }] : []))];
}
