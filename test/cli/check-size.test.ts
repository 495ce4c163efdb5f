import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { run } from '../../src/cli/run.ts';
import type { Design, Requirement } from '../../src/design/types.ts';
import { MOBILITY_NOTE } from '../../src/result/mobility-note.ts';
import type { SizedAnswer } from '../../src/requirements/size.ts';
import type { Result } from '../../src/result/types.ts';
import { contactDesign } from '../requirements/designs.ts';

const folder = mkdtempSync(join(tmpdir(), 'halfmark-check-'));
afterAll(() => rmSync(folder, { recursive: true }));

interface Heard { code: number; out: string; error: string }

async function call(...args: string[]): Promise<Heard> {
  let out = '';
  let error = '';
  const code = await run(args, { out: (t) => void (out += t), error: (t) => void (error += t), stdin: async () => '' });
  return { code, out, error };
}

let files = 0;
function file(requirements: Requirement[], change?: (design: Design) => void): string {
  const path = join(folder, `${files++}.json`);
  writeFileSync(path, JSON.stringify({ ...contactDesign(change), requirements }));
  return path;
}

const met: Requirement = { quantity: 'sheetResistance', of: 'cap', max: '1 kohm', over: 'temperatureRange' };
const broken: Requirement = { quantity: 'contactResistivity', of: 'top', max: '1e-9 ohm cm^2' };
/** Aluminium share that leaves its range at one end of its tolerance. */
const beyond = (d: Design): void => {
  d.variables = [{ name: 'x', value: '0.98', tolerance: '0.03', range: ['0.5', '0.9'] }];
  d.layers[0] = { name: 'cap', material: 'AlGaAs', x: 'x', thickness: '30 nm' };
  d.layers[1] = { name: 'base', material: 'GaAs', thickness: '100 nm', dopants: [{ dopant: 'Si', concentration: '1e18 cm^-3' }] };
};

describe('halfmark check', () => {
  it('prints one line a requirement, and ends with 0 where all are met', async () => {
    const { code, out, error } = await call('check', file([met, { quantity: 'degenerate', of: 'cap', min: true }]), '--tolerances', 'stated');
    expect([code, error]).toEqual([0, `halfmark: ${MOBILITY_NOTE}\n`]);
    const lines = out.trimEnd().split('\n');
    expect(lines).toHaveLength(2);
    expect(lines[0]).toMatch(/^met {8}sheet resistance of cap at most 1000 ohm; worst \d+(\.\d+)? ohm at (-40|125) degC, Ncap -10 %, tcap -3 nm; margin \d+(\.\d+)? times$/);
    expect(lines[1]).toMatch(/^met {8}cap degenerate; worst yes at .*; margin \d+(\.\d+)? kT$/);
  });

  it('says that mobilities are those of 300 K only where a figure rests on one away from it', async () => {
    const room: Requirement = { quantity: 'sheetResistance', of: 'cap', max: '1 kohm' };
    expect((await call('check', file([room]), '--tolerances', 'none')).error).toBe('');
    expect((await call('check', file([room]), '--tolerances', 'none', '--set', 'temperature=350 K')).error).toBe(`halfmark: ${MOBILITY_NOTE}\n`);
    expect((await call('check', file([{ quantity: 'degenerate', of: 'cap', min: true, over: 'temperatureRange' }]), '--tolerances', 'none')).error).toBe('');
  });

  it('ends with 1 where one is not met', async () => {
    const { code, out } = await call('check', file([met, broken]), '--tolerances', 'none');
    expect(code).toBe(1);
    expect(out).toMatch(/^met .*\nnot met {4}contact resistivity of top at most 1e-9 ohm cm\^2; worst .* ohm cm\^2 at .*; missed by a factor [\d.e+]+\n$/);
  });

  it('takes variables, the temperature and the tolerances from the command line', async () => {
    const path = file([{ quantity: 'sheetResistance', of: 'cap', max: '250 ohm' }]);
    const worst = async (...args: string[]): Promise<number> => Number(/worst ([\d.]+) ohm/.exec((await call('check', path, ...args)).out)?.[1]);
    const nominal = await worst('--tolerances', 'none');
    expect(await worst('--tolerances', 'stated')).toBeGreaterThan(1.1 * nominal);
    // Twice the thickness with its 3 nm: half the sheet resistance, but for the doping.
    expect((await worst('--set', 'tcap=120 nm', '--tolerances', 'none')) / nominal).toBeCloseTo(0.5, 3);
    expect((await call('check', path, '--set', 'temperature=77 K')).out).toMatch(/at -196\.[12] degC/);
  });

  it('ends with 3 where the verdict stays open, or the design has no answer', async () => {
    const open = await call('check', file([{ quantity: 'carrierDensity', of: 'base', min: '1 cm^-3' }], beyond), '--tolerances', 'stated');
    expect(open.code).toBe(3);
    expect(open.out).toMatch(/^no answer {2}carrier density of base at least 1 cm\^-3; worst .*; no answer at \d+ points?, first at 26.9 degC, x \+0.03: layers\[0\]\.x/m);
    const missing = await call('check', file([{ quantity: 'leakage', of: 'bottom', max: '1 A/cm^2' }]), '--tolerances', 'none');
    expect(missing.code).toBe(3);
    expect(missing.out).toMatch(/^no answer {2}saturation current density of bottom/);
  });

  it('ends with 1 where one is found broken, whatever else stays open', async () => {
    expect((await call('check', file([{ quantity: 'carrierDensity', of: 'base', min: '1 cm^-3' }, { quantity: 'carrierDensity', of: 'base', min: '1e20 cm^-3' }], beyond), '--tolerances', 'stated')).code).toBe(1);
  });

  it('says so where there is nothing to judge', async () => {
    const { code, out, error } = await call('check', file([]));
    expect([code, out]).toEqual([0, '']);
    expect(error).toMatch(/no requirements/);
  });

  it('keeps a hostile name on its line and out of the terminal', async () => {
    const name = 'cap\u001b[31m\nmet  everything';
    const { out } = await call('check', file([{ ...met, of: name }], (d) => { d.layers[0].name = name; }), '--tolerances', 'none');
    expect(out.trimEnd().split('\n')).toHaveLength(1);
    expect(out).not.toContain('\u001b');
  });

  it('refuses wrong input with one line and exit code 2', async () => {
    for (const [args, line] of [
      [['check', file([{ ...met, of: 'cup' }])], /requirements\[0\]\.of: there is nothing called 'cup'; did you mean cap\?/],
      [['check', file([met]), '--tolerances', 'al'], /--tolerances is 'al'; all, stated, none would do; did you mean all\?/],
      [['check'], /no FILE/],
    ] as [string[], RegExp][]) {
      const { code, out, error } = await call(...args);
      expect([code, out]).toEqual([2, '']);
      expect(error).toMatch(line);
      expect(error).toMatch(/^halfmark: [^\n]*\n$/);
    }
  });
});

describe('halfmark compute', () => {
  it('carries the judged requirements in the result', async () => {
    const { code, out } = await call('compute', file([{ ...met, over: 'temperature' }, broken]));
    expect(code).toBe(0);
    const { requirements } = JSON.parse(out) as Result;
    expect(requirements?.map((r) => [r.quantity, r.of, r.limit, r.met])).toEqual([['sheetResistance', 'cap', 1000, true], ['contactResistivity', 'top', 1e-9, false]]);
    expect(requirements?.[0].at?.temperature_K).toBeGreaterThan(200);
    expect(requirements?.[0].margin).toBeCloseTo(1000 / (requirements?.[0].worst as number), 6);
  });
});

describe('halfmark size', () => {
  const requirements: Requirement[] = [met, { quantity: 'carrierDensity', of: 'cap', max: '1e20 cm^-3' }];

  it('prints the interval with what ends it, and the best point', async () => {
    const { code, out, error } = await call('size', file(requirements), '--variable', 'Ncap', '--tolerances', 'stated', '--points', '9');
    expect([code, error]).toEqual([0, '']);
    expect(out).toMatch(/^Ncap from \S+ cm\^-3 to \S+ cm\^-3 meets every requirement\n {2}lower end: sheet resistance of cap at most 1000 ohm at \S+ degC, Ncap -10 %, tcap -3 nm\n {2}upper end: carrier density of cap at most 1e20 cm\^-3 at 26.9 degC, Ncap \+10 %\nbest: \S+ cm\^-3, /);
  });

  it('prints the same as JSON', async () => {
    const { out } = await call('size', file(requirements), '--variable', 'Ncap', '--tolerances', 'none', '--points', '9', '--json', '--from', '1e19 cm^-3');
    const answer = JSON.parse(out) as SizedAnswer;
    expect(answer.intervals).toHaveLength(1);
    expect(answer.from).toBe(1e19);
    expect(answer.intervals[0].to.value / 1e20).toBeGreaterThan(0.99);
    expect(answer.scan.length).toBeGreaterThan(8);
    expect(out).not.toMatch(/NaN|Infinity/);
  });

  it('ends with 1 where no value meets everything, and names what blocks', async () => {
    const { code, out } = await call('size', file([met, broken]), '--variable', 'Ncap', '--tolerances', 'none', '--points', '9');
    expect(code).toBe(1);
    expect(out).toMatch(/^no value of Ncap in its range meets every requirement; the nearest is .*\n {2}blocked by: contact resistivity of top at most 1e-9 ohm cm\^2, which no value meets\n/);
  });

  it('ends with 3 where there is no answer at any value', async () => {
    const { code, error } = await call('size', file([{ quantity: 'leakage', of: 'bottom', max: '1 A/cm^2' }]), '--variable', 'Ncap', '--tolerances', 'none', '--points', '5');
    expect(code).toBe(3);
    expect(error).toMatch(/no accepted answer at any value of Ncap/);
  });

  it('refuses wrong input with one line and exit code 2', async () => {
    const path = file(requirements);
    for (const [args, line] of [
      [['size', path], /no variable is named/],
      [['size', path, '--variable', 'Ncup'], /did you mean Ncap\?/],
      [['size', path, '--variable', 'Ncap', '--points', '2.5'], /--points is '2\.5'; a whole number/],
      [['size', path, '--variable', 'Ncap', '--from', '5 nm'], /--from: '5 nm' is not of the kind of Ncap/],
      [['size', path, '--variable', 'Ncap', '--json=yes'], /--json takes no value/],
      [['size', path, '--variable', 'Ncap', '--jsn'], /did you mean --json\?/],
    ] as [string[], RegExp][]) {
      const { code, out, error } = await call(...args);
      expect([code, out], args.join(' ')).toEqual([2, '']);
      expect(error).toMatch(line);
      expect(error).toMatch(/^halfmark: [^\n]*\n$/);
    }
  });
});
