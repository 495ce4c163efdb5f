import type { LayerResult } from '../../result/types.ts';
import { lengthText, powerOfTen } from '../figures.ts';
import type { Frame } from '../frame.ts';
import { fitted, runsWidth, textWidth } from '../glyph-widths.ts';
import type { Shape, TextRun } from '../shapes.ts';

/** The stack under the diagram, a column a layer: name, material, thickness, doping, as far as each column has room. */
export function strip(frame: Frame): Shape[] {
  const { area, depth, style, text, small, result } = frame;
  if (frame.strip === 0) return [];
  const shapes: Shape[] = [{ kind: 'line', role: 'strip', x1: area.left, x2: area.right, y1: area.bottom, y2: area.bottom, stroke: style.faint, width: 1.5 * style.thinWidth }];
  result.layers.forEach((layer, i) => {
    const left = Math.max(depth.edges[i], area.left);
    const right = Math.min(depth.edges[i + 1], area.right);
    const room = right - left - 6;
    const common = { kind: 'text', x: (left + right) / 2, anchor: 'middle', fill: style.ink } as const;
    const line = (n: number): number => area.bottom + 1.15 * text + (n * (frame.strip - 0.4 * text)) / 4;
    // A number where the name would lose its sense; the caption says which it is.
    const name = isNumbered(frame, i) ? String(i + 1) : layer.name;
    const rows: { runs: TextRun[]; size: number; bold?: boolean }[] = [
      { runs: isNumbered(frame, i) ? whole([{ text: name }], small, right - left) : [{ text: fitted(name, 0.95 * text, room / BOLD) }], size: isNumbered(frame, i) ? small : 0.95 * text, bold: true },
      { runs: cut(materialText(layer), small, room), size: small },
      { runs: whole([{ text: lengthText(layer.thickness_nm) }], small, room), size: small },
      { runs: whole(dopingRuns(layer), small, room), size: small },
    ];
    rows.forEach(({ runs, size, bold }, n) => {
      if (runs.length === 0 || runs[0].text === '') return;
      shapes.push({ ...common, role: n === 0 ? 'layer-name' : 'layer-figure', y: line(n), size, runs, weight: bold ? 'bold' : undefined, title: n === 0 ? layer.name : undefined });
    });
  });
  return shapes;
}

/** Bold glyphs are wider by about a tenth. */
const BOLD = 1.1;

/** A word cut to its room, unless hardly a letter would be left of it. */
function cut(text: string, size: number, room: number): TextRun[] {
  const short = fitted(text, size, room);
  return short === text || short.length > 4 ? [{ text: short }] : [];
}

/** A figure that does not fit is left out: half a number is a wrong one. */
function whole(runs: TextRun[], size: number, room: number): TextRun[] {
  return runsWidth(runs, size) <= room ? runs : [];
}

/** Whether a layer's column is too narrow for its name. */
export function isNumbered(frame: Frame, i: number): boolean {
  const { area, depth, text, result } = frame;
  const room = Math.min(depth.edges[i + 1], area.right) - Math.max(depth.edges[i], area.left) - 6;
  return room < Math.min(0.95 * text * 4, BOLD * textWidth(result.layers[i].name, 0.95 * text));
}

function materialText(layer: LayerResult): string {
  return layer.x === null ? layer.material : `${layer.material}, x = ${Number(layer.x.toPrecision(3))}`;
}

/** Net active doping: "n 10^17". */
function dopingRuns(layer: LayerResult): TextRun[] {
  const net = layer.ionised.reduce((sum, row) => sum + (row.kind === 'donor' ? 1 : -1) * row.concentration_cm3, 0);
  if (net === 0) return [];
  return [{ text: `${net > 0 ? 'n' : 'p'} ` }, ...powerOfTen(Math.abs(net)), { text: ' cm' }, { text: '−3', script: 'super' }];
}
