import { profileAt, type Interface, type Layer } from '../../solver/index.ts';
import type { Asker } from './ask.ts';
import { OFFSETS, type Catalogue } from './catalogue.ts';

/**
 * Published band offset of the pair that meets at an interface, value below less value above, eV; undefined where none is known.
 * Only presets have one: a design's own entry of the same name is another material.
 */
export function publishedOffset(above: Layer, below: Layer, catalogue: Catalogue, ask: Asker): Interface['published'] {
  if (above.material.id === below.material.id) return undefined;
  if (![above, below].every((l) => catalogue.materials.get(l.material.id)?.preset)) return undefined;
  const row = OFFSETS.find((o) => (o.first === above.material.id && o.second === below.material.id) || (o.first === below.material.id && o.second === above.material.id));
  if (!row) return undefined;
  // x of the alloy of the pair; the law is straight in it.
  const second = row.second === below.material.id;
  const x = second ? profileAt(below.x, 0, below.thickness) : profileAt(above.x, above.thickness, above.thickness);
  const step = (law: { constant?: string; perX?: string } | undefined): number | undefined => {
    if (!law) return undefined;
    const at = `published offset ${row.first} to ${row.second}`;
    const value = (ask.maybe(law.constant, 'energy', at) ?? 0) + (ask.maybe(law.perX, 'energy', at) ?? 0) * x;
    return second ? value : -value;
  };
  return { dEc: step(row.deltaEc), dEv: step(row.deltaEv) };
}
