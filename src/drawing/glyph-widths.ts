import type { TextRun } from './shapes.ts';

/**
 * Advance widths of the glyphs from space to tilde, thousandths of the font size: table hmtx of DejaVu Sans 2.37. It is among the widest of the faces that a
 * system font stack may fall to, so what fits here fits elsewhere. Drawings are made without a page, hence a table and no measuring.
 */
const ASCII = [
  318, 401, 460, 838, 636, 950, 780, 275, 390, 390, 500, 838, 318, 361, 318, 337, 636, 636, 636, 636, 636, 636, 636, 636, 636, 636, 337, 337, 838, 838, 838, 531,
  1000, 684, 686, 698, 770, 632, 575, 775, 752, 295, 295, 656, 557, 863, 748, 787, 603, 787, 695, 635, 611, 732, 684, 989, 685, 611, 685, 390, 337, 390, 838, 500,
  500, 613, 635, 550, 635, 615, 352, 635, 634, 278, 278, 579, 278, 974, 634, 612, 635, 635, 411, 521, 392, 634, 592, 818, 592, 592, 525, 636, 337, 636, 838,
];
const OTHERS: Record<string, number> = {
  µ: 636, Δ: 684, φ: 660, Φ: 787, χ: 578, ψ: 660, '−': 838, '–': 500, '—': 1000, '…': 1000, '±': 838, '×': 838, '·': 318, '°': 500, '²': 401, '³': 401, '⁻': 528,
};
/** Greek, Cyrillic, accented letters: few are wider than a capital. */
const LETTER = 700;
/** Ideographs and pictures fill a square. */
const SQUARE = 1000;
/** Subscripts and superscripts, of the font size. */
export const SCRIPT_SIZE = 0.72;

/** Width of a text, px, at the font size given. An upper bound rather than a mean. */
export function textWidth(text: string, size: number): number {
  let sum = 0;
  for (const glyph of text) sum += glyphWidth(glyph);
  return (sum * size) / 1000;
}

export function runsWidth(runs: TextRun[], size: number): number {
  return runs.reduce((sum, run) => sum + textWidth(run.text, run.script ? size * SCRIPT_SIZE : size), 0);
}

/** The text cut to a width, with an ellipsis where something is cut; empty where not even one glyph fits. */
export function fitted(text: string, size: number, room: number): string {
  if (textWidth(text, size) <= room) return text;
  const glyphs = [...text];
  let width = textWidth('…', size);
  let count = 0;
  while (count < glyphs.length && width + textWidth(glyphs[count], size) <= room) width += textWidth(glyphs[count++], size);
  return count === 0 ? '' : `${glyphs.slice(0, count).join('').trimEnd()}…`;
}

function glyphWidth(glyph: string): number {
  const code = glyph.codePointAt(0)!;
  if (code >= 32 && code < 127) return ASCII[code - 32];
  return OTHERS[glyph] ?? (code < 0x2e80 ? LETTER : SQUARE);
}
