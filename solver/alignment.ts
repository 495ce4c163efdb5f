import { localBands, type LocalBands } from './bands.ts';
import { localCharge } from './charge.ts';
import { profileAt } from './profile.ts';
import type { AlignmentSource } from './solution.ts';
import { isAlloy, type Interface, type Layer, type Material, type Stack } from './stack.ts';

/** Flat bands of every layer from the common vacuum level, before charge moves. */
export interface Alignment {
  /** Ec_flat, eV; layer index, depth from the layer's top, cm */
  ecFlat(layer: number, z: number): number;
  /** [layers - 1] */
  interfaces: InterfaceAlignment[];
}

export interface InterfaceAlignment {
  /** value below less value above, eV */ deltaEc: number;
  deltaEv: number;
  class: 'straddling' | 'staggered' | 'broken';
  source: AlignmentSource;
}

/**
 * Natural valence edge of a material, eV, with the scale that it is measured on; null where it has none.
 *
 * Alloys: straight between the ends but for the bowing, where both stand on one scale. Natural offsets: Vurgaftman, Meyer and
 * Ram-Mohan, J. Appl. Phys. 89, 5815 (2001), section II.
 */
export function naturalValence(material: Material, x: number): { scale: string; edge: number } | null {
  if (!isAlloy(material)) return material.naturalValence ?? null;
  const a = material.first.naturalValence;
  const b = material.second.naturalValence;
  if (!a || !b || a.scale !== b.scale) return null;
  return { scale: a.scale, edge: (1 - x) * a.edge + x * b.edge - x * (1 - x) * (material.bowing.naturalValence ?? 0) };
}

/**
 * Lines up the layers. Each interface takes the first of: its own dEc or dEv; a published offset of the pair; natural valence edges on
 * one scale; the electron affinity rule (Anderson, Solid-State Electron. 5, 341, 1962). Whatever departs from the affinity rule is an
 * interface dipole and shifts everything on the far side. With `alignment: "affinity"` only own offsets depart from that rule.
 *
 * @throws {RangeError} what `localBands` refuses
 */
export function align(stack: Stack): Alignment {
  const { layers, temperature: T, assumptions } = stack;
  const bandsAt = (l: number, z: number): LocalBands => localCharge(layers[l], z, T, assumptions).bands;
  /** Ec less any dipole, before the layer's shift. */
  const bare = (l: number, z: number): number => {
    const layer = layers[l];
    const bands = bandsAt(l, z);
    if (assumptions.alignment === 'offsets' && isAlloy(layer.material) && layer.x.kind !== 'constant') {
      const edge = valenceWithNarrowing(stack, layer, z, bands);
      // Within a graded layer its own valence scale counts, hung from the affinity at its top.
      if (edge !== null) {
        const top = bandsAt(l, 0);
        const topEdge = valenceWithNarrowing(stack, layer, 0, top) as number;
        return -top.affinity - top.gap + (edge - topEdge) + bands.gap;
      }
    }
    return -bands.affinity;
  };
  const shift = new Float64Array(layers.length);
  const interfaces: InterfaceAlignment[] = [];
  // The first row of an interface counts.
  const rows = new Map<number, Interface>();
  for (const row of stack.interfaces) if (!rows.has(row.index)) rows.set(row.index, row);
  for (let l = 0; l + 1 < layers.length; l++) {
    const above = bandsAt(l, layers[l].thickness);
    const below = bandsAt(l + 1, 0);
    const ecAbove = bare(l, layers[l].thickness) + shift[l];
    const ecBelow = bare(l + 1, 0);
    const { deltaEc, source } = offset(stack, l, rows.get(l), above, below);
    shift[l + 1] = ecAbove + deltaEc - ecBelow;
    const deltaEv = deltaEc - below.gap + above.gap;
    const ec = ecAbove + deltaEc;
    interfaces.push({ deltaEc, deltaEv, class: classOf(ecAbove, ecAbove - above.gap, ec, ec - below.gap), source });
  }
  return { ecFlat: (l, z) => bare(l, z) + shift[l], interfaces };
}

function offset(stack: Stack, l: number, row: Interface | undefined, above: LocalBands, below: LocalBands): { deltaEc: number; source: AlignmentSource } {
  const fromDeltaEv = (deltaEv: number): number => deltaEv + below.gap - above.gap;
  if (row?.dEc !== undefined) return { deltaEc: row.dEc, source: 'own' };
  if (row?.dEv !== undefined) return { deltaEc: fromDeltaEv(row.dEv), source: 'own' };
  const [upper, lower] = [stack.layers[l], stack.layers[l + 1]];
  const xAbove = profileAt(upper.x, upper.thickness, upper.thickness);
  const xBelow = profileAt(lower.x, 0, lower.thickness);
  if (upper.material.id === lower.material.id && xAbove === xBelow) return { deltaEc: above.affinity - below.affinity, source: 'same' };
  if (stack.assumptions.alignment === 'offsets') {
    if (row?.published?.dEv !== undefined) return { deltaEc: fromDeltaEv(row.published.dEv), source: 'published' };
    if (row?.published?.dEc !== undefined) return { deltaEc: row.published.dEc, source: 'published' };
    const a = naturalValence(upper.material, xAbove);
    const b = naturalValence(lower.material, xBelow);
    if (a && b && a.scale === b.scale) {
      const edgeAbove = valenceWithNarrowing(stack, upper, upper.thickness, above) as number;
      const edgeBelow = valenceWithNarrowing(stack, lower, 0, below) as number;
      return { deltaEc: fromDeltaEv(edgeBelow - edgeAbove), source: 'natural' };
    }
  }
  return { deltaEc: above.affinity - below.affinity, source: 'affinity' };
}

/** Natural valence edge raised by the valence share of the narrowing in force, eV. */
function valenceWithNarrowing(stack: Stack, layer: Layer, z: number, bands: LocalBands): number | null {
  const x = profileAt(layer.x, z, layer.thickness);
  const natural = naturalValence(layer.material, x);
  if (!natural) return null;
  if (!stack.assumptions.narrowing) return natural.edge;
  const pure = localBands(layer.material, x, stack.temperature, { ...stack.assumptions, narrowing: false }, { donors: 0, acceptors: 0 });
  return natural.edge + (pure.gap - bands.gap) - (bands.affinity - pure.affinity);
}

/** Straddling (type I), staggered (type II) or broken gap (type III) of two pairs of edges, eV. */
export function classOf(ecAbove: number, evAbove: number, ecBelow: number, evBelow: number): 'straddling' | 'staggered' | 'broken' {
  if (evAbove >= ecBelow || evBelow >= ecAbove) return 'broken';
  return (ecBelow - ecAbove) * (evBelow - evAbove) <= 0 ? 'straddling' : 'staggered';
}
