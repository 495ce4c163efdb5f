import type { CarrierCloseUp, CloseUp } from '../contacts/close-up.ts';
import { polyline, thinned, type Points } from './curve.ts';
import { closeUpFrame, closeUpTicks, drawnBarrier, type CloseUpFrame } from './contact-closeup-frame.ts';
import { closeUpTitle, describeCloseUp } from './contact-closeup-words.ts';
import { energyText } from './figures.ts';
import type { Area } from './frame.ts';
import { fitted, runsWidth } from './glyph-widths.ts';
import { px, type Drawing, type LineShape, type Shape, type TextRun, type TextShape } from './shapes.ts';
import { mixed, styleOf, type StyleName } from './styles.ts';

export interface CloseUpOptions {
  width: number;
  height: number;
  style?: StyleName;
  prefix?: string;
}

/** Distance of the hatch lines of the metal along its sides, px. */
const HATCH = 7;

/**
 * A metal contact from near: the bands just under the metal, with the image force on the band that the carriers cross; beside them, on the same energies, T(E) on
 * a logarithmic scale and T f to its own largest value. A band across both shows the middle 80 % of the current, a line its peak.
 *
 * @throws {RangeError} no room
 */
export function drawCloseUp(closeUp: CloseUp, options: CloseUpOptions): Drawing {
  const { width, height, prefix = `closeup-${closeUp.side}` } = options;
  const style = styleOf(options.style ?? 'light');
  const frame = closeUpFrame(closeUp, style, { width, height, prefix });
  const { bands, passage } = frame;
  const box = (id: string, a: Area) => ({ id, x: a.left, y: a.top, w: a.right - a.left, h: a.bottom - a.top });
  return {
    width, height, background: style.ground, font: style.font, gradients: [],
    clips: [box(`${prefix}-bands`, bands), box(`${prefix}-passage`, passage)],
    shapes: [...currentBand(frame), ...metalBlock(frame), ...bandLines(frame), ...passing(frame), ...axes(frame), ...fermi(frame), ...barrierDimension(frame), ...names(frame), ...heading(frame, width)],
    title: closeUpTitle(closeUp),
    description: describeCloseUp(closeUp),
  };
}

function text(frame: CloseUpFrame, role: string, at: { x: number; y: number }, anchor: TextShape['anchor'], runs: TextRun[], more: Partial<TextShape> = {}): TextShape {
  return { kind: 'text', role, ...at, size: frame.small, anchor, runs, fill: frame.style.ink, ...more };
}

const symbol = (letter: string, sub: string): TextRun[] => [{ text: letter, italic: true }, { text: sub, script: 'sub' }];

/** Where the current goes through: the middle 80 %, and the peak. */
function currentBand(frame: CloseUpFrame): Shape[] {
  const { curve, bands, passage, style, y, small } = frame;
  if (curve === null || curve.peak_eV === null || curve.from_eV === null || curve.to_eV === null) return [];
  const [high, low] = [y(Math.max(curve.from_eV, curve.to_eV)), y(Math.min(curve.from_eV, curve.to_eV))];
  const title = `80 % of the current, from ${energyText(curve.from_eV)} to ${energyText(curve.to_eV)}`;
  const line: Omit<LineShape, 'y1' | 'y2'> = { kind: 'line', role: 'closeup-current-edge', x1: bands.left, x2: passage.right, stroke: style.choice, width: style.thinWidth, dash: '2 3' };
  const peak = y(curve.peak_eV);
  return [
    { kind: 'rect', role: 'closeup-current', title, x: bands.left, y: high, w: passage.right - bands.left, h: Math.max(low - high, 1), fill: mixed(style.ground, style.choice, 0.16) },
    { ...line, y1: high, y2: high },
    { ...line, y1: low, y2: low },
    { kind: 'line', role: 'closeup-peak', title: `most passes at ${energyText(curve.peak_eV)}`, x1: bands.left, x2: bands.right, y1: peak, y2: peak, stroke: style.choice, width: style.fermiWidth },
    { kind: 'line', role: 'closeup-peak', x1: passage.left, x2: passage.right, y1: peak, y2: peak, stroke: style.choice, width: style.fermiWidth },
    { kind: 'path', role: 'closeup-peak-mark', d: `M${px(passage.left)},${px(peak)}L${px(passage.left - 0.7 * small)},${px(peak - 0.4 * small)}L${px(passage.left - 0.7 * small)},${px(peak + 0.4 * small)}Z`, fill: style.choice },
  ];
}

/** Hatched up to the Fermi level. */
function metalBlock({ metal, style, y, closeUp, small }: CloseUpFrame): Shape[] {
  const top = Math.min(Math.max(y(0), metal.top), metal.bottom);
  let d = '';
  for (let c = metal.left + top + HATCH / 2; c < metal.right + metal.bottom; c += HATCH) {
    const from = Math.max(metal.left, c - metal.bottom);
    const to = Math.min(metal.right, c - top);
    if (to > from) d += `M${px(from)},${px(c - from)}L${px(to)},${px(c - to)}`;
  }
  const name = fitted(closeUp.metal ?? 'metal', small, metal.right - metal.left - 2);
  return [
    { kind: 'path', role: 'metal-hatch', title: `${closeUp.metal ?? 'metal'}, filled up to its Fermi level`, d, stroke: style.faint, width: style.thinWidth },
    { kind: 'line', role: 'metal-surface', x1: metal.right, x2: metal.right, y1: metal.top, y2: metal.bottom, stroke: style.ink, width: style.thinWidth },
    { kind: 'text', role: 'metal-name', x: (metal.left + metal.right) / 2, y: top - 0.5 * small, size: small, anchor: 'middle', runs: [{ text: name }], fill: style.ink },
  ];
}

/** Ec and Ev without the image force; the band on the way with it, heavier; interfaces upright. */
function bandLines(frame: CloseUpFrame): Shape[] {
  const { closeUp, curve, carrier, style, prefix, x, y, bands, depth } = frame;
  const { s_nm, ec_eV, ev_eV, layer } = closeUp.bands;
  const clip = `${prefix}-bands`;
  // One node beyond the edge, so that the line runs out of the picture.
  const end = s_nm.findIndex((s) => s > depth);
  const last = end < 0 ? s_nm.length - 1 : end;
  const path = (values: readonly number[]): string => polyline(lines(s_nm.slice(0, last + 1).map(x), values.slice(0, last + 1).map(y)), 'M');
  const shapes: Shape[] = [];
  for (let i = 1; i <= last; i++) {
    if (layer[i] !== layer[i - 1] && s_nm[i] < depth) shapes.push({ kind: 'line', role: 'interface', x1: x(s_nm[i]), x2: x(s_nm[i]), y1: bands.top, y2: bands.bottom, stroke: style.faint, width: style.thinWidth });
  }
  const bare = closeUp.imageForce && curve !== null && curve.way.s_nm.length > 0;
  const common = { kind: 'path', clip, join: 'round' } as const;
  const thin = { width: style.thinWidth * 1.4, dash: '5 3' };
  shapes.push(
    { ...common, role: 'valence-edge', title: 'valence band edge Ev', d: path(ev_eV), stroke: style.valence, ...(bare && carrier === 'holes' ? thin : { width: style.valenceWidth }) },
    { ...common, role: 'conduction-edge', title: 'conduction band edge Ec', d: path(ec_eV), stroke: style.conduction, ...(bare && carrier === 'electrons' ? thin : { width: style.edgeWidth }) },
  );
  if (bare) {
    const way = curve.way;
    const count = way.s_nm.findIndex((s) => s > depth);
    const upTo = count < 0 ? way.s_nm.length : count + 1;
    shapes.push({ ...common, role: 'closeup-way', title: `the band that ${carrier} cross, image force included`, d: polyline(lines(way.s_nm.slice(0, upTo).map(x), way.band_eV.slice(0, upTo).map((e) => heldFar(frame, y(e)))), 'M'), stroke: carrier === 'electrons' ? style.conduction : style.valence, width: carrier === 'electrons' ? style.edgeWidth : style.valenceWidth });
  }
  return shapes;
}

/** The image force runs to infinity at the metal: far outside is far enough. */
const heldFar = ({ bands }: CloseUpFrame, at: number): number => Math.min(Math.max(at, bands.top - 200), bands.bottom + 200);

/** Thinned within rising stretches only: at an interface a distance stands twice. */
function lines(xs: number[], ys: number[]): Points {
  const out: Points = { x: [], y: [] };
  let from = 0;
  for (let i = 1; i <= xs.length; i++) {
    if (i < xs.length && xs[i] > xs[i - 1]) continue;
    const run = thinned({ x: xs.slice(from, i), y: ys.slice(from, i) });
    out.x.push(...run.x);
    out.y.push(...run.y);
    from = i;
  }
  return out;
}

/** T(E) as a line on decades, T f as an area to its own largest value. */
function passing(frame: CloseUpFrame): Shape[] {
  const { curve, passage, style, prefix, y, xT, carrier } = frame;
  const clip = `${prefix}-passage`;
  if (curve === null) return [];
  const most = Math.max(...curve.product);
  const room = passage.right - passage.left;
  const ys = curve.energy_eV.map(y);
  const shapes: Shape[] = [];
  if (most > 0) {
    const area = thinnedUpright(ys, curve.product.map((p) => passage.left + (0.96 * room * p) / most));
    const d = `M${px(passage.left)},${px(area.y[0])}${polyline(area, 'L')}L${px(passage.left)},${px(area.y[area.y.length - 1])}Z`;
    shapes.push({ kind: 'path', role: 'closeup-product', title: `T f of ${carrier}, to its own largest value`, d, fill: mixed(style.ground, style.occupancy, 1.4 * style.fullTint), stroke: style.occupancy, width: style.thinWidth, clip });
  }
  const t = thinnedUpright(ys, curve.transmission.map(xT));
  shapes.push({ kind: 'path', role: 'closeup-transmission', title: `T(E) of ${carrier}, logarithmic`, d: polyline(t, 'M'), stroke: style.ink, width: 0.8 * style.edgeWidth, dash: '7 3', clip, join: 'round' });
  if (topShows(frame, curve)) shapes.push({ kind: 'line', role: 'closeup-top', title: `top of the barrier, ${energyText(curve.top_eV)}`, x1: passage.left, x2: passage.right, y1: y(curve.top_eV), y2: y(curve.top_eV), stroke: style.faint, width: style.thinWidth, dash: '1 3' });
  return shapes;
}

function topShows({ domain, small, y }: CloseUpFrame, { top_eV, edge_eV }: CarrierCloseUp): boolean {
  return top_eV > domain[0] && top_eV < domain[1] && Math.abs(y(top_eV) - y(edge_eV)) > small;
}

/** Curves that run upwards are thinned along x. */
function thinnedUpright(ys: number[], xs: number[]): Points {
  const { x, y } = thinned({ x: ys, y: xs });
  return { x: y, y: x };
}

function axes(frame: CloseUpFrame): Shape[] {
  const { bands, passage, metal, style, small, x, y, xT } = frame;
  const line = { kind: 'line', role: 'closeup-axis', stroke: style.faint, width: style.thinWidth } as const;
  const ticks = closeUpTicks(frame);
  const shapes: Shape[] = [
    { ...line, x1: metal.left, x2: metal.left, y1: metal.top, y2: metal.bottom },
    { ...line, x1: bands.left, x2: bands.right, y1: bands.bottom, y2: bands.bottom },
    { ...line, x1: bands.right, x2: bands.right, y1: bands.top, y2: bands.bottom },
    { ...line, x1: passage.left, x2: passage.right, y1: passage.bottom, y2: passage.bottom },
    { ...line, x1: passage.left, x2: passage.left, y1: passage.top, y2: passage.bottom },
  ];
  for (const tick of ticks.energy) {
    shapes.push({ ...line, x1: metal.left - 5, x2: metal.left, y1: y(tick.at), y2: y(tick.at) });
    shapes.push(text(frame, 'energy-tick', { x: metal.left - 7, y: y(tick.at) + 0.36 * small }, 'end', [{ text: tick.text }]));
  }
  for (const tick of ticks.depth) {
    shapes.push({ ...line, x1: x(tick.at), x2: x(tick.at), y1: bands.bottom, y2: bands.bottom + 5 });
    shapes.push(text(frame, 'depth-tick', { x: x(tick.at), y: bands.bottom + 6 + small }, 'middle', [{ text: tick.text }]));
  }
  for (const decade of ticks.decades) {
    const at = xT(10 ** decade);
    shapes.push({ ...line, x1: at, x2: at, y1: passage.bottom, y2: passage.bottom + 5 });
    shapes.push(text(frame, 'transmission-tick', { x: at, y: passage.bottom + 6 + small }, 'middle', decade === 0 ? [{ text: '1' }] : [{ text: '10' }, { text: String(decade).replace('-', '−'), script: 'super' }]));
  }
  const under = bands.bottom + 2.6 * small;
  shapes.push(text(frame, 'depth-title', { x: (bands.left + bands.right) / 2, y: under }, 'middle', [{ text: 'from the metal (nm)' }]));
  shapes.push(text(frame, 'transmission-title', { x: (passage.left + passage.right) / 2, y: under }, 'middle', [{ text: 'T', italic: true }, { text: '(' }, { text: 'E', italic: true }, { text: ')' }]));
  shapes.push(text(frame, 'energy-title', { x: 1.1 * small, y: (bands.top + bands.bottom) / 2 }, 'middle', [{ text: 'energy (eV)' }], { rotate: -90 }));
  return shapes;
}

/** Across both pictures, with the gap between them left to the names. */
function fermi({ metal, bands, passage, style, y }: CloseUpFrame): Shape[] {
  const line = { kind: 'line', role: 'fermi-level', y1: y(0), y2: y(0), stroke: style.ink, width: style.fermiWidth, dash: style.fermiDash } as const;
  return [{ ...line, title: 'Fermi level', x1: metal.left, x2: bands.right }, { ...line, x1: passage.left, x2: passage.right }];
}

/** The barrier from EF to the band at the metal; beside it what the image force takes off. */
function barrierDimension(frame: CloseUpFrame): Shape[] {
  const { closeUp, carrier, curve, bands, style, small, y } = frame;
  const height = drawnBarrier(closeUp, carrier);
  const size = carrier === 'electrons' ? closeUp.barrier_n_eV : closeUp.barrier_p_eV;
  const at = bands.left + 0.5 * (bands.right - bands.left);
  const [from, to] = [y(0), y(height)];
  const faint = { kind: 'line', role: 'dimension-extension', stroke: style.faint, width: style.thinWidth } as const;
  const label: TextRun[] = [...symbol('φ', carrier === 'electrons' ? 'Bn' : 'Bp'), { text: ` ${energyText(size)}` }];
  const shapes: Shape[] = [{ ...faint, x1: bands.left, x2: at + 4, y1: to, y2: to }, ...arrowed(at, from, to, style.ink, style.thinWidth, small)];
  shapes.push(...onPaper(frame, 'dimension-figure', { x: at + 6, y: (from + to) / 2 + 0.36 * small }, label));
  if (!closeUp.imageForce || curve === null || curve.way.s_nm.length === 0) return shapes;
  const taken = Math.abs(height) - Math.abs(curve.top_eV);
  // A way whose highest point is not that of the surface says nothing of the image force.
  if (!(taken > 0) || Math.sign(height) !== Math.sign(curve.top_eV) || taken > Math.abs(height) / 1.05) return shapes;
  const top = y(curve.top_eV);
  const beside = bands.left + 0.28 * (bands.right - bands.left);
  shapes.push({ ...faint, x1: bands.left, x2: beside + 4, y1: top, y2: top });
  const outside = carrier === 'electrons' ? Math.min(to, top) - 0.6 * small : Math.max(to, top) + 1.3 * small;
  shapes.push(...onPaper(frame, 'lowering-figure', { x: bands.left + 4, y: outside }, [{ text: 'Δ' }, { text: 'φ', italic: true }, { text: ` ${energyText(taken)}` }]));
  return shapes;
}

function arrowed(x: number, from: number, to: number, ink: string, width: number, small: number): Shape[] {
  const up = to < from;
  const head = (tip: number, rising: boolean): string => {
    const base = tip + (rising ? 1 : -1) * 0.6 * small;
    return `M${px(x)},${px(tip)}L${px(x - 0.22 * small)},${px(base)}L${px(x + 0.22 * small)},${px(base)}Z`;
  };
  const shapes: Shape[] = [{ kind: 'line', role: 'dimension-line', x1: x, x2: x, y1: from, y2: to, stroke: ink, width }];
  if (Math.abs(to - from) > 1.4 * small) shapes.push({ kind: 'path', role: 'dimension-arrow', d: head(to, up) + head(from, !up), fill: ink });
  return shapes;
}

/** A text on a patch of paper, kept within the bands. */
function onPaper(frame: CloseUpFrame, role: string, { x, y }: { x: number; y: number }, runs: TextRun[]): Shape[] {
  const { bands, small, style } = frame;
  const w = runsWidth(runs, small);
  const left = Math.max(bands.left + 2, Math.min(x, bands.right - w - 2));
  const base = Math.max(bands.top + small, Math.min(y, bands.bottom - 0.4 * small));
  return [{ kind: 'rect', role: `${role}-ground`, x: left - 2, y: base - small, w: w + 4, h: 1.4 * small, fill: style.ground, opacity: 0.88 }, text(frame, role, { x: left, y: base }, 'start', runs)];
}

/** E_C, E_F and E_V between the two pictures, pushed apart; T and T f in theirs. */
function names(frame: CloseUpFrame): Shape[] {
  const { closeUp, bands, passage, style, small, y, depth, domain, curve } = frame;
  const { s_nm, ec_eV, ev_eV } = closeUp.bands;
  const end = s_nm.findIndex((s) => s >= depth);
  const node = end < 0 ? s_nm.length - 1 : end;
  const wanted = [
    { role: 'label-conduction', runs: symbol('E', 'C'), fill: style.conduction, e: ec_eV[node] },
    { role: 'label-fermi', runs: symbol('E', 'F'), fill: style.ink, e: 0 },
    { role: 'label-valence', runs: symbol('E', 'V'), fill: style.valence, e: ev_eV[node] },
  ].filter(({ e }) => e > domain[0] && e < domain[1]).map((label) => ({ ...label, at: y(label.e) })).sort((a, b) => a.at - b.at);
  for (let i = 1; i < wanted.length; i++) wanted[i].at = Math.max(wanted[i].at, wanted[i - 1].at + 1.3 * small);
  const shapes: Shape[] = wanted.map(({ role, runs, fill, at }) => text(frame, role, { x: bands.right + 3, y: Math.min(at, bands.bottom) + 0.34 * small }, 'start', runs, { fill, weight: 'bold' }));
  if (curve === null) {
    shapes.push(text(frame, 'closeup-nothing', { x: (passage.left + passage.right) / 2, y: passage.top + 2 * small }, 'middle', [{ text: fitted('no way through', small, passage.right - passage.left) }]));
    return shapes;
  }
  shapes.push(text(frame, 'label-product', { x: passage.right - 2, y: passage.bottom - 0.6 * small }, 'end', [{ text: 'T f', italic: true }], { fill: style.occupancy, weight: 'bold' }));
  shapes.push(text(frame, 'label-transmission', { x: passage.right - 2, y: passage.top - 0.4 * small }, 'end', [{ text: 'T', italic: true }], { weight: 'bold' }));
  return shapes;
}

function heading(frame: CloseUpFrame, width: number): Shape[] {
  const { closeUp, small } = frame;
  const words = `${closeUpTitle(closeUp)}, ${Number(closeUp.temperature_K.toPrecision(4))} K`;
  return [text(frame, 'heading', { x: frame.metal.left, y: 1.3 * small }, 'start', [{ text: fitted(words, small * 1.1, width - frame.metal.left - 3 * small) }], { weight: 'bold' })];
}
