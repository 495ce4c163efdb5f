import type { Part, Shape } from '../drawing/shapes.ts';
import { brokenLines, lineWidth, oneLine } from './lines.ts';
import type { SheetLook } from './look.ts';

/** What stands in the block at the foot of every page. */
export interface TitleBlock {
  title: string;
  author: string;
  date: string;
  revision: string;
  page: number;
  pages: number;
  program: string;
  parameters: string;
  design: string;
  caution: string;
}

const PAD = 6;

interface Box {
  label: string;
  text: string;
  w: number;
  bold?: boolean;
}

/** px; with the cautions above it */
export function titleBlockHeight(look: SheetLook, caution: string): number {
  return cautionLines(look, caution).length * 1.3 * look.block.label + 2 * 4 + rowHeights(look).reduce((a, b) => a + b, 0);
}

function rowHeights({ block }: SheetLook): [number, number] {
  return [1.4 * block.label + 1.35 * block.value + 8, 1.4 * block.label + 1.4 * (block.label + 0.5) + 5];
}

function cautionLines(look: SheetLook, caution: string): string[] {
  return brokenLines(caution, look.block.label, look.width - 2 * look.margin - 2 * PAD, 4);
}

/** Frame of the page, the cautions, and the block with its cells along the lower edge. */
export function titleBlock(of: TitleBlock, look: SheetLook): Shape[] {
  const { style, margin, width, height, block } = look;
  const full = width - 2 * margin;
  const [upper, lower] = rowHeights(look);
  const [top, middle] = [height - margin - upper - lower, height - margin - lower];
  const lines = cautionLines(look, of.caution);
  // What stands on every page is told once.
  const told = (as: 'title' | 'paragraph'): { part?: Part } => (of.page === 1 ? { part: { as } } : {});
  const caution = told('paragraph');
  const rule = (x1: number, y1: number, x2: number, y2: number, w = 0.6): Shape => ({ kind: 'line', role: 'block-rule', x1, y1, x2, y2, stroke: style.ink, width: w });
  const shapes: Shape[] = [
    { kind: 'rect', role: 'frame', x: margin, y: margin, w: full, h: height - 2 * margin, fill: 'none', stroke: style.ink, width: 1 },
    ...lines.map((line, i): Shape => ({ kind: 'text', role: 'caution', ...caution, x: margin + PAD, y: top - 5 - (lines.length - 1 - i) * 1.3 * block.label, size: block.label, anchor: 'start', runs: [{ text: line }], fill: style.ink })),
    rule(margin, top, margin + full, top, 1),
    rule(margin, middle, margin + full, middle),
  ];
  const small = { author: 0.16 * full, date: 0.1 * full, revision: 0.08 * full, checked: 0.14 * full, page: 0.07 * full };
  const rest = full - Object.values(small).reduce((a, b) => a + b, 0);
  const first: Box[] = [
    { label: 'title', text: of.title, w: rest, bold: true },
    { label: 'author', text: of.author, w: small.author },
    { label: 'checked by', text: '', w: small.checked },
    { label: 'date', text: of.date, w: small.date },
    { label: 'revision', text: of.revision, w: small.revision },
    { label: 'page', text: `${of.page} of ${of.pages}`, w: small.page },
  ];
  const hash = 0.365 * full;
  const second: Box[] = [
    { label: 'program and model', text: of.program, w: full - 2 * hash },
    { label: 'parameters', text: of.parameters, w: hash },
    { label: 'design', text: of.design, w: hash },
  ];
  cells(first, top, upper, block.value);
  cells(second, middle, lower, block.label + 0.5);
  return shapes;

  function cells(boxes: Box[], y: number, h: number, size: number): void {
    let x = margin;
    boxes.forEach((box, i) => {
      if (i > 0) shapes.push(rule(x, y, x, y + h));
      const part = told(box.label === 'title' ? 'title' : 'paragraph');
      shapes.push({ kind: 'text', role: 'block-label', ...(box.label === 'title' ? {} : part), x: x + PAD, y: y + 1.25 * block.label, size: block.label, anchor: 'start', runs: [{ text: box.label }], fill: style.faint });
      const room = box.w - 2 * PAD;
      const fits = y !== top || lineWidth(box.text, size, box.bold) <= room;
      // What is too long for the line takes two smaller ones.
      const s = fits ? size : 0.75 * size;
      const values = fits ? [oneLine(box.text, s, room, box.bold)] : brokenLines(box.text, s, room, 2, box.bold);
      values.forEach((value, l) => {
        if (value !== '') shapes.push({ kind: 'text', role: `block-${box.label.replaceAll(' ', '-')}`, ...part, x: x + PAD, y: y + h - 0.45 * s - (values.length - 1 - l) * 1.25 * s, size: s, anchor: 'start', ...(box.bold ? { weight: 'bold' as const } : {}), runs: [{ text: value }], fill: style.ink });
      });
      x += box.w;
    });
  }
}
