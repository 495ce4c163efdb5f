import type { Clip, Gradient, Part, Shape } from '../drawing/shapes.ts';
import { brokenLines, oneLine } from './lines.ts';
import type { SheetLook } from './look.ts';

/** Something that is never cut. */
export interface Piece {
  /** px */ height: number;
  draw(x: number, y: number): Shape[];
  /** what its shapes refer to; ids unique within the sheet */ defs?(x: number, y: number): { gradients: Gradient[]; clips: Clip[] };
  /** of a picture: what it shows, in words */ description?: string;
}

/** A heading with pieces under it, such as a table with its rows. */
export interface Section {
  /** empty: no heading */ title: string;
  /** a sentence under it, on its first page */ note?: string;
  /** repeated on every page that the section reaches */ head?: Piece;
  pieces: Piece[];
}

/** What stands on a page. */
export interface PageMarks {
  shapes: Shape[];
  gradients: Gradient[];
  clips: Clip[];
  /** of its pictures, in words */ descriptions: string[];
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
 * @returns at least one page
 */
export function pagesOf(sections: readonly Section[], room: Room, look: SheetLook): PageMarks[] {
  const blank = (): PageMarks => ({ shapes: [], gradients: [], clips: [], descriptions: [] });
  const pages: PageMarks[] = [blank()];
  let y = room.y;
  const bottom = room.y + room.height;
  const turn = (): void => {
    pages.push(blank());
    y = room.y;
  };
  const put = (piece: Piece, again = false): void => {
    const page = pages[pages.length - 1];
    const shapes = piece.draw(room.x, y);
    page.shapes.push(...(again ? shapes.map(({ part: _, ...shape }) => shape as Shape) : shapes));
    const defs = piece.defs?.(room.x, y);
    page.gradients.push(...(defs?.gradients ?? []));
    page.clips.push(...(defs?.clips ?? []));
    if (piece.description !== undefined) page.descriptions.push(piece.description);
    y += piece.height;
  };
  for (const section of sections) {
    if (section.pieces.length === 0) continue;
    const first = headingPieces(section, false, room, look);
    const start = height(first) + height(section.pieces.slice(0, TOGETHER));
    if (y > room.y) y += GAP;
    if (y > room.y && y + Math.min(start, room.height) > bottom) turn();
    first.forEach((piece) => put(piece));
    let alone = true;
    for (const [i, piece] of section.pieces.entries()) {
      // The last one is not left alone on its page: the one before it goes along.
      const pair = i === section.pieces.length - 2 ? height(section.pieces.slice(i)) : 0;
      const needed = pair <= room.height / 2 ? Math.max(piece.height, pair) : piece.height;
      // A piece of more than a page stays where it is: a new page would not help it.
      if (!alone && y + needed > bottom) {
        turn();
        // Headings that are repeated are said once.
        headingPieces(section, true, room, look).forEach((piece) => put(piece, true));
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
    const part: Part = { as: 'heading' };
    out.push({ height: 1.5 * head, draw: (x, y) => [{ kind: 'text', role: 'section', part, x, y: y + 1.05 * head, size: head, anchor: 'start', weight: 'bold', runs: [{ text: title }], fill: style.ink }] });
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
  const part: Part = { as: 'paragraph' };
  return {
    height: lines.length * leading * size + 2,
    draw: (x, y) => [
      ...(of.lead ? [{ kind: 'text' as const, role: 'lead', part, x, y: y + 0.8 * leading * size, size, anchor: 'start' as const, runs: [{ text: of.lead }], fill: of.fill ?? style.ink }] : []),
      ...lines.map((line, i): Shape => ({ kind: 'text', role: 'sentence', part, x: x + indent, y: y + (i + 0.8) * leading * size, size, anchor: 'start', runs: [{ text: line }], fill: of.fill ?? style.ink })),
    ],
  };
}

/** Of one paragraph; a design's notes may be of any length. */
const MOST_LINES = 20;
