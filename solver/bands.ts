import { BOLTZMANN, ELECTRON_MASS, ELEMENTARY_CHARGE, PLANCK } from './constants.ts';
import { formulaAt, type Formula } from './formula.ts';
import { narrowing } from './narrowing.ts';
import { isAlloy, type AlloyMaterial, type Assumptions, type CrystalMaterial, type GapLaw, type MassPolynomial, type Material, type NarrowingLaw } from './stack.ts';

/** The bands at one point of a layer: everything that the carriers there depend on besides the Fermi level. */
export interface LocalBands {
  /** K */ T: number;
  /** eV */ kT: number;
  /** eV, narrowed when narrowing is on */ gap: number;
  /** eV, narrowed likewise */ affinity: number;
  /** cm^-3, band edge; 0 in an insulator */ nc: number;
  nv: number;
  /** static, relative */ permittivity: number;
  permittivityHighFrequency: number;
  insulator: boolean;
  /** Kane's alpha, 1/eV; 0 = parabolic */ kaneN: number;
  kaneP: number;
  statistics: 'fermi-dirac' | 'boltzmann';
}

/** Reference temperature of affinities, K. */
const T_AFFINITY = 300;

/**
 * Gap by the law that the material names, eV. @param T  K, > 0
 *
 * Varshni, Physica 34, 149 (1967), eq. (1); O'Donnell and Chen, Appl. Phys. Lett. 58, 2924 (1991), eq. (3) (equation number from memory).
 */
export function gapAt(law: GapLaw, T: number): number {
  if (law.law === 'formula') return formulaAt(law.formula, T, Number.NaN);
  if (law.law === 'linear') return law.at300K - law.slope * (T - 300);
  // coth(u/2) - 1 = 2/(e^u - 1): the difference itself would lose its digits where the phonons freeze.
  if (law.law === 'odonnell-chen') return law.zeroK - (2 * law.coupling * law.phonon) / Math.expm1(law.phonon / (BOLTZMANN * T));
  return law.zeroK - (law.alpha * T * T) / (T + law.beta);
}

/**
 * Effective density of states, cm^-3: 2 (2 pi m k T/h^2)^(3/2); e.g. Sze and Ng, Physics of Semiconductor Devices (2007), section 1.4.
 *
 * @param mass  density-of-states mass, m0, valleys included
 * @param T     K
 */
export function densityOfStates(mass: number, T: number): number {
  // kT in J, h in J s: per m^3, then per cm^3.
  const perM2 = (2 * Math.PI * mass * ELECTRON_MASS * BOLTZMANN * ELEMENTARY_CHARGE * T) / (PLANCK * PLANCK);
  return 2e-6 * perM2 * Math.sqrt(perM2);
}

/**
 * Bands of a material at composition x and temperature T.
 *
 * @param x       share of the alloy's `second`, 0..1; ignored for a crystal
 * @param T       K, > 0
 * @param doping  sums of all active donors and acceptors, cm^-3; only narrowing uses them
 * @throws {RangeError} T not positive, x outside 0..1, a semiconductor without masses, or a gap, a mass or a permittivity that cannot be
 *
 * An alloy's rule P(x) = (1 - x) P_A + x P_B - x (1 - x) b holds for each valley's gap at T, for chi at 300 K, for the share kappa, for masses and
 * permittivities. A further valley counts in the alloy only where both ends know it. chi(x, T) follows from the alloy's own gap:
 * chi = chi(x, 300 K) + kappa [Eg(x, 300 K) - Eg(x, T)]. An own formula counts instead of the law, or of the rule, that it stands for.
 */
export function localBands(material: Material, x: number, T: number, a: Assumptions, doping: { donors: number; acceptors: number }): LocalBands {
  if (!(T > 0) || !Number.isFinite(T)) throw new RangeError(`temperature must be positive and finite: ${T}`);
  const alloy = isAlloy(material) ? material : null;
  if (alloy && !(x >= 0 && x <= 1)) throw new RangeError(`composition must lie in 0..1: ${x}`);
  const A = isAlloy(material) ? material.first : material;
  const B = isAlloy(material) ? material.second : material;
  const share = alloy ? x : 0;
  const mix = (first: number, second: number, bowing = 0): number => (1 - share) * first + share * second - share * (1 - share) * bowing;
  const bowing: AlloyMaterial['bowing'] = alloy ? alloy.bowing : {};

  const now = lowestValley(A, B, share, T, alloy);
  const at300 = T === T_AFFINITY ? now : lowestValley(A, B, share, T_AFFINITY, alloy);
  let gap = now.gap;
  const kappa = mix(A.affinityShare, B.affinityShare);
  const own = alloy?.formulas ?? {};
  const by = (formula: Formula | undefined, otherwise: () => number): number => (formula === undefined ? otherwise() : formulaAt(formula, T, x));
  let affinity = by(own.affinity, () => mix(A.affinity, B.affinity, bowing.affinity)) + kappa * (at300.gap - now.gap);
  if (a.narrowing) {
    const fall = (law: NarrowingLaw | undefined): number => (law ? narrowing(law, doping.donors, doping.acceptors) : 0);
    const fallA = fall(A.narrowing);
    const fallB = fall(B.narrowing);
    gap -= mix(fallA, fallB);
    affinity += mix(fallA * (A.narrowing?.conductionShare ?? 0), fallB * (B.narrowing?.conductionShare ?? 0));
  }
  if (!(gap > 0) || !Number.isFinite(affinity)) throw new RangeError(`the gap of ${material.id} is not positive at ${T} K: ${gap} eV`);

  const insulator = A.insulator || (share > 0 && B.insulator);
  let nc = 0;
  let nv = 0;
  if (!insulator) {
    nc = densityOfStates(positive(by(own.electronMass, () => mix(now.massA(), now.massB(), bowing.electronMass)), material.id, T), T);
    nv = densityOfStates(positive(by(own.holeMass, () => mix(massAt(A, 'holeMass', T), massAt(B, 'holeMass', T), bowing.holeMass)), material.id, T), T);
  }
  const permittivity = by(own.permittivity, () => mix(permittivityAt(A, 'permittivity', T), permittivityAt(B, 'permittivity', T), bowing.permittivity));
  const permittivityHighFrequency = by(own.permittivityHighFrequency, () => mix(permittivityAt(A, 'permittivityHighFrequency', T), permittivityAt(B, 'permittivityHighFrequency', T), bowing.permittivity));
  if (!(permittivity > 0 && permittivityHighFrequency > 0)) throw new RangeError(`a permittivity of ${material.id} is not positive at ${T} K`);
  return {
    T,
    kT: BOLTZMANN * T,
    gap,
    affinity,
    nc,
    nv,
    permittivity,
    permittivityHighFrequency,
    insulator,
    kaneN: a.nonParabolic ? mix(A.nonParabolicity?.electron ?? 0, B.nonParabolicity?.electron ?? 0) : 0,
    kaneP: a.nonParabolic ? mix(A.nonParabolicity?.hole ?? 0, B.nonParabolicity?.hole ?? 0) : 0,
    statistics: a.statistics,
  };
}

interface Valley {
  gap: number;
  /** m0; asked for only where there are carriers */ massA: () => number;
  massB: () => number;
}

function lowestValley(A: CrystalMaterial, B: CrystalMaterial, x: number, T: number, alloy: AlloyMaterial | null): Valley {
  const rule = (a: GapLaw, b: GapLaw, bow: number): number => (1 - x) * gapAt(a, T) + x * gapAt(b, T) - x * (1 - x) * bow;
  const main = { massA: () => massAt(A, 'electronMass', T), massB: () => massAt(B, 'electronMass', T) };
  if (alloy?.formulas?.gap) return { gap: formulaAt(alloy.formulas.gap, T, x), ...main };
  let lowest: Valley = { gap: rule(A.gap, B.gap, polynomial(alloy?.bowing.gap ?? 0, x)), ...main };
  for (const valley of A.otherValleys ?? []) {
    // At x = 0 the other end has no say, so its valley is not needed.
    const partner = x === 0 ? valley : B.otherValleys?.find((v) => v.name === valley.name);
    if (!partner) continue;
    const gap = rule(valley.gap, partner.gap, alloy?.valleyBowing?.[valley.name] ?? 0);
    if (gap < lowest.gap) lowest = { gap, massA: () => polynomialMass(valley.electronMass, T, A.id), massB: () => polynomialMass(partner.electronMass, T, B.id) };
  }
  if (x === 1) {
    for (const valley of B.otherValleys ?? []) {
      const gap = gapAt(valley.gap, T);
      const mass = (): number => polynomialMass(valley.electronMass, T, B.id);
      if (gap < lowest.gap) lowest = { gap, massA: mass, massB: mass };
    }
  }
  return lowest;
}

function polynomial(c: number | readonly number[], x: number): number {
  if (typeof c === 'number') return c;
  let sum = 0;
  for (let i = c.length - 1; i >= 0; i--) sum = sum * x + c[i];
  return sum;
}

/** Density-of-states mass of a crystal, m0. @throws {RangeError} there is none, or it is not positive */
export function massAt(crystal: CrystalMaterial, which: 'electronMass' | 'holeMass', T: number): number {
  const own = crystal.formulas?.[which];
  return own ? positive(formulaAt(own, T, Number.NaN), crystal.id, T) : polynomialMass(crystal[which], T, crystal.id);
}

/** Relative permittivity of a crystal. */
export function permittivityAt(crystal: CrystalMaterial, which: 'permittivity' | 'permittivityHighFrequency', T: number): number {
  const own = crystal.formulas?.[which];
  return own ? formulaAt(own, T, Number.NaN) : crystal[which];
}

function polynomialMass(mass: MassPolynomial | undefined, T: number, id: string): number {
  if (!mass) throw new RangeError(`${id} has no density-of-states mass`);
  return positive(polynomial(mass, T), id, T);
}

function positive(mass: number, id: string, T: number): number {
  if (!(mass > 0) || mass === Number.POSITIVE_INFINITY) throw new RangeError(`the density-of-states mass of ${id} is not positive at ${T} K: ${mass}`);
  return mass;
}
