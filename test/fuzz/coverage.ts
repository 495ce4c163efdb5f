import { catalogueOf, presetCatalogue } from '../../src/design/catalogue.ts';
import type { Design, DopantRow } from '../../src/design/types.ts';

/** What random designs must really hold, read off the documents themselves: a feature and how many designs have it. */
export class Coverage {
  private readonly counts = new Map<string, number>(FEATURES.map((feature) => [feature, 0]));
  private designs = 0;

  add(design: Design): void {
    this.designs++;
    for (const feature of featuresOf(design)) this.counts.set(feature, (this.counts.get(feature) ?? 0) + 1);
  }

  /** Features that no design had. */
  missing(): string[] {
    return [...this.counts].filter(([, count]) => count === 0).map(([feature]) => feature);
  }

  /** A line a group, the rarest first within it. */
  lines(): string[] {
    const groups = new Map<string, string[]>();
    for (const [feature, count] of [...this.counts].sort((a, b) => a[1] - b[1])) {
      const [group, name] = feature.split(': ');
      groups.set(group, [...(groups.get(group) ?? []), `${name} ${count}`]);
    }
    return [`designs ${this.designs}`, ...[...groups].sort().map(([group, names]) => `${group}: ${names.join(', ')}`)];
  }
}

const KINDS = ['neutral', 'barrier', 'pinned', 'open'] as const;
const SHAPES = ['constant', 'linear', 'gaussian', 'erfc', 'implant', 'table of three', 'measured table'];
/** Upper ends of the ranges into which figures are sorted. */
const TEMPERATURES = [10, 30, 100, 300, 600, 1000];
const THICKNESSES = [2, 10, 100, 1e3, 1e4, 1e5, 5e5];
const DOPINGS = [1e13, 1e15, 1e17, 1e19, 1e20, 1e21];
const band = (value: number, ends: readonly number[]): number => ends.find((end) => value <= end * 1.001) ?? Infinity;

const FEATURES: readonly string[] = [
  ...[...presetCatalogue.materials.keys()].map((id) => `material: ${id}`),
  ...['crystal', 'alloy', 'insulator'].map((k) => `own material: ${k}`),
  ...['constant', 'varshni', 'linear', 'odonnell-chen', 'mass moves with T', 'further valley', 'narrowing', 'non-parabolic'].map((k) => `own law: ${k}`),
  ...KINDS.flatMap((k) => [`end: ${k} above`, `end: ${k} below`]), 'end: open at both', 'end: metal, measured barrier', 'end: metal by its work function', 'end: pinned in a band',
  ...SHAPES.map((s) => `doping: ${s}`), ...['constant', 'linear', 'gaussian', 'erfc', 'table', 'an end of the range'].map((s) => `composition: ${s}`),
  ...Array.from({ length: 12 }, (_, i) => `layers: ${i + 1}`),
  ...TEMPERATURES.map((T) => `temperature: to ${T} K`), ...THICKNESSES.map((t) => `thickness: to ${t} nm`), ...DOPINGS.map((n) => `concentration: to ${n.toExponential(0)} cm^-3`),
  ...['pseudomorphic', 'relaxed', 'metal-face', 'N-face', 'on GaN', 'on AlN', 'on InN', 'on ZnO', 'on an own crystal', 'own polar layer'].map((s) => `polar: ${s}`),
  ...[...presetCatalogue.dopants].flatMap(([host, rows]) => [...new Set([...rows.values()].flatMap((d) => d.entry.centre ?? []))].map((c) => `centre: ${c} in ${host}`)), 'centre: own',
  ...['none', 'compensation', 'activation', 'complete', 'merging', 'screened', 'given outright', 'depth moves with x', 'exact compensation'].map((s) => `dopants: ${s}`),
  ...['above 3e13', 'below -3e13', 'below 1e11 in size', 'own dEc', 'own dEv'].map((s) => `interface: ${s}`),
  ...['narrowing', 'non-parabolic', 'affinity rule'].map((s) => `assumption: ${s}`),
];

function featuresOf(design: Design): Set<string> {
  const out = new Set<string>();
  const catalogue = catalogueOf(design.custom);
  const temperature = parseFloat(design.conditions.temperature);
  out.add(`layers: ${design.layers.length}`).add(`temperature: to ${band(temperature, TEMPERATURES)} K`);
  for (const [place, end] of [['above', design.top], ['below', design.bottom]] as const) {
    out.add(`end: ${end.kind} ${place}`);
    const material = design.layers[place === 'above' ? 0 : design.layers.length - 1].material;
    if (end.kind === 'barrier' && end.metal !== undefined) out.add(end.pinning === undefined ? 'end: metal, measured barrier' : 'end: metal by its work function');
    const gap = catalogue.materials.get(material)?.entry.gap;
    if (end.kind === 'pinned' && (parseFloat(end.level) < 0 || (typeof gap === 'string' && parseFloat(end.level) > parseFloat(gap)))) out.add('end: pinned in a band');
  }
  if (design.top.kind === 'open' && design.bottom.kind === 'open') out.add('end: open at both');
  for (const layer of design.layers) {
    const found = catalogue.materials.get(layer.material);
    if (!found) continue;
    const { entry } = found;
    const { gap } = entry;
    if (found.preset) out.add(`material: ${layer.material}`);
    else {
      out.add(`own material: ${entry.insulator ? 'insulator' : entry.alloy ? 'alloy' : 'crystal'}`);
      if (gap !== undefined) out.add(`own law: ${typeof gap !== 'object' ? 'constant' : 'formula' in gap ? 'formula' : (gap.law ?? 'varshni')}`);
      if (Array.isArray(entry.electronMass) || Array.isArray(entry.holeMass)) out.add('own law: mass moves with T');
      if (entry.otherValleys) out.add('own law: further valley');
      if (entry.narrowing && design.assumptions?.narrowing) out.add('own law: narrowing');
      if (entry.nonParabolicity && design.assumptions?.nonParabolic) out.add('own law: non-parabolic');
      if (entry.polarisation && design.crystal) out.add('polar: own polar layer');
    }
    out.add(`thickness: to ${band(parseFloat(layer.thickness), THICKNESSES)} nm`);
    const { x } = layer;
    if (x !== undefined) out.add(`composition: ${typeof x !== 'object' ? (Number(x) === 0 || Number(x) === 1 ? 'an end of the range' : 'constant') : 'points' in x ? 'table' : x.shape}`);
    const rows = layer.dopants ?? [];
    if (rows.length === 0) out.add('dopants: none');
    for (const row of rows) for (const feature of rowFeatures(row, layer.material)) out.add(feature);
    const texts = rows.map((row) => JSON.stringify(row.concentration));
    if (rows.some((a, i) => rows.some((b, j) => j > i && texts[i] === texts[j] && a.dopant !== b.dopant && (b.kind ?? a.kind) !== undefined))) out.add('dopants: exact compensation');
  }
  for (const row of design.interfaces ?? []) {
    const sheet = row.sheetCharge === undefined ? NaN : parseFloat(row.sheetCharge);
    if (sheet > 3e13) out.add('interface: above 3e13');
    if (sheet < -3e13) out.add('interface: below -3e13');
    if (Math.abs(sheet) < 1e11) out.add('interface: below 1e11 in size');
    if (row.dEc !== undefined) out.add('interface: own dEc');
    if (row.dEv !== undefined) out.add('interface: own dEv');
  }
  const { crystal } = design;
  if (crystal) out.add(`polar: ${crystal.strain}`).add(`polar: ${crystal.face}-face`);
  if (crystal?.template !== undefined) out.add(`polar: on ${catalogue.materials.get(crystal.template)?.preset ? crystal.template : 'an own crystal'}`);
  if (design.assumptions?.narrowing) out.add('assumption: narrowing');
  if (design.assumptions?.nonParabolic) out.add('assumption: non-parabolic');
  if (design.assumptions?.alignment === 'affinity') out.add('assumption: affinity rule');
  return out;

  function rowFeatures(row: DopantRow, host: string): string[] {
    const features: string[] = [];
    const c = row.concentration;
    const shape = typeof c !== 'object' ? 'constant' : 'peak' in c ? 'implant' : 'points' in c ? (c.points.length > 3 ? 'measured table' : 'table of three') : c.shape;
    features.push(`doping: ${shape}`);
    if (typeof c === 'string') features.push(`concentration: to ${band(parseFloat(c), DOPINGS).toExponential(0)} cm^-3`);
    if (row.compensation !== undefined) features.push('dopants: compensation');
    if (row.activation !== undefined) features.push('dopants: activation');
    if (row.dopant === undefined) features.push('dopants: given outright');
    const entry = row.dopant === undefined ? undefined : catalogue.dopants.get(host)?.get(row.dopant);
    if (entry?.entry.centre !== undefined) features.push(entry.preset ? `centre: ${entry.entry.centre} in ${host}` : 'centre: own');
    if (typeof entry?.entry.depth === 'object') features.push('dopants: depth moves with x');
    if (row.model === 'complete') features.push('dopants: complete');
    else if (entry?.entry.merging) features.push('dopants: merging');
    else if (entry?.entry.screened) features.push('dopants: screened');
    return features;
  }
}
