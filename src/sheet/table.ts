import type { Part, PartTable, Shape } from '../drawing/shapes.ts';
import { mixed } from '../drawing/styles.ts';
import type { Piece, Section } from './flow.ts';
import { brokenLines, lineWidth, widestWord } from './lines.ts';
import type { SheetLook } from './look.ts';

/** A paragraph of a cell. */
export interface Words {
  text: string;
  /** stands back: a note to what is above it */ faint?: boolean;
  /** a finding that asks for attention; says so in its words as well */ trouble?: boolean;
  bold?: boolean;
}
export type Cell = readonly Words[];

export interface SheetColumn {
  heading: string;
  /** under the heading, in brackets */ unit?: string;
  align: 'start' | 'end';
  /** holds sentences; the others hold names and figures, and a long name does not push them aside */ wide?: true;
}

export interface SheetTable {
  title: string;
  /** a sentence under the title */ note?: string;
  columns: SheetColumn[];
  /** each row one or more lines of cells that stay together, such as a layer with a line for each dopant */ rows: Cell[][][];
}

/** Longest cell, lines: what is longer than a page could not stay in one piece. */
const MOST_LINES = 24;
/** Of the faint ink: rules between rows guide the eye and are not read. */
const RULE = 0.45;
/** Of the table's width: a longer word, such as a hostile name, is broken rather than given more. */
const LONGEST_WORD = 0.16;
/** Likewise, what a column without and with sentences asks for. */
const LONGEST_NAME = 0.22;
const WIDEST = 0.6;
const PAD_X = 5;
const PAD_Y = 3;

/** Smallest letters of a table, px; where not even they let every word stand whole, words are broken. */
const LEAST_TEXT = 6.5;
/** Letters shrink by steps of this. */
const STEP = 0.93;

/** A table of the page's full width: heading repeated on each page that it reaches, rows never cut. Where its words do not fit side by side, its letters shrink: a broken figure is misread. */
export function tableSection(table: SheetTable, look: SheetLook, width: number): Section {
  const fit = columnWidths(table, look, width);
  if (fit.tight && look.text * STEP >= LEAST_TEXT) return tableSection(table, { ...look, text: look.text * STEP, small: look.small * STEP }, width);
  const { widths } = fit;
  const { style, small, leading } = look;
  const lefts = widths.map((_, i) => widths.slice(0, i).reduce((a, b) => a + b, 0));
  const at = (column: number, x: number): { x: number; anchor: 'start' | 'end' } =>
    table.columns[column].align === 'end' ? { x: x + lefts[column] + widths[column] - PAD_X, anchor: 'end' } : { x: x + lefts[column] + PAD_X, anchor: 'start' };

  const parts: PartTable = { columns: table.columns.length, heads: 1 };
  const headParts = table.columns.map((_, column): Part => ({ as: 'cell', table: parts, row: 0, column }));
  const headings = table.columns.map((column, i) => [...brokenLines(column.heading, small, widths[i] - 2 * PAD_X), ...(column.unit ? brokenLines(`(${column.unit})`, small, widths[i] - 2 * PAD_X) : [])]);
  const deepest = Math.max(...headings.map((h) => h.length));
  const headHeight = deepest * leading * small + 2 * PAD_Y;
  const columnHeads: Piece = {
    height: headHeight,
    draw: (x, y) => [
      ...headings.flatMap((lines, i) =>
        lines.map((line, l): Shape => ({ kind: 'text', role: 'column-heading', part: headParts[i], ...at(i, x), y: y + PAD_Y + (deepest - lines.length + l + 0.8) * leading * small, size: small, runs: [{ text: line }], fill: style.faint })),
      ),
      { kind: 'line', role: 'head-rule', x1: x, x2: x + width, y1: y + headHeight, y2: y + headHeight, stroke: style.ink, width: 1 },
    ],
  };
  let count = 1;
  const pieces = table.rows.map((row) => {
    const piece = rowPiece(row, { parts, first: count }, widths, at, look, width);
    count += row.length;
    return piece;
  });
  return { title: table.title, note: table.note, head: columnHeads, pieces };
}

/** @param of  the table and the number of the row's first line in it */
function rowPiece(row: Cell[][], of: { parts: PartTable; first: number }, widths: number[], at: (column: number, x: number) => { x: number; anchor: 'start' | 'end' }, look: SheetLook, width: number): Piece {
  const { style, text, leading } = look;
  const most = Math.max(2, Math.floor(MOST_LINES / row.length));
  const lines = row.map((cells) => cells.map((cell, c) => set(cell, widths[c] - 2 * PAD_X, look, most)));
  const heights = lines.map((cells) => Math.max(leading * text, ...cells.map((cell) => cell.reduce((sum, line) => sum + leading * line.size, 0))));
  const height = heights.reduce((a, b) => a + b, 0) + 2 * PAD_Y;
  const cellParts = lines.map((cells, l) => cells.map((_, column): Part => ({ as: 'cell', table: of.parts, row: of.first + l, column })));
  return {
    height,
    draw(x, y) {
      const shapes: Shape[] = [];
      lines.forEach((cells, l) => {
        const top = y + PAD_Y + heights.slice(0, l).reduce((a, b) => a + b, 0);
        cells.forEach((cell, c) => {
          let down = top;
          for (const { words, size, line } of cell) {
            if (line !== '') shapes.push({ kind: 'text', role: 'cell', part: cellParts[l][c], ...at(c, x), y: down + 0.8 * leading * size, size, runs: [{ text: line }], fill: words.trouble ? style.trouble : words.faint ? style.faint : style.ink, ...(words.bold ? { weight: 'bold' as const } : {}) });
            down += leading * size;
          }
        });
      });
      shapes.push({ kind: 'line', role: 'row-rule', x1: x, x2: x + width, y1: y + height, y2: y + height, stroke: mixed(style.ground, style.faint, RULE), width: 0.6 });
      return shapes;
    },
  };
}

interface SetLine {
  words: Words;
  size: number;
  line: string;
}

/** A cell's paragraphs as lines. */
function set(cell: Cell, room: number, look: SheetLook, most: number): SetLine[] {
  const out: SetLine[] = [];
  for (const words of cell) {
    const left = most - out.length;
    if (left <= 0) {
      out[out.length - 1].line = out[out.length - 1].line.replace(/…?$/, '…');
      break;
    }
    const size = words.faint ? look.small : look.text;
    out.push(...brokenLines(words.text, size, room, left, words.bold).map((line) => ({ words, size, line })));
  }
  return out;
}

/**
 * Each column gets what its longest word needs, then, as far as there is room, what its cells would like. Room that is left goes to the columns of words.
 * Where not even the words fit, it is tight: all give way in proportion and words are broken.
 */
function columnWidths({ columns, rows }: SheetTable, look: SheetLook, width: number): { widths: number[]; tight: boolean } {
  const pad = 2 * PAD_X + 0.5;
  const size = (words: Words): number => (words.faint ? look.small : look.text);
  const cells = (c: number): Words[] => rows.flatMap((row) => row.flatMap((line) => line[c] ?? []));
  const least = columns.map(({ heading, unit }, c) => pad + Math.max(...heading.split(' ').map((word) => lineWidth(word, look.small)), unit ? lineWidth(`(${unit})`, look.small) : 0, ...cells(c).map((w) => Math.min(widestWord(w.text, size(w), w.bold), LONGEST_WORD * width))));
  const liked = columns.map((_, c) => Math.max(least[c], pad + Math.max(0, ...cells(c).map((w) => Math.min(lineWidth(w.text, size(w), w.bold), (columns[c].wide ? WIDEST : LONGEST_NAME) * width)))));
  const sum = (values: number[]): number => values.reduce((a, b) => a + b, 0);
  const [low, high] = [sum(least), sum(liked)];
  if (low > width) return { widths: least.map((w) => (w * width) / low), tight: true };
  if (high > width) return { widths: least.map((w, c) => w + ((liked[c] - w) * (width - low)) / (high - low)), tight: false };
  const words = columns.filter((column) => column.align === 'start').length;
  return { widths: liked.map((w, c) => w + (words === 0 ? (width - high) / columns.length : columns[c].align === 'start' ? (width - high) / words : 0)), tight: false };
}

/** Parts of a list, in order, none longer than `most`. */
export function inParts<T>(items: readonly T[], most: number): T[][] {
  const out: T[][] = [];
  for (let i = 0; i < items.length; i += most) out.push(items.slice(i, i + most));
  return out;
}
