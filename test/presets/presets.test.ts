import { describe, expect, it } from 'vitest';
import { dopants, materials, metals, offsets, sources, type Provenance, type Sources } from '../../presets/index.ts';
import { rivals } from '../../presets/rivals.ts';

const NUMBER = '-?\\d+(\\.\\d+)?(e[-+]?\\d+)?';
const quantity = (unit: string): RegExp => new RegExp(`^${NUMBER} ${unit.replace(/[\^().]/g, '\\$&')}$`);
const ENERGY = new RegExp(`^${NUMBER} m?eV$`);
const NAMES = ['law', 'scale', 'first', 'second', 'name', 'carrier', 'source'];

/** What a value at a path has to look like; a path that no line fits is refused. Pure numbers are JSON numbers. */
const FORMS: [RegExp, RegExp | 'number'][] = [
  [/^(otherValleys\.\w+\.)?gap(\.(zeroK|at300K|phonon))?$/, ENERGY],
  [/gap\.(alpha|slope)$/, quantity('eV/K')],
  [/gap\.beta$/, quantity('K')],
  [/gap\.coupling$/, 'number'],
  [/^(affinity|neutralityLevel|naturalValence\.edge|depth|depth\.points\.\d+|workFunction|height)$/, ENERGY],
  [/^alloy\.(bowing\.(gap|affinity|naturalValence)|valleyBowing\.\w+)$/, ENERGY],
  [/^(affinityShare|permittivity|permittivityHighFrequency|pinningSlope|degeneracy)$/, 'number'],
  [/^(otherValleys\.\w+\.)?(electronMass|holeMass)$/, 'number'],
  [/^alloy\.bowing\.(permittivity|electronMass|holeMass)$/, 'number'],
  [/^tunnellingMass\.(electron|hole)$/, 'number'],
  [/^nonParabolicity\.(electron|hole)$/, quantity('eV^-1')],
  [/^richardson\.(electron|hole)$/, quantity('A/(cm^2 K^2)')],
  [/^mobility\.(electron|hole)\.(min|max)$/, quantity('cm^2/(V s)')],
  [/^(mobility\.(electron|hole)|narrowing)\.reference$/, quantity('cm^-3')],
  [/^(mobility\.(electron|hole)\.exponent|narrowing\.(constant|conductionShare))$/, 'number'],
  [/^narrowing\.(energy|(donor|acceptor)\.(third|quarter|half))$/, ENERGY],
  [/^polarisation\.(spontaneous|e31|e33)$/, quantity('C/m^2')],
  [/^polarisation\.c(13|33)$/, quantity('GPa')],
  [/^polarisation\.lattice$/, quantity('nm')],
  [/^(solubility|mottDensity|screened\.mottDensity|merging\.(depth|bound)Reference)$/, quantity('cm^-3')],
  [/^(merging\.(depth|bound)|screened\.bound)Exponent$/, 'number'],
  [/^screened\.coefficient$/, quantity('eV cm')],
  [/^validity\.temperature$/, quantity('K')],
  [/^outsideContactModel\.(low|high)$/, quantity('ohm cm^2')],
  [/^delta(Ev|Ec)\.(constant|perX)$/, ENERGY],
];
const WORDS = ['id', 'name', 'host', 'kind', 'centre', 'model', 'insulator', 'barriers', 'source', 'sources', 'first', 'second'];

/** Every value of an entry by its path; names are no values, a polynomial is one. */
function valuesOf(entry: object): Map<string, unknown> {
  const found = new Map<string, unknown>();
  const walk = (o: object, prefix: string): void => {
    for (const [key, value] of Object.entries(o)) {
      if (NAMES.includes(key)) continue;
      if (key === 'otherValleys') for (const v of value as { name: string }[]) walk(v, `${prefix}${key}.${v.name}.`);
      else if (key === 'points') (value as [number, string][]).forEach(([, depth], i) => found.set(`${prefix}points.${i}`, depth));
      else if (typeof value === 'object' && !Array.isArray(value)) walk(value as object, `${prefix}${key}.`);
      else found.set(`${prefix}${key}`, value);
    }
  };
  walk(Object.fromEntries(Object.entries(entry).filter(([key]) => !WORDS.includes(key))), '');
  return found;
}

function expectForm(entry: object, place: string): void {
  for (const [path, value] of valuesOf(entry)) {
    const form = FORMS.find(([fits]) => fits.test(path))?.[1];
    expect(form, `${place}: ${path} is no known key`).toBeDefined();
    for (const one of Array.isArray(value) ? value : [value]) {
      if (form === 'number') expect(one, `${place}: ${path}`).toSatisfy((v: unknown) => typeof v === 'number' && Number.isFinite(v));
      else expect(one, `${place}: ${path}`).toMatch(form as RegExp);
    }
  }
}

function expectSourced(entry: Provenance, place: string): void {
  expect(Object.keys(sources), `${place}: source`).toContain(entry.source);
  expect(['page', 'memory', 'computed'], `${place}: checked`).toContain(entry.checked);
  if (entry.checked === 'memory') expect(['high', 'medium', 'low'], `${place}: confidence`).toContain(entry.confidence);
}

function expectAllSourced(entry: { source: string; sources: Sources }, place: string): void {
  expect(Object.keys(sources), place).toContain(entry.source);
  expect(Object.keys(entry.sources).sort(), place).toEqual([...valuesOf(entry).keys()].sort());
  for (const [key, provenance] of Object.entries(entry.sources)) expectSourced(provenance, `${place} ${key}`);
}

const ids = materials.map((m) => m.id);

describe('every preset', () => {
  const entries: [string, { source: string; sources: Sources }][] = [
    ...materials.map((m) => [m.id, m] as [string, typeof m]),
    ...dopants.map((d) => [`${d.host}:${d.id}`, d] as [string, typeof d]),
    ...metals.map((m) => [m.id, m] as [string, typeof m]),
    ...offsets.map((o) => [`${o.first}/${o.second}`, o] as [string, typeof o]),
  ];

  it('is named once', () => {
    for (const list of [ids, dopants.map((d) => `${d.host}:${d.id}`), metals.map((m) => m.id)]) expect(new Set(list).size).toBe(list.length);
  });

  it('holds known keys only, each with a number and its unit', () => {
    for (const [place, entry] of entries) expectForm(entry, place);
  });

  it('gives every value a source that is listed, and how it was checked', () => {
    for (const [place, entry] of entries) expectAllSourced(entry, place);
  });

  it('draws on works named with author and year, and every work listed is used', () => {
    const used = new Set([...entries.flatMap(([, e]) => [e.source, ...Object.values(e.sources).map((s) => s.source)]), ...[...rivals.values, ...rivals.offsets].map((r) => r.source)]);
    for (const m of metals) for (const b of m.barriers) used.add(b.source);
    expect(Object.keys(sources).sort()).toEqual([...used].sort());
    // Tables on the web, one survey and the two words for "no work" carry no year.
    const undated = ['KSU', 'TUGraz', 'Takagi', 'computed', 'convention'];
    for (const [key, text] of Object.entries(sources)) {
      expect(text.length, key).toBeGreaterThan(20);
      if (!undated.includes(key)) expect(text, key).toMatch(/\b(19|20)\d\d\b/);
    }
  });
});

describe('the presets of dopants', () => {
  it('stand in hosts that exist, as donors or acceptors', () => {
    for (const d of dopants) {
      expect(ids, `${d.host}:${d.id}`).toContain(d.host);
      expect(['donor', 'acceptor']).toContain(d.kind);
    }
  });

  it('tell their depth against x only in alloys, from x = 0 upwards', () => {
    for (const d of dopants) {
      const host = materials.find((m) => m.id === d.host);
      if (typeof d.depth === 'string') continue;
      expect(host && 'alloy' in host, `${d.host}:${d.id}`).toBe(true);
      const x = d.depth.points.map(([at]) => at);
      expect(x[0]).toBe(0);
      expect(x).toEqual([...new Set(x)].sort((a, b) => a - b));
      expect(x[x.length - 1]).toBeLessThanOrEqual(1);
    }
  });

  it('hold the shallow dopants of the usual hosts and the deep levels of semi-insulating crystals', () => {
    const names = dopants.map((d) => `${d.host}:${d.id}`);
    for (const name of ['Si:P', 'Si:As', 'Si:B', 'Ge:P', 'GaAs:Si', 'InP:Si', 'GaN:Si', 'GaN:Mg', '4H-SiC:N', '4H-SiC:Al', 'diamond:B', 'AlGaAs:Si', 'AlGaN:Mg']) expect(names).toContain(name);
    for (const name of ['Si:Au-acceptor', 'Si:Au-donor', 'GaAs:EL2', 'InP:Fe', 'GaN:Fe', 'GaN:C', '4H-SiC:V-acceptor', 'Ga2O3:Fe', 'diamond:N']) expect(names).toContain(name);
  });
});

describe('the presets of metals', () => {
  it('are at least 15 with a work function, and those without one have measured barriers', () => {
    expect(metals.filter((m) => m.workFunction !== undefined).length).toBeGreaterThanOrEqual(15);
    for (const m of metals) if (m.workFunction === undefined) expect(m.barriers.length, m.id).toBeGreaterThan(0);
  });

  it('give every measured barrier a material that exists, its carrier, height and source, once', () => {
    const seen = new Set<string>();
    for (const m of metals) {
      for (const b of m.barriers) {
        const place = `${m.id} on ${b.carrier}-${b.material}`;
        expect(ids, place).toContain(b.material);
        expect(['n', 'p'], place).toContain(b.carrier);
        expect(b.height, place).toMatch(ENERGY);
        expectSourced(b, place);
        expect(seen.has(place), place).toBe(false);
        seen.add(place);
      }
    }
    expect(seen.size).toBeGreaterThan(150);
  });
});

describe('the presets of materials', () => {
  it('hold the materials that a device engineer expects', () => {
    for (const id of ['Si', 'Ge', 'SiGe', 'GaAs', 'AlGaAs', 'InP', 'InGaAs', 'GaN', 'AlGaN', 'InGaN', '4H-SiC', 'ZnO', 'Ga2O3', 'CdTe', 'CdS', 'diamond', 'SiO2', 'Al2O3']) expect(ids).toContain(id);
  });

  it('have what a design needs', () => {
    for (const m of materials) {
      if ('alloy' in m) {
        for (const end of [m.alloy.first, m.alloy.second]) {
          const crystal = materials.find((c) => c.id === end);
          expect(crystal && !('alloy' in crystal) && !crystal.insulator, `${m.id}: ${end}`).toBe(true);
        }
        continue;
      }
      for (const key of ['gap', 'affinity', 'permittivity', ...(m.insulator ? [] : ['electronMass', 'holeMass', 'mobility'])]) expect(m, m.id).toHaveProperty(key);
    }
  });
});

describe('the published band offsets', () => {
  it('join two materials that exist, give one edge, and need x only where one of the two is an alloy', () => {
    const isAlloy = (id: string): boolean => materials.some((m) => m.id === id && 'alloy' in m);
    for (const o of offsets) {
      const place = `${o.first}/${o.second}`;
      expect(ids, place).toContain(o.first);
      expect(ids, place).toContain(o.second);
      expect([o.deltaEv, o.deltaEc].filter((v) => v !== undefined).length, place).toBe(1);
      const value = o.deltaEv ?? o.deltaEc ?? {};
      expect('perX' in value, place).toBe(isAlloy(o.first) !== isAlloy(o.second));
    }
    const pairs = offsets.map((o) => [o.first, o.second].sort().join('/'));
    expect(new Set(pairs).size).toBe(pairs.length);
  });
});
