import { isAlloy, profileAt, type Crystal, type Dopant, type Interface, type Layer, type Material, type Stack } from '../../solver/index.ts';
import { quoted } from '../quantity/wording.ts';
import { Asker } from './ask.ts';
import { catalogueOf, type Catalogue } from './catalogue.ts';
import type { Complaint } from './complaint.ts';
import { readContact, sheetBounds } from './contact.ts';
import { readDopant } from './dopant.ts';
import { tryFormulas } from './formula.ts';
import { readMaterial } from './material.ts';
import { checkOffsets, ownOffset, publishedOffset } from './offset.ts';
import { readProfile } from './profile.ts';
import { readRequirements, type ReadRequirement } from './requirements.ts';
import type { AssumptionsInput, Design, LayerInput } from './types.ts';
import { readVariables } from './variables.ts';

export type StackReading = { ok: true; stack: Stack; notes: string[]; requirements: ReadRequirement[]; /** K, coldest first */ temperatureRange: [number, number] | null } | { ok: false; complaints: Complaint[] };

const TEMPERATURE = { of: 'a temperature', least: [1, '1 K'] as [number, string], most: [2000, '2000 K'] as [number, string] };
const THICKNESS = { of: 'a thickness', least: [1e-9, '0.01 nm'] as [number, string], most: [10, '10 cm'] as [number, string] };

/**
 * A design in the solver's units, or everything that is wrong with it.
 *
 * @param set    values for this run: variables by name, and "temperature"
 * @param moves  signed counts of a variable's stated tolerance by which it lies off its value, by name
 */
export function toStack(design: Design, set: Readonly<Record<string, string>> = {}, moves: Readonly<Record<string, number>> = {}): StackReading {
  const { temperature: setTemperature, ...overrides } = set;
  const variables = readVariables(design.variables ?? [], overrides, moves);
  const ask = new Asker(variables.scope, Object.values(moves).some((count) => count !== 0) ? () => readVariables(design.variables ?? [], overrides).scope : null);
  ask.complaints.push(...variables.complaints);
  const catalogue = catalogueOf(design.custom, ask.complaints);
  const { conditions } = design;
  const temperature = setTemperature === undefined ? ask.quantity(conditions.temperature, 'temperature', 'conditions.temperature', TEMPERATURE) : ask.quantity(setTemperature, 'temperature', '--set temperature', TEMPERATURE);
  const temperatureRange = readRange(conditions.temperatureRange, ask);
  if (conditions.bias !== undefined && ask.quantity(conditions.bias, 'potential', 'conditions.bias') !== 0) {
    if (ask.complaints.every((c) => c.path !== 'conditions.bias')) ask.wrong('conditions.bias', `${quoted(conditions.bias)} is not 0 V; only thermal equilibrium is solved`);
  }

  const materials = new Map<string, Material | null>();
  const layers = design.layers.map((layer, l) => readLayer(layer, `layers[${l}]`, catalogue, materials, ask));
  design.layers.forEach((layer, l) => {
    if (design.layers.findIndex((other) => other.name === layer.name) < l) ask.wrong(`layers[${l}].name`, `${quoted(layer.name)} is there twice; each layer needs a name of its own`);
  });
  const last = design.layers.length - 1;
  const top = readContact(design.top, 'top', layers[0]?.material ?? null, design.layers[0].name, catalogue, ask);
  const bottom = readContact(design.bottom, 'bottom', layers[last]?.material ?? null, design.layers[last].name, catalogue, ask);
  const rows = readInterfaces(design, ask);
  checkOffsets(design.custom, catalogue, ask);
  const crystal = readCrystal(design, catalogue, ask);
  const requirements = readRequirements(design, ask);
  ask.complaints.push(...variables.afterthoughts);
  if (ask.complaints.length === 0) tryFormulas(layers as Layer[], temperature, temperatureRange, catalogue, ask);
  if (ask.complaints.length > 0) return { ok: false, complaints: ask.complaints };
  const solved = layers as Layer[];
  const stack: Stack = {
    layers: solved,
    interfaces: withPublished(solved, rows, catalogue, design.custom, ask),
    top: top as Stack['top'],
    bottom: bottom as Stack['bottom'],
    temperature,
    assumptions: readAssumptions(design.assumptions),
    ...(crystal ? { crystal } : {}),
  };
  return ask.complaints.length > 0 ? { ok: false, complaints: ask.complaints } : { ok: true, stack, notes: [], requirements, temperatureRange };
}

export function readAssumptions(a: AssumptionsInput = {}): Stack['assumptions'] {
  return { statistics: a.statistics ?? 'fermi-dirac', alignment: a.alignment ?? 'offsets', narrowing: a.narrowing ?? false, nonParabolic: a.nonParabolic ?? false, transmission: a.transmission ?? 'wkb' };
}

function readRange(range: [string, string] | undefined, ask: Asker): [number, number] | null {
  if (!range) return null;
  const [from, to] = range.map((t, i) => ask.quantity(t, 'temperature', `conditions.temperatureRange[${i}]`, TEMPERATURE));
  if (from > to) ask.wrong('conditions.temperatureRange', `runs from ${quoted(range[0])} down to ${quoted(range[1])}; put the lower temperature first`);
  return [from, to];
}

function readLayer(input: LayerInput, path: string, catalogue: Catalogue, materials: Map<string, Material | null>, ask: Asker): Layer | null {
  // Each material is read once, so that its complaints come once.
  if (!materials.has(input.material)) materials.set(input.material, readMaterial(input.material, catalogue, ask, `${path}.material`));
  const material = materials.get(input.material) ?? null;
  const thickness = ask.quantity(input.thickness, 'length', `${path}.thickness`, THICKNESS);
  const alloy = material !== null && isAlloy(material);
  if (material && alloy && input.x === undefined) ask.wrong(`${path}.x`, `is missing; ${material.id} is an alloy, x is the share of ${(material as { second: Material }).second.id} in it`);
  if (material && !alloy && input.x !== undefined) ask.wrong(`${path}.x`, `stands beside ${material.id}, which is no alloy; drop it`);
  const x = input.x === undefined || !alloy ? ({ kind: 'constant', value: 0 } as const) : readProfile(input.x, 'number', `${path}.x`, ask, { least: [0, '0'], most: [1, '1'] });
  const insulator = material !== null && !isAlloy(material) && material.insulator;
  if (insulator && input.dopants?.length) ask.wrong(`${path}.dopants`, `stand in ${input.material}, an insulator, which takes none; put fixed charge on an interface instead`);
  const dopants = material && !insulator ? (input.dopants ?? []).map((row, d) => readDopant(row, input.material, profileAt(x, thickness / 2, thickness), catalogue, `${path}.dopants[${d}]`, ask)) : [];
  return material && { name: input.name, material, x, thickness, dopants: dopants as Dopant[] };
}

function readInterfaces(design: Design, ask: Asker): Interface[] {
  const seen = new Set<number>();
  const at = new Map(design.layers.map((layer, index) => [layer.name, index]));
  const all = listedNames(design.layers);
  const between = listedNames(design.layers.slice(0, -1));
  return (design.interfaces ?? []).map((row, i) => {
    const path = `interfaces[${i}]`;
    const index = at.get(row.above) ?? -1;
    if (index < 0) ask.wrong(`${path}.above`, `there is no layer ${quoted(row.above)}; the layers are ${all}`);
    else if (index === design.layers.length - 1) ask.wrong(`${path}.above`, `${quoted(row.above)} is the last layer, with no interface below it${between ? `; name one of ${between}` : ''}`);
    else if (seen.has(index)) ask.wrong(`${path}.above`, `the interface below ${quoted(row.above)} is there twice; put both into one row`);
    seen.add(index);
    if (row.dEc !== undefined && row.dEv !== undefined) ask.wrong(path, 'has both dEc and dEv; give one, the gaps fix the other');
    return {
      index,
      sheetCharge: ask.maybe(row.sheetCharge, 'sheetDensity', `${path}.sheetCharge`, sheetBounds) ?? 0,
      ...(row.dEc !== undefined ? { dEc: ask.quantity(row.dEc, 'energy', `${path}.dEc`) } : {}),
      ...(row.dEv !== undefined ? { dEv: ask.quantity(row.dEv, 'energy', `${path}.dEv`) } : {}),
    };
  });
}

/** Puts the offset of each pair beside the design's own rows: the published one, and, where an interface says nothing itself, the design's own of the pair. */
function withPublished(layers: Layer[], rows: Interface[], catalogue: Catalogue, custom: Design['custom'], ask: Asker): Interface[] {
  const out = [...rows];
  for (let l = 0; l + 1 < layers.length; l++) {
    const published = publishedOffset(layers[l], layers[l + 1], catalogue, ask);
    const own = ownOffset(layers[l], layers[l + 1], custom, ask);
    if (!published && !own) continue;
    const at = out.findIndex((row) => row.index === l);
    const row: Interface = at < 0 ? { index: l, sheetCharge: 0 } : out[at];
    const silent = row.dEc === undefined && row.dEv === undefined;
    const next: Interface = { ...row, ...(published ? { published } : {}), ...(own && silent ? { ...(own.dEc === undefined ? {} : { dEc: own.dEc }), ...(own.dEv === undefined ? {} : { dEv: own.dEv }) } : {}) };
    if (at < 0) out.push(next);
    else out[at] = next;
  }
  return out;
}

function readCrystal(design: Design, catalogue: Catalogue, ask: Asker): Crystal | undefined {
  const input = design.crystal;
  if (!input) return undefined;
  if (input.strain === 'pseudomorphic' && input.template === undefined) {
    ask.wrong('crystal.template', 'is missing; a pseudomorphic stack takes the lattice of a template: name its material');
    return undefined;
  }
  if (input.template === undefined) return { face: input.face, strain: input.strain };
  const template = readMaterial(input.template, catalogue, ask, 'crystal.template');
  if (template && isAlloy(template)) ask.wrong('crystal.template', `${quoted(input.template)} is an alloy; name a crystal`);
  return template ? { face: input.face, strain: input.strain, template } : undefined;
}

/** Names for a complaint, the first dozen: with thousands of layers and of complaints whole lists would fill the memory. */
function listedNames(layers: readonly LayerInput[]): string {
  const named = layers.slice(0, 12).map((layer) => quoted(layer.name)).join(', ');
  return layers.length > 12 ? `${named} and ${layers.length - 12} more` : named;
}
