import type { Shape } from '../drawing/shapes.ts';
import { brokenLines, oneLine } from './lines.ts';
import type { SheetLook } from './look.ts';

/** Something that is never cut. */
export interface Piece {
  /** px */ height: number;
  draw(x: number, y: number): Shape[];
}

/** A heading with pieces under it, such as a table with its rows. */
export interface Section {
  /** empty: no heading */ title: string;
  /** a sentence under it, on its first page */ note?: string;
  /** repeated on every page that the section reaches */ head?: Piece;
  pieces: Piece[];
}

/** px */
export interface Room {
  x: number;
  y: number;
  width: number;
  height: number;
}

const GAP = 12;
/** A section begins only where this many of its pieces, or all of them, go with its heading. */
const TOGETHER = 2;

/**
 * Lays sections under each other, page after page. A piece that does not fit begins the next page; its section's heading comes with it, marked as continued.
 *
 * @returns shapes of each page; at least one page
 */
export function pagesOf(sections: readonly Section[], room: Room, look: SheetLook): Shape[][] {
  const pages: Shape[][] = [[]];
  let y = room.y;
  const bottom = room.y + room.height;
  const turn = (): void => {
    pages.push([]);
    y = room.y;
  };
  const put = (piece: Piece): void => {
    pages[pages.length - 1].push(...piece.draw(room.x, y));
    y += piece.height;
  };
  for (const section of sections) {
    if (section.pieces.length === 0) continue;
    const first = headingPieces(section, false, room, look);
    const start = height(first) + height(section.pieces.slice(0, TOGETHER));
    if (y > room.y) y += GAP;
    if (y > room.y && y + Math.min(start, room.height) > bottom) turn();
    first.forEach(put);
    let alone = true;
    for (const [i, piece] of section.pieces.entries()) {
      // The last one is not left alone on its page: the one before it goes along.
      const pair = i === section.pieces.length - 2 ? height(section.pieces.slice(i)) : 0;
      const needed = pair <= room.height / 2 ? Math.max(piece.height, pair) : piece.height;
      // A piece of more than a page stays where it is: a new page would not help it.
      if (!alone && y + needed > bottom) {
        turn();
        headingPieces(section, true, room, look).forEach(put);
      }
      put(piece);
      alone = false;
    }
  }
  return pages;
}

/** Height of a section on one page, without the gap before it. */
export function sectionHeight(section: Section, room: Room, look: SheetLook): number {
  return height(headingPieces(section, false, room, look)) + height(section.pieces);
}

function height(pieces: readonly Piece[]): number {
  return pieces.reduce((sum, piece) => sum + piece.height, 0);
}

function headingPieces(section: Section, continued: boolean, room: Room, look: SheetLook): Piece[] {
  const out: Piece[] = [];
  const { style, head, small, leading } = look;
  if (section.title !== '') {
    const title = oneLine(continued ? `${section.title}, continued` : section.title, head, room.width, true);
    out.push({ height: 1.5 * head, draw: (x, y) => [{ kind: 'text', role: 'section', x, y: y + 1.05 * head, size: head, anchor: 'start', weight: 'bold', runs: [{ text: title }], fill: style.ink }] });
  }
  if (section.note && !continued) out.push(paragraph(section.note, look, room.width, { size: small, fill: style.faint }));
  if (section.head) out.push(section.head);
  else if (section.title !== '') out.push({ height: 0.3 * small * leading, draw: () => [] });
  return out;
}

/** Sentences of the room's width. */
export function paragraph(text: string, look: SheetLook, width: number, of: { size?: number; fill?: string; lead?: string } = {}): Piece {
  const { leading, style } = look;
  const size = of.size ?? look.text;
  const indent = of.lead ? 1.6 * size : 0;
  const lines = brokenLines(text, size, width - indent, MOST_LINES);
  return {
    height: lines.length * leading * size + 2,
    draw: (x, y) => [
      ...(of.lead ? [{ kind: 'text' as const, role: 'lead', x, y: y + 0.8 * leading * size, size, anchor: 'start' as const, runs: [{ text: of.lead }], fill: of.fill ?? style.ink }] : []),
      ...lines.map((line, i): Shape => ({ kind: 'text', role: 'sentence', x: x + indent, y: y + (i + 0.8) * leading * size, size, anchor: 'start', runs: [{ text: line }], fill: of.fill ?? style.ink })),
    ],
  };
}

/** Of one paragraph; a design's notes may be of any length. */
const MOST_LINES = 20;
