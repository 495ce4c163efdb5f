import Ajv2020 from 'ajv/dist/2020.js';
import { readFileSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { shapeComplaints } from '../../src/design/shape-complaints.ts';
import { starters } from '../../src/design/starters/index.ts';
import { schemaText } from '../../src/tools/schema-text.ts';

const ROOT = join(import.meta.dirname, '../..');
const text = readFileSync(join(ROOT, 'src/design/halfmark-design-1.schema.json'), 'utf8');
const validate = new Ajv2020({ strict: false }).compile(JSON.parse(text));
const fixtures = readdirSync(join(ROOT, 'test/fixtures/designs')).map((name) => JSON.parse(readFileSync(join(ROOT, 'test/fixtures/designs', name), 'utf8')));

describe('the published JSON Schema', () => {
  it('is the one that the reader checks (npm run schema)', () => {
    expect(text).toBe(schemaText());
  });

  it('accepts every starter and every fixture', () => {
    for (const document of [...starters.map((s) => s.design), ...fixtures]) expect(validate(document), JSON.stringify(validate.errors)).toBe(true);
  });

  it('and the reader refuse the same documents', () => {
    const base = (): any => structuredClone(starters[0].design);
    const changes: ((d: any) => void)[] = [
      (d) => { d.extra = 1; }, (d) => { delete d.layers; }, (d) => { d.layers = []; }, (d) => { d.layers[0].thickness = 5; }, (d) => { d.top.kind = 'x'; }, (d) => { d.format = 'halfmark-design/9'; },
      (d) => { d.layers[0].dopants[0].concentration = { from: '1', to: '2', shape: 'cubic' }; }, (d) => { d.custom = { materials: [{ name: 'x' }] }; }, (d) => { d.assumptions.narrowing = 'yes'; }, (d) => { d.conditions.temperatureRange = ['1 K']; },
    ];
    for (const change of changes) {
      const d = base();
      change(d);
      expect(validate(d), JSON.stringify(d).slice(0, 200)).toBe(false);
      expect(shapeComplaints(d)).not.toEqual([]);
    }
    expect(shapeComplaints(base())).toEqual([]);
  });
});
