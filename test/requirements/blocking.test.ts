import { describe, expect, it } from 'vitest';
import { rankMetals, type Ranking } from '../../src/contacts/rank-metals.ts';
import { orderedRows } from '../../src/contacts/metal-order.ts';
import { readDesign } from '../../src/design/read.ts';
import type { Design, Requirement } from '../../src/design/types.ts';
import { judge } from '../../src/requirements/judge.ts';
import { size } from '../../src/requirements/size.ts';
import { verdictLine } from '../../src/requirements/verdict.ts';
import { solveDesign } from '../../src/result/solve-design.ts';

/** A metal on n silicon that is cold enough for nothing to pass. */
function design(temperature: string, requirements: Requirement[]): Design {
  const reading = readDesign(JSON.stringify({
    format: 'halfmark-design/1', title: 'cold contact', conditions: { temperature, temperatureRange: ['4 K', '300 K'] }, variables: [{ name: 'N', value: '1e16 cm^-3', range: ['1e14 cm^-3', '1e16 cm^-3'] }],
    layers: [{ name: 'n', material: 'Si', thickness: '2 um', dopants: [{ dopant: 'P', concentration: 'N' }] }], top: { kind: 'barrier', barrier: '0.7 eV' }, bottom: { kind: 'neutral' }, requirements,
  }));
  if (!reading.ok) throw new Error(JSON.stringify(reading.complaints));
  return reading.design;
}

function judged(d: Design) {
  const found = judge(d, { tolerances: 'none' });
  if (found.kind !== 'judged') throw new Error(JSON.stringify(found));
  return found.requirements;
}

describe('a contact that blocks', () => {
  it('says so in the result, beside the missing figure', () => {
    const answer = solveDesign(design('4 K', []));
    if (answer.kind !== 'result') throw new Error(JSON.stringify(answer));
    const [top, bottom] = answer.result.contacts;
    expect([top.rho_c_ohm_cm2, top.blocks]).toEqual([null, true]);
    expect(bottom.blocks, 'an ideal end is no barrier').toBe(false);
  });

  it('misses every largest resistivity, with its corner and no margin at all', () => {
    const [row] = judged(design('300 K', [{ quantity: 'contactResistivity', of: 'top', max: '1e9 ohm cm^2', over: 'temperatureRange' }]));
    expect(row).toMatchObject({ met: false, judged: true, worst: null, blocks: true, margin: 0, unanswered: null });
    expect(row.at!.temperature_K).toBe(4);
    for (const words of ['not met', 'worst blocks; no finite resistivity at 4 K', 'margin none']) expect(verdictLine(row)).toContain(words);
    expect(JSON.parse(JSON.stringify(row))).toEqual(row);
  });

  it('meets a least resistivity, without end', () => {
    const [row] = judged(design('4 K', [{ quantity: 'contactResistivity', of: 'top', min: '1 ohm cm^2' }]));
    expect(row).toMatchObject({ met: true, blocks: true, margin: null });
  });

  it('is not told from one without an answer by a verdict of "no answer"', () => {
    const [row] = judged(design('4 K', [{ quantity: 'contactResistivity', of: 'bottom', max: '1 ohm cm^2' }]));
    expect(row).toMatchObject({ met: false, judged: false, blocks: false });
    expect(row.unanswered!.points).toBe(1);
  });

  it('ends a sizing as a requirement that nothing meets', () => {
    const d = design('300 K', [{ quantity: 'contactResistivity', of: 'top', max: '1 ohm cm^2', over: 'temperatureRange' }]);
    const found = size(d, { variable: 'N', tolerances: 'none', points: 5, samples: 0 });
    if (found.kind !== 'sized') throw new Error(JSON.stringify(found));
    expect(found.intervals).toEqual([]);
    expect(found.blockers).toHaveLength(1);
    expect(found.refusal).toBeNull();
    expect(found.best!.requirements[0].blocks).toBe(true);
  });

  it('stands in the ranking behind every finite one, and before those without a figure', () => {
    const steps = rankMetals(design('300 K', []), { side: 'top', tolerances: 'none' });
    let step = steps.next();
    while (!step.done) step = steps.next();
    const { rows, majority } = step.value as Ranking;
    const blocked = rows.filter(({ blocks }) => blocks !== null);
    expect(blocked.length).toBeGreaterThan(5);
    for (const row of blocked) {
      expect([row.worst_ohm_cm2, row.blocks], row.metal).toEqual([null, 'worst']);
      expect(row.worst_at, row.metal).toContain('4 K');
      expect(row.points.worst!.temperature_K).toBe(4);
    }
    const order = orderedRows(rows, { by: 'worst', descending: false }, majority).map(({ worst_ohm_cm2, blocks }) => (worst_ohm_cm2 !== null ? 0 : blocks !== null ? 1 : 2));
    expect(order).toEqual([...order].sort());
  });
});
