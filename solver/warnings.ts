import { BOLTZMANN } from './constants.ts';
import type { Solution } from './solution.ts';

/** Cautions that the figures of a solution carry, in words. */
export function warningsOf(solution: Solution): string[] {
  const { stack, layers, contacts } = solution;
  const out: string[] = [];
  if (stack.assumptions.statistics === 'boltzmann') out.push('Boltzmann statistics: for comparison only, wrong where a layer is degenerate');
  if (stack.assumptions.narrowing && stack.assumptions.statistics === 'fermi-dirac') {
    for (const layer of stack.layers) {
      const law = 'narrowing' in layer.material ? layer.material.narrowing?.law : undefined;
      if (law === 'slotboom') out.push(`${layer.name}: its narrowing was fitted with Boltzmann statistics and counts degeneracy twice with Fermi-Dirac`);
    }
  }
  stack.layers.forEach((layer, l) => {
    if (layers[l].fullyDepleted) out.push(`${layer.name} is fully depleted: thinner than the depletion that it must hold`);
    layers[l].ionised.forEach((row, d) => {
      const mott = layer.dopants[d]?.screened?.mottDensity;
      if (mott !== undefined && row.concentration > mott) out.push(`${layer.name}: ${row.dopant ?? row.kind} at ${row.concentration.toExponential(1)} cm^-3 lies above its Mott density ${mott.toExponential(1)} cm^-3, where an impurity band conducts`);
    });
  });
  for (const contact of contacts) {
    if (contact.lowering && contact.e00 !== null && contact.e00 > 5 * BOLTZMANN * stack.temperature) {
      out.push(`${contact.side} contact: so heavily doped that the image-force lowering has no meaning as a continuum figure`);
    }
  }
  return out;
}
