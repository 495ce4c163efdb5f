import { formulaAt } from '../../solver/formula.ts';
import type { Dopant } from '../../solver/index.ts';
import { didYouMean, quoted } from '../quantity/wording.ts';
import type { Asker } from './ask.ts';
import type { Catalogue, Entry } from './catalogue.ts';
import { askFormula, isFormula } from './formula.ts';
import { modelsKnown } from './ionisation-models.ts';
import { readProfile } from './profile.ts';
import type { DopantInput, DopantRow, Pure } from './types.ts';

const MOST_CONCENTRATION: [number, string] = [1e23, '1e23 cm^-3'];
const SHARE = { least: [0, '0'] as [number, string], most: [1, '1'] as [number, string] };
/** 0.9 within 20 % is no mistake: it reaches to all atoms and no further. */
const SHARE_OF_ATOMS = { ...SHARE, holds: true };

/**
 * One row of a layer's dopants.
 *
 * @param host  id of the layer's material
 * @param x     composition at the middle of the layer, for a depth that moves with it
 */
export function readDopant(row: DopantRow, host: string, x: number, catalogue: Catalogue, path: string, ask: Asker): Dopant | null {
  const before = ask.complaints.length;
  const common = {
    concentration: readProfile(row.concentration, 'density', `${path}.concentration`, ask, { least: [0, '0 cm^-3'], most: MOST_CONCENTRATION }),
    activation: ask.maybe(row.activation, 'number', `${path}.activation`, SHARE_OF_ATOMS) ?? 1,
    compensation: ask.maybe(row.compensation, 'number', `${path}.compensation`, SHARE_OF_ATOMS) ?? 0,
  };
  const dopant = row.dopant === undefined ? outright(row, common, path, ask) : named(row, row.dopant, common, host, x, catalogue, path, ask);
  return ask.complaints.length > before ? null : dopant;
}

type Common = Pick<Dopant, 'concentration' | 'activation' | 'compensation'>;

function outright(row: DopantRow, common: Common, path: string, ask: Asker): Dopant | null {
  const { kind } = row;
  if (kind === undefined || row.depth === undefined) {
    ask.wrong(path, 'names no dopant; name one ("dopant": "P"), or give its kind and depth outright ("kind": "donor", "depth": "45 meV")');
    return null;
  }
  const model = row.model ?? 'dilute';
  if (model === 'merging' || model === 'screened') ask.wrong(`${path}.model`, `is ${quoted(model)}, which takes parameters that a dopant given outright does not have; use "dilute" or "complete", or put the dopant under custom.dopants`);
  return { id: null, kind, ...common, depth: readDepth(row.depth, 0, `${path}.depth`, ask), degeneracy: readDegeneracy(row.degeneracy, kind, `${path}.degeneracy`, ask), model };
}

function named(row: DopantRow, id: string, common: Common, host: string, x: number, catalogue: Catalogue, path: string, ask: Asker): Dopant | null {
  for (const key of ['kind', 'depth', 'degeneracy'] as const) {
    if (row[key] !== undefined) ask.wrong(`${path}.${key}`, `stands beside a named dopant, which has its own; drop it, or drop "dopant"`);
  }
  const found = catalogue.dopants.get(host)?.get(id);
  if (!found) {
    const known = [...(catalogue.dopants.get(host)?.keys() ?? [])];
    const mend = known.length === 0 ? `; no dopant is known in ${host}: give it outright with kind and depth, or add it under custom.dopants` : `; in ${host} there are ${known.join(', ')}`;
    ask.wrong(`${path}.dopant`, `there is no dopant ${quoted(id)} in ${host}${mend}${didYouMean(id, known)}`);
    return null;
  }
  return { id, ...common, ...levelOf(found, x, ask), model: modelOf(row, found, path, ask) };
}

/** The laws of the level itself, preset or custom. */
function levelOf({ entry, path }: Entry<DopantInput>, x: number, ask: Asker): Omit<Dopant, 'id' | 'model' | keyof Common> {
  const { merging, screened } = entry;
  const positive = { positive: true };
  return {
    kind: entry.kind,
    depth: readDepth(entry.depth, x, `${path}.depth`, ask),
    degeneracy: readDegeneracy(entry.degeneracy, entry.kind, `${path}.degeneracy`, ask),
    ...(merging ? { merging: {
      depthReference: ask.quantity(merging.depthReference, 'density', `${path}.merging.depthReference`, positive), depthExponent: ask.quantity(merging.depthExponent, 'number', `${path}.merging.depthExponent`, positive),
      boundReference: ask.quantity(merging.boundReference, 'density', `${path}.merging.boundReference`, positive), boundExponent: ask.quantity(merging.boundExponent, 'number', `${path}.merging.boundExponent`, positive),
    } } : {}),
    ...(screened ? { screened: {
      coefficient: ask.quantity(screened.coefficient, 'energyLength', `${path}.screened.coefficient`, { least: [0, '0'] }), mottDensity: ask.quantity(screened.mottDensity, 'density', `${path}.screened.mottDensity`, positive),
      boundExponent: ask.maybe(screened.boundExponent, 'number', `${path}.screened.boundExponent`, positive) ?? 2,
    } } : {}),
    ...(entry.mottDensity !== undefined ? { mottDensity: ask.quantity(entry.mottDensity, 'density', `${path}.mottDensity`, positive) } : {}),
    ...(entry.solubility !== undefined ? { solubility: ask.quantity(entry.solubility, 'density', `${path}.solubility`, positive) } : {}),
    ...(entry.centre !== undefined ? { centre: entry.centre } : {}),
  };
}

/** What the row says, else the first of the models that the entry has. */
function modelOf(row: DopantRow, { entry }: Entry<DopantInput>, path: string, ask: Asker): Dopant['model'] {
  const known = modelsKnown(entry);
  const model = row.model ?? known[0];
  if (!known.includes(model)) {
    ask.wrong(`${path}.model`, `is ${quoted(model)}, but ${entry.id} in ${entry.host} has no parameters for it; ${known.join(', ')} would do`);
  }
  return model;
}

function readDepth(depth: DopantInput['depth'], x: number, path: string, ask: Asker): number {
  if (isFormula(depth)) {
    const { steps } = askFormula(depth, 'energy', path, ['x'], ask);
    const value = formulaAt({ steps }, Number.NaN, x);
    // A formula that is wrong in itself has been told of.
    if (!Number.isNaN(steps[0]) && !(value >= -2 && value <= 20)) ask.wrong(`${path}.formula`, `${Number.isFinite(value) ? `comes to ${Number(value.toPrecision(4))} eV` : 'has no finite value'} at x = ${Number(x.toPrecision(4))}; a depth lies between -2 and 20 eV`);
    return value;
  }
  if (typeof depth !== 'object') return ask.quantity(depth, 'energy', path, { most: [20, '20 eV'], least: [-2, '-2 eV'] });
  const xs = depth.points.map(([p], i) => ask.quantity(p, 'number', `${path}.points[${i}][0]`, SHARE));
  const values = depth.points.map(([, v], i) => ask.quantity(v, 'energy', `${path}.points[${i}][1]`));
  for (let i = 1; i < xs.length; i++) if (xs[i] <= xs[i - 1]) ask.wrong(`${path}.points[${i}][0]`, 'is not above the composition before it; compositions must grow');
  const after = xs.findIndex((p) => p >= x);
  if (after === 0) return values[0];
  if (after < 0) return values[values.length - 1];
  return values[after - 1] + ((values[after] - values[after - 1]) * (x - xs[after - 1])) / (xs[after] - xs[after - 1]);
}

/** g of the usual N/(1 + g exp(..)): 2 for a donor, 4 for an acceptor where nothing else is said. */
function readDegeneracy(g: Pure | undefined, kind: 'donor' | 'acceptor', path: string, ask: Asker): number {
  return ask.maybe(g, 'number', path, { positive: true }) ?? (kind === 'donor' ? 2 : 4);
}
