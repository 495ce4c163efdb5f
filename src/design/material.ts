import type { AlloyMaterial, CrystalMaterial, GapLaw, Material, MobilityLaw, NarrowingLaw } from '../../solver/index.ts';
import { didYouMean, quoted } from '../quantity/wording.ts';
import type { Asker } from './ask.ts';
import type { Catalogue } from './catalogue.ts';
import { askFormula, isFormula } from './formula.ts';
import type { FormulaInput, GapInput, MassInput, MaterialInput, MobilityInput, NarrowingInput, Pure } from './types.ts';

/**
 * Turns an entry of the catalogue, preset or custom alike, into the solver's material.
 *
 * @param where  the place that names it, for "there is no material ..."
 * @returns null when something is wrong; the asker holds the complaints
 */
export function readMaterial(id: string, catalogue: Catalogue, ask: Asker, where: string): Material | null {
  const found = catalogue.materials.get(id);
  if (!found) {
    ask.wrong(where, `there is no material ${quoted(id)}${didYouMean(id, [...catalogue.materials.keys()])}; presets and this design's custom.materials are known`);
    return null;
  }
  return found.entry.alloy ? readAlloy(found.entry, found.path, catalogue, ask) : readCrystal(found.entry, found.path, ask);
}

function readAlloy(m: MaterialInput, path: string, catalogue: Catalogue, ask: Asker): AlloyMaterial | null {
  const { alloy } = m;
  if (!alloy) return null;
  const end = (key: 'first' | 'second'): CrystalMaterial | null => {
    const id = alloy[key];
    const place = `${path}.alloy.${key}`;
    const found = catalogue.materials.get(id);
    if (!found) ask.wrong(place, `there is no material ${quoted(id)}${didYouMean(id, [...catalogue.materials.keys()])}`);
    else if (found.entry.alloy) ask.wrong(place, `${quoted(id)} is an alloy itself; name a crystal`);
    else return readCrystal(found.entry, found.path, ask);
    return null;
  };
  const first = end('first');
  const second = end('second');
  if (!first || !second) return null;
  if (first.insulator || second.insulator) {
    ask.wrong(`${path}.alloy`, 'mixes an insulator into an alloy; both ends must be semiconductors');
    return null;
  }
  const b = alloy.bowing ?? {};
  const at = `${path}.alloy.bowing`;
  return {
    id: m.id, first, second,
    bowing: {
      gap: Array.isArray(b.gap) ? b.gap.map((t, i) => ask.quantity(t, 'energy', `${at}.gap[${i}]`)) : ask.maybe(b.gap, 'energy', `${at}.gap`),
      affinity: ask.maybe(b.affinity, 'energy', `${at}.affinity`),
      permittivity: ask.maybe(b.permittivity, 'number', `${at}.permittivity`),
      electronMass: ask.maybe(b.electronMass, 'number', `${at}.electronMass`),
      holeMass: ask.maybe(b.holeMass, 'number', `${at}.holeMass`),
      naturalValence: ask.maybe(b.naturalValence, 'energy', `${at}.naturalValence`),
    },
    ...(alloy.valleyBowing ? { valleyBowing: Object.fromEntries(Object.entries(alloy.valleyBowing).map(([k, t]) => [k, ask.quantity(t, 'energy', `${path}.alloy.valleyBowing.${k}`)])) } : {}),
    ...(m.mobility ? { mobility: readMobilities(m.mobility, path, ask) } : {}),
    neutralityLevel: ask.maybe(m.neutralityLevel, 'energy', `${path}.neutralityLevel`),
    pinningSlope: ask.maybe(m.pinningSlope, 'number', `${path}.pinningSlope`, { least: [0, '0'], most: [1, '1'] }),
    ...alloyFormulas(m, path, ask),
    ...readValidity(m, path, ask),
  };
}

/** What an alloy says of itself counts instead of the rule of its ends; a plain value is a formula that stands still. */
function alloyFormulas(m: MaterialInput, path: string, ask: Asker): Pick<AlloyMaterial, 'formulas'> {
  const formulas: NonNullable<AlloyMaterial['formulas']> = {};
  for (const key of ['gap', 'affinity', 'permittivity', 'permittivityHighFrequency', 'electronMass', 'holeMass'] as const) {
    const given = m[key];
    if (given === undefined) continue;
    const kind = key === 'gap' || key === 'affinity' ? 'energy' : 'number';
    if (isFormula(given)) formulas[key] = askFormula(given, kind, `${path}.${key}`, key === 'affinity' ? ['x'] : ['T', 'x'], ask);
    else if (typeof given === 'object') ask.wrong(`${path}.${key}`, 'is a law of a crystal; an alloy takes its own as one value or as { "formula": ... } over T and x');
    else formulas[key] = { steps: [ask.quantity(given, kind, `${path}.${key}`)] };
  }
  return Object.keys(formulas).length === 0 ? {} : { formulas };
}

function readCrystal(m: MaterialInput, path: string, ask: Asker): CrystalMaterial | null {
  const insulator = m.insulator ?? false;
  const needed: (keyof MaterialInput)[] = ['gap', 'affinity', 'permittivity', ...(insulator ? [] : (['electronMass', 'holeMass'] as const))];
  const missing = needed.filter((key) => m[key] === undefined);
  for (const key of missing) ask.wrong(`${path}.${key}`, `is missing; ${quoted(m.id)} cannot be used without it${key.endsWith('Mass') ? ' (or say "insulator": true)' : ''}`);
  if (missing.length > 0) return null;
  if (isFormula(m.affinity)) {
    ask.wrong(`${path}.affinity.formula`, 'is a formula, which only an alloy takes; a crystal has one affinity at 300 K, and its share of the gap moves it');
    return null;
  }
  const formulas: NonNullable<CrystalMaterial['formulas']> = {};
  // Where a formula counts nothing reads the value beside it.
  const value = (key: 'permittivity' | 'permittivityHighFrequency', given: Pure | FormulaInput | undefined): number | undefined => {
    if (!isFormula(given)) return ask.maybe(given, 'number', `${path}.${key}`, { least: [1, '1'] });
    formulas[key] = askFormula(given, 'number', `${path}.${key}`, ['T'], ask);
    return 1;
  };
  const mass = (key: 'electronMass' | 'holeMass'): number[] | undefined => {
    const given = m[key];
    if (!isFormula(given)) return given === undefined ? undefined : readMass(given, `${path}.${key}`, ask);
    formulas[key] = askFormula(given, 'number', `${path}.${key}`, ['T'], ask);
    return undefined;
  };
  const permittivity = value('permittivity', m.permittivity) as number;
  const highFrequency = value('permittivityHighFrequency', m.permittivityHighFrequency);
  if (formulas.permittivity && highFrequency === undefined) formulas.permittivityHighFrequency = formulas.permittivity;
  const [electronMass, holeMass] = [mass('electronMass'), mass('holeMass')];
  const pair = <K extends 'number' | 'perEnergy' | 'richardson'>(key: 'tunnellingMass' | 'nonParabolicity' | 'richardson', kind: K, positive: boolean) => {
    const value = m[key];
    return value ? { [key]: { electron: ask.maybe(value.electron, kind, `${path}.${key}.electron`, positive ? { positive } : { least: [0, '0'] }), hole: ask.maybe(value.hole, kind, `${path}.${key}.hole`, positive ? { positive } : { least: [0, '0'] }) } } : {};
  };
  return {
    id: m.id,
    insulator,
    gap: readGap(m.gap as GapInput, `${path}.gap`, ask),
    ...(m.otherValleys ? { otherValleys: m.otherValleys.map((v, i) => ({ name: v.name, gap: readGap(v.gap, `${path}.otherValleys[${i}].gap`, ask), electronMass: readMass(v.electronMass, `${path}.otherValleys[${i}].electronMass`, ask) })) } : {}),
    affinity: ask.quantity(m.affinity, 'energy', `${path}.affinity`, { least: [-10, '-10 eV'], most: [20, '20 eV'] }),
    affinityShare: ask.maybe(m.affinityShare, 'number', `${path}.affinityShare`) ?? 0.5,
    permittivity,
    permittivityHighFrequency: highFrequency ?? permittivity,
    ...(electronMass ? { electronMass } : {}),
    ...(holeMass ? { holeMass } : {}),
    ...(Object.keys(formulas).length > 0 ? { formulas } : {}),
    ...pair('nonParabolicity', 'perEnergy', false),
    ...pair('tunnellingMass', 'number', true),
    ...pair('richardson', 'richardson', true),
    ...(m.mobility ? { mobility: readMobilities(m.mobility, path, ask) } : {}),
    ...(m.narrowing ? { narrowing: readNarrowing(m.narrowing, `${path}.narrowing`, ask) } : {}),
    neutralityLevel: ask.maybe(m.neutralityLevel, 'energy', `${path}.neutralityLevel`),
    pinningSlope: ask.maybe(m.pinningSlope, 'number', `${path}.pinningSlope`, { least: [0, '0'], most: [1, '1'] }),
    ...(m.polarisation ? { polarisation: readPolarisation(m.polarisation, `${path}.polarisation`, ask) } : {}),
    ...(m.naturalValence ? { naturalValence: { scale: m.naturalValence.scale, edge: ask.quantity(m.naturalValence.edge, 'energy', `${path}.naturalValence.edge`) } } : {}),
    ...(m.outsideContactModel ? { outsideContactModel: readOutside(m.outsideContactModel, `${path}.outsideContactModel`, ask) } : {}),
    ...readValidity(m, path, ask),
  };
}

/** A constant gap is Varshni's law without its slope; beta only keeps the quotient defined. */
function readGap(g: GapInput, path: string, ask: Asker): GapLaw {
  const bounds = { positive: true, most: [30, '30 eV'] as [number, string] };
  if (typeof g !== 'object') return { zeroK: ask.quantity(g, 'energy', path, bounds), alpha: 0, beta: 1 };
  if (isFormula(g)) return { law: 'formula', formula: askFormula(g, 'energy', path, ['T'], ask) };
  if (g.law === 'linear') return { law: 'linear', at300K: ask.quantity(g.at300K, 'energy', `${path}.at300K`, bounds), slope: ask.quantity(g.slope, 'energyPerKelvin', `${path}.slope`) };
  if (g.law === 'odonnell-chen') return { law: 'odonnell-chen', zeroK: ask.quantity(g.zeroK, 'energy', `${path}.zeroK`, bounds), coupling: ask.quantity(g.coupling, 'number', `${path}.coupling`), phonon: ask.quantity(g.phonon, 'energy', `${path}.phonon`, { positive: true }) };
  return { zeroK: ask.quantity(g.zeroK, 'energy', `${path}.zeroK`, bounds), alpha: ask.quantity(g.alpha, 'energyPerKelvin', `${path}.alpha`), beta: ask.quantity(g.beta, 'temperature', `${path}.beta`, { least: [0, '0 K'] }) };
}

function readMass(m: MassInput, path: string, ask: Asker): number[] {
  if (isFormula(m)) return [ask.wrong(`${path}.formula`, 'is a formula, which the mass of a further valley does not take; write a value, or a list of powers of T')];
  if (Array.isArray(m)) return m.map((c, i) => ask.quantity(c, 'number', `${path}[${i}]`));
  return [ask.quantity(m, 'number', path, { positive: true })];
}

function readMobilities(m: { electron?: MobilityInput; hole?: MobilityInput }, path: string, ask: Asker): { electron?: MobilityLaw; hole?: MobilityLaw } {
  const read = (law: MobilityInput | undefined, at: string): MobilityLaw | undefined => {
    if (law === undefined) return undefined;
    if (typeof law !== 'object') return ask.quantity(law, 'mobility', at, { positive: true });
    return {
      min: ask.quantity(law.min, 'mobility', `${at}.min`, { least: [0, '0'] }), max: ask.quantity(law.max, 'mobility', `${at}.max`, { positive: true }),
      reference: ask.quantity(law.reference, 'density', `${at}.reference`, { positive: true }), exponent: ask.quantity(law.exponent, 'number', `${at}.exponent`, { positive: true }),
    };
  };
  return { electron: read(m.electron, `${path}.mobility.electron`), hole: read(m.hole, `${path}.mobility.hole`) };
}

function readNarrowing(n: NarrowingInput, path: string, ask: Asker): NarrowingLaw {
  const conductionShare = ask.quantity(n.conductionShare, 'number', `${path}.conductionShare`, { least: [0, '0'], most: [1, '1'] });
  if (n.law === 'slotboom') {
    return { law: 'slotboom', energy: ask.quantity(n.energy, 'energy', `${path}.energy`), reference: ask.quantity(n.reference, 'density', `${path}.reference`, { positive: true }), constant: ask.quantity(n.constant, 'number', `${path}.constant`), conductionShare };
  }
  const terms = (key: 'donor' | 'acceptor') => ({
    third: ask.quantity(n[key].third, 'energy', `${path}.${key}.third`), quarter: ask.quantity(n[key].quarter, 'energy', `${path}.${key}.quarter`), half: ask.quantity(n[key].half, 'energy', `${path}.${key}.half`),
  });
  return { law: 'jain-roulston', donor: terms('donor'), acceptor: terms('acceptor'), conductionShare };
}

function readOutside(o: NonNullable<MaterialInput['outsideContactModel']>, path: string, ask: Asker): NonNullable<CrystalMaterial['outsideContactModel']> {
  const value = (key: 'low' | 'high'): number => ask.quantity(o[key], 'contactResistivity', `${path}.${key}`, { positive: true });
  return { carrier: o.carrier, low: value('low'), high: value('high'), source: o.source };
}

function readValidity(m: MaterialInput, path: string, ask: Asker): Pick<CrystalMaterial, 'validity'> {
  if (!m.validity) return {};
  const pair = (texts: [string, string] | undefined, kind: 'temperature' | 'density', at: string): [number, number] | undefined => texts && [ask.quantity(texts[0], kind, `${at}[0]`), ask.quantity(texts[1], kind, `${at}[1]`)];
  return { validity: { temperature: pair(m.validity.temperature, 'temperature', `${path}.validity.temperature`), doping: pair(m.validity.doping, 'density', `${path}.validity.doping`) } };
}

function readPolarisation(p: NonNullable<MaterialInput['polarisation']>, path: string, ask: Asker): CrystalMaterial['polarisation'] {
  return {
    spontaneous: ask.quantity(p.spontaneous, 'chargeDensity', `${path}.spontaneous`),
    e31: ask.maybe(p.e31, 'chargeDensity', `${path}.e31`), e33: ask.maybe(p.e33, 'chargeDensity', `${path}.e33`),
    c13: ask.maybe(p.c13, 'stiffness', `${path}.c13`, { positive: true }), c33: ask.maybe(p.c33, 'stiffness', `${path}.c33`, { positive: true }), lattice: ask.maybe(p.lattice, 'length', `${path}.lattice`, { positive: true }),
  };
}
