import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { addVariant, loneVariant, removeVariant } from '../../src/state/variants.ts';
import { setTitle } from '../../src/state/commands/index.ts';
import { readBackup, writeBackup } from '../../src/storage/backup.ts';
import { keptVariants, readVariants, variantsFault, workOf } from '../../src/storage/kept-variants.ts';
import { recordFault, type ProjectRecord } from '../../src/storage/record.ts';
import { designFixture } from '../state/design-fixture.ts';

const all = removeVariant(addVariant(addVariant(loneVariant(setTitle(designFixture(), 'first')), 'thin', 'b'), 'thick', 'c'), 'b');
const record = (change: Partial<ProjectRecord> = {}): ProjectRecord => ({
  id: 'p', name: 'p', created: 1, changed: 2, revision: 3, designText: JSON.stringify(designFixture()), history: { past: [], future: [] }, view: {}, variants: keptVariants(all), binned: null, ...change,
});

describe('variants as they are kept', () => {
  it('come back as they were, the open one from the project itself', () => {
    const back = readVariants(keptVariants(all), designFixture());
    expect(back).toEqual({ ok: true, all: { ...all, list: all.list.map((variant) => (variant.id === 'c' ? { ...variant, design: designFixture() } : variant)) } });
  });

  it('that are garbled make a damaged record, and are never taken for none', () => {
    const good = keptVariants(all);
    expect(variantsFault(good)).toBeNull();
    const bad: unknown[] = [[], {}, [null], good.slice(0, 2), [...good, good[0]], good.map((row) => ({ ...row, kept: null })), good.map((row) => (row.kept ? { ...row, kept: { designText: '{"a' } } : row)), good.map((row) => ({ ...row, removed: true }))];
    for (const variants of bad) expect(recordFault({ ...record(), variants }), JSON.stringify(variants)).toMatch(/variants|which of/);
    expect(recordFault({ ...record(), variants: undefined })).toBeNull();
  });

  it('one that cannot be read is told, with its text', () => {
    const kept = keptVariants(all).map((row) => (row.id === 'base' ? { ...row, kept: { designText: '{"format":"halfmark-design/9"}', history: { past: [], future: [] } } } : row));
    expect(readVariants(kept, designFixture())).toMatchObject({ ok: false, designText: expect.stringContaining('design/9') });
  });

  it('count as work: another name or design is noticed, another history is not', () => {
    const work = workOf(record());
    expect(workOf({ ...record(), variants: record().variants!.map((row) => (row.id === 'b' ? { ...row, name: 'x' } : row)) })).not.toBe(work);
    expect(workOf({ ...record(), variants: record().variants!.map((row) => (row.kept ? { ...row, kept: { ...row.kept, history: { past: [{ label: 'x', changes: [] }], future: [] } } } : row)) })).toBe(work);
  });

  it('are carried by a backup, and what was changed there is noticed', () => {
    const file = writeBackup([record()], 0);
    const reading = readBackup(file);
    expect(reading).toMatchObject({ ok: true, refused: [], projects: [{ variants: keptVariants(all) }] });
    expect(readBackup(file.replace('"name": "thin"', '"name": "then"'))).toMatchObject({ ok: true, projects: [], refused: [{ why: expect.stringContaining('check') }] });
  });

  it('are absent from a backup of the first version, which is still read whole', () => {
    const reading = readBackup(readFileSync(new URL('../fixtures/backup-1.json', import.meta.url), 'utf8'));
    expect(reading.ok && reading.refused).toEqual([]);
    expect(reading.ok && reading.projects.map(({ name }) => name).sort()).toHaveLength(3);
    expect(reading.ok && reading.projects.every((project) => !('variants' in project))).toBe(true);
  });
});
