import { sources } from '../../presets/index.ts';
import { Asker } from '../design/ask.ts';
import { OFFSETS } from '../design/catalogue.ts';
import { isPair } from '../design/offset.ts';
import type { Design, OffsetInput } from '../design/types.ts';
import { readVariables } from '../design/variables.ts';
import { offsetOf, rivalOffsets } from './rivals.ts';

type Step = { constant?: string; perX?: string };

/** A pair of materials that meets in the design, or that the design has an own offset of. */
export interface ShownPair {
  first: string;
  second: string;
  /** as it counts: the design's own, else the published one; null where there is neither */ text: string | null;
  work: string;
  own: boolean;
  /** null where none is published, or own materials take its place */ presetText: string | null;
  rivals: { text: string; offset: OffsetInput; work: string; chosen: boolean }[];
}

export function shownPairs(design: Design): ShownPair[] {
  const own = design.custom?.offsets ?? [];
  const met = design.layers.slice(1).map((layer, i) => [design.layers[i].material, layer.material] as const);
  const pairs: (readonly [string, string])[] = [];
  for (const [a, b] of [...met, ...own.map(({ first, second }) => [first, second] as const)]) {
    if (a !== b && !pairs.some(([p, q]) => isPair({ first: p, second: q }, a, b))) pairs.push([a, b]);
  }
  return pairs.map(([a, b]) => {
    const published = OFFSETS.find((row) => isPair(row, a, b));
    const mine = own.find((row) => isPair(row, a, b));
    const [first, second] = mine ? [mine.first, mine.second] : published ? [published.first, published.second] : [a, b];
    const row = mine ?? published;
    const key = typeof published?.source === 'string' ? published.source : '';
    return {
      first, second, own: mine !== undefined, text: row ? stepText(row) : null,
      work: mine ? String(mine.source) : published ? (sources[key] ?? key) : 'no published offset: natural valence edges on one scale, else the affinities',
      presetText: published ? stepText(published) : null,
      rivals: rivalOffsets(a, b).map((rival) => {
        const offset = offsetOf(rival);
        return { text: stepText(offset), offset, work: String(offset.source), chosen: mine !== undefined && stepText(mine) === stepText(offset) };
      }),
    };
  });
}

/** "ΔEv -0.53 eV x". */
function stepText({ deltaEv, deltaEc }: { deltaEv?: Step; deltaEc?: Step }): string {
  const of = ({ constant, perX }: Step): string => [constant, perX === undefined ? undefined : `${perX} × x`].filter((part) => part !== undefined).join(' + ');
  return deltaEv ? `ΔEv ${of(deltaEv)}` : `ΔEc ${of(deltaEc ?? {})}`;
}

/** What is wrong with the texts of an offset before it is in the design; null for a good one. */
export function offsetComplaint(design: Design, constant: string, perX: string): string | null {
  if (constant.trim() === '' && perX.trim() === '') return 'is empty; give a value, such as "0.3 eV", or one per x';
  const ask = new Asker(readVariables(design.variables ?? []).scope);
  for (const text of [constant, perX]) if (text.trim() !== '') ask.quantity(text, 'energy', 'offset', { least: [-20, '-20 eV'], most: [20, '20 eV'] });
  return ask.complaints[0]?.message ?? null;
}
