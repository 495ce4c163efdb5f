import { writeNumber } from '../quantity/write-quantity.ts';
import { polyline, thinned } from './curve.ts';
import { fitted } from './glyph-widths.ts';
import { lineCode } from './margin-plot.ts';
import { alongAxis, axisTitle, footAxis, sideAxis, sideRoom, type PlotArea, type PlotAxis } from './plot-frame.ts';
import { plainText, type Drawing, type Shape, type TextShape } from './shapes.ts';
import { styleOf, type Style, type StyleName } from './styles.ts';

/** One figure against what is swept. */
export interface SweptCurve {
  /** "cap: sheet resistance" */ label: string;
  unit: string;
  /** spans decades */ log: boolean;
  /** [points]; null where there is none (yet) */ values: readonly (number | null)[];
}

export interface SweepPicture {
  axis: PlotAxis;
  /** rising [points] */ values: readonly number[];
  curves: readonly SweptCurve[];
  gaps: readonly { index: number; reason: string }[];
  /** the value in the design */ now: { value: number; text: string } | null;
}

/** A panel holds the curves of one unit. */
export interface SweepPanel {
  area: PlotArea;
  /** indices of its curves */ curves: number[];
  y(value: number): number;
}

export interface SweepPlot extends Drawing {
  x(value: number): number;
  panels: SweepPanel[];
}

/** Below this width the curves' ends bear numbers and no words, px at a text size of 12. */
const NARROW = 560;
const ONE_PANEL = 260;
const PANEL = 150;
/** Words of an axis that several curves share, by its unit. */
const UNIT_WORDS: Readonly<Record<string, string>> = {
  eV: 'energy', meV: 'energy', 'cm^-3': 'density', 'cm^-2': 'sheet density', nm: 'length', V: 'potential', 'V/cm': 'field', ohm: 'sheet resistance', 'ohm cm': 'resistivity', 'ohm cm^2': 'contact resistivity',
  'cm^2/(V s)': 'mobility', 'F/cm^2': 'capacitance', 'A/cm^2': 'current density', '': 'share or ratio',
};

/**
 * Figures against what is swept: a panel for each unit, one above the other over one axis; curves told apart by dash and weight and named at their ends.
 * What has no answer breaks the curve and is marked at the foot.
 *
 * @throws {RangeError} no room, or no range
 */
export function drawSweepPlot(picture: SweepPicture, options: { width: number; style?: StyleName; prefix?: string }): SweepPlot {
  const { axis, curves } = picture;
  if (!(axis.to > axis.from) || (axis.scale === 'log' && !(axis.from > 0))) throw new RangeError('a picture of a sweep needs a range');
  const style = styleOf(options.style ?? 'light');
  const { width, prefix = 'sweep' } = options;
  const small = style.smallSize;
  const narrow = width < NARROW * (style.textSize / 12);
  const labelRoom = narrow ? 2.2 * small : Math.min(0.3 * width, 22 * small);
  const groups = grouped(curves);
  const each = (groups.length > 1 ? PANEL : ONE_PANEL) * (style.textSize / 12);
  const axes = groups.map((group) => panelAxis(group.map((i) => curves[i])));
  const [left, right] = [axes.reduce((room, own) => Math.max(room, sideRoom(own, each, style)), 0), width - labelRoom - 0.4 * small];
  if (!(right - left >= 60)) throw new RangeError(`no room for a picture of a sweep: ${width} px`);
  const head = 2.1 * small;
  const x = alongAxis(axis, left, right);
  const top = 1.8 * small;
  const panels = groups.map((group, g): SweepPanel & { axis: PlotAxis } => {
    const area = { left, right, top: top + g * (each + head) + head, bottom: top + (g + 1) * (each + head) };
    const own = axes[g];
    return { area, curves: group, axis: own, y: alongAxis(own, area.bottom, area.top) };
  });
  const bottom = panels.length === 0 ? top + head : panels[panels.length - 1].area.bottom;
  const whole = { left, right, top: top + head, bottom };
  const clips = panels.map(({ area }, g) => ({ id: `${prefix}-${g}`, x: left, y: area.top - 1, w: right - left, h: area.bottom - area.top + 2 }));
  return {
    width, height: Math.ceil(bottom + 3.6 * small), background: style.ground, font: style.font, gradients: [], clips, x, panels,
    shapes: [
      ...panels.flatMap((panel) => frame(panel, style, panel.curves.every((i) => curves[i].values.every((v) => v === null)))),
      ...gapMarks(picture, x, whole, style),
      ...nowLine(picture, x, whole, style),
      ...panels.flatMap((panel, g) => panel.curves.map((i) => curveShape(picture, i, x, panel, clips[g].id, style))),
      ...footAxis(axis, whole, style, 'sweep'),
      ...panels.flatMap((panel) => endLabels(curves, panel, style, right + 6, labelRoom - 8, narrow)),
    ],
    title: `Figures against ${axis.words}`,
    description: describeSweep(picture),
  };
}

function grouped(curves: readonly SweptCurve[]): number[][] {
  const groups = new Map<string, number[]>();
  curves.forEach(({ unit, log }, i) => groups.set(`${unit} ${log}`, [...(groups.get(`${unit} ${log}`) ?? []), i]));
  return [...groups.values()];
}

/** The axis of a panel: all that its curves have, with a little room; a constant gets room enough to be read as one. */
function panelAxis(curves: readonly SweptCurve[]): PlotAxis {
  const values = curves.flatMap((curve) => curve.values.filter((v): v is number => v !== null && Number.isFinite(v)));
  const { unit } = curves[0];
  const common = new Set(curves.map(({ label }) => label.slice(label.indexOf(': ') + 1).trim()));
  const words = curves.length === 1 ? curves[0].label : common.size === 1 ? [...common][0] : (UNIT_WORDS[unit] ?? 'figures');
  if (values.length === 0) return { words, unit, scale: 'linear', from: 0, to: 1 };
  const [low, high] = [values.reduce((a, b) => Math.min(a, b)), values.reduce((a, b) => Math.max(a, b))];
  if (curves[0].log && low > 0) {
    const room = Math.max(1.02, (high / low) ** 0.06);
    return { words, unit, scale: 'log', from: low / room, to: high * room };
  }
  const room = Math.max(0.08 * (high - low), 2e-3 * Math.max(Math.abs(low), Math.abs(high)), 1e-300);
  return { words, unit, scale: 'linear', from: low - room, to: high + room };
}

function frame({ area, axis }: SweepPanel & { axis: PlotAxis }, style: Style, empty: boolean): Shape[] {
  const none: Shape = { kind: 'text', role: 'sweep-none', x: (area.left + area.right) / 2, y: (area.top + area.bottom) / 2, size: style.smallSize, anchor: 'middle', runs: [{ text: 'no figures' }], fill: style.faint };
  return [
    ...(empty ? [none] : sideAxis(axis, area, style, 'sweep')),
    { kind: 'line', role: 'sweep-axis', x1: area.left, x2: area.right, y1: area.bottom, y2: area.bottom, stroke: style.faint, width: style.thinWidth },
    { kind: 'text', role: 'sweep-panel-title', x: area.left, y: area.top - 0.6 * style.smallSize, size: style.smallSize, anchor: 'start', runs: axisTitle(axis.words, axis.unit), fill: style.ink, weight: 'bold' },
  ];
}

function curveShape({ values, curves }: SweepPicture, i: number, x: (value: number) => number, { y }: SweepPanel, clip: string, style: Style): Shape {
  const { dash, width, color } = lineCode(i, style);
  let d = '';
  let run: { x: number[]; y: number[] } = { x: [], y: [] };
  const close = (): void => {
    // A lone point between two without an answer is still seen, as a dot of the line.
    if (run.x.length === 1) d += polyline({ x: [run.x[0] - 1.5, run.x[0] + 1.5], y: [run.y[0], run.y[0]] }, 'M');
    else if (run.x.length > 1) d += polyline(thinned(run), 'M');
    run = { x: [], y: [] };
  };
  curves[i].values.forEach((value, k) => {
    const at = value === null ? NaN : y(value);
    if (!Number.isFinite(at)) return close();
    run.x.push(x(values[k]));
    run.y.push(at);
  });
  close();
  return { kind: 'path', role: 'sweep-curve', title: `${i + 1} ${curves[i].label}`, d, stroke: color, width, dash, clip, join: 'round' };
}

/** Bars along the foot where a point has no answer, neighbours in one. */
function gapMarks({ gaps, values }: SweepPicture, x: (value: number) => number, area: PlotArea, style: Style): Shape[] {
  const shapes: Shape[] = [];
  const sorted = [...gaps].sort((a, b) => a.index - b.index);
  for (let i = 0; i < sorted.length; i++) {
    const first = sorted[i];
    while (i + 1 < sorted.length && sorted[i + 1].index === sorted[i].index + 1) i++;
    const [from, to] = [x(values[first.index]) - 2, x(values[sorted[i].index]) + 2];
    shapes.push({ kind: 'rect', role: 'sweep-gap', title: `no answer: ${first.reason}`, x: from, y: area.bottom - 6, w: to - from, h: 6, fill: style.trouble });
    shapes.push({ kind: 'text', role: 'sweep-gap-word', x: Math.min(Math.max((from + to) / 2, area.left + 30), area.right - 30), y: area.bottom - 9, size: style.smallSize, anchor: 'middle', runs: [{ text: 'no answer' }], fill: style.trouble });
  }
  return shapes;
}

function nowLine({ now, axis }: SweepPicture, x: (value: number) => number, area: PlotArea, style: Style): Shape[] {
  if (now === null || now.value < axis.from || now.value > axis.to) return [];
  const at = x(now.value);
  return [
    { kind: 'line', role: 'sweep-now', x1: at, x2: at, y1: area.top, y2: area.bottom, stroke: style.choice, width: 1.4, dash: '1 3', cap: 'round' },
    { kind: 'text', role: 'sweep-now-figure', x: Math.min(Math.max(at, area.left + 40), area.right - 40), y: 1.2 * style.smallSize, size: style.smallSize, anchor: 'middle', runs: [{ text: `now ${now.text}` }], fill: style.ink },
  ];
}

/** At the right end of each curve its number and, where there is room, its words; pushed apart. */
function endLabels(curves: readonly SweptCurve[], { area, curves: own, y }: SweepPanel, style: Style, at: number, room: number, narrow: boolean): TextShape[] {
  const small = style.smallSize;
  const least = 1.25 * small;
  const wanted = own.flatMap((i) => {
    const last = [...curves[i].values].reverse().find((v) => v !== null && Number.isFinite(y(v)));
    return last === undefined || last === null ? [] : [{ i, y: Math.min(Math.max(y(last), area.top + 0.5 * small), area.bottom - 0.5 * small) }];
  });
  wanted.sort((a, b) => a.y - b.y);
  for (let k = 1; k < wanted.length; k++) wanted[k].y = Math.max(wanted[k].y, wanted[k - 1].y + least);
  for (let k = wanted.length - 1; k >= 0; k--) wanted[k].y = Math.min(wanted[k].y, area.bottom - 0.5 * small - (wanted.length - 1 - k) * least);
  return wanted.map(({ i, y: up }): TextShape => ({
    kind: 'text', role: 'sweep-label', title: curves[i].label, x: at, y: up + 0.36 * small, size: small, anchor: 'start', runs: [{ text: fitted(`${i + 1}${narrow ? '' : ` ${curves[i].label}`}`, small, room) }], fill: lineCode(i, style).color,
  }));
}

/** In words: where each figure begins and ends, and what is missing. */
export function describeSweep({ axis, values, curves, gaps }: SweepPicture): string {
  const figure = (v: number, unit: string): string => `${writeNumber(v, 4)}${unit === '' ? '' : ` ${unit}`}`;
  const parts = curves.map(({ label, unit, values: own }, i) => {
    const known = own.flatMap((v, k) => (v === null ? [] : [{ v, k }]));
    if (known.length === 0) return `${i + 1} ${label}: no figures`;
    const [first, last] = [known[0], known[known.length - 1]];
    const high = known.reduce((a, b) => (b.v > a.v ? b : a));
    const low = known.reduce((a, b) => (b.v < a.v ? b : a));
    const turns = [high, low].filter(({ k, v }) => k !== first.k && k !== last.k && v !== first.v && v !== last.v).map((e) => `, ${e === high ? 'largest' : 'smallest'} ${figure(e.v, unit)} at ${figure(values[e.k], axis.unit)}`);
    return `${i + 1} ${label}: from ${figure(first.v, unit)} to ${figure(last.v, unit)}${turns.join('')}`;
  });
  const missing = gaps.length === 0 ? '' : ` ${gaps.length === 1 ? 'One point has' : `${gaps.length} points have`} no answer.`;
  return `Against ${plainText(axisTitle(axis.words, axis.unit))}, from ${figure(axis.from, axis.unit)} to ${figure(axis.to, axis.unit)}. ${parts.join('. ')}.${missing}`;
}
