import { describe, expect, it } from 'vitest';
import { sources } from '../../presets/index.ts';
import { starters } from '../../src/design/starters/index.ts';
import type { Design } from '../../src/design/types.ts';
import { ledgerTables } from '../../src/result/ledger.ts';
import { solveDesign } from '../../src/result/solve-design.ts';
import type { Result } from '../../src/result/types.ts';
import { shown } from '../../src/workings/step.ts';
import { workingsOf } from '../../src/workings/workings-of.ts';
import { workingsText } from '../../src/workings/text.ts';
import type { Workings } from '../../src/workings/workings.ts';
import { byHand, closeToDigits, everyStep, lastOf } from './by-hand.ts';

interface Case {
  name: string;
  design: Design;
}

const starter = (id: string): Design => structuredClone(starters.find((s) => s.id === id)!.design);

/** The starters, and designs that take the laws which no starter takes. */
const CASES: Case[] = [
  ...starters.map(({ id, design }) => ({ name: id, design })),
  { name: 'narrowed diode with Kane bands', design: { ...starter('pn-diode'), assumptions: { narrowing: true, nonParabolic: true } } },
  { name: 'Boltzmann diode', design: { ...starter('pn-diode'), assumptions: { statistics: 'boltzmann' } } },
  { name: 'channel by the affinity rule, hot', design: { ...starter('modulation-doped'), conditions: { temperature: '77 K' }, requirements: [], assumptions: { alignment: 'affinity' } } },
  { name: 'metal by its work function', design: { ...starter('schottky'), top: { kind: 'barrier', metal: 'Ti', pinning: 'none' } } },
  { name: 'undoped layer at 20 K', design: { ...starter('back-field'), conditions: { temperature: '20 K' }, requirements: [], layers: starter('back-field').layers.map((layer) => ({ ...layer, dopants: [] })), interfaces: [] } },
  { name: 'metal by the exact transmission', design: { ...starter('schottky'), assumptions: { transmission: 'exact' } } },
  { name: 'metal half pinned', design: { ...starter('schottky'), top: { kind: 'barrier', metal: 'Ti', pinning: '0.3' } } },
];

function solved(design: Design): Result {
  const answer = solveDesign(design);
  if (answer.kind !== 'result') throw new Error(JSON.stringify(answer));
  return answer.result;
}

const all = CASES.map(({ name, design }) => {
  const result = solved(design);
  const tables = ledgerTables(result);
  const figures = tables.flatMap((table) => table.rows.flatMap((row) => table.columns.map((column) => ({ table, row, column, workings: workingsOf(design, result, { table: table.id, index: row.index, column: column.id }) }))));
  return { name, design, result, figures };
});

const place = (name: string, w: Workings): string => `${name}: ${w.title}`;

const WORDS = ['class', 'regime', 'kind', 'source', 'transport', 'material'];

describe('the workings', () => {
  it('exist for every figure that the ledger shows, with its own title, value and unit', () => {
    let count = 0;
    for (const { figures } of all) {
      for (const { workings, row, column } of figures) {
        expect(workings.value).toEqual(row.cells[column.id].lines);
        expect(workings.title).toContain(column.heading);
        expect(workings.unit).toBe(column.unit);
        expect(workings.steps.length + workings.remarks.length, workings.title).toBeGreaterThan(0);
        count++;
      }
    }
    expect(count).toBeGreaterThan(500);
  });

  it('work every line out again from the numbers as they are printed', () => {
    const wrong: string[] = [];
    let lines = 0;
    for (const { name, figures } of all) {
      for (const { workings } of figures) {
        for (const step of everyStep(workings)) {
          if (step.kind === 'law') continue;
          lines++;
          const { mine, its } = byHand(step);
          if (!closeToDigits(mine, its)) wrong.push(`${place(name, workings)}: ${shown(step).text}: ${mine} against ${its}`);
        }
      }
    }
    expect(wrong).toEqual([]);
    expect(lines).toBeGreaterThan(3000);
  });

  it('end at the figure that the ledger shows', () => {
    const wrong: string[] = [];
    let figures = 0;
    for (const { name, figures: of } of all) {
      for (const { workings, row, column } of of) {
        const { value } = row.cells[column.id];
        if (typeof value !== 'number' || WORDS.includes(column.id)) continue;
        figures++;
        const last = lastOf(workings);
        if (last === null || !(Math.abs(last - value) <= 1e-9 * Math.abs(value))) wrong.push(`${place(name, workings)}: ${last} against ${value}`);
      }
    }
    expect(wrong).toEqual([]);
    expect(figures).toBeGreaterThan(300);
  });

  it('say where every value stands, in a work that the list of sources holds or as an own value', () => {
    const keys = new Set<string>();
    for (const { name, figures } of all) {
      for (const { workings } of figures) {
        for (const step of everyStep(workings)) {
          for (const { known } of shown(step).symbols) {
            const { origin } = known;
            if (origin.from === 'source') {
              expect(Object.hasOwn(sources, origin.key), `${place(name, workings)}: ${known.words}: ${origin.key}`).toBe(true);
              expect(origin.text).toBe(sources[origin.key]);
              keys.add(origin.key);
            } else if (origin.from === 'this design') expect(known.path === '' ? known.sign : known.path, known.words).toMatch(/\S/);
          }
        }
      }
    }
    expect(keys.size).toBeGreaterThan(10);
  });

  it('give finite numbers only, each with words', () => {
    for (const { name, figures } of all) {
      for (const { workings } of figures) {
        for (const step of everyStep(workings)) {
          for (const { known, value } of shown(step).symbols) {
            expect(Number.isNaN(known.value), `${place(name, workings)}: ${known.words}`).toBe(false);
            expect(value).not.toBe('–');
            expect(known.words.length).toBeGreaterThan(2);
          }
        }
      }
    }
  });

  it('flag a value of the person’s own', () => {
    const design = starter('schottky');
    const { material, dopants } = design.layers[0];
    design.custom = { dopants: [{ id: 'mine', host: material, kind: 'donor', depth: '60 meV', source: 'our own Hall data' }] };
    design.layers[0].dopants = [{ ...dopants![0], dopant: 'mine' }];
    delete design.layers[0].dopants[0].model;
    const w = workingsOf(design, solved(design), { table: 'layers', index: 0, column: 'n' });
    const depth = w.steps.flatMap((s) => shown(s).symbols).find(({ known }) => known.path.endsWith(':mine depth'))!;
    expect(depth.known.origin).toEqual({ from: 'own value', text: 'our own Hall data' });
  });

  it('set other published barriers of the pair beside the one in force', () => {
    const design = starter('pn-diode');
    const { rivals, steps } = workingsOf(design, solved(design), { table: 'contacts', index: 0, column: 'barrierN' });
    expect(rivals.some(({ words }) => words.startsWith('measured barrier'))).toBe(true);
    expect(rivals.some(({ words }) => words.startsWith('work function less affinity'))).toBe(true);
    expect(steps.some((s) => shown(s).symbols.some(({ known }) => known.origin.from === 'source' && known.words.includes('measured')))).toBe(true);
  });

  it('are refused for a result of another design, and for a figure that is not there', () => {
    const [diode, channel] = [starter('pn-diode'), starter('modulation-doped')];
    const result = solved(diode);
    expect(() => workingsOf(channel, result, { table: 'layers', index: 0, column: 'n' })).toThrow('not of this design');
    expect(() => workingsOf(diode, result, { table: 'layers', index: 99, column: 'n' })).toThrow('row 99');
    expect(() => workingsOf(diode, result, { table: 'layers', index: 0, column: 'colour' })).toThrow('colour');
  });

  it('as text name the figure, the formula, each value and its source', () => {
    const design = starter('pn-diode');
    const text = workingsText(workingsOf(design, solved(design), { table: 'layers', index: 1, column: 'gap' }));
    expect(text).toContain('Gap of drift: 1.125 eV');
    expect(text).toContain('Eg = Eg,0K − (α T^2)/(T + β) → Eg = 1.1245 eV');
    expect(text).toContain('Thurmond');
    expect(text).toContain('seen in print');
  });
});
