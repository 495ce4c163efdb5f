import { presetCatalogue } from '../../src/design/catalogue.ts';
import type { ContactInput, Design, DopantRow, InterfaceInput, LayerInput } from '../../src/design/types.ts';

/** A small generator of even numbers in 0..1 from a seed: the same seed, the same designs, on every machine. Mulberry32 (public domain). */
export function randomFrom(seed: number): () => number {
  let a = seed >>> 0;
  return () => {
    a = (a + 0x6d2b79f5) >>> 0;
    let t = a;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

export interface Limits {
  layers: number;
  temperature: [number, number];
  /** nm */ thickness: [number, number];
  /** cm^-3 */ doping: [number, number];
  /** cm^-2 */ sheet: number;
}

/** What an engineer could ask of the presets: random, yet sensible. */
export const SENSIBLE: Limits = { layers: 12, temperature: [4, 900], thickness: [1, 5e5], doping: [1e12, 1e21], sheet: 5e13 };

const ALL = [...presetCatalogue.materials.values()].map((e) => e.entry);
const isInsulator = (id: string): boolean => presetCatalogue.materials.get(id)?.entry.insulator === true;
/** Materials that are grown on each other; a stack keeps to one family, with insulators anywhere. */
const FAMILIES: string[][] = [
  ['Si', 'SiGe', 'Ge'], ['GaAs', 'AlGaAs', 'AlAs', 'InGaP'], ['InP', 'InGaAs', 'InAlAs'], ['GaN', 'AlGaN', 'InGaN', 'AlN', 'InN'], ['4H-SiC'], ['6H-SiC'], ['ZnO'], ['Ga2O3'], ['CdTe', 'CdS'], ['diamond'], ['InAs', 'GaSb'], ['GaP', 'Si'],
];
const INSULATORS = ALL.filter((m) => m.insulator).map((m) => m.id);
const METALS = [...presetCatalogue.metals.values()].map((e) => e.entry).filter((m) => m.workFunction !== undefined);

/** One random design of the presets. */
export function randomDesign(random: () => number, limits: Limits = SENSIBLE): Design {
  const pick = <T>(list: readonly T[]): T => list[Math.min(list.length - 1, Math.floor(random() * list.length))];
  const between = (low: number, high: number): number => low + (high - low) * random();
  const logBetween = (low: number, high: number): number => Math.exp(between(Math.log(low), Math.log(high)));
  const family = pick(FAMILIES);
  const count = 1 + Math.floor(random() * limits.layers);
  const doping = (): string => `${logBetween(...limits.doping).toExponential(3)} cm^-3`;
  const concentration = (thickness: number): DopantRow['concentration'] => {
    const kind = random();
    if (kind < 0.85) return doping();
    if (kind < 0.92) return { from: doping(), to: doping(), shape: pick(['linear', 'gaussian', 'erfc'] as const) };
    if (kind < 0.96) return { peak: doping(), depth: `${(thickness * between(0, 1)).toFixed(3)} nm`, straggle: `${(thickness * between(0.05, 0.3)).toFixed(3)} nm`, shape: 'gaussian' };
    return { points: [['0 nm', doping()], [`${(thickness / 2).toFixed(3)} nm`, doping()], [`${thickness.toFixed(3)} nm`, doping()]] };
  };
  const layer = (l: number): LayerInput => {
    const material = random() < 0.06 && INSULATORS.length > 0 ? pick(INSULATORS) : pick(family);
    const thickness = isInsulator(material) ? logBetween(limits.thickness[0], 100) : logBetween(...limits.thickness);
    const out: LayerInput = { name: `layer ${l}`, material, thickness: `${thickness.toPrecision(5)} nm` };
    if (presetCatalogue.materials.get(material)?.entry.alloy) out.x = random() < 0.8 ? between(0, 1).toFixed(3) : { from: between(0, 1).toFixed(3), to: between(0, 1).toFixed(3), shape: 'linear' };
    if (isInsulator(material)) return out;
    const known = [...(presetCatalogue.dopants.get(material)?.keys() ?? [])];
    out.dopants = Array.from({ length: Math.floor(random() * 3) }, (): DopantRow => {
      const row: DopantRow = known.length > 0 && random() < 0.8 ? { dopant: pick(known), concentration: concentration(thickness) } : { kind: pick(['donor', 'acceptor'] as const), depth: `${between(5, 400).toFixed(1)} meV`, concentration: concentration(thickness) };
      if (random() < 0.1) row.compensation = between(0, 0.9).toFixed(2);
      if (random() < 0.1) row.activation = between(0.05, 1).toFixed(2);
      if (random() < 0.15) row.model = 'complete';
      return row;
    });
    return out;
  };
  const layers = Array.from({ length: count }, (_, l) => layer(l));
  const contact = (material: string): ContactInput => {
    const kind = random();
    if (kind < 0.35 && !isInsulator(material)) return { kind: 'neutral' };
    if (kind < 0.6) return random() < 0.5 ? { kind: 'barrier', metal: pick(METALS).id, pinning: 'none' } : { kind: 'barrier', barrier: `${between(0, 1.2).toFixed(3)} eV`, carrier: pick(['n', 'p'] as const) };
    if (kind < 0.8) return { kind: 'pinned', level: `${between(0, 1).toFixed(3)} eV` };
    return { kind: 'open', sheetCharge: `${between(-1, 1).toFixed(4)}e12 cm^-2` };
  };
  const interfaces: InterfaceInput[] = layers.slice(0, -1).filter(() => random() < 0.15).map((l) => ({ above: l.name, sheetCharge: `${(limits.sheet * between(-1, 1)).toExponential(3)} cm^-2` }));
  const polar = ['GaN', 'AlGaN', 'InGaN', 'AlN', 'InN'];
  return {
    format: 'halfmark-design/1', title: 'random', conditions: { temperature: `${logBetween(...limits.temperature).toFixed(2)} K` },
    assumptions: { alignment: random() < 0.8 ? 'offsets' : 'affinity', narrowing: random() < 0.2, nonParabolic: random() < 0.1 },
    ...(polar.includes(layers[0].material) && random() < 0.5 ? { crystal: { face: pick(['metal', 'N'] as const), strain: 'relaxed' as const } } : {}),
    top: contact(layers[0].material), layers, ...(interfaces.length > 0 ? { interfaces } : {}), bottom: contact(layers[layers.length - 1].material),
  };
}
