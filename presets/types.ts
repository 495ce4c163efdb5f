/**
 * The shapes of the presets: those of the design document's `custom` entries, quantities as strings with a unit. Pure numbers (masses, permittivities,
 * exponents, compositions) are numbers.
 */

/** Where a value stands and how that was checked. */
export interface Provenance {
  /** key of sources.json */ source: string;
  /** "page": seen in print; "memory": from memory of the cited work; "computed": derived from it */ checked: 'page' | 'memory' | 'computed';
  confidence?: 'high' | 'medium' | 'low';
  /** what the figure leaves out, or how it was derived */ note?: string;
}

/** Path of a value inside its entry ("gap.zeroK", "otherValleys.X.electronMass", "depth.points.0") to its provenance. */
export type Sources = Record<string, Provenance>;

/**
 * A gap: constant, Varshni's law (no `law`), a straight line (at300K - slope (T - 300 K)), or the law of O'Donnell and Chen
 * (zeroK - coupling phonon [coth(phonon/2kT) - 1]).
 */
export type GapPreset =
  | string
  | { law?: 'varshni'; zeroK: string; alpha: string; beta: string }
  | { law: 'linear'; at300K: string; slope: string }
  | { law: 'odonnell-chen'; zeroK: string; coupling: number; phonon: string };

/** Density-of-states mass, m0; a list is a polynomial in T/K, lowest power first. */
export type MassPreset = number | number[];

export type MobilityPreset = string | { min: string; max: string; reference: string; exponent: number };

/** Shifts at 1e18 cm^-3 that grow as N^(1/3), N^(1/4) and N^(1/2). */
export interface NarrowingPowers {
  third: string;
  quarter: string;
  half: string;
}

export type NarrowingPreset =
  | { law: 'slotboom'; energy: string; reference: string; constant: number; conductionShare: number }
  | { law: 'jain-roulston'; donor: NarrowingPowers; acceptor: NarrowingPowers; conductionShare: number };

export interface ByCarrier<V> {
  electron?: V;
  hole?: V;
}

export interface ValleyPreset {
  /** valleys of one name belong together in an alloy */ name: string;
  gap: GapPreset;
  electronMass: MassPreset;
}

interface Entry {
  id: string;
  name: string;
  /** main work, key of sources.json */ source: string;
  sources: Sources;
}

interface SurfacePreset {
  /** E_CNL above Ev */ neutralityLevel?: string;
  /** S */ pinningSlope?: number;
}

/** Where the laws were measured or fitted: lowest and highest. */
export interface ValidityPreset {
  temperature?: [string, string];
  /** sum of all active dopants */ doping?: [string, string];
}

export interface CrystalPreset extends Entry, SurfacePreset {
  insulator?: boolean;
  /** Gap of the valley that goes with `electronMass`. It is the lowest one but where `otherValleys` holds a lower: AlAs (Gamma first), Ge (Delta first). */
  gap: GapPreset;
  otherValleys?: ValleyPreset[];
  /** at 300 K */ affinity: string;
  /** kappa, 0.5 where absent (a convention, no measured value) */ affinityShare?: number;
  permittivity: number;
  permittivityHighFrequency?: number;
  electronMass?: MassPreset;
  holeMass?: MassPreset;
  nonParabolicity?: ByCarrier<string>;
  tunnellingMass?: ByCarrier<number>;
  richardson?: ByCarrier<string>;
  mobility?: ByCarrier<MobilityPreset>;
  narrowing?: NarrowingPreset;
  polarisation?: { spontaneous: string; e31?: string; e33?: string; c13?: string; c33?: string; lattice?: string };
  validity?: ValidityPreset;
  /** valence edge on a named scale; edges of two scales cannot be compared */ naturalValence?: { scale: string; edge: string };
  /** contacts to one type whose published resistivities lie decades away from the barrier picture: lowest and highest, and where they stand, in words */
  outsideContactModel?: { carrier: 'n' | 'p'; low: string; high: string; source: string };
}

export interface AlloyPreset extends Entry, SurfacePreset {
  alloy: {
    first: string;
    /** `x` is the share of this one */ second: string;
    bowing: {
      /** of the first valley; a list is a polynomial in x, lowest power first */ gap?: string | string[];
      affinity?: string;
      permittivity?: number;
      electronMass?: number;
      holeMass?: number;
      naturalValence?: string;
    };
    /** of the gaps of the ends' `otherValleys`, by name; 0 where absent */ valleyBowing?: Record<string, string>;
  };
  mobility?: ByCarrier<MobilityPreset>;
  validity?: ValidityPreset;
}

export type MaterialPreset = CrystalPreset | AlloyPreset;

export interface DopantPreset extends Entry {
  host: string;
  kind: 'donor' | 'acceptor';
  /** Of a donor below Ec, of an acceptor above Ev; in an alloy against x, straight between the points and constant beyond them. */
  depth: string | { points: [number, string][] };
  degeneracy?: number;
  merging?: { depthReference: string; depthExponent: number; boundReference: string; boundExponent: number };
  screened?: { coefficient: string; mottDensity: string; boundExponent?: number };
  /** the model taken where a design names none; by default "merging" where there are parameters for it, else "dilute" */ model?: 'dilute' | 'merging' | 'screened' | 'complete';
  /** highest active concentration reached */ solubility?: string;
  /** of the metal-insulator transition */ mottDensity?: string;
  /** rows of one host with the same word are levels of one atom */ centre?: string;
}

export interface BarrierPreset extends Provenance {
  material: string;
  carrier: 'n' | 'p';
  height: string;
}

export interface MetalPreset extends Entry {
  kind: 'element' | 'nitride' | 'oxide' | 'silicide' | 'germanide';
  /** absent where only barriers are published */ workFunction?: string;
  barriers: BarrierPreset[];
}

/** constant + perX x, x being that of the alloy among the two. */
export interface OffsetValue {
  constant?: string;
  perX?: string;
}

/** Published band offset of a pair, edge of `second` less that of `first`; one of the two edges is given. */
export interface OffsetPreset {
  first: string;
  second: string;
  deltaEv?: OffsetValue;
  deltaEc?: OffsetValue;
  source: string;
  sources: Sources;
}
