import { describe, expect, it } from 'vitest';
import { plainText, type Shape } from '../../src/drawing/shapes.ts';
import { pagesOf as laidOut, type Piece, type Section } from '../../src/sheet/flow.ts';
import { sheetLook } from '../../src/sheet/look.ts';

const look = sheetLook('screen', 'A4');
const pagesOf = (...args: Parameters<typeof laidOut>): Shape[][] => laidOut(...args).map((page) => page.shapes);
const room = { x: 10, y: 10, width: 300, height: 200 };
const piece = (name: string, height: number): Piece => ({ height, draw: (x, y) => [{ kind: 'rect', role: name, x, y, w: 1, h: height }] });
const section = (title: string, heights: number[], head?: Piece): Section => ({ title, head, pieces: heights.map((h, i) => piece(`${title} ${i + 1}`, h)) });
const names = (page: Shape[]): string[] => page.map((s) => (s.kind === 'text' ? plainText(s.runs) : s.role));

describe('pages of sections', () => {
  it('hold every piece once, in order, none beyond the foot', () => {
    const pages = pagesOf([section('a', Array(12).fill(40)), section('b', [30, 30])], room, look);
    const pieces = pages.flat().filter((s) => s.kind === 'rect');
    expect(pieces.map((s) => s.role)).toEqual([...Array.from({ length: 12 }, (_, i) => `a ${i + 1}`), 'b 1', 'b 2']);
    for (const s of pieces) if (s.kind === 'rect') expect(s.y + s.h).toBeLessThanOrEqual(room.y + room.height);
  });

  it('repeat title and heads where a section goes on, marked as continued', () => {
    const pages = pagesOf([section('a', Array(6).fill(50), piece('head', 10))], room, look);
    expect(names(pages[0]).slice(0, 2)).toEqual(['a', 'head']);
    for (const page of pages.slice(1)) expect(names(page).slice(0, 2)).toEqual(['a, continued', 'head']);
  });

  it('leave no heading alone at the foot of a page', () => {
    const pages = pagesOf([section('a', [130]), section('b', [30, 30, 30])], room, look);
    expect(names(pages[0])).not.toContain('b');
    expect(names(pages[1])[0]).toBe('b');
  });

  it('leave no last row alone on its page', () => {
    for (let count = 3; count < 30; count++) {
      const pages = pagesOf([section('a', Array(count).fill(30), piece('head', 10))], room, look);
      if (pages.length > 1) expect(names(pages[pages.length - 1]).filter((n) => n.startsWith('a ')).length, `${count} rows`).toBeGreaterThan(1);
    }
  });

  it('give a piece of more than a page a page of its own and end', () => {
    const pages = pagesOf([section('a', [20, 900, 20])], room, look);
    expect(pages.flat().filter((s) => s.kind === 'rect').map((s) => s.role)).toEqual(['a 1', 'a 2', 'a 3']);
    expect(pages.length).toBeLessThanOrEqual(3);
  });

  it('pass over a section without pieces', () => {
    expect(pagesOf([section('empty', [])], room, look)).toEqual([[]]);
  });
});
