import { describe, expect, it } from 'vitest';
import { densityOfStates } from '../../solver/bands.ts';
import { dopants, materials, metals, sources } from '../../presets/index.ts';

interface Provenance { source: string; checked: string; confidence?: string }
const QUANTITY: Record<string, RegExp> = {
  energy: /^\d+(\.\d+)?(e-?\d+)? m?eV$/,
  density: /^\d+(\.\d+)?e\+?\d+ cm\^-3$/,
};

function expectSourced(entry: Provenance, place: string): void {
  expect(Object.keys(sources), `${place}: source`).toContain(entry.source);
  expect(['page', 'memory', 'computed'], `${place}: checked`).toContain(entry.checked);
  if (entry.checked === 'memory') expect(['high', 'medium', 'low'], `${place}: confidence`).toContain(entry.confidence);
}

describe('the presets of dopants', () => {
  it('give every value a source that is listed, and how it was checked', () => {
    for (const d of dopants) {
      const place = `${d.host}:${d.id}`;
      const given = d.sources as unknown as Record<string, Provenance>;
      const values = ['depth', 'degeneracy', 'solubility', 'mottDensity'].filter((key) => key in d);
      for (const group of ['merging', 'screened']) if (group in d) values.push(...Object.keys((d as unknown as Record<string, object>)[group]).map((key) => `${group}.${key}`));
      expect(Object.keys(given).sort(), place).toEqual(values.sort());
      for (const [key, entry] of Object.entries(given)) expectSourced(entry, `${place} ${key}`);
    }
  });

  it('are named once in each host, with a depth in eV and a degeneracy of the bound state', () => {
    const names = dopants.map((d) => `${d.host}:${d.id}`);
    expect(new Set(names).size).toBe(names.length);
    for (const d of dopants) {
      expect(d.depth, `${d.host}:${d.id}`).toMatch(QUANTITY.energy);
      expect(['donor', 'acceptor']).toContain(d.kind);
      if ('degeneracy' in d) expect(d.degeneracy).toBeGreaterThan(0);
      if ('solubility' in d) expect(d.solubility, `${d.host}:${d.id}`).toMatch(QUANTITY.density);
    }
  });

  it('hold the shallow dopants of the usual hosts', () => {
    for (const name of ['Si:P', 'Si:As', 'Si:B', 'Ge:P', 'GaAs:Si', 'InP:Si', 'GaN:Si', 'GaN:Mg', '4H-SiC:N', '4H-SiC:Al', 'diamond:B']) expect(dopants.map((d) => `${d.host}:${d.id}`)).toContain(name);
  });
});

describe('the presets of metals', () => {
  it('are at least 15, each with a work function and its source', () => {
    expect(metals.length).toBeGreaterThanOrEqual(15);
    expect(new Set(metals.map((m) => m.id)).size).toBe(metals.length);
    for (const m of metals) {
      expect(m.workFunction, m.id).toMatch(QUANTITY.energy);
      expectSourced(m.sources.workFunction, m.id);
    }
  });

  it('give every measured barrier its material, carrier, height and source', () => {
    let count = 0;
    for (const m of metals) {
      for (const b of m.barriers) {
        expect(b.height, `${m.id} on ${b.material}`).toMatch(QUANTITY.energy);
        expect(['n', 'p']).toContain(b.carrier);
        expectSourced(b, `${m.id} on ${b.material}`);
        count++;
      }
    }
    expect(count).toBeGreaterThan(100);
  });
});

describe('the presets of materials', () => {
  it('give every value a source that is listed, and how it was checked', () => {
    for (const m of materials) {
      const skipped = ['id', 'name', 'insulator', 'source', 'sources'];
      const flat = (o: object, prefix: string): string[] => Object.entries(o).flatMap(([k, v]) => (typeof v === 'object' ? flat(v, `${prefix}${k}.`) : [`${prefix}${k}`]));
      // The scale of a natural edge is a name, no value.
      const values = flat(Object.fromEntries(Object.entries(m).filter(([k]) => !skipped.includes(k))), '').filter((k) => k !== 'naturalValence.scale');
      expect(Object.keys(m.sources).sort(), m.id).toEqual(values.sort());
      for (const [key, entry] of Object.entries(m.sources as unknown as Record<string, Provenance>)) expectSourced(entry, `${m.id} ${key}`);
    }
  });

  it('are named once and have what a design needs', () => {
    expect(new Set(materials.map((m) => m.id)).size).toBe(materials.length);
    for (const m of materials) {
      expect(m.permittivity, m.id).toBeGreaterThan(1);
      if ('insulator' in m) continue;
      expect('electronMass' in m && 'holeMass' in m, m.id).toBe(true);
    }
  });

  it('give silicon the measured intrinsic density at 300 K', () => {
    // 9.7e9 cm^-3, Misiakos and Tsamakis, J. Appl. Phys. 74, 3293 (1993), stated to some 5 %; 1.08e10, Green, J. Appl. Phys. 67, 2944 (1990).
    const si = materials.find((m) => m.id === 'Si');
    if (!si || typeof si.gap === 'string' || !('electronMass' in si)) throw new Error('no silicon');
    const T = 300;
    const gap = Number.parseFloat(si.gap.zeroK) - (Number.parseFloat(si.gap.alpha) * T * T) / (T + Number.parseFloat(si.gap.beta));
    const ni = Math.sqrt(densityOfStates(si.electronMass, T) * densityOfStates(si.holeMass, T)) * Math.exp(-gap / (2 * 8.617333262e-5 * T));
    expect(ni).toBeGreaterThan(9.2e9);
    expect(ni).toBeLessThan(1.1e10);
  });
});
