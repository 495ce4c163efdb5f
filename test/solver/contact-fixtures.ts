import { barrierShape, type BarrierShape } from '../../solver/barrier-shape.ts';
import type { Carrier } from '../../solver/carrier-constants.ts';
import { contactPath, type ContactPath } from '../../solver/contact-path.ts';
import { carrierConductance, isMissing, type CarrierConductance, type ResistivityOptions } from '../../solver/contact-resistivity.ts';
import { spaceChargeOf } from '../../solver/depletion.ts';
import { solveStack } from '../../solver/solve-stack.ts';
import type { Solution } from '../../solver/solution.ts';
import type { Boundary, CrystalMaterial, Stack } from '../../solver/stack.ts';
import { CM_PER_NM } from '../../solver/units.ts';
import { expectSound } from './invariants.ts';
import { crystalWith, dopant } from './point-fixtures.ts';
import { layer, stackOf } from './stack-fixtures.ts';

/** n-silicon as the published curves of contact resistivity take it: Nc 2.86e19, m_t 0.26, A* 110 (electrons). */
export const SILICON: CrystalMaterial = { ...crystalWith(1.12, 2.86e19, 2.66e19), id: 'Si', tunnellingMass: { electron: 0.26, hole: 0.16 }, richardson: { electron: 110, hole: 79 } };

export function metal(height: number, imageForce = false, carrier: 'n' | 'p' = 'n'): Boundary {
  return { kind: 'barrier', source: { from: 'given', carrier, height }, metal: null, imageForce };
}

/** A metal on a layer of one doping, thick enough to be neutral below, every dopant charged. */
export function contactOn(material: CrystalMaterial, N: number, height: number, options: { T?: number; imageForce?: boolean; carrier?: 'n' | 'p'; transmission?: 'wkb' | 'kemble' | 'exact'; accuracy?: number } = {}): Solution {
  const carrier = options.carrier ?? 'n';
  const width = 1e7 * Math.sqrt((2 * 12 * 8.85e-14) / (1.6e-19 * N));
  const stack = stackOf([layer('layer', Math.max(30, 4 * width), [dopant(carrier === 'n' ? 'donor' : 'acceptor', N, { model: 'complete' })], material)], {
    T: options.T, top: metal(height, options.imageForce, carrier), assumptions: { transmission: options.transmission ?? 'wkb' },
  });
  const accuracy = options.accuracy ?? 1e-6;
  return expectSound(solveStack(stack, { accuracy }), accuracy);
}

/** What one carrier conducts; throws where a constant is missing. */
export function conductance(s: Solution, carrier: Carrier = 'electron', options: ResistivityOptions = {}, side: 'top' | 'bottom' = 'top'): CarrierConductance {
  const path = contactPath(s.stack, s.profiles, spaceChargeOf(s.stack, s.profiles), side);
  const c = path && carrierConductance(s.stack, path, carrier, options);
  if (!c || isMissing(c)) throw new Error(c ? c.missing : 'no neutral layer');
  return c;
}

/** A made-up way of an electron: U and dU/ds at given depths (nm), one piece a layer, down to a neutral edge. */
export function wayOf(pieces: { s: number[]; u: number[]; slope: number[] }[], edge: number): ContactPath {
  const nodes = pieces.flatMap((piece, l) => piece.s.map((s, i) => ({ s: s * CM_PER_NM, u: piece.u[i], slope: piece.slope[i] / CM_PER_NM, l })));
  const from = (read: (n: (typeof nodes)[number]) => number): Float64Array => Float64Array.from(nodes, read);
  return {
    side: 'top', s: from((n) => n.s), layer: Int32Array.from(nodes, (n) => n.l), psi: from((n) => -n.u), slope: from((n) => -n.slope), conduction: from(() => 0), valence: from(() => -2),
    reservoir: pieces.length - 1, ecMinusEf: edge, efMinusEv: 2 - edge, electrons: true,
  };
}

/** A stack of layers for a made-up way, one a piece, each with its own mass. */
export function bareStack(masses: number[], T = 300): Stack {
  return stackOf(masses.map((electron, l) => layer(`l${l}`, 1000, [], { ...SILICON, gap: { zeroK: 2, alpha: 0, beta: 1 }, tunnellingMass: { electron } })), { T, top: metal(0.5) });
}

export function shapeOf(path: ContactPath, masses: number[], options: { imageForce?: boolean; deep?: boolean; T?: number } = {}): BarrierShape {
  return barrierShape(bareStack(masses, options.T), path, 'electron', options.imageForce ?? false, options.deep);
}
