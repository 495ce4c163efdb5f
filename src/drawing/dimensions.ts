import type { ContactResult, JunctionResult, Result } from '../result/types.ts';
import { energyText } from './figures.ts';
import type { Frame } from './frame.ts';
import { nodesOfLayers } from './layer-nodes.ts';
import type { TextRun } from './shapes.ts';

/** A measured distance between two energies, before it has found its place. */
export interface Dimension {
  /** e.g. "builtin:0" (junction by its upper layer's index), "barrier-n:top" */ id: string;
  /** "qVbi" */ label: string;
  /** "0.853 eV" */ value: string;
  /** the symbol as drawn */ symbol: TextRun[];
  /** eV, low < high */ low: number;
  high: number;
  /** px where the curve has the low and the high energy: extension lines start here */ lowX: number;
  highX: number;
  /** px where the line may stand, best first */ places: number[];
  /** what is measured, in words */ meaning: string;
}

/** Below this an offset or a bending is no more than the rounding of its inputs, eV. */
const LEAST = 5e-4;
/** Shorter lines cannot be read, px; zoomed in they come. */
const SHORTEST = 4;
/** How near to its neutral value Ec has to come, eV: a share of the built-in potential, held between two bounds. */
const NEUTRAL = { share: 0.02, least: 1e-4, most: 0.01 };

/** All dimension lines that the result calls for, the most wanted first. */
export function dimensionsOf(frame: Frame): Dimension[] {
  const { result } = frame;
  const all = [
    ...result.contacts.flatMap((contact) => barriers(frame, contact)),
    ...result.junctions.flatMap((junction, i) => builtIn(frame, junction, i)),
    ...result.junctions.flatMap((junction, i) => offsets(frame, junction, i)),
    ...gap(frame),
  ];
  return all.filter((d) => d.high - d.low >= LEAST && inView(frame, d));
}

function inView(frame: Frame, d: Dimension): boolean {
  const [low, high] = frame.energy.domain;
  return d.low >= low && d.high <= high && d.places.length > 0 && frame.energy.y(d.low) - frame.energy.y(d.high) >= SHORTEST;
}

function symbol(letter: string, sub: string, before = ''): TextRun[] {
  const runs: TextRun[] = [{ text: letter, italic: true }, { text: sub, script: 'sub' }];
  return before === '' ? runs : [{ text: before }, ...runs];
}

/** phi_Bn from the metal's Fermi level up to Ec, phi_Bp from Ev up to it, in the metal's lane; at a pinned surface just inside. */
function barriers(frame: Frame, contact: ContactResult): Dimension[] {
  const { area, lanes, result, depth } = frame;
  if (contact.kind !== 'barrier' && contact.kind !== 'pinned') return [];
  const top = contact.side === 'top';
  const edge = top ? depth.edges[0] : depth.edges[depth.edges.length - 1];
  if (edge < area.left - 0.5 || edge > area.right + 0.5) return [];
  const lane = lanes[contact.side];
  const inside = top ? [14, 30, 60] : [-14, -30, -60];
  const places = lane > 0 ? [edge + (top ? -0.5 : 0.5) * lane] : inside.map((dx) => edge + dx);
  const ef = result.profile.ef_eV[top ? 0 : result.profile.ef_eV.length - 1];
  const found: Dimension[] = [];
  const where = `${top ? 'top' : 'bottom'} ${contact.kind === 'pinned' ? 'surface' : 'contact'}`;
  if (contact.barrier_n_eV !== null) {
    const h = contact.barrier_n_eV;
    found.push({
      id: `barrier-n:${contact.side}`, label: 'φBn', value: energyText(h), symbol: symbol('φ', 'Bn'), low: Math.min(ef, ef + h), high: Math.max(ef, ef + h), lowX: edge, highX: edge, places,
      meaning: `barrier of electrons at the ${where}`,
    });
  }
  if (contact.barrier_p_eV !== null) {
    const h = contact.barrier_p_eV;
    found.push({
      id: `barrier-p:${contact.side}`, label: 'φBp', value: energyText(h), symbol: symbol('φ', 'Bp'), low: Math.min(ef, ef - h), high: Math.max(ef, ef - h), lowX: edge, highX: edge, places,
      meaning: `barrier of holes at the ${where}`,
    });
  }
  return found;
}

/**
 * q Vbi against Ec: from the neutral Ec of the layer above, carried over the offset, to the neutral Ec of the layer below. Only where Ec comes to
 * its neutral value in both: a layer that is depleted throughout has no level in the picture to measure from.
 */
function builtIn(frame: Frame, junction: JunctionResult, i: number): Dimension[] {
  const { result, depth } = frame;
  const [above, below] = [result.layers[i], result.layers[i + 1]];
  if (junction.builtin_V === null || above.insulator || below.insulator) return [];
  const ef = result.profile.ef_eV[0] ?? 0;
  const end = ef + below.ec_minus_ef_eV;
  const start = end + junction.builtin_V;
  // In graded layers the figure refers to values at the interface, the neutral level to the middle: no line in the picture is that long.
  if (Math.abs(ef + above.ec_minus_ef_eV + junction.delta_ec_eV - start) > NEUTRAL.most) return [];
  const startX = nearestAt(frame, i, ef + above.ec_minus_ef_eV, junction.builtin_V, 'last');
  const endX = nearestAt(frame, i + 1, end, junction.builtin_V, 'first');
  if (startX === null || endX === null) return [];
  // Beyond an offset the level of the layer above stands on no curve of its own: its extension starts at the interface.
  const edgeX = Math.abs(junction.delta_ec_eV) < LEAST ? startX : depth.edges[i + 1];
  const places = within(frame, i + 1, [0.5, 0.65, 0.35, 0.8, 0.2]);
  const rises = start > end;
  return [
    {
      id: `builtin:${i}`, label: 'qVbi', value: energyText(Math.abs(junction.builtin_V)), symbol: symbol('V', 'bi', 'q'),
      low: Math.min(start, end), high: Math.max(start, end), lowX: rises ? endX : edgeX, highX: rises ? edgeX : endX, places,
      meaning: `built-in potential between ${junction.above} and ${junction.below}`,
    },
  ];
}

/** Delta Ec and Delta Ev across an interface. */
function offsets(frame: Frame, junction: JunctionResult, i: number): Dimension[] {
  const { result, depth } = frame;
  const x = depth.edges[i + 1];
  if (x < frame.area.left || x > frame.area.right) return [];
  const nodes = nodesOfLayers(result);
  // Beyond the next interface it would seem to belong to that one.
  const [left, right] = [Math.max(frame.area.left, depth.edges[i]), Math.min(frame.area.right, depth.edges[i + 2])];
  const places = [16, -16, 30, -30, 48, -48, 70, -70].map((dx) => x + dx).filter((at) => at > left + 4 && at < right - 4);
  const [a, b] = [nodes[i][1], nodes[i + 1][0]];
  const one = (id: string, label: string, sub: string, edges: number[], words: string): Dimension => ({
    id, label, value: energyText(Math.abs(edges[b] - edges[a])), symbol: symbol('E', sub, 'Δ'),
    low: Math.min(edges[a], edges[b]), high: Math.max(edges[a], edges[b]), lowX: x, highX: x, places, meaning: `${words} of ${junction.above} and ${junction.below}`,
  });
  return [
    one(`dec:${i}`, 'ΔEc', 'C', result.profile.ec_eV, 'conduction band offset'),
    one(`dev:${i}`, 'ΔEv', 'V', result.profile.ev_eV, 'valence band offset'),
  ];
}

/** The gap of the first layer that is no insulator. */
function gap(frame: Frame): Dimension[] {
  const { result, depth } = frame;
  const i = result.layers.findIndex((layer) => !layer.insulator);
  if (i < 0) return [];
  return within(frame, i, [0.5, 0.3, 0.7]).slice(0, 1).flatMap((x) => {
    const node = nodeAt(result, depth.depth(x), i);
    if (node < 0) return [];
    const [low, high] = [result.profile.ev_eV[node], result.profile.ec_eV[node]];
    const at = depth.x(result.profile.z_nm[node]);
    return [{ id: `gap:${i}`, label: 'Eg', value: energyText(high - low), symbol: symbol('E', 'g'), low, high, lowX: at, highX: at, places: [at], meaning: `band gap of ${result.layers[i].name}` }];
  });
}

/** px at the given shares of the visible part of a layer; none where it is narrower than 24 px. */
function within(frame: Frame, layer: number, shares: number[]): number[] {
  const left = Math.max(frame.depth.edges[layer], frame.area.left);
  const right = Math.min(frame.depth.edges[layer + 1], frame.area.right);
  return right - left < 24 ? [] : shares.map((share) => left + share * (right - left));
}

/** px of the node nearest to the interface (the last or the first of the layer) at which Ec has come to its neutral level; null where it never does. */
function nearestAt(frame: Frame, layer: number, level: number, builtIn: number, from: 'first' | 'last'): number | null {
  const { result, depth } = frame;
  const near = Math.min(NEUTRAL.most, Math.max(NEUTRAL.least, NEUTRAL.share * Math.abs(builtIn)));
  const [first, last] = nodesOfLayers(result)[layer];
  const step = from === 'first' ? 1 : -1;
  for (let i = from === 'first' ? first : last; i >= first && i <= last; i += step) {
    if (Math.abs(result.profile.ec_eV[i] - level) < near) return depth.x(result.profile.z_nm[i]);
  }
  return null;
}

function nodeAt(result: Result, z_nm: number, layer: number): number {
  const [first, last] = nodesOfLayers(result)[layer];
  let best = -1;
  for (let i = first; i <= last; i++) {
    if (best < 0 || Math.abs(result.profile.z_nm[i] - z_nm) < Math.abs(result.profile.z_nm[best] - z_nm)) best = i;
  }
  return best;
}
