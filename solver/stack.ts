/**
 * What goes into the solver: a stack of layers, in the solver's own units
 * (eV, V, cm, cm^-3, cm^-2, K, A/cm^2; see units.ts). No strings, no presets.
 *
 * Frame: z = 0 at the top contact, growing into the stack. Layers run from the top down.
 */

import type { Formula } from './formula.ts';

/** Band gap against temperature; without `law` it is Varshni's. */
export type GapLaw = VarshniGap | LinearGap | ODonnellChenGap | FormulaGap;

/** Eg = zeroK - alpha T^2/(T + beta); Varshni, Physica 34, 149 (1967), eq. (1). */
export interface VarshniGap {
  law?: 'varshni';
  /** gap at 0 K, eV */ zeroK: number;
  /** eV/K */ alpha: number;
  /** K */ beta: number;
}

/** Eg = at300K - slope (T - 300 K); common practice where only a temperature coefficient is published, no source. */
export interface LinearGap {
  law: 'linear';
  /** gap at 300 K, eV */ at300K: number;
  /** fall per kelvin, eV/K */ slope: number;
}

/** Eg = zeroK - coupling phonon [coth(phonon/2kT) - 1]; O'Donnell and Chen, Appl. Phys. Lett. 58, 2924 (1991), eq. (3). */
export interface ODonnellChenGap {
  law: 'odonnell-chen';
  /** gap at 0 K, eV */ zeroK: number;
  /** S, dimensionless */ coupling: number;
  /** mean phonon energy, eV, > 0 */ phonon: number;
}

/** Eg by a formula of whoever made the stack, eV. */
export interface FormulaGap {
  law: 'formula';
  formula: Formula;
}

/** Formulas over T and x that count instead of the values and mixing rules beside them. Masses in m0, permittivities relative. */
export interface OwnFormulas {
  permittivity?: Formula;
  permittivityHighFrequency?: Formula;
  electronMass?: Formula;
  holeMass?: Formula;
}

/** A mass, m0, as a polynomial in T/K, lowest power first; one coefficient is a constant mass. */
export type MassPolynomial = readonly number[];

/** Mobility: a constant (cm^2/(V s)), or min + (max - min)/(1 + (N/reference)^exponent), Caughey and Thomas (1967). */
export type MobilityLaw = number | { min: number; max: number; reference: number; exponent: number };

/** Band-gap narrowing law; `conductionShare` of the narrowing lowers Ec, the rest raises Ev. */
export type NarrowingLaw =
  | {
      /** dEg = energy { ln(N/reference) + sqrt[ln^2(N/reference) + constant] } above 0; Slotboom and de Graaff (1976). */
      law: 'slotboom';
      energy: number;
      reference: number;
      constant: number;
      conductionShare: number;
    }
  | {
      /** dEg = a3 (N/1e18)^(1/3) + a4 (N/1e18)^(1/4) + a2 (N/1e18)^(1/2), eV; Jain and Roulston (1991), closed form. */
      law: 'jain-roulston';
      donor: { third: number; quarter: number; half: number };
      acceptor: { third: number; quarter: number; half: number };
      conductionShare: number;
    };

/** Polarisation constants of a polar crystal. C/cm^2 for charges, any one unit for stiffnesses (only their ratio counts), cm for the lattice. */
export interface Polarisation {
  spontaneous: number;
  e31?: number;
  e33?: number;
  c13?: number;
  c33?: number;
  lattice?: number;
}

/** Where a material's laws were measured or fitted; beyond it they are extrapolated, which is said and not refused. */
export interface Validity {
  /** lowest and highest, K */ temperature?: readonly [number, number];
  /** lowest and highest sum of all active dopants, cm^-3 */ doping?: readonly [number, number];
}

/** A material that is no alloy. Every law holds at every T; values outside a source's range are the reader's business to warn of. */
export interface CrystalMaterial {
  id: string;
  insulator: boolean;
  gap: GapLaw;
  /** Further valleys' gaps (e.g. Gamma, X, L): the lowest at T and x counts. */
  otherValleys?: readonly { name: string; gap: GapLaw; electronMass: MassPolynomial }[];
  /** chi at 300 K, eV */ affinity: number;
  /** kappa: share of the gap's change with T taken by the conduction edge */ affinityShare: number;
  /** static, relative */ permittivity: number;
  permittivityHighFrequency: number;
  /** density-of-states masses; absent for an insulator */
  electronMass?: MassPolynomial;
  holeMass?: MassPolynomial;
  /** Kane's alpha, 1/eV */
  nonParabolicity?: { electron?: number; hole?: number };
  tunnellingMass?: { electron?: number; hole?: number };
  /** A/(cm^2 K^2) */
  richardson?: { electron?: number; hole?: number };
  mobility?: { electron?: MobilityLaw; hole?: MobilityLaw };
  narrowing?: NarrowingLaw;
  /** E_CNL above Ev, eV */ neutralityLevel?: number;
  /** S */ pinningSlope?: number;
  polarisation?: Polarisation;
  /** valence edge on a named scale of natural offsets, eV, unstrained */
  naturalValence?: { scale: string; edge: number };
  validity?: Validity;
  outsideContactModel?: OutsideContactModel;
  /** over T alone: a crystal has no composition */ formulas?: OwnFormulas;
}

/** Contacts to one type of a material whose published resistivities lie decades away from what its barrier lets through. */
export interface OutsideContactModel {
  carrier: 'n' | 'p';
  /** published, ohm cm^2 */ low: number;
  high: number;
  /** author, year, journal */ source: string;
}

/** P(x) = (1 - x) first + x second - x (1 - x) bowing, for each property that has a bowing (0 else). */
export interface AlloyMaterial {
  id: string;
  first: CrystalMaterial;
  second: CrystalMaterial;
  /** The gap's bowing may itself move with x: a list is a polynomial in x, lowest power first. */
  bowing: { gap?: number | readonly number[]; affinity?: number; permittivity?: number; electronMass?: number; holeMass?: number; naturalValence?: number };
  /** Own bowing for the named other valleys. */
  valleyBowing?: Readonly<Record<string, number>>;
  /** Own laws that win over the two ends'. */
  mobility?: { electron?: MobilityLaw; hole?: MobilityLaw };
  neutralityLevel?: number;
  pinningSlope?: number;
  /** of the alloy's own laws; those of its ends count as well */ validity?: Validity;
  /** The gap is then that of the lowest band, whatever valleys the ends have (eV, over T and x); the affinity that at 300 K (eV, over x alone). */
  formulas?: OwnFormulas & { gap?: Formula; affinity?: Formula };
}

export type Material = CrystalMaterial | AlloyMaterial;

export function isAlloy(m: Material): m is AlloyMaterial {
  return 'first' in m;
}

/** A quantity through the depth of a layer. `z` counts from the top of the layer, cm. */
export type Profile =
  | { kind: 'constant'; value: number }
  | { kind: 'linear' | 'gaussian' | 'erfc'; from: number; to: number }
  | { kind: 'implant'; peak: number; depth: number; straggle: number; background: number }
  | { kind: 'points'; z: readonly number[]; value: readonly number[]; /** between the points straight, or straight in the logarithm where both values are positive; "linear" by default */ scale?: 'linear' | 'log' };

export type IonisationModel = 'dilute' | 'merging' | 'screened' | 'complete';

/** One level of one dopant in one layer. A dopant of several levels is several rows. */
export interface Dopant {
  /** preset or custom id; null for a row given outright */ id: string | null;
  kind: 'donor' | 'acceptor';
  /** chemical concentration, cm^-3 */ concentration: Profile;
  /** active share of it, 0..1 */ activation: number;
  /** share of the active row that counts as opposite, always ionised charge, 0..1 */ compensation: number;
  /** eV: donor below Ec, acceptor above Ev */ depth: number;
  /** g, of the usual N/(1 + g exp(..)) */ degeneracy: number;
  model: IonisationModel;
  merging?: { depthReference: number; depthExponent: number; boundReference: number; boundExponent: number };
  /** coefficient in eV cm */
  screened?: { coefficient: number; mottDensity: number; boundExponent: number };
  /** of the metal-insulator transition, cm^-3; by default that of `screened` */ mottDensity?: number;
  /** highest published active concentration, cm^-3 */ solubility?: number;
  /** Rows of one layer with the same name are levels of one and the same centre. */ centre?: string;
}

export interface Layer {
  name: string;
  material: Material;
  /** share of the alloy's `second`, 0..1; constant 0 for a crystal */ x: Profile;
  /** cm */ thickness: number;
  dopants: readonly Dopant[];
}

/** The interface below layer `index` (between layers index and index + 1). */
export interface Interface {
  index: number;
  /** fixed charge, units of +q, cm^-2 */ sheetCharge: number;
  /** own offset, value below less value above, eV; wins over every rule */ dEc?: number;
  dEv?: number;
  /** a published offset of this very pair (already for these compositions), with the same sign */
  published?: { dEc?: number; dEv?: number };
}

export interface Metal {
  id: string;
  /** eV */ workFunction: number;
}

export type Boundary =
  | { kind: 'neutral' }
  | {
      kind: 'barrier';
      /** How phi_Bn comes about; `measured` is already chosen for this metal on this material (a barrier for its own carrier, constant in T). */
      source: { from: 'given' | 'measured'; carrier: 'n' | 'p'; height: number } | { from: 'workFunction'; workFunction: number; slope: number | 'material' };
      metal: string | null;
      imageForce: boolean;
    }
  | { kind: 'pinned'; /** EF below Ec at the surface, eV */ level: number }
  | { kind: 'open'; /** units of +q, cm^-2 */ sheetCharge: number };

export interface Assumptions {
  statistics: 'fermi-dirac' | 'boltzmann';
  alignment: 'offsets' | 'affinity';
  narrowing: boolean;
  nonParabolic: boolean;
  transmission: 'wkb' | 'kemble' | 'exact';
}

export interface Crystal {
  face: 'metal' | 'N';
  strain: 'relaxed' | 'pseudomorphic';
  /** material whose lattice the layers take; needed for pseudomorphic */ template?: Material;
  templateX?: number;
}

export interface Stack {
  layers: readonly Layer[];
  /** only exceptional interfaces need a row */ interfaces: readonly Interface[];
  top: Boundary;
  bottom: Boundary;
  /** K */ temperature: number;
  assumptions: Assumptions;
  crystal?: Crystal;
}

export interface SolveOptions {
  /** accepted estimated mesh error in psi, V; default 1e-4 */ accuracy?: number;
  /** most mesh nodes; default 40000, or 200 a layer where that is more */ maxNodes?: number;
  /** whether contact resistivities are worked out; default true */ contacts?: boolean;
  /** Start from an earlier solution of a similar stack (same number of layers): its mesh and its potential. */
  warmStart?: import('./solution.ts').Profiles;
}
