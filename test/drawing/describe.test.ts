import { describe as suite, expect, it } from 'vitest';
import { describe } from '../../src/drawing/describe.ts';
import { drawPlate } from '../../src/drawing/plate.ts';
import { inventedResult } from './invented-result.ts';
import { STACKS } from './results.ts';

suite('the description in words', () => {
  it('names conditions, layers, junctions and contacts with their figures', () => {
    const text = describe(inventedResult());
    for (const part of ['Invented stack: 3 layers at 300 K in equilibrium', 'Layer 1, n cap: 100 nm of narrow', '0.100 eV below the conduction band', 'Layer 3, p base: 2 µm', '0.150 eV above the valence band', 'conduction band step 0.250 eV', 'straddling', 'Top: contact of M', 'barrier of electrons 0.700 eV', 'Bottom: neutral contact']) {
      expect(text).toContain(part);
    }
  });

  it('says inside the band where the Fermi level is', () => {
    expect(describe(STACKS.tunnel())).toMatch(/Layer 2, n\+\+: .*degenerate; by itself its Fermi level lies 0\.\d+ eV inside the conduction band/);
  });

  it('says where the conduction band is highest and lowest', () => {
    expect(describe(inventedResult())).toMatch(/highest, 0\.950 eV at 2\.12 µm, and lowest, 0\.100 eV at/);
  });

  it('goes with the plate, as does its title', () => {
    const plate = drawPlate(inventedResult(), {});
    expect(plate.description).toBe(describe(inventedResult()));
    expect(plate.title).toBe('Band diagram: Invented stack');
  });
});
