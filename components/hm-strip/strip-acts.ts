import type { Design, LayerInput } from '../../src/design/types.ts';
import { freeName, insertLayer, moveLayer, removeLayer } from '../../src/state/commands/index.ts';

/** What an act on the stack leads to: the design, its name for undo, the layer that is chosen afterwards, and what is said. */
export interface StackAct {
  next: Design;
  label: string;
  chosen: number;
  said: string;
}

/** Thick enough to see, thin enough to disturb little (own choice). */
const NEW_THICKNESS = '50 nm';

/** An undoped layer of the material beside it, in front of layer number `at`. */
export function inserted(design: Design, at: number): StackAct {
  const beside = design.layers[Math.max(0, at - 1)];
  const name = freeName('new', design.layers.map((l) => l.name));
  const layer: LayerInput = { name, material: beside.material, ...(typeof beside.x === 'object' ? { x: uniform(beside.x) } : beside.x === undefined ? {} : { x: beside.x }), thickness: NEW_THICKNESS, dopants: [] };
  return { next: insertLayer(design, at, layer), label: `layer ${name} put in`, chosen: at, said: `Layer ${name} put in as number ${at + 1}.` };
}

/** A graded neighbour lends its value at the bottom. */
function uniform(x: Exclude<LayerInput['x'], string | number | undefined>): LayerInput['x'] {
  return 'points' in x ? (x.points[x.points.length - 1]?.[1] ?? '0') : x.to;
}

export function copied(design: Design, layer: number): StackAct {
  const source = design.layers[layer];
  const name = freeName(source.name, design.layers.map((l) => l.name));
  return { next: insertLayer(design, layer + 1, { ...source, name }), label: `layer ${source.name} copied`, chosen: layer + 1, said: `Layer ${source.name} copied as ${name}.` };
}

/** Null where nothing would move. */
export function moved(design: Design, from: number, to: number): StackAct | null {
  if (to < 0 || to >= design.layers.length || to === from) return null;
  const { name } = design.layers[from];
  return { next: moveLayer(design, from, to), label: `layer ${name} moved`, chosen: to, said: `Layer ${name} is now number ${to + 1} of ${design.layers.length}.` };
}

/** Null for the last layer: a stack has at least one. */
export function removed(design: Design, layer: number): StackAct | null {
  if (design.layers.length === 1) return null;
  const { name } = design.layers[layer];
  return { next: removeLayer(design, layer), label: `layer ${name} taken out`, chosen: Math.min(layer, design.layers.length - 2), said: `Layer ${name} taken out.` };
}
