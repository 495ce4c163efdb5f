import { describe, expect, it } from 'vitest';
import { BOLTZMANN } from '../../solver/constants.ts';
import { contactFigures } from '../../solver/contact.ts';
import { logOccupancy } from '../../solver/contact-integral.ts';
import { contactPath } from '../../solver/contact-path.ts';
import { carrierBarrier } from '../../solver/contact-resistivity.ts';
import { spaceChargeOf } from '../../solver/depletion.ts';
import { solveStack } from '../../solver/solve-stack.ts';
import { isRefusal, type ContactFigures, type Solution } from '../../solver/solution.ts';
import type { CrystalMaterial, Layer } from '../../solver/stack.ts';
import { wkbExponent } from '../../solver/wkb.ts';
import { Dice, randomFrom } from '../fuzz/dice.ts';
import { conductance, metal, SILICON } from './contact-fixtures.ts';
import { dopant } from './point-fixtures.ts';
import { layer, stackOf } from './stack-fixtures.ts';

const WIDE: CrystalMaterial = { ...SILICON, id: 'wide', gap: { zeroK: 3.4, alpha: 0, beta: 1 }, affinity: 2.5, tunnellingMass: { electron: 0.2, hole: 0.8 }, richardson: { electron: 24, hole: 96 } };
const NITRIDE: CrystalMaterial = { id: 'nitride', insulator: true, gap: { zeroK: 5.3, alpha: 0, beta: 1 }, affinity: 2.1, affinityShare: 0.5, permittivity: 7.5, permittivityHighFrequency: 4, tunnellingMass: { electron: 0.5, hole: 0.5 } };

/** What is wrong with what a contact conducts; empty where every figure is above zero, Infinity with "blocks", or missing with a reason. */
function faultsOf(c: ContactFigures): string[] {
  const faults: string[] = [];
  for (const key of ['rhoC', 'rhoCn', 'rhoCp', 'rhoCFloor', 'rhoCClosedForm'] as const) {
    const value = c[key];
    if (value !== null && !(value > 0)) faults.push(`${key} is ${value}`);
  }
  if (c.rhoError !== null && !(c.rhoError >= 0 && c.rhoError < Infinity)) faults.push(`rhoError is ${c.rhoError}`);
  if (c.transmission !== 'exact' && c.rhoError !== null && !(c.rhoError < 1e-5)) faults.push(`rhoError is ${c.rhoError} in ${c.transmission}`);
  if ((c.rhoC === null) !== (c.rhoError === null)) faults.push('a figure and its error do not come together');
  if (c.rhoC === null && c.rhoCNotes.length === 0) faults.push('nothing tells why there is no figure');
  if (c.blocks !== (c.rhoC === Infinity)) faults.push(`blocks is ${c.blocks} at ${c.rhoC}`);
  return faults;
}

/** One to five layers of three materials, any doping and thickness, cold; a metal on either side. */
function drawn(dice: Dice, i: number): Solution | null {
  const layers: Layer[] = Array.from({ length: 1 + dice.whole(5) }, (_, l) => {
    const material = dice.pick([SILICON, WIDE, SILICON, WIDE, NITRIDE]);
    if (material === NITRIDE) return layer(`l${l}`, dice.logBetween(0.5, 80), [], NITRIDE);
    const kind = dice.pick(['donor', 'acceptor'] as const);
    const doped = dice.chance(0.2) ? [] : [dopant(kind, dice.logBetween(1e13, 5e20), dice.chance(0.5) ? { model: 'complete' } : { depth: dice.between(0.01, 0.25) })];
    return layer(`l${l}`, dice.logBetween(2, 3e5), doped, material);
  });
  if (layers.every((l) => l.material === NITRIDE)) return null;
  const stack = stackOf(layers, { T: dice.logBetween(1, 80), top: metal(dice.between(-0.1, 3), dice.chance(0.5)), bottom: metal(dice.between(0.1, 1), dice.chance(0.5), 'p') });
  const answer = solveStack(stack, { contacts: false });
  if (isRefusal(answer)) throw new Error(`${i}: ${answer.reason}`);
  return answer;
}

describe('random cold contacts, 1 to 80 K', () => {
  it('have figures above zero, or block, or tell why they have none, by each transmission', () => {
    const bad: string[] = [];
    const seen = { figure: 0, blocks: 0, reason: 0 };
    for (let i = 0; i < 240; i++) {
      const s = drawn(new Dice(randomFrom(4100 + i)), i);
      if (!s) continue;
      const space = spaceChargeOf(s.stack, s.profiles);
      // The wave equation takes its time: every fourth.
      for (const transmission of i % 4 === 0 ? (['wkb', 'kemble', 'exact'] as const) : (['wkb', 'kemble'] as const)) {
        for (const side of ['top', 'bottom'] as const) {
          const c = contactFigures({ ...s.stack, assumptions: { ...s.stack.assumptions, transmission } }, s.profiles, space, side);
          for (const fault of faultsOf(c)) bad.push(`${i} ${side} ${transmission} ${s.stack.temperature} K: ${fault}`);
          seen[c.rhoC === null ? 'reason' : c.blocks ? 'blocks' : 'figure']++;
        }
      }
    }
    expect(bad).toEqual([]);
    expect(seen.figure).toBeGreaterThan(100);
    expect(seen.blocks).toBeGreaterThan(50);
    expect(seen.reason).toBeGreaterThan(20);
  }, 240_000);
});

describe('a thick insulator in the cold', () => {
  // The exponent falls by thousands over the range of energies, and the occupancy by thousands against it: the peak lies between any places of a coarse scan.
  const at = (nm: number, T: number): Solution => {
    const answer = solveStack(stackOf([layer('nitride', nm, [], NITRIDE), layer('n', 300, [dopant('donor', 1e20, { model: 'complete' })], SILICON)], { T, top: metal(3) }), { contacts: false });
    if (isRefusal(answer)) throw new Error(answer.reason);
    return answer;
  };

  it('costs exp(-2 kappa d), however much that is', () => {
    for (const T of [2, 6, 20]) {
      const logs = [20, 40, 60, 80].map((nm) => conductance(at(nm, T)).log);
      const slopes = logs.slice(1).map((log, i) => (logs[i] - log) / 20);
      for (const slope of slopes) expect(Math.abs(slope / slopes[0] - 1), `${T} K`).toBeLessThan(0.01);
      // Some 3 eV above EF with a mass of 0.5: 2 kappa = 2 sqrt(26.2/nm^2/eV 0.5 3 eV) = 12.5/nm.
      expect(slopes[0]).toBeGreaterThan(11);
      expect(slopes[0]).toBeLessThan(13.5);
    }
  });

  it('is the same by the sum over 200,000 energies, where the bands under it bend over microns as well', () => {
    for (const [nm, T, N] of [[30, 6, 1e20], [60, 2, 1e20], [5, 40, 1e18], [50, 6, 1e15]]) {
      const answer = solveStack(stackOf([layer('nitride', nm, [], NITRIDE), layer('n', 4e4, [dopant('donor', N, { model: 'complete' })], SILICON)], { T, top: metal(3) }), { contacts: false });
      if (isRefusal(answer)) throw new Error(answer.reason);
      const path = contactPath(answer.stack, answer.profiles, spaceChargeOf(answer.stack, answer.profiles), 'top');
      const shape = path && carrierBarrier(answer.stack, path, 'electron', 'wkb', false, 4);
      if (!shape || 'missing' in shape) throw new Error('no barrier');
      const { edge, top, kT } = shape;
      const count = 200_000;
      const logs = Array.from({ length: count }, (_, i) => {
        const energy = edge + ((top - edge) * (i + 0.5)) / count;
        return -wkbExponent(shape, energy) + logOccupancy(energy / kT);
      });
      const peak = logs.reduce((a, b) => Math.max(a, b));
      const sum = logs.reduce((total, log) => total + Math.exp(log - peak), 0);
      const scanned = peak + Math.log((sum * (top - edge)) / count / kT);
      expect(Math.abs(conductance(answer).log - Math.log((110 / BOLTZMANN ** 2) * kT) - scanned), `${nm} nm, ${T} K`).toBeLessThan(1e-3);
    }
  }, 60_000);
});
