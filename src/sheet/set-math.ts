import { textWidth } from '../drawing/glyph-widths.ts';
import { px, type Part, type Shape } from '../drawing/shapes.ts';
import type { MathNode } from '../workings/math.ts';

/** A formula as it is set: room it takes about its baseline, px, and the shapes at a place. */
export interface MathBox {
  width: number;
  up: number;
  down: number;
  draw(x: number, baseline: number): Shape[];
}

/** What every mark of a formula shares. */
interface Ink {
  fill: string;
  part: Part;
}

/** Of the letters' size: height and depth of a line, height of the axis that fractions and signs stand on. */
const [UP, DOWN, AXIS] = [0.76, 0.22, 0.32];
const SCRIPT = 0.72;
/** Smallest letters of a formula, px. */
const LEAST = 5.5;
/** Operators with room on both sides. */
const ROOMY: ReadonlySet<string> = new Set(['+', '−', '=', '·', '<', '>', '≤', '≥', '≈', '→']);
/** Invisible product, application of a function. */
const [TIMES, APPLIED] = ['\u2062', '\u2061'];
/** Of the letters' size: between things that stand side by side, and beside an operator. */
const [THIN, ROOM] = [0.14, 0.26];
/** A bracket grows no further, its content may. */
const LARGEST_BRACKET = 2.6;

/** A formula from its tree: real text for every letter, lines for fractions and roots. */
export function mathBox(node: MathNode, size: number, ink: Ink): MathBox {
  const s = Math.max(LEAST, size);
  if ('text' in node) return letters(node.text, s, ink, node.tag === 'mi' && [...node.text].length === 1);
  const of = (i: number, scale = 1): MathBox => mathBox(node.children[i], s * scale, ink);
  switch (node.tag) {
    case 'mrow': return rowBox(node.children, s, ink);
    case 'mfrac': return fractionBox(of(0, 0.92), of(1, 0.92), s, ink);
    case 'msup': return scripted(of(0), null, of(1, SCRIPT), s);
    case 'msub': return scripted(of(0), of(1, SCRIPT), null, s);
    case 'msubsup': return scripted(of(0), of(1, SCRIPT), of(2, SCRIPT), s);
    case 'msqrt': return rootBox(rowBox(node.children, s, ink), s, ink);
    case 'munderover': return scripted(centred(of(0, 1.5), s), of(1, SCRIPT), of(2, SCRIPT), s);
  }
}

function letters(text: string, size: number, { fill, part }: Ink, italic: boolean): MathBox {
  return {
    width: textWidth(text, size), up: UP * size, down: DOWN * size,
    draw: (x, baseline) => [{ kind: 'text', role: 'formula', x, y: baseline, size, anchor: 'start', runs: [italic ? { text, italic } : { text }], fill, part }],
  };
}

/** Boxes side by side on one baseline. */
function joined(boxes: readonly { box: MathBox; before: number }[]): MathBox {
  const lefts: number[] = [];
  let width = 0;
  for (const { box, before } of boxes) {
    lefts.push((width += before));
    width += box.width;
  }
  return {
    width, up: Math.max(0, ...boxes.map(({ box }) => box.up)), down: Math.max(0, ...boxes.map(({ box }) => box.down)),
    draw: (x, baseline) => boxes.flatMap(({ box }, i) => box.draw(x + lefts[i], baseline)),
  };
}

function rowBox(children: readonly MathNode[], size: number, ink: Ink): MathBox {
  const boxes: { box: MathBox; before: number }[] = [];
  // Brackets are as tall as the tallest thing in the row.
  const inner = children.filter((child) => !isBracket(child) && !isGap(child)).map((child) => mathBox(child, size, ink));
  const [up, down] = [Math.max(0, ...inner.map((b) => b.up)), Math.max(0, ...inner.map((b) => b.down))];
  let gap = 0;
  children.forEach((child, i) => {
    const text = 'text' in child && child.tag === 'mo' ? child.text : null;
    if (text === TIMES || text === APPLIED) {
      gap = THIN;
      return;
    }
    const roomy = text !== null && ROOMY.has(text) && i > 0;
    const before = boxes.length === 0 ? 0 : (roomy ? ROOM : isBracket(child) ? 0 : gap) * size;
    boxes.push({ box: isBracket(child) ? bracket(text!, up, down, size, ink) : mathBox(child, size, ink), before });
    gap = roomy ? ROOM : text === ',' ? ROOM : text !== null ? 0 : THIN;
  });
  return joined(boxes);
}

function isBracket(node: MathNode): boolean {
  return 'text' in node && (node.text === '(' || node.text === ')');
}

function isGap(node: MathNode): boolean {
  return 'text' in node && (node.text === TIMES || node.text === APPLIED);
}

function bracket(text: string, up: number, down: number, size: number, { fill, part }: Ink): MathBox {
  const tall = Math.min(LARGEST_BRACKET, Math.max(1, (up + down) / ((UP + DOWN) * size)));
  const s = size * tall;
  // Its middle at the middle of what it holds.
  const drop = tall === 1 ? 0 : (down - up) / 2 + ((UP - DOWN) * s) / 2;
  return {
    width: textWidth(text, s), up: UP * s - drop, down: DOWN * s + drop,
    draw: (x, baseline) => [{ kind: 'text', role: 'formula', x, y: baseline + drop, size: s, anchor: 'start', runs: [{ text }], fill, part }],
  };
}

function fractionBox(over: MathBox, under: MathBox, size: number, { fill, part }: Ink): MathBox {
  const pad = 0.12 * size;
  const width = Math.max(over.width, under.width) + 2 * pad;
  const [rise, drop] = [AXIS * size + pad + over.down, pad + under.up - AXIS * size];
  return {
    width, up: rise + over.up, down: drop + under.down,
    draw: (x, baseline) => [
      ...over.draw(x + (width - over.width) / 2, baseline - rise),
      { kind: 'line', role: 'formula-rule', x1: x, x2: x + width, y1: baseline - AXIS * size, y2: baseline - AXIS * size, stroke: fill, width: Math.max(0.5, 0.06 * size), part },
      ...under.draw(x + (width - under.width) / 2, baseline + drop),
    ],
  };
}

/** A base with what stands lowered and raised behind it. */
function scripted(base: MathBox, low: MathBox | null, high: MathBox | null, size: number): MathBox {
  const drop = Math.max(0.2 * size, base.down - 0.05 * size);
  const rise = Math.max(0.36 * size, base.up - 0.42 * size);
  const at = base.width + 0.03 * size;
  return {
    width: at + Math.max(low?.width ?? 0, high?.width ?? 0),
    up: Math.max(base.up, high ? rise + high.up : 0), down: Math.max(base.down, low ? drop + low.down : 0),
    draw: (x, baseline) => [...base.draw(x, baseline), ...(low?.draw(x + at, baseline + drop) ?? []), ...(high?.draw(x + at, baseline - rise) ?? [])],
  };
}

/** A large sign with its middle on the axis. */
function centred(box: MathBox, size: number): MathBox {
  const drop = (box.up - box.down) / 2 - AXIS * size;
  return { ...box, up: box.up - drop, down: box.down + drop, draw: (x, baseline) => box.draw(x, baseline + drop) };
}

function rootBox(inside: MathBox, size: number, { fill, part }: Ink): MathBox {
  const sign = 0.6 * size;
  const up = inside.up + 0.14 * size;
  return {
    width: sign + inside.width + 0.08 * size, up: up + 0.06 * size, down: inside.down,
    draw: (x, baseline) => {
      const [foot, top] = [baseline + inside.down, baseline - up];
      const d = `M${px(x)},${px(baseline - 0.28 * size)}L${px(x + 0.16 * size)},${px(baseline - 0.36 * size)}L${px(x + 0.34 * size)},${px(foot)}L${px(x + 0.54 * size)},${px(top)}L${px(x + sign + inside.width + 0.08 * size)},${px(top)}`;
      return [{ kind: 'path', role: 'formula-rule', d, stroke: fill, width: Math.max(0.5, 0.06 * size), join: 'round', part }, ...inside.draw(x + sign, baseline)];
    },
  };
}
