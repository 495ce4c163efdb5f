import { produce } from 'immer';
import type { Design } from '../../design/types.ts';
import { partAt } from './parts.ts';

/** Keys whose text is a word or prose, not a quantity: a variable's name in them is a coincidence. */
const WORDS = new Set(['format', 'title', 'notes', 'note', 'name', 'material', 'dopant', 'kind', 'model', 'shape', 'metal', 'carrier', 'pinning', 'above', 'of', 'quantity', 'over', 'custom', 'crystal', 'assumptions']);

/** Gives a variable another name and writes it into every expression that uses the old one. */
export function renameVariable(design: Design, variable: number, name: string): Design {
  const old = partAt(design.variables ?? [], variable, 'variable').name;
  if (old === name || !/^[A-Za-z]\w*$/.test(old)) return design;
  // "2*Ncap" uses Ncap, "NcapOld" does not. A digit before it is no part of a name: "2Ncap" is a product.
  const use = new RegExp(`(?<![A-Za-z_])${old}(?!\\w)`, 'g');
  const walk = (node: unknown): unknown => {
    if (typeof node === 'string') return node.replace(use, () => name);
    if (Array.isArray(node)) return node.map(walk);
    if (node === null || typeof node !== 'object') return node;
    return Object.fromEntries(Object.entries(node).map(([key, value]) => [key, WORDS.has(key) ? value : walk(value)]));
  };
  return produce(walk(design) as Design, (draft) => {
    draft.variables![variable].name = name;
  });
}
