import type { KindName } from '../quantity/kinds.ts';

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
  return KINDS_BY_PATH.find(([pattern]) => pattern.test(path))?.[1] ?? 'number';
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
