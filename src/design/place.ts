import type { Design } from './types.ts';

/** The place in a design that a refusal of the solver speaks of: the layer or the material that it names, else the stack's polarity. */
export function placeOf(message: string, design: Design): string {
  const l = design.layers.findIndex((layer) => message.includes(layer.name) || new RegExp(`(^|[^\\w-])${escaped(layer.material)}([^\\w-]|$)`).test(message));
  if (l >= 0) return `layers[${l}]`;
  return /pseudomorphic|strained/.test(message) ? 'crystal' : 'layers';
}

const escaped = (text: string): string => text.replace(/[.*+?^${}()|[\]\\]/g, '\\$&');
