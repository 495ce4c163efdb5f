import { BOLTZMANN } from '../../solver/constants.ts';
import { ticks as evenTicks } from 'd3-array';
import type { CarrierCloseUp, CloseUp } from '../contacts/close-up.ts';
import { writeNumber } from '../quantity/write-quantity.ts';
import { carrierShown } from './contact-closeup-words.ts';
import type { Area } from './frame.ts';
import type { Style } from './styles.ts';

/** Everything that the marks of a close-up need to place themselves. Lengths in px. */
export interface CloseUpFrame {
  closeUp: CloseUp;
  carrier: 'electrons' | 'holes';
  curve: CarrierCloseUp | null;
  style: Style;
  small: number;
  /** the metal's block */ metal: Area;
  /** bands against the distance from the metal */ bands: Area;
  /** what passes, on the same energies */ passage: Area;
  /** eV */ domain: readonly [number, number];
  y(e_eV: number): number;
  /** nm from the metal */ depth: number;
  x(s_nm: number): number;
  /** lowest decade of T that is shown */ decade: number;
  /** x of a transmission, held within the passage */ xT(transmission: number): number;
  prefix: string;
}

/** Bending that is left, of the whole, where the picture ends, and how much room is left behind. */
const SETTLED = 0.04;
const BEHIND = 1.25;
const LEAST_DEPTH = 2;
/** nm, where no barrier says how far to look */ const USUAL_DEPTH = 20;
/** Energies shown beyond the barrier's top and EF, kT. */
const ABOVE = 6;
const MARGIN = 0.1;
/** Decades of T below that of the middle of the current. */
const BELOW = 3;
const LOWEST = -60;

/** @throws {RangeError} no room */
export function closeUpFrame(closeUp: CloseUp, style: Style, { width, height, prefix }: { width: number; height: number; prefix: string }): CloseUpFrame {
  const small = style.smallSize;
  const { words: carrier, curve } = carrierShown(closeUp);
  const narrow = width < 520 * (style.textSize / 12);
  const top = 2.4 * small;
  const bottom = height - 3.2 * small;
  const left = 4.6 * small;
  const lane = narrow ? 2.4 * small : 4.6 * small;
  const gap = 2.4 * small;
  const room = width - left - lane - gap - 1.2 * small;
  const share = narrow ? 0.6 : 0.62;
  const bands: Area = { left: left + lane, right: left + lane + share * room, top, bottom };
  const passage: Area = { left: bands.right + gap, right: width - 1.2 * small, top, bottom };
  if (!(passage.right - passage.left >= 50 && bottom - top >= 80)) throw new RangeError(`no room for a close-up: ${width} by ${height} px`);
  const domain = energyWindow(closeUp, carrier, curve);
  const depth = depthShown(closeUp, carrier, curve);
  const decade = lowestDecade(curve);
  return {
    closeUp, carrier, curve, style, small, bands, passage, domain, depth, decade, prefix, metal: { left, right: bands.left, top, bottom },
    y: (e) => bottom - ((e - domain[0]) / (domain[1] - domain[0])) * (bottom - top),
    x: (s) => bands.left + (s / depth) * (bands.right - bands.left),
    xT: (t) => passage.left + Math.min(1, Math.max(0, 1 - Math.log10(Math.max(t, Number.MIN_VALUE)) / decade)) * (passage.right - passage.left),
  };
}

/** Height of the barrier that is drawn, from EF to the band at the metal: upwards for electrons, downwards for holes. */
export function drawnBarrier({ barrier_n_eV, barrier_p_eV }: CloseUp, carrier: 'electrons' | 'holes'): number {
  return carrier === 'electrons' ? barrier_n_eV : -barrier_p_eV;
}

/** Holds EF, the barrier, the edge inside and where the current goes, of the carrier that makes it up. */
function energyWindow(closeUp: CloseUp, carrier: 'electrons' | 'holes', curve: CarrierCloseUp | null): [number, number] {
  const kT = BOLTZMANN * closeUp.temperature_K;
  const sign = carrier === 'electrons' ? 1 : -1;
  const barrier = sign * drawnBarrier(closeUp, carrier);
  const inside = [0, barrier, ...(curve === null ? [] : [sign * curve.edge_eV, sign * curve.top_eV])];
  const passed = curve === null ? [] : [curve.from_eV, curve.to_eV].flatMap((e) => (e === null ? [] : [sign * e]));
  const low = Math.min(...inside, ...passed);
  const high = Math.max(...inside, ...passed.map((e) => e + 2 * kT), Math.min(Math.max(barrier, 0) + ABOVE * kT, Math.max(barrier, 0) + 0.15));
  const room = Math.max(MARGIN * (high - low), 0.02);
  return sign > 0 ? [low - room, high + room] : [-high - room, -low + room];
}

/** From the metal to where the band has all but settled. */
function depthShown({ bands, depletion_nm }: CloseUp, carrier: 'electrons' | 'holes', curve: CarrierCloseUp | null): number {
  const total = bands.s_nm[bands.s_nm.length - 1];
  const way = curve === null || curve.way.s_nm.length === 0 ? 0 : curve.way.s_nm[curve.way.s_nm.length - 1];
  const least = Math.min(total, LEAST_DEPTH);
  if (way === 0 || curve === null) return Math.max(least, Math.min(total, depletion_nm === null ? USUAL_DEPTH : 3 * depletion_nm));
  const band = carrier === 'electrons' ? bands.ec_eV : bands.ev_eV;
  const off = band.map((e) => Math.abs(e - curve.edge_eV));
  const most = Math.max(...off.filter((_, i) => bands.s_nm[i] <= way));
  let last = 0;
  for (let i = 0; i < off.length && bands.s_nm[i] <= way; i++) if (off[i] > SETTLED * most) last = bands.s_nm[i];
  return Math.max(least, Math.min(total, BEHIND * last));
}

function lowestDecade(curve: CarrierCloseUp | null): number {
  if (curve === null || curve.peak_eV === null) return -BELOW;
  const at = curve.energy_eV.indexOf(curve.peak_eV);
  return Math.max(LOWEST, Math.floor(Math.log10(Math.max(curve.transmission[at], 1e-300))) - BELOW);
}

/** Ticks of energy and of depth: values with their texts. */
export function closeUpTicks(frame: CloseUpFrame): { energy: { at: number; text: string }[]; depth: { at: number; text: string }[]; decades: number[] } {
  const { domain, bands, depth, decade, passage, small } = frame;
  const energies = evenTicks(domain[0], domain[1], Math.max(2, Math.floor((bands.bottom - bands.top) / 45)));
  const step = energies.length > 1 ? energies[1] - energies[0] : 1;
  const decimals = Math.max(1, Math.ceil(-Math.log10(step) - 1e-9));
  const every = Math.max(1, Math.ceil((-decade * 3.4 * small) / (passage.right - passage.left)));
  const decades: number[] = [];
  for (let d = 0; d >= decade; d -= every) decades.push(d);
  return {
    energy: energies.map((at) => ({ at, text: (Math.abs(at) < 1e-9 ? 0 : at).toFixed(decimals).replace('-', '−') })),
    depth: evenTicks(0, depth, Math.max(2, Math.floor((bands.right - bands.left) / (5 * small)))).map((at) => ({ at, text: writeNumber(at, 4) })),
    decades,
  };
}
