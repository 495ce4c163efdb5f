import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readBackup, writeBackup } from '../../src/storage/backup.ts';
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
    expect(reading).toEqual({ ok: true, projects: [bare(record('one')), bare({ ...record('two'), binned: 5 })], refused: [] });
  });

  it('names the project that was altered and still gives the others back', () => {
    const reading = readBackup(file.replace('300 K', '301 K'));
    expect(reading).toMatchObject({ ok: true, refused: [{ name: 'one', why: expect.stringContaining('check') }] });
    expect(reading.ok && reading.projects.map(({ name }) => name)).toEqual(['two']);
  });

  it('that was cut short still gives back every project that stands before the cut, and says that more followed', () => {
    const second = file.indexOf('"name": "two"');
    for (let cut = second; cut < file.length - 8; cut += 7) {
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

  it('is refused in words when it is something else, or newer', () => {
    expect(readBackup('nonsense')).toMatchObject({ ok: false, message: expect.stringContaining('not JSON') });
    expect(readBackup('null')).toMatchObject({ ok: false });
    expect(readBackup('{"format":"halfmark-design/1"}')).toMatchObject({ ok: false, message: expect.stringContaining('format') });
    expect(readBackup('{"format":"halfmark-backup/3","projects":[]}')).toMatchObject({ ok: false, message: expect.stringContaining('version 3') });
    expect(readBackup('{"format":"halfmark-backup/1"}')).toMatchObject({ ok: false, message: expect.stringContaining('no list') });
    expect(readBackup('{"format":"halfmark-backup/2","projects":[null,7,{}]}')).toMatchObject({ ok: true, projects: [], refused: [{ name: 'number 1' }, {}, {}] });
  });
});
