import { describe, expect, it } from 'vitest';
import { readDesign } from '../../src/design/read.ts';
import type { Design, Requirement } from '../../src/design/types.ts';
import { judge } from '../../src/requirements/judge.ts';
import { size } from '../../src/requirements/size.ts';
import { Dice, randomFrom } from '../fuzz/dice.ts';

/** A layer of fixed donors into which acceptors are sized, over a junction: its carriers fall to none at the crossing and rise again, so that nothing about them is monotone. */
function drawn(seed: number): Design {
  const dice = new Dice(randomFrom(seed));
  const donors = dice.logBetween(1e17, 5e18);
  const text = (v: number, unit: string): string => `${v.toPrecision(5)} ${unit}`;
  const least: Requirement = { quantity: 'carrierDensity', of: 'layer', min: text(donors * dice.between(0.1, 0.7), 'cm^-3') };
  const others: Requirement[] = [
    { quantity: 'carrierDensity', of: 'layer', max: text(donors * dice.between(0.5, 8), 'cm^-3') },
    { quantity: 'ecMinusEf', of: 'layer', max: text(dice.between(0.1, 1.1), 'eV') },
    { quantity: 'depletionBelow', of: 'layer', min: text(dice.logBetween(5, 200), 'nm') },
    { quantity: 'peakField', of: 'layer', max: text(dice.logBetween(2e4, 1e6), 'V/cm') },
    { quantity: 'sheetResistance', of: 'layer', max: text(dice.logBetween(100, 1e5), 'ohm') },
    { quantity: 'builtIn', of: 'layer', max: text(dice.between(0.1, 0.9), 'V') },
  ];
  const reading = readDesign(JSON.stringify({
    format: 'halfmark-design/1', title: 'random', conditions: { temperature: text(dice.between(250, 400), 'K') },
    variables: [{ name: 'N', value: text(donors, 'cm^-3'), range: [text(donors / dice.between(10, 50), 'cm^-3'), text(donors * dice.between(3, 20), 'cm^-3')] }],
    top: { kind: 'neutral' }, bottom: { kind: 'neutral' },
    layers: [
      { name: 'layer', material: 'Si', thickness: text(dice.logBetween(150, 800), 'nm'), dopants: [{ dopant: 'P', concentration: text(donors, 'cm^-3') }, { dopant: 'B', concentration: 'N' }] },
      { name: 'below', material: 'Si', thickness: '2 um', dopants: [{ dopant: 'P', concentration: text(dice.logBetween(1e15, 1e17), 'cm^-3') }] },
    ],
    requirements: [least, ...(dice.chance(0.7) ? [dice.pick(others)] : [])],
  }));
  if (!reading.ok) throw new Error(`${seed}: ${JSON.stringify(reading.complaints)}`);
  return reading.design;
}

const STEPS = 40;

describe('sizing of fifty random designs', () => {
  it('has the intervals of a scan of full judgements, each edge met itself and failing next to it, also where nothing is monotone', () => {
    const seen = { several: 0, one: 0, none: 0 };
    for (let seed = 1; seed <= 50; seed++) {
      const d = drawn(seed);
      const met = (N: number): boolean => {
        const found = judge(d, { set: { N: `${N} cm^-3` }, tolerances: 'none', samples: 0 });
        if (found.kind !== 'judged') throw new Error(JSON.stringify(found));
        return found.requirements.every((row) => row.met);
      };
      const found = size(d, { variable: 'N', tolerances: 'none', samples: 0, points: 25 });
      if (found.kind !== 'sized') throw new Error(`${seed}: ${JSON.stringify(found.complaints)}`);
      const { intervals, from, to } = found;
      const inside = (N: number): boolean => intervals.some((i) => N >= i.from.value && N <= i.to.value);
      // Next to an edge rounding may decide; nowhere else do the scan and the intervals differ.
      const nearEdge = (N: number): boolean => intervals.some((i) => [i.from.value, i.to.value].some((e) => Math.abs(Math.log(N / e)) < 2e-3));
      for (let k = 0; k <= STEPS; k++) {
        const N = from * (to / from) ** (k / STEPS);
        if (!nearEdge(N)) expect(met(N), `design ${seed}, N = ${N}`).toBe(inside(N));
      }
      for (const interval of intervals) {
        for (const [edge, outward] of [[interval.from, 1 / 1.003], [interval.to, 1.003]] as const) {
          expect(met(edge.value), `design ${seed}, edge ${edge.value}`).toBe(true);
          if (edge.reason === 'requirement') expect(met(edge.value * outward), `design ${seed}, beyond ${edge.value}`).toBe(false);
        }
      }
      if (intervals.length === 0) {
        expect(found.blockers.length, `design ${seed}`).toBeGreaterThan(0);
        // The nearest miss: a value of the range, what blocks it, and by how much.
        expect(found.best, `design ${seed}`).not.toBeNull();
        for (const { index } of found.blockers) {
          const row = found.best?.requirements[index];
          expect(row?.met, `design ${seed}`).toBe(false);
          expect(Number.isFinite(row?.margin) || row?.unanswered, `design ${seed}`).toBeTruthy();
        }
      }
      seen[intervals.length > 1 ? 'several' : intervals.length === 1 ? 'one' : 'none']++;
    }
    expect(seen.several).toBeGreaterThan(8);
    expect(seen.one).toBeGreaterThan(5);
    expect(seen.none).toBeGreaterThan(1);
  }, 240_000);
});
