import type { Context } from './context.ts';
import type { Rests } from './workings.ts';

const TRANSMISSION = { wkb: 'Transmission by WKB, one band.', kemble: 'Transmission by Kemble’s uniform form.', exact: 'Transmission exact on the solved barrier.' };

/** The assumptions that bear on a figure, a sentence each. */
export function assumptionsInForce({ stack, design, result }: Context, rests: readonly Rests[]): string[] {
  const a = stack.assumptions;
  const out = [`${Number(result.conditions.temperature_K.toPrecision(6))} K, thermal equilibrium.`];
  if (rests.includes('carriers')) out.push(a.statistics === 'boltzmann' ? 'Boltzmann statistics, as the design asks: for comparison only.' : 'Fermi–Dirac statistics; dopants ionise by their own level.', a.nonParabolic ? 'Non-parabolic bands (Kane) where a material has a parameter.' : 'Parabolic bands.');
  if (rests.includes('bands')) out.push(a.narrowing ? 'The gap narrows with doping by each material’s law.' : 'No narrowing of the gap by doping.');
  if (rests.includes('alignment')) out.push(a.alignment === 'affinity' ? 'Line-up by the affinity rule, as the design asks.' : 'Line-up by a published offset, else natural valence edges, else the affinity rule.');
  if (rests.includes('stack')) {
    out.push('One dimension; bulk densities of states, no quantum confinement.');
    if (stack.crystal) out.push(`Polar crystal, ${stack.crystal.face === 'N' ? 'N' : 'metal'} face up, ${stack.crystal.strain}${design.crystal?.template === undefined ? '' : ` on ${design.crystal.template}`}.`);
  }
  if (rests.includes('image force')) out.push('The image force lowers a barrier where the contact has it on.');
  if (rests.includes('transmission')) out.push(TRANSMISSION[a.transmission]);
  return out;
}
