import { profileAt } from './profile.ts';
import type { Dopant, Layer } from './stack.ts';

/** Depths at which a profile of the layer can have its largest or smallest value, cm from its top: both ends, peaks and given points. */
function turningDepths(dopants: readonly Dopant[], thickness: number): number[] {
  const depths = [0, thickness];
  for (const { concentration: c } of dopants) {
    if (c.kind === 'implant') depths.push(Math.min(thickness, Math.max(0, c.depth)));
    if (c.kind === 'points') for (const z of c.z) if (z > 0 && z < thickness) depths.push(z);
  }
  return depths;
}

/** Largest active concentration of one row in its layer, cm^-3. */
export function peakActive(layer: Layer, row: Dopant): number {
  return row.activation * Math.max(...turningDepths([row], layer.thickness).map((z) => profileAt(row.concentration, z, layer.thickness)));
}

/** Least and largest sum of all active dopants of a layer, cm^-3; of overlapping profiles the values at each one's own turning points. */
export function totalActiveRange(layer: Layer): [number, number] {
  const totals = turningDepths(layer.dopants, layer.thickness).map((z) => layer.dopants.reduce((sum, d) => sum + d.activation * profileAt(d.concentration, z, layer.thickness), 0));
  return [Math.min(...totals), Math.max(...totals)];
}
