import type { ContactInput, DopantRow, LayerInput } from '../../src/design/types.ts';
import type { ContactResult, IonisedResult, LayerResult } from '../../src/result/types.ts';
import { textWidth } from '../../src/drawing/glyph-widths.ts';
import { decimalText } from '../../src/result/figure-text.ts';
import { raisedPowers } from '../../src/quantity/printed-units.ts';
import { writeNumber } from '../../src/quantity/write-quantity.ts';
import type { OwnOfLayer } from '../../src/parameters/own-entries.ts';
import { OWN_SIGN } from '../shared/own-mark.ts';
import { shortText } from '../shared/graded.ts';
import { unitOf } from '../shared/typed-text.ts';

export function materialText(layer: LayerInput): string {
  return layer.x === undefined ? layer.material : `${layer.material}, x = ${shortText(layer.x)}`;
}

export function dopantName(row: DopantRow): string {
  return row.dopant ?? row.kind ?? 'dopant';
}

function dopantText(row: DopantRow): string {
  return `${dopantName(row)} ${raisedPowers(shortText(row.concentration))}`;
}

/** An expression says what it comes to: "2*Ncap" gives " = 2e18 cm⁻³". Plain values and shapes give nothing. */
export function worth(text: unknown, solved: number | null | undefined, unit: string): string {
  if (typeof text !== 'string' || solved === null || solved === undefined || !Number.isFinite(solved)) return '';
  return /[a-z_]\w*/i.test(text) && unitOf(text) === null && Number.isNaN(Number(text)) ? ` = ${writeNumber(solved, 3)}${unit === '' ? '' : ` ${unit}`}` : '';
}

/** One or two short lines for a contact: what it is, and its barrier for the majority carrier of the layer beside it, where the result has one. */
export function contactText(contact: ContactInput, solved: ContactResult | undefined, type: 'n' | 'p' | 'i' = 'n'): string[] {
  if (contact.kind === 'neutral') return ['neutral'];
  if (contact.kind === 'pinned') return ['pinned', raisedPowers(contact.level)];
  if (contact.kind === 'open') return contact.sheetCharge === undefined ? ['open'] : ['open', raisedPowers(contact.sheetCharge)];
  if (contact.barrier !== undefined) return contact.metal === undefined ? ['barrier', raisedPowers(contact.barrier)] : [contact.metal, `barrier ${raisedPowers(contact.barrier).replace(/ (?=\S+$)/, '\u00a0')}`];
  if (solved?.kind !== 'barrier' || solved.metal !== contact.metal) return [contact.metal ?? 'metal'];
  const [symbol, barrier] = type === 'p' ? ['φBp', solved.barrier_p_eV] : ['φBn', solved.barrier_n_eV];
  return [contact.metal ?? 'metal', ...(barrier === null ? [] : [`${symbol} ${decimalText(barrier, 2)}\u00a0eV`])];
}

/** Sizes of the strip's text and most lines of a column, for the decision where a layer is written. */
const TEXT = 14;
const PADDING = 12;
const MOST_LINES = 5;
const BOLD = 1.12;

const NOTHING_OWN: OwnOfLayer = { material: false, dopants: [] };
const signed = (own: boolean | undefined): string => (own ? ` ${OWN_SIGN}` : '');

/** A layer's lines in words, as its column shows them, with a sign where they rest on the design's own values. */
export function layerLines(layer: LayerInput, i: number, solved?: LayerResult, own: OwnOfLayer = NOTHING_OWN): string[] {
  const dopants = (layer.dopants ?? []).map((row, r) => `${dopantText(row)}${dopantWorth(row, solved?.ionised[r])}${signed(own.dopants[r])}`);
  return [
    `${i + 1} ${layer.name}`, `${materialText(layer)}${worth(layer.x, solved?.x, '')}${signed(own.material)}`, `${raisedPowers(layer.thickness)}${worth(layer.thickness, solved?.thickness_nm, 'nm')}`,
    ...(dopants.length === 0 ? ['undoped'] : dopants),
  ];
}

/** What a concentration comes to. The result knows the active one: with an active share of its own the row says so. */
function dopantWorth(row: DopantRow, solved: IonisedResult | undefined): string {
  const comesTo = worth(row.concentration, solved?.concentration_cm3, 'cm⁻³');
  return comesTo === '' || row.activation === undefined ? comesTo : `${comesTo} active`;
}

/** Whether the lines of a column can be read in it. An upper bound of their widths serves: no page is measured. */
export function fitsColumn(lines: readonly string[], width: number): boolean {
  const room = width - PADDING;
  let count = 0;
  for (const [i, line] of lines.entries()) {
    // The name, first, is set bold.
    const size = i === 0 ? TEXT * BOLD : TEXT;
    let used = Infinity;
    for (const word of line.split(' ')) {
      const w = textWidth(word, size);
      if (w > room) return false;
      used += w + textWidth(' ', size);
      if (used > room) [used, count] = [w, count + 1];
    }
  }
  return count <= MOST_LINES;
}

/** A layer in one sentence, for readers who cannot see the column. */
export function layerSentence(layer: LayerInput, index: number, of: number, complaints: readonly string[]): string {
  const dopants = layer.dopants ?? [];
  const parts = [`layer ${index + 1} of ${of}: ${layer.name}`, materialText(layer), layer.thickness, dopants.length === 0 ? 'undoped' : dopants.map(dopantText).join(' and ')];
  return [parts.join(', '), ...complaints].join('; ');
}
