import { deflateRawSync } from 'node:zlib';
import { afterEach, describe, expect, it } from 'vitest';
import { readDesign } from '../../src/design/read.ts';
import { toStack } from '../../src/design/stack.ts';
import type { Design } from '../../src/design/types.ts';
import { drawPlate } from '../../src/drawing/plate.ts';
import { svgText } from '../../src/drawing/svg-text.ts';
import { ledgerTsv } from '../../src/export/ledger-tsv.ts';
import { profileCsv } from '../../src/export/profile-csv.ts';
import { textOfLink } from '../../src/export/link.ts';
import { sheetPdf, sheetSvgs } from '../../src/export/sheet-files.ts';
import { solveDesign } from '../../src/result/solve-design.ts';
import type { Result } from '../../src/result/types.ts';
import { reviewSheet } from '../../src/sheet/review-sheet.ts';
import { apply, type Change, type Json } from '../../src/state/difference.ts';
import { History } from '../../src/state/history.ts';
import { readView } from '../../src/state/view.ts';
import { readBackup, writeBackup } from '../../src/storage/backup.ts';
import { wellFormed } from '../drawing/well-formed.ts';
import { FONTS } from '../export/fonts.ts';
import { objectsOf, readPdf } from '../export/read-pdf.ts';
import { readCsv } from '../export/read-csv.ts';
import { designFixture } from '../state/design-fixture.ts';
import { NAMES } from './hostile-names.ts';

/** Longest that a hostile text may hold the reader up, ms. A person would not notice a tenth of it; a busy machine is slower. */
const PATIENCE = 3000;
function quickly<T>(work: () => T): T {
  const started = performance.now();
  const value = work();
  expect(performance.now() - started).toBeLessThan(PATIENCE);
  return value;
}

const good = JSON.stringify(designFixture());
/** Every place in the design where an object begins. */
const objects = [...good.matchAll(/\{/g)].map((found) => found.index + 1);

afterEach(() => {
  const bare = {} as Record<string, unknown>;
  for (const key of ['polluted', 'format', 'x']) expect(bare[key]).toBe(undefined);
  expect(Object.keys(Object.prototype)).toEqual([]);
});

describe('a hostile design file', () => {
  it('is refused whichever object in it carries a key that every object has', () => {
    for (const key of ['__proto__', 'constructor', 'prototype', 'toString', 'hasOwnProperty']) {
      for (const place of objects) {
        const text = `${good.slice(0, place)}"${key}":{"polluted":1}${good[place] === '}' ? '' : ','}${good.slice(place)}`;
        expect(quickly(() => readDesign(text)).ok, text.slice(Math.max(0, place - 40), place + 40)).toBe(false);
      }
    }
  });

  it('is refused in words, however deeply it is nested', () => {
    for (const depth of [50, 5000, 400_000]) {
      for (const [open, close] of [['[', ']'], ['{"a":', '}']]) {
        const deep = open.repeat(depth) + '1' + close.repeat(depth);
        for (const text of [deep, open.repeat(depth), good.replace('"title":', `"custom":${deep},"title":`), good.replace(/"title":"[^"]*"/, `"title":${deep}`)]) {
          const reading = quickly(() => readDesign(text));
          expect(reading.ok).toBe(false);
          if (!reading.ok) for (const complaint of reading.complaints) expect(complaint.message.length + complaint.path.length).toBeLessThan(1000);
        }
      }
    }
  }, 60_000);

  it('is refused or answered with short sentences when its texts are enormous', () => {
    const megabytes = 'A'.repeat(4e6);
    const design = designFixture();
    const tries: unknown[] = [
      { ...design, format: megabytes }, { ...design, [megabytes]: 1 }, { ...design, top: { kind: megabytes } },
      { ...design, layers: [{ ...design.layers[0], thickness: megabytes }] }, { ...design, layers: [{ ...design.layers[0], material: megabytes }] },
      { ...design, layers: [{ ...design.layers[0], dopants: [{ dopant: megabytes, concentration: '1e17 cm^-3' }] }] }, { ...design, variables: [{ name: megabytes, value: '1' }] },
      { ...design, variables: [{ name: 'a', value: megabytes }] }, { ...design, layers: Array.from({ length: 20_000 }, () => ({ name: 'a', material: 'Si', thickness: '1 nm' })) },
      { ...design, layers: Array.from({ length: 300_000 }, () => 0) },
      { ...design, interfaces: Array.from({ length: 50_000 }, (_, i) => ({ above: `nowhere ${i}` })), layers: Array.from({ length: 2000 }, (_, i) => ({ name: `layer ${i}`, material: 'Si', thickness: '1 nm' })) },
    ];
    for (const document of tries) {
      const complaints = quickly(() => {
        const reading = readDesign(JSON.stringify(document));
        const answer = reading.ok ? toStack(reading.design) : reading;
        return answer.ok ? [] : answer.complaints;
      });
      expect(complaints.length).toBeGreaterThan(0);
      for (const { message } of complaints) expect(message.length).toBeLessThan(1000);
    }
    expect(quickly(() => readDesign(JSON.stringify({ ...design, notes: 'A'.repeat(10e6) }))).ok).toBe(false);
  }, 60_000);

  it('cannot make variables multiply each other into endless work', () => {
    const variables = [{ name: 'v0', value: '1' }, ...Array.from({ length: 400 }, (_, i) => ({ name: `v${i + 1}`, value: `(v${i}+v${i})/2+v${i}*0` }))];
    const design = { ...designFixture(), variables };
    design.layers[0].thickness = 'v400*100 nm';
    quickly(() => toStack(design));
  });

  it('is refused when it is something else altogether', () => {
    for (const text of ['', ' ', '\u0000', '\ufeff', 'null', '1', '"halfmark-design/1"', '[]', '{}', '<svg onload="x"/>', 'PK\u0003\u0004', '{"format":"halfmark-design/1e999"}', '{"format":["halfmark-design/1"]}', '{"format":"halfmark-design/99999999999"}', `${good}${good}`]) {
      expect(quickly(() => readDesign(text)).ok, text.slice(0, 40)).toBe(false);
    }
  });
});

describe('a hostile link', () => {
  it('is refused in words whatever stands in it', async () => {
    for (const text of ['', '=', '%00', '../../etc', 'A'.repeat(10e6), '<script>', 'A', 'AA', '𝒳', '_'.repeat(1e6), '%E0%A4%A']) {
      await expect(textOfLink(`http://localhost/#design=${text}`), text.slice(0, 20)).rejects.toThrow(/^The link /);
    }
  });

  it('unpacks to no more than a design has, and holds no more memory than that, however it was packed', async () => {
    for (const fill of [0x20, 0x5b]) {
      // 200 MB in some 200 kB.
      const bomb = deflateRawSync(Buffer.alloc(200e6, fill), { level: 6 }).toString('base64url');
      expect(bomb.length).toBeLessThan(1e6);
      const floor = process.memoryUsage().rss;
      await expect(textOfLink(`http://localhost/#design=${bomb}`)).rejects.toThrow('more than any design has');
      expect(process.memoryUsage().rss - floor).toBeLessThan(100e6);
    }
  }, 60_000);
});

describe('a hostile project in the database or in a backup', () => {
  const steps: unknown[] = [
    [{ path: ['__proto__', 'polluted'], after: 1 }], [{ path: ['constructor', 'prototype', 'polluted'], after: 1 }], [{ path: ['layers', '__proto__'], after: {} }],
    [{ path: ['layers'], at: -1, out: [], into: [1] }], [{ path: ['layers'], at: 1e9, out: [], into: [] }], [{ path: ['layers'], at: Number.NaN, out: [], into: [1] }],
    [{ path: Array.from({ length: 100_000 }, () => 'a'), after: 1 }], [{ path: ['layers', 1e12, 'name'], after: 1 }], [{ path: [], after: null }],
  ];

  it('never reaches beyond its own design through a step of its history', () => {
    for (const changes of steps) {
      const history = new History();
      history.restore({ past: [{ label: 'odd', changes }], future: [{ label: 'odd', changes }] });
      const design = designFixture();
      const before = JSON.stringify(design);
      for (const move of ['undo', 'redo'] as const) {
        history[move](design);
        expect(JSON.stringify(design)).toBe(before);
      }
      try {
        apply(design as unknown as Json, changes as Change[]);
      } catch (error) {
        expect(error).toBeInstanceOf(RangeError);
      }
      expect(JSON.stringify(design)).toBe(before);
    }
  });

  it('keeps its view to itself', () => {
    const view = readView(JSON.parse('{"__proto__":{"polluted":1},"constructor":{"prototype":{"polluted":1}}}'));
    expect((view as { polluted?: unknown }).polluted).toBe(undefined);
    expect(readView({ long: 'A'.repeat(1e6) })).toEqual({});
  });

  it('is left out of a backup that was written by hand, and the page is not held up', () => {
    for (const text of ['[{"format":"halfmark-backup/1"}]', `{"format":"halfmark-backup/1","projects":${'['.repeat(1e5)}`, `{"format":"halfmark-backup/1","projects":[${'{"a":'.repeat(1e5)}`, `{"format":"halfmark-backup/1","projects":[${'{'.repeat(1e6)}`, `{"format":"halfmark-backup/1","projects":[{"__proto__":{"polluted":1}}]}`]) {
      const reading = quickly(() => readBackup(text));
      if (reading.ok) expect(reading.projects).toEqual([]);
    }
    const record = { id: 'a', name: 'a', created: 1, changed: 1, revision: 1, designText: good, history: { past: [], future: [] }, view: {}, binned: null };
    const mine = writeBackup([record], 0).replace('"name": "a"', '"name": "a", "id": "b", "revision": 99');
    const reading = readBackup(mine);
    // The place in the database is the browser's to give, not the file's.
    expect(reading.ok && reading.projects.some((project) => 'id' in project && (project as { id: unknown }).id === 'b')).toBe(false);
  });
});

describe('a backup that was edited by a hostile hand', () => {
  const record = (name: string, view: Record<string, unknown> = {}) => ({ id: name, name, created: 1, changed: 1, revision: 1, designText: good, history: { past: [], future: [] }, view, binned: null });

  it('loses no whole project beside one that is nested beyond all depth', () => {
    for (const depth of [1000, 20_000, 400_000]) {
      for (const [open, close] of [['[', ']'], ['{"a":', '}']]) {
        const text = writeBackup([record('first'), record('odd', { odd: '@' }), record('last')], 0).replace('"@"', `${open.repeat(depth)}1${close.repeat(depth)}`);
        const reading = quickly(() => readBackup(text));
        expect(reading.ok && reading.projects.map(({ name }) => name)).toEqual(['first', 'last']);
        expect(reading.ok && reading.refused.map(({ name }) => name)).toEqual(['odd']);
      }
    }
  }, 60_000);

  it('notices every change of a letter, project by project', () => {
    const text = writeBackup([record('first'), record('second')], 0);
    const places = [...text.matchAll(/[A-Za-z0-9]/g)].map(({ index }) => index).filter((_, i) => i % 7 === 0);
    const whole = readBackup(text);
    expect(whole.ok && whole.projects).toHaveLength(2);
    for (const place of places) {
      const reading = quickly(() => readBackup(`${text.slice(0, place)}${text[place] === 'x' ? 'y' : 'x'}${text.slice(place + 1)}`));
      // Either the file says that it is none, or what came through is word for word what was written.
      if (reading.ok) for (const project of reading.projects) expect([JSON.stringify(whole.ok && whole.projects[0]), JSON.stringify(whole.ok && whole.projects[1])]).toContain(JSON.stringify(project));
    }
  }, 60_000);

  it('gives back every project that stands whole before the cut, wherever it is cut', () => {
    const text = writeBackup([record('first'), record('second'), record('third')], 0);
    let most = 0;
    for (let at = 0; at < text.length; at += 23) {
      const reading = quickly(() => readBackup(text.slice(0, at)));
      const names = reading.ok ? reading.projects.map(({ name }) => name) : [];
      expect(names).toEqual(['first', 'second', 'third'].slice(0, names.length));
      // The farther the cut, the more comes back.
      expect(names.length).toBeGreaterThanOrEqual(most);
      most = names.length;
    }
    expect(most).toBe(3);
  }, 60_000);
});

const designs = NAMES.map((name): { name: string; design: Design } => {
  const design = designFixture();
  design.title = name;
  design.notes = name;
  design.layers.forEach((layer, i) => (layer.name = `${name}${i === 0 ? '' : i}`));
  delete design.interfaces;
  delete design.requirements;
  return { name, design };
});
function solved(design: Design): Result | null {
  const answer = solveDesign(design);
  return answer.kind === 'result' ? answer.result : null;
}

describe('markup, formulas and controls in names', () => {
  const results = designs.map(({ name, design }) => ({ name, design, result: solved(design) })).filter((row): row is { name: string; design: Design; result: Result } => row.result !== null);

  it('are most of them names like any other, and are solved', () => {
    expect(results.length).toBeGreaterThan(NAMES.length / 2);
  });

  it('stay text in every drawing', () => {
    const looks = new Set<string>();
    for (const { name, result } of results) {
      for (const element of wellFormed(svgText(drawPlate(result, { style: 'light', width: 800, height: 450, frame: 'full' })))) {
        looks.add(element.name);
        for (const [key, value] of Object.entries(element.attributes)) {
          expect(key, name).not.toMatch(/^on|^style$|href/i);
          expect(value, name).not.toMatch(/javascript:|url\((?!#)/i);
        }
      }
    }
    for (const name of looks) expect(['svg', 'title', 'desc', 'defs', 'linearGradient', 'stop', 'clipPath', 'rect', 'path', 'line', 'text', 'tspan', 'g']).toContain(name);
  }, 60_000);

  it('are no formulas in the tables', () => {
    const formula = /^\s*[=+\-@＝＋－＠]/;
    const isNumber = (cell: string): boolean => cell === '' || Number.isFinite(Number(cell));
    for (const { name, result } of results) {
      const cells = [...readCsv(profileCsv(result)).flat(), ...ledgerTsv(result).split(/[\t\n]/)];
      for (const cell of cells) if (!isNumber(cell)) expect(formula.test(cell), `${JSON.stringify(cell.slice(0, 60))} of ${name.slice(0, 40)}`).toBe(false);
      const widths = new Set(readCsv(profileCsv(result)).map((row) => row.length));
      expect(widths.size, name).toBe(1);
    }
  }, 60_000);

  it('stay text in the review sheet, as SVG and as PDF', () => {
    for (const { name, design, result } of results.filter((_, i) => i % 3 === 0)) {
      const pages = reviewSheet({ design, result, requirements: [], author: name, date: name, revision: name, style: 'screen', paper: 'A4' });
      for (const { text } of sheetSvgs(pages, 'sheet')) for (const element of wellFormed(text)) expect(['script', 'img', 'b', 'image', 'a', 'foreignObject', 'style']).not.toContain(element.name);
      const bytes = sheetPdf(pages, FONTS, { title: name, author: name, provenance: result.provenance });
      expect(readPdf(bytes)).toHaveLength(pages.length);
      // A reader looks for these only outside strings and streams: names of the dictionaries.
      for (const { body } of objectsOf(bytes).values()) expect(body.replace(/\((?:\\.|[^\\()])*\)|<[0-9A-Fa-f]*>/gs, '')).not.toMatch(/\/(JS|JavaScript|OpenAction|AA|URI|Launch|EmbeddedFile)\b/);
    }
  }, 60_000);
});
