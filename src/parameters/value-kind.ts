import type { KindName } from '../quantity/kinds.ts';
import type { Over } from '../quantity/read-formula.ts';

/** Which kind of quantity a value of an entry is, by its path (design/entry-path.ts). The first pattern that fits counts. */
const KINDS_BY_PATH: readonly [path: RegExp, kind: KindName][] = [
  [/^(otherValleys\..+\.)?gap\.(alpha|slope)$/, 'energyPerKelvin'],
  [/^(otherValleys\..+\.)?gap\.beta$/, 'temperature'],
  [/^(otherValleys\..+\.)?gap\.coupling$/, 'number'],
  [/^(otherValleys\..+\.)?gap(\.(zeroK|at300K|phonon))?$/, 'energy'],
  [/^(affinity|neutralityLevel|workFunction|naturalValence\.edge|depth(\.points\.\d+)?|barriers\.\d+)$/, 'energy'],
  [/^alloy\.(bowing\.(gap|affinity|naturalValence)|valleyBowing\..+)$/, 'energy'],
  [/^nonParabolicity\./, 'perEnergy'],
  [/^richardson\./, 'richardson'],
  [/^mobility\.(electron|hole)\.reference$/, 'density'],
  [/^mobility\.(electron|hole)(\.(min|max))?$/, 'mobility'],
  [/^narrowing\.(energy|(donor|acceptor)\.(third|quarter|half))$/, 'energy'],
  [/^(narrowing\.reference|merging\.(depth|bound)Reference|screened\.mottDensity|mottDensity|solubility|validity\.doping)$/, 'density'],
  [/^validity\.temperature$/, 'temperature'],
  [/^screened\.coefficient$/, 'energyLength'],
  [/^polarisation\.(spontaneous|e31|e33)$/, 'chargeDensity'],
  [/^polarisation\.c(13|33)$/, 'stiffness'],
  [/^polarisation\.lattice$/, 'length'],
  [/^outsideContactModel\./, 'contactResistivity'],
];

/** Shares, masses, permittivities, exponents and degeneracies are pure numbers. */
export function valueKind(path: string): KindName {
  const value = path.replace(/\.formula$/, '');
  return KINDS_BY_PATH.find(([pattern]) => pattern.test(value))?.[1] ?? 'number';
}

/** Values that can be written as a formula, and over what; each takes the place of the whole law that stands there. */
const FORMULAS: Readonly<Record<'crystal' | 'alloy' | 'insulator' | 'dopant' | 'metal', Readonly<Record<string, readonly Over[]>>>> = {
  crystal: { gap: ['T'], electronMass: ['T'], holeMass: ['T'], permittivity: ['T'], permittivityHighFrequency: ['T'] },
  alloy: { gap: ['T', 'x'], affinity: ['x'], electronMass: ['T', 'x'], holeMass: ['T', 'x'], permittivity: ['T', 'x'], permittivityHighFrequency: ['T', 'x'] },
  insulator: { gap: ['T'], permittivity: ['T'], permittivityHighFrequency: ['T'] },
  dopant: { depth: ['x'] },
  metal: {},
};

/** Over what a value may be a formula; null for one that may not. @param path  of the value, or of its formula */
export function formulaOver(kind: keyof typeof FORMULAS, path: string): readonly Over[] | null {
  const value = path.replace(/\.formula$/, '');
  return Object.hasOwn(FORMULAS[kind], value) ? FORMULAS[kind][value] : null;
}

/** @returns paths of formulas that the entry does not have yet */
export function missingFormulas(kind: keyof typeof FORMULAS, paths: readonly string[]): string[] {
  return Object.keys(FORMULAS[kind]).map((value) => `${value}.formula`).filter((path) => !paths.includes(path));
}

/** Values that an entry may have and that can be put in where it has none, in the order of the document. */
const OPTIONAL = {
  crystal: [
    'affinityShare', 'permittivityHighFrequency', 'nonParabolicity.electron', 'nonParabolicity.hole', 'tunnellingMass.electron', 'tunnellingMass.hole', 'richardson.electron', 'richardson.hole',
    'mobility.electron', 'mobility.hole', 'neutralityLevel', 'pinningSlope',
  ],
  alloy: ['alloy.bowing.gap', 'alloy.bowing.affinity', 'alloy.bowing.permittivity', 'alloy.bowing.electronMass', 'alloy.bowing.holeMass', 'mobility.electron', 'mobility.hole', 'neutralityLevel', 'pinningSlope'],
  insulator: ['affinityShare', 'permittivityHighFrequency', 'tunnellingMass.electron', 'tunnellingMass.hole'],
  dopant: ['degeneracy', 'mottDensity', 'solubility'],
  metal: ['workFunction'],
} as const;

/** @returns paths without a value in the entry, nor below nor above them */
export function missingValues(kind: keyof typeof OPTIONAL, paths: readonly string[]): string[] {
  return OPTIONAL[kind].filter((path) => !paths.some((p) => p === path || p.startsWith(`${path}.`)));
}
