import type { DEGENERACIES, RegimeMap } from '../map/regime-map.ts';
import type { Regime } from '../result/types.ts';
import { mixed, type Style } from './styles.ts';

/** What the carriers come from: frozen onto their dopants, set by the doping, or across the gap. */
export type CarrierClass = 'freeze-out' | 'extrinsic' | 'intrinsic';
export type Degeneracy = (typeof DEGENERACIES)[number];

/** Minority over majority above this is intrinsic, majority over net doping below this is freeze-out: as in the layer's figures. */
export const INTRINSIC_ABOVE = 0.1;
export const FROZEN_BELOW = 0.9;

/** Carrier class at one point of a map, whatever its degeneracy; null where the gap closes. */
export function carrierClass({ minorityShare, carrierShare }: RegimeMap, i: number): CarrierClass | null {
  if (Number.isNaN(minorityShare[i])) return null;
  return minorityShare[i] > INTRINSIC_ABOVE ? 'intrinsic' : carrierShare[i] < FROZEN_BELOW ? 'freeze-out' : 'extrinsic';
}

/** Tint of a carrier class, on which ink is read. The three differ in lightness as well. */
export function classTint(name: CarrierClass, style: Style): string {
  if (name === 'freeze-out') return mixed(style.ground, style.conduction, 0.38);
  if (name === 'intrinsic') return mixed(style.ground, style.valence, 0.24);
  return mixed(style.ground, style.ink, 0.03);
}

/** Tint and hatch of a layer's regime: a degenerate one is hatched, since its carriers may be any class. */
export function regimeTint(name: Regime, style: Style): string {
  return name === 'degenerate' ? mixed(style.ground, style.occupancy, 0.16) : classTint(name, style);
}

/** Spacings of the hatch, px; one that is not degenerate has none. */
export const HATCH: Readonly<Record<Degeneracy, number | null>> = { degenerate: 6, transitional: 14, nondegenerate: null };
