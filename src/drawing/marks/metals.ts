import { heldY, type Frame } from '../frame.ts';
import { fitted, textWidth } from '../glyph-widths.ts';
import { px, type Shape } from '../shapes.ts';

/** Distance of the hatch lines along the block's sides, px. */
const HATCH = 7;

/** A hatched block up to the metal's Fermi level at each end that has one, with the metal's name. */
export function metals(frame: Frame): Shape[] {
  const { area, lanes, result, depth } = frame;
  const shapes: Shape[] = [];
  for (const contact of result.contacts) {
    const lane = lanes[contact.side];
    const end = contact.side === 'top' ? depth.edges[0] : depth.edges[depth.edges.length - 1];
    // Zoomed away from the surface the lane stays, so that the picture does not jump, but no metal stands beside the inside of the stack.
    if (lane === 0 || contact.kind !== 'barrier' || end < area.left - 0.5 || end > area.right + 0.5) continue;
    const left = contact.side === 'top' ? area.left - lane : area.right;
    const name = contact.metal ?? 'metal';
    shapes.push(...block(frame, left, left + lane, name, contact.side === 'top'));
  }
  return shapes;
}

function block(frame: Frame, x0: number, x1: number, name: string, top: boolean): Shape[] {
  const { area, style, small, result } = frame;
  const ef = result.profile.ef_eV;
  const y0 = heldY(frame, (top ? ef[0] : ef[ef.length - 1]) ?? 0);
  const y1 = area.bottom;
  const shapes: Shape[] = [
    { kind: 'path', role: 'metal-hatch', title: `${name}, filled up to its Fermi level`, d: hatch(x0, x1, y0, y1), stroke: style.faint, width: style.thinWidth },
    { kind: 'line', role: 'metal-fermi-level', x1: x0, x2: x1, y1: y0, y2: y0, stroke: style.ink, width: 1.6 * style.fermiWidth },
    { kind: 'line', role: 'metal-end', x1: top ? x0 : x1, x2: top ? x0 : x1, y1: y0, y2: y1, stroke: style.faint, width: style.thinWidth },
  ];
  const label = fitted(name, small, x1 - x0 - 8);
  if (label !== '' && y1 - y0 > 2.2 * small) {
    const width = textWidth(label, small) + 6;
    const y = y1 - 0.7 * small;
    shapes.push({ kind: 'rect', role: 'metal-name-ground', x: (x0 + x1 - width) / 2, y: y - 1.05 * small, w: width, h: 1.45 * small, fill: style.ground });
    shapes.push({ kind: 'text', role: 'metal-name', x: (x0 + x1) / 2, y, size: small, anchor: 'middle', runs: [{ text: label }], fill: style.ink });
  }
  return shapes;
}

/** Strokes rising to the right at 45 degrees, cut to the block: lines, since not every reader of SVG knows patterns. */
function hatch(x0: number, x1: number, y0: number, y1: number): string {
  let d = '';
  // Each stroke lies on x + y = c.
  for (let c = x0 + y0 + HATCH / 2; c < x1 + y1; c += HATCH) {
    const fromX = Math.max(x0, c - y1);
    const toX = Math.min(x1, c - y0);
    if (toX > fromX) d += `M${px(fromX)},${px(c - fromX)}L${px(toX)},${px(c - toX)}`;
  }
  return d;
}
