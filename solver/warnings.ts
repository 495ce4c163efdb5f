import { confinedPockets } from './confinement.ts';
import { peakActive, totalActiveRange } from './doping-range.ts';
import { profileAt } from './profile.ts';
import type { Solution } from './solution.ts';
import { NM_PER_CM } from './units.ts';
import { isAlloy, type CrystalMaterial, type Dopant, type Layer, type Stack } from './stack.ts';

/** Cautions that the figures of a solution carry, in words, each naming its layer or contact. */
export function warningsOf(solution: Solution): string[] {
  const { stack } = solution;
  const out: string[] = [];
  if (stack.assumptions.statistics === 'boltzmann') out.push('Boltzmann statistics: for comparison only, wrong where a layer is degenerate');
  stack.layers.forEach((layer, l) => {
    out.push(...rangeWarnings(layer, stack.temperature));
    if (solution.layers[l].insulator) return;
    if (solution.layers[l].fullyDepleted) out.push(`${layer.name} is fully depleted: thinner than the depletion that it must hold`);
    out.push(...narrowingWarnings(stack, layer), ...dopantWarnings(layer));
  });
  for (const { layer, carrier, spacing } of confinedPockets(stack, solution.profiles)) {
    const meV = (1000 * spacing).toFixed(spacing < 0.01 ? 1 : 0);
    out.push(`${stack.layers[layer].name}: its ${carrier}s are confined (levels about ${meV} meV apart, more than kT/2), which this solution leaves out`);
  }
  out.push(...contactWarnings(solution));
  return out;
}

/** Crystals that the layer is made of, an alloy's end only where it holds some of it. */
function crystalsOf(layer: Layer): CrystalMaterial[] {
  if (!isAlloy(layer.material)) return [layer.material];
  const shares = [0, 0.25, 0.5, 0.75, 1].map((u) => profileAt(layer.x, u * layer.thickness, layer.thickness));
  return [...(shares.some((x) => x < 1) ? [layer.material.first] : []), ...(shares.some((x) => x > 0) ? [layer.material.second] : [])];
}

function density(value: number): string {
  return `${value.toExponential(1)} cm^-3`;
}

/** Laws used outside the range that they were measured or fitted in. */
function rangeWarnings(layer: Layer, T: number): string[] {
  const out: string[] = [];
  const [least, most] = totalActiveRange(layer);
  for (const material of new Set([...crystalsOf(layer), layer.material])) {
    const { temperature, doping } = material.validity ?? {};
    if (temperature && (T < temperature[0] || T > temperature[1])) out.push(`${layer.name}: ${T} K is outside the ${temperature[0]} to ${temperature[1]} K in which the laws of ${material.id} are known; they are extrapolated`);
    // An undoped layer asks nothing of laws in the doping.
    if (doping && most > 0 && (most > doping[1] || least < doping[0])) {
      out.push(`${layer.name}: doping of ${density(most > doping[1] ? most : least)} is outside the ${density(doping[0])} to ${density(doping[1])} in which the laws of ${material.id} are known; they are extrapolated`);
    }
  }
  return out;
}

/** Narrowing that counts degeneracy twice, or that is asked for where no law is known. The Jain-Roulston form is the true narrowing and goes with Fermi-Dirac. */
function narrowingWarnings(stack: Stack, layer: Layer): string[] {
  if (!stack.assumptions.narrowing || totalActiveRange(layer)[1] === 0) return [];
  const out: string[] = [];
  for (const { id, narrowing } of crystalsOf(layer)) {
    if (!narrowing) out.push(`${layer.name}: no narrowing law is known for ${id}; its gap is left as it is`);
    else if (narrowing.law === 'slotboom' && stack.assumptions.statistics === 'fermi-dirac') out.push(`${layer.name}: the narrowing of ${id} was fitted with Boltzmann statistics and counts degeneracy twice with Fermi-Dirac`);
  }
  return out;
}

function dopantWarnings(layer: Layer): string[] {
  const out: string[] = [];
  const present = layer.dopants.filter((d) => peakActive(layer, d) > 0);
  for (const d of present) {
    const name = d.id ?? d.kind;
    const peak = peakActive(layer, d);
    const mott = d.mottDensity ?? d.screened?.mottDensity;
    if (mott !== undefined && peak > mott) out.push(`${layer.name}: ${name} at ${density(peak)} lies above its Mott density ${density(mott)}, where an impurity band conducts${d.model === 'dilute' ? '; "dilute" still binds carriers there and leaves too few free, "complete" frees them all' : ''}`);
    if (d.solubility !== undefined && peak > d.solubility) out.push(`${layer.name}: ${name} at ${density(peak)} lies above the ${density(d.solubility)} that was published as reachable`);
    if ((d.model === 'merging' && !d.merging) || (d.model === 'screened' && !d.screened)) out.push(`${layer.name}: ${name} has no parameters for "${d.model}"; its level is taken as that of dilute doping`);
  }
  for (const name of sharedCentres(present)) out.push(`${layer.name}: the levels of ${name} belong to one centre, but are counted as independent of each other`);
  return out;
}

/** Centres that appear with several levels: rows of one `centre`, or rows of one dopant at different levels. */
function sharedCentres(dopants: readonly Dopant[]): Set<string> {
  const shared = new Set<string>();
  const differ = (a: Dopant, b: Dopant): boolean => a.kind !== b.kind || a.depth !== b.depth;
  dopants.forEach((a, i) => {
    for (const b of dopants.slice(i + 1)) {
      if (a.centre !== undefined || b.centre !== undefined) {
        if (a.centre !== undefined && a.centre === b.centre && differ(a, b)) shared.add(a.centre);
      } else if (a.id !== null && a.id === b.id && differ(a, b)) shared.add(a.id);
    }
  });
  return shared;
}

/** Neighbours in a crystal, cm: 0.19 nm in GaN and SiC to 0.28 nm in InSb (from memory). The image-force barrier is highest lowering/(2 field) from the metal. */
const ATOMS_APART = 2.5e-8;

const nmText = (cm: number): string => (cm * NM_PER_CM).toFixed(2);

function contactWarnings(solution: Solution): string[] {
  const { stack, contacts } = solution;
  const out: string[] = [];
  for (const contact of contacts) {
    if (contact.lowering && contact.lowering < 2 * Math.abs(contact.surfaceField) * ATOMS_APART) {
      out.push(`${contact.side} contact: the field is so high that the image-force lowering has no meaning as a continuum figure: its barrier would be highest ${nmText(contact.lowering / (2 * Math.abs(contact.surfaceField)))} nm from the metal, less than atoms lie apart`);
    }
    for (const note of contact.rhoCNotes) out.push(`${contact.side} contact: ${note}`);
    const boundary = stack[contact.side];
    const layer = stack.layers[contact.side === 'top' ? 0 : stack.layers.length - 1];
    if (boundary.kind === 'barrier' && boundary.source.from === 'workFunction' && boundary.source.slope === 'material' && !knowsPinning(layer)) {
      out.push(`${contact.side} contact: how strongly ${layer.material.id} pins a metal is not known; its barrier is the ideal one (S = 1)`);
    }
    const outside = isAlloy(layer.material) ? undefined : layer.material.outsideContactModel;
    const type = solution.layers[contact.side === 'top' ? 0 : stack.layers.length - 1].type;
    if (boundary.kind === 'barrier' && outside && type === outside.carrier) {
      out.push(`${contact.side} contact: mechanism outside the model; contacts to ${outside.carrier}-type ${layer.material.id} were measured between ${outside.low.toExponential(1)} and ${outside.high.toExponential(1)} ohm cm^2 (${outside.source}), decades away from what a barrier explains`);
    }
  }
  return out;
}

function knowsPinning(layer: Layer): boolean {
  return layer.material.pinningSlope !== undefined || crystalsOf(layer).every((m) => m.pinningSlope !== undefined);
}
