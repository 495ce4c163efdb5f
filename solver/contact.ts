import { barrierHeights, imageForceLowering, transportRegime, tunnellingEnergy } from './barrier.ts';
import { localCharge, netDoping } from './charge.ts';
import { depletionFrom, type SpaceCharge } from './depletion.ts';
import { profileAt } from './profile.ts';
import type { ContactFigures, Profiles } from './solution.ts';
import { isAlloy, type Material, type Stack } from './stack.ts';

/** Tunnelling mass of a carrier, m0; straight between an alloy's ends; undefined where one is missing. */
export function tunnellingMass(material: Material, x: number, carrier: 'electron' | 'hole'): number | undefined {
  if (!isAlloy(material)) return material.tunnellingMass?.[carrier];
  const a = material.first.tunnellingMass?.[carrier];
  const b = material.second.tunnellingMass?.[carrier];
  return a === undefined || b === undefined ? undefined : (1 - x) * a + x * b;
}

/**
 * Figures of one end of the stack. E00 takes N = |net active doping| at the metal, where all of it is charged, the static permittivity and the
 * majority's tunnelling mass; the lowering is quoted only where the field depletes the majority (an accumulated surface has no barrier top inside).
 */
export function contactFigures(stack: Stack, profiles: Profiles, space: SpaceCharge, side: 'top' | 'bottom'): ContactFigures {
  const boundary = stack[side];
  const index = side === 'top' ? 0 : stack.layers.length - 1;
  const layer = stack.layers[index];
  const z = side === 'top' ? 0 : layer.thickness;
  const c = localCharge(layer, z, stack.temperature, stack.assumptions);
  const x = profileAt(layer.x, z, layer.thickness);
  const node = side === 'top' ? 0 : profiles.z.length - 1;
  const surfaceField = profiles.field[node];
  const figures: ContactFigures = {
    side, kind: boundary.kind, barrierN: null, barrierP: null, barrierSource: null, lowering: null, surfaceField,
    e00: null, transport: null, depletion: depletionFrom(stack, profiles, space, index, side),
  };
  if (boundary.kind === 'pinned') {
    figures.barrierN = boundary.level;
    figures.barrierP = c.bands.gap - boundary.level;
    return figures;
  }
  if (boundary.kind !== 'barrier') return figures;
  const heights = barrierHeights(boundary.source, layer.material, x, c.bands);
  figures.barrierN = heights.barrierN;
  figures.barrierP = heights.barrierP;
  figures.barrierSource = heights.source;
  const net = netDoping(c);
  // Into the semiconductor Ec falls from a depleted n surface: psi rises inward, so the field points at the metal.
  const inward = side === 'top' ? surfaceField : -surfaceField;
  const depleting = net >= 0 ? inward < 0 : inward > 0;
  if (boundary.imageForce) figures.lowering = depleting ? imageForceLowering(Math.abs(surfaceField), c.bands.permittivityHighFrequency) : 0;
  const mass = tunnellingMass(layer.material, x, net >= 0 ? 'electron' : 'hole');
  if (net !== 0 && mass !== undefined) {
    figures.e00 = tunnellingEnergy(Math.abs(net), mass, c.bands.permittivity);
    figures.transport = transportRegime(figures.e00, stack.temperature);
  }
  return figures;
}
