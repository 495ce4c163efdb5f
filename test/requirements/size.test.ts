import { describe, expect, it } from 'vitest';
import { judge } from '../../src/requirements/judge.ts';
import { size, sizeSteps, type SizedAnswer, type SizeOptions } from '../../src/requirements/size.ts';
import type { Design } from '../../src/design/types.ts';
import { contactDesign } from './designs.ts';

/** Cap doping against two sides: a contact resistivity and a sheet resistance from below, the published solubility from above. */
const sized = (): Design => contactDesign((d) => {
  d.requirements = [
    { quantity: 'contactResistivity', of: 'top', max: '1e-6 ohm cm^2', over: 'temperatureRange' },
    { quantity: 'sheetResistance', of: 'cap', max: '400 ohm', over: 'temperatureRange' },
    { quantity: 'solubility', of: 'cap', max: '1' },
  ];
});

function answer(design: Design, options: SizeOptions): SizedAnswer {
  const found = size(design, options);
  if (found.kind === 'complaints') throw new Error(found.complaints.map((c) => `${c.path}: ${c.message}`).join('\n'));
  return found;
}

function allMet(design: Design, name: string, text: string): boolean {
  const judgement = judge(design, { set: { [name]: text }, tolerances: 'stated', samples: 0, inside: 1 });
  if (judgement.kind === 'complaints') throw new Error(JSON.stringify(judgement.complaints));
  return judgement.requirements.every((row) => row.met);
}

describe('sizing a variable of a design', () => {
  it('tells what is to be cautioned of at the best value, and only there', () => {
    const resistance = (max: string): Design => contactDesign((d) => { d.requirements = [{ quantity: 'sheetResistance', of: 'cap', max }]; });
    const quick = { variable: 'Ncap', tolerances: 'none', samples: 0, points: 9 } as const;
    // The lower the resistance, the better: the best is the end of the range, 5e20, above what was published as reachable.
    const above = answer(resistance('300 ohm'), quick).best!;
    expect(above.value).toBeCloseTo(5e20, -18);
    expect(above.cautions.join('; ')).toMatch(/cap: P at 5\.0e\+20 cm\^-3 lies above the \S+ cm\^-3 that was published as reachable/);
    const below = answer(resistance('3000 ohm'), { ...quick, to: '1e20 cm^-3' }).best!;
    expect(below.cautions.join('; ')).not.toMatch(/reachable/);
  });

  it('finds the interval of a fine scan of full judgements', () => {
    const design = sized();
    const found = answer(design, { variable: 'Ncap', tolerances: 'stated', samples: 4, points: 13 });
    expect(found.scale).toBe('log');
    expect(found.confirmed).toBe(true);
    expect(found.intervals).toHaveLength(1);
    const [{ from, to }] = found.intervals;
    const count = 24;
    let [low, high] = [Infinity, 0];
    for (let k = 0; k <= count; k++) {
      const value = 1e18 * 500 ** (k / count);
      if (allMet(design, 'Ncap', `${value} cm^-3`)) [low, high] = [Math.min(low, value), Math.max(high, value)];
    }
    const step = 500 ** (1 / count);
    expect(from.value).toBeLessThanOrEqual(low * 1.001);
    expect(from.value).toBeGreaterThan(low / step);
    expect(to.value).toBeGreaterThanOrEqual(high / 1.001);
    expect(to.value).toBeLessThan(high * step);
    // Either edge is met itself and not met a little beyond.
    for (const [edge, beyond] of [[from, 1 / 1.003], [to, 1.003]] as const) {
      expect(allMet(design, 'Ncap', `${edge.value} cm^-3`)).toBe(true);
      expect(allMet(design, 'Ncap', `${edge.value * beyond} cm^-3`)).toBe(false);
    }
    expect(from.requirement?.words).toMatch(/^contact resistivity of top at most 1e-6 ohm cm\^2$/);
    expect(from.at).toBe('-40 degC, Ncap -10 %');
    expect(to.requirement?.words).toMatch(/solubility of cap at most 1/);
    expect(to.at).toMatch(/Ncap \+10 %/);
    expect(found.best?.value).toBeGreaterThan(from.value);
    expect(found.best?.value).toBeLessThan(to.value);
    expect(found.best?.requirements.map((r) => r.met)).toEqual([true, true, true]);
    expect(JSON.parse(JSON.stringify(found))).toEqual(found);
  });

  it('counts the defaults for what is not stated: the window is narrower', () => {
    const stated = answer(sized(), { variable: 'Ncap', tolerances: 'stated', samples: 0, points: 7 });
    const all = answer(sized(), { variable: 'Ncap', samples: 0, points: 7 });
    expect(all.intervals[0].from.value).toBeGreaterThan(1.02 * stated.intervals[0].from.value);
    expect(all.intervals[0].from.at).toBe('-40 degC, Ncap -10 %, barrier +50 meV');
    const none = answer(sized(), { variable: 'Ncap', tolerances: 'none', points: 7 });
    expect(none.intervals[0].from.value).toBeLessThan(stated.intervals[0].from.value);
  });

  it('tells the nearest miss and its blockers where nothing meets everything', () => {
    const design = sized();
    design.requirements = [{ quantity: 'sheetResistance', of: 'cap', max: '100 ohm' }, { quantity: 'carrierDensity', of: 'cap', max: '1e19 cm^-3' }, { quantity: 'builtIn', of: 'cap', max: '2 V' }];
    const found = answer(design, { variable: 'Ncap', tolerances: 'none' });
    expect(found.intervals).toEqual([]);
    expect(found.blockers.map((b) => b.index)).toEqual([0, 1]);
    expect(found.blockers.map((b) => b.met_somewhere)).toEqual([true, true]);
    expect(found.best?.requirements.map((r) => r.met)).toEqual([false, false, true]);
  });

  it('sizes on a straight scale between ends that are close, and takes ends from outside', () => {
    const design = sized();
    design.requirements = [{ quantity: 'sheetResistance', of: 'cap', max: '250 ohm' }];
    const found = answer(design, { variable: 'tcap', tolerances: 'none', from: '40 nm', to: '90 nm' });
    expect(found.scale).toBe('linear');
    const [{ from, to }] = found.intervals;
    expect(to.reason).toBe('range');
    expect(to.text).toBe('90 nm');
    // Sheet resistance goes as the thickness to the -1, so one judgement gives the edge in closed form.
    const judgement = judge(design, { tolerances: 'none' });
    const sheet = judgement.kind === 'judged' ? (judgement.requirements[0].worst as number) : NaN;
    expect(from.value / ((60e-7 * sheet) / 250)).toBeCloseTo(1, 3);
  });

  it('never takes values without an answer for met', () => {
    const design = contactDesign((d) => {
      d.variables = [{ name: 'x', value: '0.5', tolerance: '0.03', range: ['0.2', '1'] }];
      d.layers[0] = { name: 'cap', material: 'AlGaAs', x: 'x', thickness: '30 nm' };
      d.layers[1] = { name: 'base', material: 'GaAs', thickness: '100 nm', dopants: [{ dopant: 'Si', concentration: '1e18 cm^-3' }] };
      d.requirements = [{ quantity: 'carrierDensity', of: 'base', min: '1e17 cm^-3' }];
    });
    const found = answer(design, { variable: 'x', tolerances: 'stated', samples: 0, points: 9 });
    const [{ to }] = found.intervals;
    expect(to.reason).toBe('no answer');
    expect(to.value).toBeGreaterThan(0.969);
    expect(to.value).toBeLessThanOrEqual(0.97);
    expect(to.at).toMatch(/x \+0\.03/);
    expect(found.refusal).toMatch(/layers\[0\]\.x/);
  });

  it('finds an interval where the ends and the middle of the range have no answer', () => {
    const design = contactDesign((d) => {
      d.variables = [{ name: 'x', value: '0.5', range: ['-2', '0.9'] }];
      d.layers[0] = { name: 'cap', material: 'AlGaAs', x: 'x', thickness: '30 nm' };
      d.layers[1] = { name: 'base', material: 'GaAs', thickness: '100 nm', dopants: [{ dopant: 'Si', concentration: '1e18 cm^-3' }] };
      d.requirements = [{ quantity: 'carrierDensity', of: 'base', min: '1e17 cm^-3', over: 'temperatureRange' }];
    });
    const found = answer(design, { variable: 'x', tolerances: 'none', to: '1.5' });
    expect(found.intervals).toHaveLength(1);
    expect(Math.abs(found.intervals[0].from.value)).toBeLessThan(1e-3);
    expect(found.intervals[0].to.value).toBeCloseTo(1, 2);
  });

  it('runs in steps with progress, and can be left', () => {
    const steps = sizeSteps(sized(), { variable: 'Ncap' });
    for (let i = 0; i < 10; i++) {
      const { done, value } = steps.next();
      expect(done).toBe(false);
      expect(value).toHaveProperty('of');
    }
    steps.return({ kind: 'complaints', complaints: [] });
  });

  it('complains of what cannot be sized', () => {
    const complaint = (options: SizeOptions, change: (d: Design) => void = () => {}): string => {
      const design = sized();
      change(design);
      const found = size(design, options);
      return found.kind === 'complaints' ? found.complaints.map((c) => `${c.path}: ${c.message}`).join('\n') : 'sized';
    };
    expect(complaint({ variable: 'Ncup' })).toMatch(/no variable 'Ncup' to size; did you mean Ncap\?/);
    expect(complaint({ variable: 'Ncap' }, (d) => { delete d.variables?.[0].range; })).toMatch(/^variables\[0\]\.range: is missing; to size Ncap there must be a range/);
    expect(complaint({ variable: 'Ncap', from: '2 nm' })).toMatch(/^--from: '2 nm' is not of the kind of Ncap/);
    expect(complaint({ variable: 'Ncap', from: '1e30 cm^-3' })).toMatch(/no range to search/);
    expect(complaint({ variable: 'Ncap', to: 'rubbish' })).toMatch(/^--to: 'rubbish'/);
    expect(complaint({ variable: 'Ncap', set: { Ncap: '1e19 cm^-3' } })).toMatch(/leave it out/);
    expect(complaint({ variable: 'Ncap' }, (d) => { d.requirements = []; })).toMatch(/^requirements: there are none/);
    expect(complaint({ variable: 'Ncap' }, (d) => { d.layers[0].thickness = '5 kg'; })).toMatch(/^layers\[0\]\.thickness/);
  });
});
