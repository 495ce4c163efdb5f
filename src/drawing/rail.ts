import { BOLTZMANN } from '../../solver/constants.ts';
import type { Result } from '../result/types.ts';
import { energyDistribution, statesDistribution } from './band-filling.ts';
import { polyline, thinned, type Points } from './curve.ts';
import { layerEdges } from './depth-axis.ts';
import type { EnergyAxis } from './energy-axis.ts';
import { densityRuns, energyText, lengthText, spoken } from './figures.ts';
import { runsWidth, textWidth } from './glyph-widths.ts';
import { fermi } from './marks/occupancy.ts';
import { px, type Drawing, type Shape, type TextRun, type TextShape } from './shapes.ts';
import { mixed, styleOf, type Style, type StyleName } from './styles.ts';
import { valueAt } from './traces.ts';

export interface RailOptions {
  width: number;
  height: number;
  /** the plate's */ energy: EnergyAxis;
  style: StyleName;
  prefix?: string;
}

/** f = 90 % and 10 % lie at -+ ln 9 kT from EF. */
const TENTHS = Math.log(9);

export interface Here {
  /** nm, within the stack */ z: number;
  layer: number;
  ec: number;
  ev: number;
  ef: number;
  n: number;
  p: number;
  kT: number;
}

/** What the curves of one rail share. */
interface Rail {
  style: Style;
  energy: EnergyAxis;
  left: number;
  right: number;
  top: number;
  bottom: number;
  small: number;
  clip: string;
}

/**
 * f(E), g(E) and g f at one depth, on the plate's energy axis. f runs from 0 to 1 over the width; g of the two bands shares one scale; g f of electrons and g (1 - f) of holes
 * are each drawn to their own largest value, since they differ by powers of ten: their integrals n and p are written in.
 *
 * @param depth_nm  held within the stack; at an interface the layer above it
 */
export function drawRail(result: Result, depth_nm: number, options: RailOptions): Drawing {
  const style = styleOf(options.style);
  const { width, height, energy } = options;
  const prefix = options.prefix ?? 'rail';
  const [top, bottom] = [Math.min(...energy.range), Math.max(...energy.range)];
  const rail: Rail = { style, energy, left: 8, right: width - 8, top, bottom, small: style.smallSize, clip: `${prefix}-area` };
  const here = hereAt(result, depth_nm);
  const { z } = here;
  const layer = result.layers[here.layer];
  return {
    width, height, background: style.ground, font: style.font,
    shapes: [...frameMarks(rail), ...densities(rail, result, here), ...occupancyCurve(rail, here), ...fermiMark(rail, here), ...figures(rail, here, z, height)],
    gradients: [],
    clips: [{ id: rail.clip, x: rail.left, y: top, w: rail.right - rail.left, h: bottom - top }],
    title: `Occupancy at ${lengthText(z)}, in ${layer.name}`,
    description:
      `At ${lengthText(z)} in ${layer.name}: Ec ${energyText(here.ec)}, Ev ${energyText(here.ev)}, Fermi level ${energyText(here.ef)}; ${spoken(here.n)} electrons and ${spoken(here.p)} holes per cubic centimetre. ` +
      `Half of the states at the Fermi level are filled; from 90 % to 10 % filled takes 4.39 kT, ${energyText(2 * TENTHS * here.kT)}.`,
  };
}

/** Bands, Fermi level, eV, and carriers, cm^-3, at a depth in nm, held within the stack; at an interface the layer above it. */
export function hereAt(result: Result, depth_nm: number): Here {
  const { profile } = result;
  const edges = layerEdges(result);
  const z = Math.min(Math.max(depth_nm, 0), edges[edges.length - 1]);
  let layer = 0;
  while (layer < result.layers.length - 1 && z > edges[layer + 1]) layer++;
  const at = (values: number[]): number => valueAt(result, values, Math.min(Math.max(z, profile.z_nm[0]), profile.z_nm[profile.z_nm.length - 1]));
  return { z, layer, ec: at(profile.ec_eV), ev: at(profile.ev_eV), ef: at(profile.ef_eV), n: at(profile.n_cm3), p: at(profile.p_cm3), kT: BOLTZMANN * result.conditions.temperature_K };
}

function frameMarks(r: Rail): Shape[] {
  const line = { kind: 'line', role: 'rail-axis', stroke: r.style.faint, width: r.style.thinWidth } as const;
  return [
    { ...line, x1: r.left, x2: r.left, y1: r.top, y2: r.bottom },
    { ...line, x1: r.right, x2: r.right, y1: r.top, y2: r.bottom },
    { ...line, x1: r.left, x2: r.right, y1: r.bottom, y2: r.bottom },
  ];
}

/** Energies at every px of the rail and at the multiples of kT about EF, rising: f is sharp at low temperature. */
function energies(r: Rail, here: Here): number[] {
  const all: number[] = [];
  for (let y = r.bottom; y >= r.top; y -= 1) all.push(r.energy.energy(y));
  for (let u = -8; u <= 8; u += 0.25) all.push(here.ef + u * here.kT);
  return all.filter((e) => e >= r.energy.energy(r.bottom) && e <= r.energy.energy(r.top)).sort((a, b) => a - b);
}

function occupancyCurve(r: Rail, here: Here): Shape[] {
  const p: Points = { x: [], y: [] };
  for (const e of energies(r, here)) {
    p.x.push(r.left + (r.right - r.left) * fermi((e - here.ef) / here.kT));
    p.y.push(r.energy.y(e));
  }
  return [{ kind: 'path', role: 'rail-occupancy', title: 'f(E), share of states filled, 0 to 1', d: polyline(p, 'M'), stroke: r.style.occupancy, width: r.style.edgeWidth * 0.8, clip: r.clip, join: 'round' }];
}

/** g(E) as lines, g f and g (1 - f) as areas. */
function densities(r: Rail, result: Result, here: Here): Shape[] {
  const layer = result.layers[here.layer];
  if (layer.insulator) return [];
  const bands = [
    { word: 'electrons', sign: 1, edge: here.ec, states: layer.nc_cm3, alpha: layer.kane_n_per_eV, color: r.style.conduction },
    { word: 'holes', sign: -1, edge: here.ev, states: layer.nv_cm3, alpha: layer.kane_p_per_eV, color: r.style.valence },
  ].filter((band) => band.states > 0);
  const curves = bands.map((band) => bandCurves(r, here, band.sign, band.edge, band.states, band.alpha * here.kT));
  const largest = Math.max(...curves.map((c) => c.largest), Number.MIN_VALUE);
  return curves.flatMap((curve, i): Shape[] => {
    if (curve.y.length < 2) return [];
    const { word, color } = bands[i];
    const room = r.right - r.left;
    const states = thinned({ x: curve.y, y: curve.states.map((v) => r.left + (room * 0.92 * v) / largest) });
    const peak = Math.max(...curve.logFilled);
    const filled = thinned({ x: curve.y, y: curve.logFilled.map((v) => r.left + room * 0.92 * Math.exp(v - peak)) });
    const area = `M${px(r.left)},${px(filled.x[0])}${polyline({ x: filled.y, y: filled.x }, 'L')}L${px(r.left)},${px(filled.x[filled.x.length - 1])}Z`;
    return [
      { kind: 'path', role: `rail-${word}`, title: `${word} per energy, to their own largest value`, d: area, fill: mixed(r.style.ground, r.style.occupancy, 1.4 * r.style.fullTint), stroke: color, width: r.style.thinWidth, clip: r.clip },
      { kind: 'path', role: `rail-states-${word}`, title: `g(E), states for ${word}`, d: polyline({ x: states.y, y: states.x }, 'M'), stroke: color, width: r.style.fermiWidth, dash: word === 'holes' ? '5 2' : undefined, clip: r.clip },
    ];
  });
}

function bandCurves(r: Rail, here: Here, sign: number, edge: number, states: number, a: number): { y: number[]; states: number[]; logFilled: number[]; largest: number } {
  const eta = (sign * (here.ef - edge)) / here.kT;
  const out = { y: [] as number[], states: [] as number[], logFilled: [] as number[], largest: 0 };
  const all = [edge + sign * 1e-9, ...energies(r, here), ...[0.02, 0.1, 0.25, 0.5, 0.75, 1, 1.5, 2, 3, 4, 6, 8].map((s) => edge + sign * s * here.kT)];
  const [low, high] = [r.energy.energy(r.bottom), r.energy.energy(r.top)];
  for (const e of all.filter((value) => sign * (value - edge) > 0 && value >= low && value <= high).sort((p, q) => sign * (p - q))) {
    const s = (sign * (e - edge)) / here.kT;
    const g = states * Math.exp(statesDistribution(s, a));
    out.y.push(r.energy.y(e));
    out.states.push(g);
    out.logFilled.push(energyDistribution(s, eta, a));
    out.largest = Math.max(out.largest, g);
  }
  return out;
}

/** EF with the half-occupancy mark, and the bracket of the thermal width. */
function fermiMark(r: Rail, here: Here): Shape[] {
  const y = r.energy.y(here.ef);
  if (y < r.top || y > r.bottom) return [];
  const { style, small } = r;
  const middle = (r.left + r.right) / 2;
  const half = Math.abs(r.energy.y(here.ef + TENTHS * here.kT) - y);
  const ink = { stroke: style.ink, width: style.thinWidth } as const;
  const x = r.right - 4;
  const bracket = `M${px(x - 5)},${px(y - half)}L${px(x)},${px(y - half)}L${px(x)},${px(y + half)}L${px(x - 5)},${px(y + half)}`;
  // In the gap where it has room for two lines, so that the figure stands clear of the carriers; above EF where neither side has.
  const height = 2.7 * small;
  const above = Math.min(y - half, r.energy.y(here.ev));
  const under = Math.max(y + half, r.energy.y(here.ec));
  const [up, down] = [above - r.energy.y(here.ec), r.energy.y(here.ev) - under];
  const first = down > height && down > up ? under + 1.3 * small : Math.max(above, r.top + height) - height + 1.1 * small;
  const width = textWidth('90…10 %: 4.39 kT', small);
  const note = (runs: TextRun[], dy: number): Shape => ({ kind: 'text', role: 'rail-width-figure', x: x - 8, y: first + dy, size: small, anchor: 'end', runs, fill: style.ink });
  return [
    { kind: 'line', role: 'rail-fermi-level', title: 'Fermi level', x1: r.left, x2: r.right, y1: y, y2: y, stroke: style.ink, width: style.fermiWidth, dash: style.fermiDash },
    { kind: 'path', role: 'rail-half', title: 'half of the states filled', d: `M${px(middle)},${px(y - 5)}L${px(middle + 5)},${px(y)}L${px(middle)},${px(y + 5)}L${px(middle - 5)},${px(y)}Z`, fill: style.ground, stroke: style.choice, width: 2 },
    { kind: 'path', role: 'rail-thermal-width', title: `from 90 % to 10 % filled: 4.39 kT, ${energyText(2 * TENTHS * here.kT)}`, d: bracket, ...ink },
    { kind: 'rect', role: 'rail-width-ground', x: x - 10 - width, y: first - 1.05 * small, w: width + 4, h: 2.6 * small, fill: style.ground, opacity: 0.85 },
    note([{ text: '90…10 %: 4.39 ' }, { text: 'kT', italic: true }], 0),
    note([{ text: `= ${energyText(2 * TENTHS * here.kT)}` }], 1.2 * small),
  ];
}

/** Scale of f, the depth, and the integrals of the two areas. */
function figures(r: Rail, here: Here, z: number, height: number): Shape[] {
  const { style, small } = r;
  const text = (role: string, x: number, y: number, anchor: 'start' | 'middle' | 'end', runs: TextRun[], fill = style.ink): TextShape => ({ kind: 'text', role, x, y, size: small, anchor, runs, fill });
  const density = (letter: string, value: number): TextRun[] => [{ text: letter, italic: true }, { text: ' ' }, ...densityRuns(value), { text: ' cm' }, { text: '−3', script: 'super' }];
  const grounded = (shape: TextShape): Shape[] => {
    const w = runsWidth(shape.runs, small) + 4;
    return [{ kind: 'rect', role: 'rail-figure-ground', x: shape.x - w + 2, y: shape.y - 1.1 * small, w, h: 1.4 * small, fill: style.ground, opacity: 0.85 }, shape];
  };
  const below = r.bottom + 1.3 * small;
  const shapes: Shape[] = [
    text('rail-scale', r.left, below, 'start', [{ text: '0' }]),
    text('rail-scale', (r.left + r.right) / 2, below, 'middle', [{ text: 'f', italic: true }, { text: '(' }, { text: 'E', italic: true }, { text: ')' }], style.occupancy),
    text('rail-scale', r.right, below, 'end', [{ text: '1' }]),
    ...grounded(text('rail-electrons-figure', r.right - 6, r.top + 1.3 * small, 'end', density('n', here.n), style.conduction)),
    ...grounded(text('rail-holes-figure', r.right - 6, r.bottom - 0.6 * small, 'end', density('p', here.p), style.valence)),
  ];
  const rows: TextRun[][] = [[{ text: 'lines ' }, { text: 'g', italic: true }, { text: ', areas ' }, { text: 'g f', italic: true }], [{ text: `at ${lengthText(z)}` }]];
  rows.forEach((runs, i) => {
    const y = below + (i + 1) * 1.4 * small;
    if (y < height - 2) shapes.push(text(i === 0 ? 'rail-key' : 'rail-depth', (r.left + r.right) / 2, y, 'middle', runs));
  });
  return shapes;
}
