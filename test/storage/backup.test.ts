import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { LARGEST_FILE, readBackup, withoutUndo, writeBackup } from '../../src/storage/backup.ts';
import type { ProjectRecord } from '../../src/storage/record.ts';
import { designFixture } from '../state/design-fixture.ts';

const record = (name: string): ProjectRecord => ({
  id: name, name, created: 1, changed: 2, revision: 7, designText: JSON.stringify(designFixture()), history: { past: [{ label: 'a', changes: [{ path: ['title'], before: 'x', after: 'y' }] }], future: [] }, view: { depth: 'even' }, binned: null,
});
const file = writeBackup([record('one'), { ...record('two'), binned: 5 }], 0);

describe('a backup', () => {
  it('gives every project back as it was, but for its place in this browser', () => {
    const reading = readBackup(file);
    const bare = ({ id: _, revision: __, ...rest }: ProjectRecord) => rest;
    expect(reading).toEqual({ ok: true, projects: [bare(record('one')), bare({ ...record('two'), binned: 5 })], shelf: [], refused: [] });
  });

  it('names the project that was altered and still gives the others back', () => {
    const reading = readBackup(file.replace('300 K', '301 K'));
    expect(reading).toMatchObject({ ok: true, refused: [{ name: 'one', why: expect.stringContaining('check') }] });
    expect(reading.ok && reading.projects.map(({ name }) => name)).toEqual(['two']);
  });

  it('holds the shelf, each entry with a check of its own, and leaves out what was altered or is no entry', () => {
    const metal = { list: 'metals' as const, entry: { id: 'M', workFunction: '4.2 eV', source: 'measured' } };
    const dopant = { list: 'dopants' as const, entry: { id: 'D', host: 'GaAs', kind: 'donor' as const, depth: '6 meV', source: 'measured' } };
    const offset = { list: 'offsets' as const, entry: { first: 'A', second: 'B', deltaEc: { constant: '0.1 eV' }, source: 'measured' } };
    const kept = writeBackup([record('one')], 0, [metal, dopant]);
    expect(readBackup(kept)).toMatchObject({ ok: true, shelf: [metal, dopant], refused: [] });
    const pairs = writeBackup([], 0, [offset]);
    expect(readBackup(pairs)).toMatchObject({ ok: true, shelf: [offset], refused: [] });
    expect(readBackup(pairs.replace('0.1 eV', '0.2 eV'))).toMatchObject({ ok: true, shelf: [], refused: [{ name: 'A to B of the shelf', why: expect.stringContaining('check') }] });
    expect(readBackup(kept.replace('4.2 eV', '4.3 eV'))).toMatchObject({ ok: true, shelf: [dopant], refused: [{ name: 'M of the shelf', why: expect.stringContaining('check') }] });
    expect(readBackup(kept.replace('"workFunction"', '"workfunction"'))).toMatchObject({ ok: true, shelf: [dopant], refused: [{ name: 'M of the shelf' }] });
    for (const shelf of ['7', 'null', '[null]', '[{"list":"__proto__"}]', '[{"list":"metals","entry":{"id":"a"}}]', '[{"list":"offsets","entry":null}]', '[{"list":"offsets","entry":{"first":"A","second":7}}]']) {
      const reading = readBackup(`{"format":"halfmark-backup/3","projects":[],"shelf":${shelf}}`);
      expect(reading.ok && reading.shelf, shelf).toEqual([]);
    }
    // A backup of an earlier version had none.
    expect(readBackup('{"format":"halfmark-backup/2","projects":[]}')).toMatchObject({ ok: true, shelf: [] });
  });

  it('that was cut short still gives back every project that stands before the cut, and says that more followed', () => {
    const second = file.indexOf('"name": "two"');
    // The shelf stands behind the projects: a cut there leaves both.
    const end = file.lastIndexOf('"check"');
    for (let cut = second; cut < end; cut += 7) {
      const reading = readBackup(file.slice(0, cut));
      expect(reading.ok && reading.projects.map(({ name }) => name), String(cut)).toEqual(['one']);
      expect(reading.ok && reading.refused.map(({ why }) => why).join()).toContain('cut short');
    }
  });

  it('gives back nothing that it was not given, however it is cut or garbled', () => {
    const whole = readBackup(file);
    const known = whole.ok ? whole.projects.map((project) => JSON.stringify(project)) : [];
    fc.assert(
      fc.property(fc.nat(file.length - 1), fc.nat(40), fc.string(), (at, length, text) => {
        const reading = readBackup(file.slice(0, at) + text + file.slice(at + length));
        if (reading.ok) for (const project of reading.projects) expect(known).toContain(JSON.stringify(project));
        else expect(reading.message).toMatch(/backup/);
      }),
      { numRuns: 300, seed: 5 },
    );
  });

  it('that is too large to be read is refused before it is parsed, and so is one packed to fill the memory', () => {
    const head = '{"format":"halfmark-backup/3","projects":';
    const started = performance.now();
    const floor = process.memoryUsage().rss;
    expect(readBackup(`${head}["${'A'.repeat(LARGEST_FILE)}"]}`)).toMatchObject({ ok: false, message: expect.stringMatching(/^This is no backup file: it has 50 MB, and more than 50 MB are not read\.$/) });
    for (const packed of [`[${'[],'.repeat(9e6)}0]`, `[${'0,'.repeat(9e6)}0]`, `${'['.repeat(9e6)}${']'.repeat(9e6)}`, `[{"a":${'{"a":'.repeat(9e6)}`, `[],"shelf":[${'{},'.repeat(9e6)}0]`]) {
      expect(readBackup(`${head}${packed}}`)).toMatchObject({ ok: false, message: expect.stringContaining('more single values than any backup') });
    }
    // Parsed, each of them would take hundreds of megabytes: its text alone has up to 45.
    expect(process.memoryUsage().rss - floor).toBeLessThan(300e6);
    expect(performance.now() - started).toBeLessThan(10_000);
    expect(readBackup(`${head}[${'0,'.repeat(20_000)}0]}`)).toMatchObject({ ok: false, message: expect.stringContaining('more than 10000 projects') });
    expect(readBackup(`${head}[],"shelf":[${'0,'.repeat(20_000)}0]}`)).toMatchObject({ ok: false, message: expect.stringContaining('more than 10000 projects') });
    // Brackets inside quotes are text: a design of any length in it is held to that of a design.
    expect(readBackup(writeBackup([{ ...record('long'), designText: `{"notes":"${'['.repeat(6e6)}"}` }, record('one')], 0))).toMatchObject({ ok: true, projects: [{ name: 'one' }], refused: [{ name: 'long', why: expect.stringContaining('longer') }] });
    const named = readBackup(file.replace('"name": "one"', `"name": "${'A'.repeat(1e6)}"`));
    expect(named.ok && named.refused[0].name.length).toBeLessThan(100);
  });

  it('as large as any is written by this program is read back', () => {
    const step = { label: 'a', changes: [{ path: ['layers', 0, 'thickness'], before: '1 nm', after: '2 nm' }] };
    const long = { ...record('long'), history: { past: Array.from({ length: 1000 }, () => step), future: [] } };
    const text = writeBackup(Array.from({ length: 225 }, () => long), 0);
    expect(text.length).toBeGreaterThan(0.9 * LARGEST_FILE);
    expect(text.length).toBeLessThan(LARGEST_FILE);
    const reading = readBackup(text);
    expect(reading.ok && [reading.projects.length, reading.refused.length]).toEqual([225, 0]);
  });

  it('can be written without undo, variants and all else as they are', () => {
    const kept = { designText: JSON.stringify(designFixture()), history: record('x').history };
    const two = { ...record('one'), variants: [{ id: 'a', name: 'a', removed: false, kept: null }, { id: 'b', name: 'b', removed: false, kept }] };
    const none = { past: [], future: [] };
    expect(withoutUndo(two)).toEqual({ ...two, history: none, variants: [two.variants[0], { ...two.variants[1], kept: { ...kept, history: none } }] });
    expect(readBackup(writeBackup([withoutUndo(two), withoutUndo(record('three'))], 0))).toMatchObject({ ok: true, refused: [] });
  });

  it('is refused in words when it is something else, or newer', () => {
    expect(readBackup('nonsense')).toMatchObject({ ok: false, message: expect.stringContaining('not JSON') });
    expect(readBackup('null')).toMatchObject({ ok: false });
    expect(readBackup('{"format":"halfmark-design/1"}')).toMatchObject({ ok: false, message: expect.stringContaining('format') });
    expect(readBackup('{"format":"halfmark-backup/4","projects":[]}')).toMatchObject({ ok: false, message: expect.stringContaining('version 4') });
    expect(readBackup('{"format":"halfmark-backup/1"}')).toMatchObject({ ok: false, message: expect.stringContaining('no list') });
    expect(readBackup('{"format":"halfmark-backup/2","projects":[null,7,{}]}')).toMatchObject({ ok: true, projects: [], refused: [{ name: 'number 1' }, {}, {}] });
  });
});
