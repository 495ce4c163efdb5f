import { runsWidth } from '../../src/drawing/glyph-widths.ts';
import { plainText, type Drawing, type TextShape } from '../../src/drawing/shapes.ts';
import { textsOf } from './sheets.ts';

/** Of the sheet itself; the plate's texts are the plate's own affair, which may cross a line. */
const OWN = /^(cell|column-heading|section|sentence|lead|caution|block-)/;

interface Box {
  left: number;
  right: number;
  top: number;
  bottom: number;
  text: string;
}

/** Box of a line of text: what lies on the line and above it. */
function boxOf(t: TextShape): Box {
  const width = runsWidth(t.runs, t.size) * (t.weight === 'bold' ? 1.13 : 1);
  const left = t.anchor === 'end' ? t.x - width : t.anchor === 'middle' ? t.x - width / 2 : t.x;
  return { left, right: left + width, top: t.y - 0.75 * t.size, bottom: t.y, text: plainText(t.runs) };
}

/** Pairs of texts that lie on each other. */
export function overlaps(page: Drawing): string[] {
  const boxes = textsOf(page).filter((t) => OWN.test(t.role)).map(boxOf);
  const out: string[] = [];
  boxes.forEach((a, i) => {
    for (const b of boxes.slice(i + 1)) if (a.left < b.right - 0.5 && b.left < a.right - 0.5 && a.top < b.bottom - 0.5 && b.top < a.bottom - 0.5) out.push(`"${a.text}" over "${b.text}"`);
  });
  return out;
}

/** Texts that reach out of the page's frame. */
export function outside(page: Drawing): string[] {
  const frame = page.shapes.find((s) => s.role === 'frame')!;
  if (frame.kind !== 'rect') throw new Error('the frame is a rect');
  return textsOf(page).filter((t) => OWN.test(t.role)).map(boxOf).filter((b) => b.left < frame.x || b.right > frame.x + frame.w + 0.5 || b.top < frame.y || b.bottom > frame.y + frame.h).map((b) => b.text);
}
