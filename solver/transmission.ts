import type { BarrierShape } from './barrier-shape.ts';
import { waveSteps, waveTransmission } from './exact-transmission.ts';
import { kembleExponent, wkbExponent, type Dispersion } from './wkb.ts';

export type Transmission = 'wkb' | 'kemble' | 'exact';

/** The transmission's logarithm against the carrier's energy, eV. */
export type LogTransmission = (energy: number) => number;

/** @param steps  of the exact way, steps a cell */
export function logTransmission(shape: BarrierShape, kind: Transmission, dispersion: Dispersion = 'one-band', steps = 2): LogTransmission {
  if (kind === 'exact') {
    const way = waveSteps(shape, steps);
    return (energy) => waveTransmission(way, energy);
  }
  if (kind === 'kemble') return (energy) => -softPlus(kembleExponent(shape, energy, dispersion));
  return (energy) => (energy >= shape.top ? 0 : -wkbExponent(shape, energy, dispersion));
}

/** ln(1 + e^x). */
function softPlus(x: number): number {
  return x > 0 ? x + Math.log1p(Math.exp(-x)) : Math.log1p(Math.exp(x));
}
