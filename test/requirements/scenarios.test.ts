import { describe, expect, it, vi } from 'vitest';
import { readDesign } from '../../src/design/read.ts';
import type { Design } from '../../src/design/types.ts';
import { judge } from '../../src/requirements/judge.ts';
import { size } from '../../src/requirements/size.ts';
import { solveDesign } from '../../src/result/solve-design.ts';
import type { Result } from '../../src/result/types.ts';

vi.setConfig({ testTimeout: 60_000 });

function design(parts: Partial<Design>): Design {
  const reading = readDesign(JSON.stringify({ format: 'halfmark-design/1', title: 'from the literature', conditions: { temperature: '300 K' }, bottom: { kind: 'neutral' }, ...parts }));
  if (!reading.ok) throw new Error(JSON.stringify(reading.complaints));
  return reading.design;
}

function solved(d: Design, set: Record<string, string> = {}): Result {
  const answer = solveDesign(d, { set });
  if (answer.kind !== 'result') throw new Error(JSON.stringify(answer));
  return answer.result;
}

const rhoC = (d: Design, set: Record<string, string> = {}): number => solved(d, set).contacts[0].rho_c_ohm_cm2 ?? NaN;

describe('a source/drain contact on n silicon', () => {
  const at = (barrier: string, imageForce: boolean): Design => design({
    conditions: { temperature: '300 K', temperatureRange: ['-40 degC', '125 degC'] },
    variables: [{ name: 'N', value: '4e20 cm^-3', tolerance: '20 %', range: ['1e20 cm^-3', '3e21 cm^-3'] }],
    layers: [{ name: 'contact', material: 'Si', thickness: '40 nm', dopants: [{ dopant: 'P', concentration: 'N' }] }],
    top: { kind: 'barrier', barrier, imageForce },
    requirements: [{ quantity: 'contactResistivity', of: 'top', max: '2e-9 ohm cm^2', over: 'temperatureRange' }],
  });

  it('of 2e-9 ohm cm^2 needs some 3 to 6e20 active donors cm^-3 where the barrier is 0.5 to 0.6 eV and the doping uncertain by 20 %', () => {
    // The target is common practice, no source; 8.4e-10 ohm cm^2 is on record for Si:P (from memory). The doping that it takes is an order: 2.5 to 7e20 here, with image force and without.
    const needed = (['0.5 eV', '0.6 eV'] as const).flatMap((barrier) => [true, false].map((imageForce) => {
      const found = size(at(barrier, imageForce), { variable: 'N', tolerances: 'stated' });
      if (found.kind !== 'sized') throw new Error(JSON.stringify(found.complaints));
      expect(found.intervals).toHaveLength(1);
      const { from, to } = found.intervals[0];
      expect(from.at).toBe('-40 degC, N -20 %');
      expect(to.reason).toBe('range');
      return from.value;
    }));
    expect(Math.min(...needed)).toBeGreaterThan(2.5e20);
    expect(Math.max(...needed)).toBeLessThan(7e20);
    // A higher barrier asks for more, and the image force for less.
    expect(needed[2]).toBeGreaterThan(needed[0]);
    expect(needed[1]).toBeGreaterThan(needed[0]);
  });

  it('misses it by the lowest doping and at the coldest end, by a margin that is the ratio', () => {
    const d = at('0.55 eV', true);
    const judged = judge(d, { set: { N: '2e20 cm^-3' }, tolerances: 'stated' });
    if (judged.kind !== 'judged') throw new Error(JSON.stringify(judged));
    const [row] = judged.requirements;
    expect(row.met).toBe(false);
    const worst = rhoC(d, { N: '1.6e20 cm^-3', temperature: '-40 degC' });
    expect((row.worst as number) / worst).toBeCloseTo(1, 3);
    expect((row.margin as number) * (worst / 2e-9)).toBeCloseTo(1, 3);
  });
});

describe('an Al-implanted p contact on 4H-SiC', () => {
  // Active by 39 to 56 % after anneals at 1675 to 1825 degC: Spera et al., Materials 12, 3468 (2019). Ti/Al/Ni on implanted p-4H-SiC: 2.3e-4 ohm cm^2, Appl. Surf. Sci. 420, 331 (2017). Both from memory.
  const at = (activation: number): Design => design({
    layers: [{ name: 'p', material: '4H-SiC', thickness: '200 nm', dopants: [{ dopant: 'Al', concentration: '1e20 cm^-3', activation: String(activation) }] }],
    top: { kind: 'barrier', barrier: '0.63 eV', carrier: 'p', imageForce: true },
  });

  it('is of the order of 1e-4 ohm cm^2 at 27 degC over the activations, and worst when cold', () => {
    for (const activation of [0.39, 0.475, 0.56]) {
      const [cold, room, hot] = ['-40 degC', '27 degC', '175 degC'].map((temperature) => rhoC(at(activation), { temperature }));
      expect(room).toBeGreaterThan(3e-5);
      expect(room).toBeLessThan(4e-4);
      expect(cold).toBeGreaterThan(2 * room);
      expect(room).toBeGreaterThan(5 * hot);
    }
    // The less is active the worse: activation counts for more than the barrier's first digit.
    expect(rhoC(at(0.39)) / rhoC(at(0.56))).toBeGreaterThan(2);
  });
});

describe('a metal on n-germanium', () => {
  const at = (N: string, barrier: string): number => rhoC(design({ layers: [{ name: 'n', material: 'Ge', thickness: '200 nm', dopants: [{ dopant: 'P', concentration: N }] }], top: { kind: 'barrier', barrier } }));

  it('pinned at 0.57 eV (Dimoulas et al., Appl. Phys. Lett., 2006) has the orders that follow, and unpinned conducts a hundred times as well', () => {
    // Worked out apart from this solver: 1.5e-6 at 2.5e19 and 8e-5 ohm cm^2 at 1e19 cm^-3, within a factor of 2.
    const pinned = at('2.5e19 cm^-3', '0.57 eV');
    for (const [got, other] of [[pinned, 1.5e-6], [at('1e19 cm^-3', '0.57 eV'), 8e-5]]) expect(Math.abs(Math.log(got / other))).toBeLessThan(Math.LN2);
    // A metal without pinning, 0.25 eV; 1.4e-8 ohm cm^2 was measured with an interlayer at this doping: Appl. Phys. Lett. 108, 10 (2016), doi 10.1063/1.4944060 (from memory).
    const unpinned = at('2.5e19 cm^-3', '0.25 eV');
    expect(pinned / unpinned).toBeGreaterThan(50);
    expect(pinned / unpinned).toBeLessThan(200);
    expect(Math.abs(Math.log(unpinned / 1.4e-8))).toBeLessThan(Math.LN2);
  });
});

describe('a p-well of 1e17 boron cm^-3', () => {
  const at = (temperature: string): Result => solved(design({
    conditions: { temperature },
    layers: [{ name: 'n+', material: 'Si', thickness: '100 nm', dopants: [{ dopant: 'P', concentration: '1e19 cm^-3' }] }, { name: 'well', material: 'Si', thickness: '1 um', dopants: [{ dopant: 'B', concentration: '1e17 cm^-3' }] }],
    top: { kind: 'neutral' },
  }));

  it('is ionised by 93 % at 300 K, 9 % at 77 K and not at 4.2 K, while its depletion region stays charged', () => {
    const runs = (['300 K', '77 K', '4.2 K'] as const).map(at);
    const shares = runs.map((r) => r.layers[1].ionised[0].fraction);
    expect(shares[0]).toBeCloseTo(0.93, 2);
    expect(shares[1]).toBeGreaterThan(0.07);
    expect(shares[1]).toBeLessThan(0.1);
    expect(shares[2]).toBeLessThan(1e-3);
    for (const { layers, junctions: [junction] } of runs) {
      expect(layers[1].ionised[0].fraction_depleted).toBeGreaterThan(0.99);
      // The field is that of the whole doping over the depletion width: q N W/eps, 11.7 for silicon. Half a Debye length at its end is left.
      const whole = (1.602176634e-19 * 1e17 * (junction.depletion_below_nm ?? NaN) * 1e-7) / (11.7 * 8.8541878128e-14);
      expect(junction.peak_field_V_cm / whole).toBeGreaterThan(0.95);
      // At 300 K electrons of the n+ side spill over the junction and add to it.
      expect(junction.peak_field_V_cm / whole).toBeLessThan(1.4);
    }
    // Wider when cold, for the built-in potential grows.
    expect(runs[2].junctions[0].depletion_below_nm).toBeGreaterThan(runs[0].junctions[0].depletion_below_nm ?? NaN);
  });
});
