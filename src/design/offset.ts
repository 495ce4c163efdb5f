import { profileAt, type Interface, type Layer } from '../../solver/index.ts';
import { didYouMean, quoted } from '../quantity/wording.ts';
import type { Asker } from './ask.ts';
import { isUnsourced, OFFSETS, type Catalogue } from './catalogue.ts';
import type { Custom, OffsetInput } from './types.ts';

/**
 * Published band offset of the pair that meets at an interface, value below less value above, eV; undefined where none is known.
 * Only presets have one: a design's own entry of the same name is another material.
 */
export function publishedOffset(above: Layer, below: Layer, catalogue: Catalogue, ask: Asker): Interface['published'] {
  if (above.material.id === below.material.id) return undefined;
  if (![above, below].every((l) => catalogue.materials.get(l.material.id)?.preset)) return undefined;
  const row = OFFSETS.find((o) => (o.first === above.material.id && o.second === below.material.id) || (o.first === below.material.id && o.second === above.material.id));
  return row && stepsOf(row, above, below, `published offset ${row.first} to ${row.second}`, ask);
}

/** The design's own offset of the pair, in the same frame; undefined where it has none. */
export function ownOffset(above: Layer, below: Layer, custom: Custom | undefined, ask: Asker): Interface['published'] {
  if (above.material.id === below.material.id) return undefined;
  const at = (custom?.offsets ?? []).findIndex((o) => isPair(o, above.material.id, below.material.id));
  return at < 0 ? undefined : stepsOf(custom!.offsets![at], above, below, `custom.offsets[${at}]`, ask);
}

export function isPair({ first, second }: Pick<OffsetInput, 'first' | 'second'>, a: string, b: string): boolean {
  return (first === a && second === b) || (first === b && second === a);
}

/** Reads the design's own offsets as they stand, whether the stack uses them or not. */
export function checkOffsets(custom: Custom | undefined, catalogue: Catalogue, ask: Asker): void {
  (custom?.offsets ?? []).forEach((row, i) => {
    const path = `custom.offsets[${i}]`;
    for (const end of ['first', 'second'] as const) {
      if (!catalogue.materials.has(row[end])) ask.wrong(`${path}.${end}`, `there is no material ${quoted(row[end])}${didYouMean(row[end], [...catalogue.materials.keys()])}`);
    }
    if (isUnsourced(row.source)) ask.wrong(`${path}.source`, 'is empty; say where the offset stands: author, year, table, or the measurement');
    if (row.first === row.second) ask.wrong(`${path}.second`, 'is the same material as the first; an offset is of two');
    if ((custom?.offsets ?? []).findIndex((other) => isPair(other, row.first, row.second)) < i) ask.wrong(path, `the pair ${row.first} and ${row.second} is there twice; keep one`);
    const given = (['deltaEc', 'deltaEv'] as const).filter((edge) => row[edge] !== undefined);
    if (given.length !== 1) ask.wrong(path, 'needs one of deltaEc and deltaEv; the gaps fix the other');
    for (const edge of given) {
      const { constant, perX } = row[edge]!;
      if (constant === undefined && perX === undefined) ask.wrong(`${path}.${edge}`, 'is empty; give "constant", "perX" or both, such as { "constant": "0.3 eV" }');
      for (const [key, text] of [['constant', constant], ['perX', perX]] as const) ask.maybe(text, 'energy', `${path}.${edge}.${key}`, { least: [-20, '-20 eV'], most: [20, '20 eV'] });
    }
  });
}

function stepsOf(row: OffsetInput, above: Layer, below: Layer, at: string, ask: Asker): Interface['published'] {
  // x of the alloy of the pair; the law is straight in it.
  const second = row.second === below.material.id;
  const x = second ? profileAt(below.x, 0, below.thickness) : profileAt(above.x, above.thickness, above.thickness);
  const step = (law: { constant?: string; perX?: string } | undefined): number | undefined => {
    if (!law) return undefined;
    const value = (ask.maybe(law.constant, 'energy', at) ?? 0) + (ask.maybe(law.perX, 'energy', at) ?? 0) * x;
    return second ? value : -value;
  };
  return { dEc: step(row.deltaEc), dEv: step(row.deltaEv) };
}
