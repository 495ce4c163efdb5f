import { describe, expect, it } from 'vitest';
import { crossingsOf } from '../../solver/crossings.ts';
import { solveStack } from '../../solver/solve-stack.ts';
import type { Dopant, Layer } from '../../solver/stack.ts';
import { expectSound } from './invariants.ts';
import { ASSUMPTIONS, doped, layer, stackOf } from './stack-fixtures.ts';

const graded = (kind: 'donor' | 'acceptor', from: number, to: number, thickness_nm: number): Dopant => ({
  ...doped(kind, from, 0, 'complete'),
  concentration: { kind: 'points', z: [0, thickness_nm * 1e-7], value: [from, to], scale: 'log' },
});

describe('junctions inside a graded layer', () => {
  it('are found where donors and acceptors cross, compensation and activation counted', () => {
    const [found, ...others] = crossingsOf(layer('g', 1000, [graded('donor', 1e20, 1e14, 1000), doped('acceptor', 1e17)]), 300, ASSUMPTIONS);
    expect(others).toEqual([]);
    expect(found.z).toBeCloseTo(500e-7, 12);
    // Half of the donors active, half of those compensated: a quarter counts.
    const [less] = crossingsOf(layer('g', 1000, [{ ...graded('donor', 1e20, 1e14, 1000), activation: 0.5, compensation: 0.5 }, doped('acceptor', 1e17)]), 300, ASSUMPTIONS);
    expect(less.z).toBeCloseTo((500 - (1000 * Math.log10(4)) / 6) * 1e-7, 12);
  });

  it('are none in a uniform layer, or where one kind prevails throughout', () => {
    expect(crossingsOf(layer('u', 1000, [doped('donor', 1e17), doped('acceptor', 1e16)]), 300, ASSUMPTIONS)).toEqual([]);
    expect(crossingsOf(layer('g', 1000, [graded('donor', 1e20, 1e18, 1000), doped('acceptor', 1e17)]), 300, ASSUMPTIONS)).toEqual([]);
  });

  it('are not stepped over: the field of a junction of 0.3 um in 100 um is that of a layer cut down to the junction', () => {
    const peak = (layers: Layer[]): number => {
      const { profiles } = expectSound(solveStack(stackOf(layers)));
      return profiles.field.reduce((a, b) => Math.max(a, Math.abs(b)), 0);
    };
    const whole = peak([layer('g', 1e5, [graded('donor', 1e20, 1e14, 1e5), doped('acceptor', 1e17, 0, 'complete')])]);
    // The same slope over a tenth of the depth, around the crossing.
    const cut = peak([layer('g', 1e4, [graded('donor', 1e17 * 10 ** 0.3, 1e17 * 10 ** -0.3, 1e4), doped('acceptor', 1e17, 0, 'complete')])]);
    expect(Math.abs(whole / cut - 1)).toBeLessThan(1e-3);
  });
});
