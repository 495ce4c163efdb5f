import { printable } from '../export/printable.ts';
import { textWidth } from '../drawing/glyph-widths.ts';

/** Bold glyphs over normal ones: the widest ratio of common letters in the face that the sheet is set in, but for i and l. */
const BOLD = 1.13;

/** Holds two words together; a plain space on paper. */
const HOLD = '\u00a0';

/** Characters of one text that are looked at: more than any cell or paragraph has lines for, and few enough that no text holds the page up. */
const LONGEST = 8000;
/** Likewise of a text in one line. */
const ONE_LINE = 1000;

/** px */
export function lineWidth(text: string, size: number, bold = false): number {
  return textWidth(text.replaceAll(HOLD, ' '), size) * (bold ? BOLD : 1);
}

/**
 * A text broken into lines of a width: at spaces, else after a hyphen, slash, comma or underscore, else anywhere. Hostile characters are left out.
 *
 * A space that does not break keeps its words on one line.
 *
 * @param most  lines; where there would be more the last one ends in an ellipsis
 * @returns at least one line, which may be empty
 */
export function brokenLines(text: string, size: number, room: number, most = Infinity, bold = false): string[] {
  const lines: string[] = [''];
  const plain = (all: string[]): string[] => all.map((line) => line.replaceAll(HOLD, ' '));
  for (const word of held(printable(cut(text)).trim()).split(/ +/)) {
    for (const [p, part] of parts(word, size, room, bold).entries()) {
      const last = lines[lines.length - 1];
      const joint = last === '' || p > 0 ? '' : ' ';
      if (lineWidth(last + joint + part, size, bold) <= room || last === '') lines[lines.length - 1] = last + joint + part;
      else lines.push(part);
      // No need to lay out what will not be shown.
      if (lines.length > most) return plain(shortened(lines.slice(0, most), size, room, bold));
    }
  }
  return plain(lines);
}

/** The text in one line, with an ellipsis where it is cut. */
export function oneLine(text: string, size: number, room: number, bold = false): string {
  const flat = printable(text.slice(0, ONE_LINE)).replaceAll(HOLD, ' ').trim();
  return lineWidth(flat, size, bold) <= room ? flat : shortened([flat], size, room, bold)[0];
}

/** Widest piece of a text that is never broken if there is room for it. */
export function widestWord(text: string, size: number, bold = false): number {
  return Math.max(0, ...held(printable(cut(text))).split(/ +/).flatMap(pieces).map((word) => lineWidth(word, size, bold)));
}

function cut(text: string): string {
  return text.length > LONGEST ? `${text.slice(0, LONGEST)}…` : text;
}

/** A word that fits stays whole; else it is cut where it may be, and where that is not enough, anywhere. */
function parts(word: string, size: number, room: number, bold: boolean): string[] {
  if (lineWidth(word, size, bold) <= room) return [word];
  return pieces(word).flatMap((piece) => {
    const out = [''];
    for (const glyph of piece) {
      const longer = out[out.length - 1] + glyph;
      if (out[out.length - 1] === '' || lineWidth(longer, size, bold) <= room) out[out.length - 1] = longer;
      else out.push(glyph);
    }
    return out;
  });
}

function pieces(word: string): string[] {
  return word.match(/[^-/,_]+[-/,_]*|[-/,_]+/g) ?? [word];
}

function shortened(lines: string[], size: number, room: number, bold: boolean): string[] {
  const glyphs = [...lines[lines.length - 1]];
  while (glyphs.length > 0 && lineWidth(`${glyphs.join('')}…`, size, bold) > room) glyphs.pop();
  return [...lines.slice(0, -1), `${glyphs.join('').trimEnd()}…`];
}

/** A number, its unit and a sign before it stay on one line, and so does a unit of two in brackets. */
function held(text: string): string {
  return text.replace(/\(([^\s()]+) ([^\s()]+)\)/g, `($1${HOLD}$2)`).replace(/([≤≥±]) (?=[\d−])/g, `$1${HOLD}`).replace(/(\d) (?=(?:[kmµnGM]?(?:eV|V|A|F|m|Ω|Pa)|cm[²³⁻]?|K|kT|°C|%|times)(?:$|[^A-Za-z]))/g, `$1${HOLD}`);
}

/** A heading whose signs of operation stay between their symbols: "Ec − EF". */
export function heldTogether(text: string): string {
  return text.replace(/ ([−+/]) /g, `${HOLD}$1${HOLD}`);
}
