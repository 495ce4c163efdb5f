import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { starters } from '../../src/design/starters/index.ts';
import { canonical, provenanceOf } from '../../src/result/provenance.ts';
import { solveDesign } from '../../src/result/solve-design.ts';
import type { Result } from '../../src/result/types.ts';
import { PROGRAM_VERSION } from '../../src/version.ts';

const resultOf = (id: string, set: Record<string, string> = {}): Result => {
  const design = starters.find((s) => s.id === id)?.design;
  const answer = solveDesign(design as never, { set });
  if (answer.kind !== 'result') throw new Error(JSON.stringify(answer));
  return answer.result;
};

describe('the result document', () => {
  it('puts the Fermi level of the bottom at zero and the bands at their distances from it', () => {
    const { profile, layers } = resultOf('pn-diode');
    const last = profile.z_nm.length - 1;
    expect(profile.potential_V[last]).toBe(0);
    expect(profile.ef_eV.every((e) => e === 0)).toBe(true);
    expect(profile.ec_eV[last]).toBeCloseTo(layers[2].ec_minus_ef_eV, 6);
    expect(profile.ec_eV[last] - profile.ev_eV[last]).toBeCloseTo(layers[2].gap_eV, 12);
  });

  it('holds an interface twice, once for each side', () => {
    const { profile, junctions } = resultOf('modulation-doped');
    const s = profile.layer.indexOf(1);
    expect(profile.z_nm[s]).toBe(profile.z_nm[s - 1]);
    expect(profile.ec_eV[s] - profile.ec_eV[s - 1]).toBeCloseTo(junctions[0].delta_ec_eV, 10);
  });

  it('keeps a flat vacuum level where nothing but the affinity rule lines up the layers', () => {
    const design = structuredClone(starters.find((s) => s.id === 'modulation-doped')?.design) as NonNullable<(typeof starters)[0]['design']>;
    design.assumptions = { ...design.assumptions, alignment: 'affinity' };
    const answer = solveDesign(design);
    if (answer.kind !== 'result') throw new Error('not solved');
    const { vacuum_eV, layer } = answer.result.profile;
    for (let s = 1; s < layer.length; s++) if (layer[s] !== layer[s - 1]) expect(vacuum_eV[s]).toBeCloseTo(vacuum_eV[s - 1], 9);
  });

  it('carries no NaN, no infinity and no undefined, at any temperature of the starters', () => {
    for (const { id } of starters) for (const temperature of ['77 K', '300 K', '500 K']) expect(JSON.stringify(resultOf(id, { temperature }), (_k, v) => { if (typeof v === 'number' && !Number.isFinite(v)) throw new Error(`${id} ${temperature}`); return v as unknown; })).not.toContain('undefined');
  });
});

describe('provenance', () => {
  it('is the same for the same design, whatever the order of its keys', () => {
    const { design } = starters[0];
    const turned = Object.fromEntries(Object.entries(design).reverse()) as unknown as typeof design;
    expect(provenanceOf(turned, {})).toEqual(provenanceOf(design, {}));
    expect(canonical({ b: 1, a: [{ d: 1, c: 2 }] })).toBe('{"a":[{"c":2,"d":1}],"b":1}');
  });

  it('moves with the design and with the values of the run', () => {
    const a = provenanceOf(starters[0].design, {}).design;
    expect(a).toMatch(/^sha256:[0-9a-f]{64}$/);
    expect(provenanceOf(starters[1].design, {}).design).not.toBe(a);
    expect(provenanceOf(starters[0].design, { temperature: '77 K' }).design).not.toBe(a);
  });

  it('names the version of package.json', () => {
    expect(JSON.parse(readFileSync(join(import.meta.dirname, '../../package.json'), 'utf8')).version).toBe(PROGRAM_VERSION);
  });
});
