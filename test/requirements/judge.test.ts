import { describe, expect, it } from 'vitest';
import { REQUIREMENT_QUANTITIES, type RequirementQuantityName } from '../../src/requirements/quantities.ts';
import { standingWords } from '../../src/requirements/verdict.ts';
import { judge, judging, type JudgeOptions } from '../../src/requirements/judge.ts';
import { solveDesign } from '../../src/result/solve-design.ts';
import { starters } from '../../src/design/starters/index.ts';
import type { Design, Requirement } from '../../src/design/types.ts';
import type { RequirementResult, Result } from '../../src/result/types.ts';
import { contactDesign } from './designs.ts';

function rowsOf(design: Design, requirements: Requirement[], options: JudgeOptions = {}): RequirementResult[] {
  const judgement = judge({ ...design, requirements }, options);
  if (judgement.kind === 'complaints') throw new Error(JSON.stringify(judgement.complaints));
  return judgement.requirements;
}

function resultOf(design: Design, set: Record<string, string> = {}): Result {
  const answer = solveDesign(design, { set, accuracy: 1e-5 });
  if (answer.kind !== 'result') throw new Error(JSON.stringify(answer));
  return answer.result;
}

const relative = (a: unknown, b: number): number => Math.abs((a as number) / b - 1);

describe('the requirements of a design', () => {
  const none = { tolerances: 'none' } as const;

  it('are judged by the figures of the result', () => {
    const diode = structuredClone(starters.find((s) => s.id === 'pn-diode')?.design as Design);
    const { layers, junctions, contacts } = resultOf(diode);
    const [layer, junction] = [layers[1], junctions[0]];
    const expected: [RequirementQuantityName, string, Requirement['max'], number][] = [
      ['sheetResistance', layer.name, '1 ohm', layer.sheet_ohm as number],
      ['resistivity', layer.name, '1 ohm cm', layer.resistivity_ohm_cm as number],
      ['carrierDensity', layer.name, '1 cm^-3', Math.max(layer.n_cm3, layer.p_cm3)],
      ['electronDensity', layer.name, '1 cm^-3', layer.n_cm3],
      ['holeDensity', layer.name, '1 cm^-3', layer.p_cm3],
      ['ionisedShare', layer.name, '0.1', Math.min(...layer.ionised.map((i) => i.fraction))],
      ['ecMinusEf', layer.name, '1 eV', layer.ec_minus_ef_eV],
      ['efMinusEv', layer.name, '1 eV', layer.ef_minus_ev_eV],
      ['builtIn', junction.above, '1 V', Math.abs(junction.builtin_V as number)],
      ['depletionWidth', junction.above, '1 nm', (junction.depletion_above_nm as number) + (junction.depletion_below_nm as number)],
      ['depletionAbove', junction.above, '1 nm', junction.depletion_above_nm as number],
      ['depletionBelow', junction.above, '1 nm', junction.depletion_below_nm as number],
      ['peakField', junction.above, '1 V/cm', junction.peak_field_V_cm],
      ['capacitance', junction.above, '1 F/cm^2', junction.capacitance_F_cm2 as number],
      ['conductionOffset', junction.above, '1 eV', junction.delta_ec_eV],
      ['valenceOffset', junction.above, '1 eV', junction.delta_ev_eV],
      ['contactResistivity', 'top', '1 ohm cm^2', contacts[0].rho_c_ohm_cm2 as number],
      ['leakage', 'top', '1 A/cm^2', contacts[0].saturation_A_cm2 as number],
      ['barrier', 'top', '1 eV', contacts[0].barrier_p_eV as number],
      ['barrierN', 'top', '1 eV', contacts[0].barrier_n_eV as number],
      ['barrierP', 'top', '1 eV', contacts[0].barrier_p_eV as number],
      ['surfaceField', 'top', '1 V/cm', Math.abs(contacts[0].surface_field_V_cm)],
    ];
    const rows = rowsOf(diode, expected.map(([quantity, of, max]) => ({ quantity, of, max: max as string })), none);
    rows.forEach((row, i) => {
      const value = expected[i][3];
      expect(value, row.quantity).not.toBeNull();
      // Another accuracy of the mesh and another start of the iteration.
      expect(Math.abs((row.worst as number) - value), row.quantity).toBeLessThanOrEqual(2e-3 * Math.abs(value) + 1e-5);
    });
  });

  it('know every quantity of the table on some starter, with a figure and not only a name', () => {
    const seen = new Set<string>();
    for (const { design } of starters) {
      const ends = ['top', 'bottom'].filter((side) => design[side as 'top' | 'bottom'].kind === 'barrier');
      const requirements = Object.entries(REQUIREMENT_QUANTITIES).flatMap(([quantity, row]): Requirement[] => {
        const unit = row.unit === 'nm' ? 'nm' : row.unit;
        const limit = row.kind === 'flag' ? { max: false } : { max: `1 ${unit}`.trim() };
        return row.of.flatMap((of) => (of === 'contact' ? ends : of === 'junction' ? [design.layers[0].name] : [design.layers[0].name]).map((name) => ({ quantity, of: name, ...limit })));
      });
      for (const row of rowsOf(design, requirements, none)) if (row.worst !== null) seen.add(row.quantity);
    }
    expect(Object.keys(REQUIREMENT_QUANTITIES).filter((name) => !seen.has(name))).toEqual([]);
  });

  it('have a margin in times or as a difference, met from 1 or from 0 up', () => {
    const design = contactDesign();
    const { layers, contacts } = resultOf(design);
    const sheet = layers[0].sheet_ohm as number;
    const [a, b, c, d] = rowsOf(design, [
      { quantity: 'sheetResistance', of: 'cap', max: `${2 * sheet} ohm` },
      { quantity: 'sheetResistance', of: 'cap', min: `${2 * sheet} ohm` },
      { quantity: 'barrierN', of: 'top', max: '0.65 eV' },
      { quantity: 'barrierN', of: 'top', min: '0.65 eV' },
    ], none);
    expect([a.met, b.met, c.met, d.met]).toEqual([true, false, true, false]);
    expect(a.margin).toBeCloseTo(2, 9);
    expect(b.margin).toBeCloseTo(0.5, 9);
    expect(c.margin).toBeCloseTo(0.1, 9);
    expect(d.margin).toBeCloseTo(-0.1, 9);
    expect([a.limit, a.unit, c.unit, c.margin_kind, a.margin_kind]).toEqual([2 * sheet, 'ohm', 'eV', 'difference', 'ratio']);
    expect(contacts[0].barrier_n_eV).toBe(0.55);
    expect([a, b, c, d].map(standingWords)).toEqual(['margin 2 times', 'missed by a factor 2', 'margin 0.1 eV', 'missed by 0.1 eV']);
    expect(standingWords({ ...b, margin: 1.66e-5 })).toBe('missed by a factor 60200');
    expect(standingWords({ ...b, margin: 0 })).toBe('missed by more than any factor');
  });

  it('take degenerate and fully depleted as asked for or forbidden', () => {
    const design = contactDesign((d) => { d.layers[0].thickness = '4 nm'; });
    const rows = rowsOf(design, [
      { quantity: 'degenerate', of: 'cap', min: true }, { quantity: 'degenerate', of: 'base', max: false }, { quantity: 'degenerate', of: 'base', min: true },
      { quantity: 'fullyDepleted', of: 'base', max: false }, { quantity: 'fullyDepleted', of: 'base', min: true },
    ], none);
    expect(rows.map((r) => [r.worst, r.met])).toEqual([[true, true], [false, true], [false, false], [false, true], [false, false]]);
    const { layers } = resultOf(design);
    expect(rows[0].margin).toBeCloseTo(3 - layers[0].ec_minus_ef_eV / (8.617333262e-5 * 300), 3);
    const thin = contactDesign((d) => { d.layers[0] = { name: 'cap', material: 'Si', thickness: '20 nm', dopants: [{ dopant: 'P', concentration: '1e17 cm^-3' }] }; d.layers[1].dopants = []; });
    expect(resultOf(thin).layers[0].fully_depleted).toBe(true);
    const [forbidden, asked, share] = rowsOf(thin, [{ quantity: 'fullyDepleted', of: 'cap', max: false }, { quantity: 'fullyDepleted', of: 'cap', min: true }, { quantity: 'depletedShare', of: 'cap', max: '0.99' }], none);
    expect([forbidden.met, asked.met, share.met, share.worst]).toEqual([false, true, false, 1]);
  });

  it('call degenerate and depleted what the result calls so, on every starter and temperature', () => {
    let [degenerate, depleted] = [0, 0];
    for (const { id, design } of starters) {
      for (const temperature of ['77 K', '300 K', '450 K']) {
        const { layers } = resultOf(design, { temperature });
        const solid = layers.filter((l) => !l.insulator);
        const rows = rowsOf(design, solid.flatMap((l) => (['degenerate', 'fullyDepleted'] as const).map((quantity) => ({ quantity, of: l.name, min: true }))), { ...none, set: { temperature } });
        solid.forEach((l, i) => {
          const [d, f] = rows.slice(2 * i, 2 * i + 2);
          expect([d.worst, f.worst], `${id} ${l.name} ${temperature}`).toEqual([l.regime === 'degenerate', l.fully_depleted]);
          expect([d.met, f.met]).toEqual([d.worst, f.worst]);
          if (d.met) degenerate++;
          if (f.met) depleted++;
        });
      }
    }
    expect(degenerate).toBeGreaterThan(5);
    expect(depleted).toBeGreaterThan(0);
  });

  it('hold a dopant against its published solubility', () => {
    const [row] = rowsOf(contactDesign(), [{ quantity: 'solubility', of: 'cap', max: '1' }], none);
    expect(row.worst).toBeGreaterThan(0);
    const [double] = rowsOf(contactDesign((d) => { (d.variables as { value: string }[])[0].value = '1e20 cm^-3'; }), [{ quantity: 'solubility', of: 'cap', max: '1' }], none);
    expect(relative(double.worst, 2 * (row.worst as number))).toBeLessThan(1e-9);
  });

  it('are two rows where a row has both ends', () => {
    const rows = rowsOf(contactDesign(), [{ quantity: 'barrier', of: 'top', max: '0.7 eV', min: '0.5 eV' }], none);
    expect(rows.map((r) => [r.bound, r.met])).toEqual([['max', true], ['min', true]]);
  });
});

describe('the worst case of a design', () => {
  const requirements: Requirement[] = [
    { quantity: 'contactResistivity', of: 'top', max: '1e-5 ohm cm^2', over: 'temperatureRange' },
    { quantity: 'sheetResistance', of: 'cap', max: '250 ohm', over: 'temperatureRange' },
    { quantity: 'sheetResistance', of: 'cap', max: '250 ohm' },
  ];

  it('is that of a full factorial of separate solves', () => {
    const design = contactDesign((d) => {
      d.variables?.push({ name: 'phi', value: '0.55 eV', tolerance: '50 meV' });
      d.top = { kind: 'barrier', barrier: 'phi', imageForce: false };
    });
    const [contact, sheet] = rowsOf(design, requirements, { tolerances: 'stated', samples: 16 });
    let [worstContact, worstSheet] = [0, 0];
    for (const temperature of ['-40 degC', '300 K', '125 degC']) {
      for (const Ncap of ['4.5e19 cm^-3', '5e19 cm^-3', '5.5e19 cm^-3']) {
        for (const tcap of ['57 nm', '60 nm', '63 nm']) {
          for (const phi of ['0.5 eV', '0.55 eV', '0.6 eV']) {
            const { contacts, layers } = resultOf(design, { temperature, Ncap, tcap, phi });
            worstContact = Math.max(worstContact, contacts[0].rho_c_ohm_cm2 as number);
            worstSheet = Math.max(worstSheet, layers[0].sheet_ohm as number);
          }
        }
      }
    }
    expect(relative(contact.worst, worstContact)).toBeLessThan(2e-3);
    expect(relative(sheet.worst, worstSheet)).toBeLessThan(1e-6);
    expect(contact.at?.words).toBe('-40 degC, Ncap -10 %, phi +50 meV');
    expect(sheet.at?.words).toMatch(/^(-40|125) degC, Ncap -10 %, tcap -3 nm$/);
    expect([contact.corners_sufficed, sheet.corners_sufficed]).toEqual([true, true]);
  });

  it('comes out the same by single directions as by all corners', () => {
    const design = contactDesign();
    const all = rowsOf(design, requirements, { samples: 0 });
    const some = rowsOf(design, requirements, { samples: 0, mostFactorial: 0 });
    some.forEach((row, i) => {
      expect(relative(row.worst, all[i].worst as number)).toBeLessThan(1e-3);
      expect(row.at?.words).toBe(all[i].at?.words);
    });
  });

  it('stays at the design temperature unless the range is asked for', () => {
    const limit = { quantity: 'contactResistivity', of: 'top', max: '1e-5 ohm cm^2' };
    const [here, ranging] = rowsOf(contactDesign(), [limit, { ...limit, over: 'temperatureRange' }], { samples: 4 });
    expect(here.at?.temperature_K).toBe(300);
    expect(ranging.at?.temperature_K).toBeCloseTo(233.15, 9);
    expect(ranging.worst).toBeGreaterThan(1.05 * (here.worst as number));
    expect(rowsOf(contactDesign(), [limit], { samples: 0, set: { temperature: '77 K' } })[0].at?.temperature_K).toBe(77);
  });

  it('never counts a point without an answer as met', () => {
    const design = contactDesign((d) => {
      d.variables = [{ name: 'x', value: '0.98', tolerance: '0.03' }];
      d.layers[0] = { name: 'cap', material: 'AlGaAs', x: 'x', thickness: '30 nm' };
      d.layers[1] = { name: 'base', material: 'GaAs', thickness: '100 nm', dopants: [{ dopant: 'Si', concentration: '1e18 cm^-3' }] };
    });
    const [row] = rowsOf(design, [{ quantity: 'carrierDensity', of: 'base', min: '1 cm^-3' }], { tolerances: 'stated' });
    expect([row.met, row.judged]).toEqual([false, false]);
    expect(row.unanswered?.reason).toMatch(/layers\[0\]\.x/);
    expect(row.unanswered?.words).toMatch(/x \+0\.03/);
    expect(row.worst).toBeGreaterThan(1);
    const [missing] = rowsOf(contactDesign(), [{ quantity: 'leakage', of: 'bottom', max: '1 A/cm^2' }], { tolerances: 'none' });
    expect([missing.met, missing.judged, missing.worst, missing.margin]).toEqual([false, false, null, null]);
  });

  it('tells why there is no figure, and what would give one', () => {
    const reasons = rowsOf(contactDesign((d) => {
      d.layers.push({ name: 'spacer', material: 'Si', thickness: '50 nm', dopants: [] }, { name: 'oxide', material: 'SiO2', thickness: '20 nm' });
      d.bottom = { kind: 'open' };
    }), [
      { quantity: 'contactResistivity', of: 'bottom', max: '1e-6 ohm cm^2' }, { quantity: 'ionisedShare', of: 'spacer', min: '0.9' }, { quantity: 'sheetResistance', of: 'oxide', max: '100 ohm' },
    ], { tolerances: 'none' }).map(({ unanswered }) => unanswered?.reason);
    expect(reasons).toEqual([
      'the bottom is an open surface, which has no contact resistivity; give it a metal or a barrier, or ask it of the other end', 'spacer has no dopant', 'oxide is an insulator, which has no sheet resistance',
    ]);
    const [neutral] = rowsOf(contactDesign(), [{ quantity: 'leakage', of: 'bottom', max: '1 A/cm^2' }], { tolerances: 'none' });
    expect(neutral.unanswered?.reason).toMatch(/^the bottom is a neutral contact, which has no saturation current density; give it a metal/);
  });

  it('ends a tolerance of an active share at all atoms, and does not take a share beyond that for one', () => {
    const design = contactDesign((d) => {
      d.variables = [{ name: 'active', value: '0.9', tolerance: '20 %' }];
      d.layers[0] = { name: 'cap', material: 'Si', thickness: '60 nm', dopants: [{ dopant: 'P', concentration: '1e20 cm^-3', activation: 'active' }] };
    });
    const over: Requirement = { quantity: 'electronDensity', of: 'cap', max: '5e19 cm^-3' };
    const [row] = rowsOf(design, [over], { tolerances: 'stated' });
    expect([row.unanswered, row.at?.words]).toEqual([null, '26.9 degC, active +20 %']);
    expect(row.worst).toBe(resultOf({ ...design, variables: [] , layers: [{ ...design.layers[0], dopants: [{ dopant: 'P', concentration: '1e20 cm^-3' }] }, design.layers[1]] }).layers[0].n_cm3);
    const wrong = judge({ ...design, requirements: [over] }, { set: { active: '1.1' }, tolerances: 'stated' });
    expect(wrong).toMatchObject({ kind: 'complaints', complaints: [{ path: 'layers[0].dopants[0].activation' }] });
  });

  it('tells where the solver refuses: a gap that closes on the way to the hot end', () => {
    const design = contactDesign((d) => {
      d.custom = { materials: [{ id: 'closing', gap: { law: 'linear', at300K: '0.3 eV', slope: '4 meV/K' }, affinity: '4 eV', permittivity: 12, electronMass: 1, holeMass: 1, source: 'invented' }] };
      d.layers = [{ name: 'cap', material: 'closing', thickness: '100 nm', dopants: [{ kind: 'donor', depth: '1 meV', concentration: '1e17 cm^-3' }] }];
      d.top = { kind: 'neutral' };
    });
    const [cold, ranging] = rowsOf(design, [{ quantity: 'carrierDensity', of: 'cap', min: '1e10 cm^-3' }, { quantity: 'carrierDensity', of: 'cap', min: '1e10 cm^-3', over: 'temperatureRange' }], { tolerances: 'none' });
    expect([cold.met, ranging.met, ranging.judged]).toEqual([true, false, false]);
    expect(ranging.unanswered?.reason).toMatch(/gap/);
  });

  it('takes a requirement found broken as not met, whatever else has no answer', () => {
    const design = contactDesign((d) => { d.variables = [{ name: 'x', value: '0.98', tolerance: '0.03' }]; d.layers[0] = { name: 'cap', material: 'AlGaAs', x: 'x', thickness: '30 nm' }; d.layers[1].material = 'GaAs'; d.layers[1].dopants = []; });
    const [row] = rowsOf(design, [{ quantity: 'carrierDensity', of: 'base', min: '1e19 cm^-3' }], { tolerances: 'stated' });
    expect([row.met, row.judged]).toEqual([false, true]);
  });

  it('runs in steps that can be left', () => {
    const steps = judging({ ...contactDesign(), requirements });
    const first = steps.next();
    expect(first.done).toBe(false);
    expect(first.value).toMatchObject({ done: 1 });
    for (let i = 0; i < 5; i++) expect(steps.next().done).toBe(false);
    expect(steps.return({ kind: 'judged', requirements: [], evaluations: 0 }).done).toBe(true);
  });

  it('is plain data that JSON keeps', () => {
    const rows = rowsOf(contactDesign(), [...requirements, { quantity: 'depletionWidth', of: 'top', max: '1 um' }], { samples: 2 });
    expect(JSON.parse(JSON.stringify(rows))).toEqual(rows);
  });
});

describe('a solve for the page', () => {
  it('does not evaluate tolerances', () => {
    expect(resultOf({ ...contactDesign(), requirements: [{ quantity: 'sheetResistance', of: 'cap', max: '1 ohm' }] }).requirements).toBeUndefined();
  });
});
