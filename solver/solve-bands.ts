import { align, type Alignment } from './alignment.ts';
import { barrierHeights } from './barrier.ts';
import { localCharge } from './charge.ts';
import { EPSILON_0 } from './constants.ts';
import { crossingsOf } from './crossings.ts';
import { spaceChargeOf, type SpaceCharge } from './depletion.ts';
import { neutralLevel } from './fermi-level.ts';
import { solvePoisson, type PoissonEnd, type PoissonProblem } from './poisson.ts';
import { polarisationSheets } from './polarisation.ts';
import { isUniform, landmarksOf, profileAt } from './profile.ts';
import { isRefusal, type Profiles, type Quality, type Refusal } from './solution.ts';
import type { SolveOptions, Stack } from './stack.ts';

/** A stack whose potential is solved. Its figures follow from this one by one (stack-figures.ts). */
export interface SolvedBands {
  stack: Stack;
  alignment: Alignment;
  /** all fixed charge on each interface, polarisation included, +q, cm^-2 [layers - 1] */ sheets: Float64Array;
  profiles: Profiles;
  quality: Quality;
  space: SpaceCharge;
}

/**
 * Alignment, then Poisson over the whole stack.
 *
 * @param stack    in solver units (units.ts)
 * @throws {RangeError} a stack that is wrong in itself: no layer, a thickness or temperature that is not positive, a neutral contact on an
 *   insulator, pinning without a neutrality level, a gap that closes
 * @returns the bands with their quality, or a refusal with its reason and without figures
 */
export function solveBands(stack: Stack, options: SolveOptions = {}): SolvedBands | Refusal {
  if (stack.layers.length === 0) throw new RangeError('a stack needs at least one layer');
  for (const layer of stack.layers) if (!(layer.thickness > 0)) throw new RangeError(`the thickness of ${layer.name} must be positive`);
  // A typed array would swallow a charge put beyond its end without a word.
  for (const row of stack.interfaces) {
    if (!Number.isInteger(row.index) || row.index < 0 || row.index >= stack.layers.length - 1) throw new RangeError(`there is no interface ${row.index} in a stack of ${stack.layers.length} layers`);
  }
  const alignment = align(stack);
  const sheets = polarisationSheets(stack);
  for (const row of stack.interfaces) sheets[row.index] += row.sheetCharge;
  const answer = solvePoisson(poissonProblem(stack, alignment, sheets), options);
  if (isRefusal(answer)) return answer;
  const { profiles, quality } = answer;
  return { stack, alignment, sheets, profiles, quality, space: spaceChargeOf(stack, profiles) };
}

function poissonProblem(stack: Stack, alignment: Alignment, sheets: Float64Array): PoissonProblem {
  const { temperature: T, assumptions } = stack;
  return {
    layers: stack.layers.map((layer, l) => ({
      thickness: layer.thickness,
      uniform: isUniform(layer),
      landmarks: [...landmarksOf(layer), ...crossingsOf(layer, T, assumptions)],
      permittivity: (z) => localCharge(layer, z, T, assumptions).bands.permittivity * EPSILON_0,
      ecFlat: (z) => alignment.ecFlat(l, z),
      gap: (z) => localCharge(layer, z, T, assumptions).bands.gap,
      charge: (z) => localCharge(layer, z, T, assumptions),
    })),
    sheets,
    top: end(stack, alignment, 'top'),
    bottom: end(stack, alignment, 'bottom'),
  };
}

/** Boundary value: psi = Ec_flat - (Ec - EF) at the surface, or the sheet of an open end. */
function end(stack: Stack, alignment: Alignment, side: 'top' | 'bottom'): PoissonEnd {
  const boundary = stack[side];
  if (boundary.kind === 'open') return { kind: 'sheet', charge: boundary.sheetCharge };
  const l = side === 'top' ? 0 : stack.layers.length - 1;
  const layer = stack.layers[l];
  const z = side === 'top' ? 0 : layer.thickness;
  const c = localCharge(layer, z, stack.temperature, stack.assumptions);
  let ecMinusEf: number;
  if (boundary.kind === 'neutral') {
    if (c.bands.insulator) throw new RangeError(`the ${side} contact is neutral, but ${layer.name} is an insulator; make it a barrier, a pinned surface or open`);
    ecMinusEf = neutralLevel(c).ecMinusEf;
  } else if (boundary.kind === 'pinned') ecMinusEf = boundary.level;
  else ecMinusEf = barrierHeights(boundary.source, layer.material, profileAt(layer.x, z, layer.thickness), c.bands).barrierN;
  return { kind: 'potential', psi: alignment.ecFlat(l, z) - ecMinusEf };
}
