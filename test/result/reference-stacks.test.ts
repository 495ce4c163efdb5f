import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { checkDesign } from '../../src/design/read.ts';
import { solveDesign } from '../../src/result/solve-design.ts';
import type { ProfileResult } from '../../src/result/types.ts';

interface Reference {
  custom: object;
  stacks: { design: { title: string; custom: unknown }; neutral_eV: (number | null)[]; samples: { layer: number; z_nm: number; ec_eV: number }[] }[];
}
// Solved by code that shares nothing with the solver; see test/tools/reference-stacks.py.
const reference = JSON.parse(readFileSync(join(import.meta.dirname, '../fixtures/reference-stacks.json'), 'utf8')) as Reference;

/** Ec at a depth of one layer, by the cubic through the four nearest nodes. */
function between(p: ProfileResult, layer: number, z: number): number {
  const first = p.layer.indexOf(layer);
  const last = p.layer.lastIndexOf(layer);
  let s = first;
  while (s < last - 1 && p.z_nm[s + 1] < z) s++;
  const from = Math.max(first, Math.min(s - 1, last - 3));
  let value = 0;
  for (let i = from; i < from + 4; i++) {
    let l = p.ec_eV[i];
    for (let j = from; j < from + 4; j++) if (j !== i) l *= (z - p.z_nm[j]) / (p.z_nm[i] - p.z_nm[j]);
    value += l;
  }
  return value;
}

describe('an independent implementation', () => {
  it('has solved seven stacks', () => {
    expect(reference.stacks).toHaveLength(7);
  });

  for (const { design, neutral_eV, samples } of reference.stacks) {
    it(`finds the same bands within 1 uV: ${design.title}`, () => {
      const reading = checkDesign({ ...design, custom: reference.custom });
      if (!reading.ok) throw new Error(JSON.stringify(reading.complaints));
      const answer = solveDesign(reading.design, { accuracy: 1e-6 });
      if (answer.kind !== 'result') throw new Error(JSON.stringify(answer));
      const { layers, profile, quality } = answer.result;
      expect(quality.mesh_error_V).toBeLessThanOrEqual(1e-6);
      neutral_eV.forEach((level, l) => { if (level !== null) expect(Math.abs(Number(layers[l].ec_minus_ef_eV) - level)).toBeLessThan(1e-9); });
      for (const { layer, z_nm, ec_eV } of samples) expect(Math.abs(between(profile, layer, z_nm) - ec_eV), `layer ${layer} at ${z_nm} nm`).toBeLessThan(1e-6);
    });
  }
});

