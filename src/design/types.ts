/**
 * The design document, version 1, as a person writes it: quantities are strings with a unit, exactly as typed, or expressions over the design's
 * variables. Nothing here is in solver units; stack.ts turns a checked document into the solver's stack.
 */
export const DESIGN_FORMAT = 'halfmark-design/1';

/** A quantity or an expression, as typed. */
export type Text = string;
/** A pure number may be a JSON number or a string. */
export type Pure = number | string;

/** A value through the depth of a layer, as typed; `V` is a string with a unit, or a pure number for a composition. */
export type Graded<V extends Pure> =
  | V
  | { from: V; to: V; shape: 'linear' | 'gaussian' | 'erfc' }
  | { points: [Text, V][] };
export type Implanted = { peak: Text; depth: Text; straggle: Text; shape: 'gaussian'; background?: Text };

export interface Variable {
  name: string;
  value: Text;
  tolerance?: Text;
  range?: [Text, Text];
  note?: string;
}

export interface Conditions {
  temperature: Text;
  temperatureRange?: [Text, Text];
  bias?: Text;
}

export interface AssumptionsInput {
  statistics?: 'fermi-dirac' | 'boltzmann';
  alignment?: 'offsets' | 'affinity';
  narrowing?: boolean;
  nonParabolic?: boolean;
  transmission?: 'wkb' | 'kemble' | 'exact';
}

export type ContactInput =
  | { kind: 'neutral' }
  | { kind: 'barrier'; metal?: string; barrier?: Text; carrier?: 'n' | 'p'; /** "material", "none", "full" or S */ pinning?: Pure; imageForce?: boolean }
  | { kind: 'pinned'; level: Text }
  | { kind: 'open'; sheetCharge?: Text };

export type DopantModel = 'dilute' | 'merging' | 'screened' | 'complete';

export interface DopantRow {
  /** id of a preset or custom dopant in this host */ dopant?: string;
  /** given outright: kind, depth and degeneracy instead of `dopant` */ kind?: 'donor' | 'acceptor';
  depth?: Text;
  degeneracy?: Pure;
  concentration: Graded<Text> | Implanted;
  model?: DopantModel;
  activation?: Pure;
  compensation?: Pure;
}

export interface LayerInput {
  name: string;
  material: string;
  x?: Graded<Pure>;
  thickness: Text;
  dopants?: DopantRow[];
}

export interface InterfaceInput {
  above: string;
  sheetCharge?: Text;
  dEc?: Text;
  dEv?: Text;
}

export interface Requirement {
  quantity: string;
  of: string;
  max?: Text | boolean;
  min?: Text | boolean;
  over?: 'temperature' | 'temperatureRange';
}

export interface CrystalInput {
  face: 'metal' | 'N';
  strain: 'relaxed' | 'pseudomorphic';
  template?: string;
}

/** A property as a formula over T and, in an alloy, x: "1.519 eV - 5.4e-4 eV/K * T^2/(T + 204 K)". */
export interface FormulaInput {
  formula: Text;
}

export type GapInput =
  | Text
  | FormulaInput
  | { law?: 'varshni'; zeroK: Text; alpha: Text; beta: Text }
  | { law: 'linear'; at300K: Text; slope: Text }
  | { law: 'odonnell-chen'; zeroK: Text; coupling: Pure; phonon: Text };

export type MobilityInput = Text | { min: Text; max: Text; reference: Text; exponent: Pure };
export type MassInput = Pure | Pure[] | FormulaInput;
export type NarrowingInput =
  | { law: 'slotboom'; energy: Text; reference: Text; constant: Pure; conductionShare: Pure }
  | { law: 'jain-roulston'; donor: NarrowingTerms; acceptor: NarrowingTerms; conductionShare: Pure };
/** factors of (N/1e18 cm^-3) to the powers 1/3, 1/4, 1/2 */
export interface NarrowingTerms {
  third: Text;
  quarter: Text;
  half: Text;
}

export interface AlloyInput {
  /** x = 0 */ first: string;
  /** x = 1 */ second: string;
  bowing?: { gap?: Text | Text[]; affinity?: Text; permittivity?: Pure; electronMass?: Pure; holeMass?: Pure; naturalValence?: Text };
  valleyBowing?: Record<string, Text>;
}

/** Presets and custom entries alike. */
export interface MaterialInput {
  id: string;
  name?: string;
  insulator?: boolean;
  alloy?: AlloyInput;
  gap?: GapInput;
  otherValleys?: { name: string; gap: GapInput; electronMass: MassInput }[];
  /** as a formula in an alloy alone, over x */ affinity?: Text | FormulaInput;
  affinityShare?: Pure;
  permittivity?: Pure | FormulaInput;
  permittivityHighFrequency?: Pure | FormulaInput;
  electronMass?: MassInput;
  holeMass?: MassInput;
  nonParabolicity?: { electron?: Text; hole?: Text };
  tunnellingMass?: { electron?: Pure; hole?: Pure };
  richardson?: { electron?: Text; hole?: Text };
  mobility?: { electron?: MobilityInput; hole?: MobilityInput };
  narrowing?: NarrowingInput;
  neutralityLevel?: Text;
  pinningSlope?: Pure;
  polarisation?: { spontaneous: Text; e31?: Text; e33?: Text; c13?: Text; c33?: Text; lattice?: Text };
  naturalValence?: { scale: string; edge: Text };
  /** contacts to one type that a barrier does not explain: published band and where it stands */ outsideContactModel?: { carrier: 'n' | 'p'; low: Text; high: Text; source: string };
  /** where the laws were measured */ validity?: { temperature?: [Text, Text]; doping?: [Text, Text] };
  source: unknown;
  sources?: Record<string, unknown>;
}

export interface DopantInput {
  id: string;
  name?: string;
  host: string;
  kind: 'donor' | 'acceptor';
  /** in an alloy against x: straight between the points, the nearest value beyond them; or a formula over x */ depth: Text | { points: [Pure, Text][] } | FormulaInput;
  degeneracy?: Pure;
  merging?: { depthReference: Text; depthExponent: Pure; boundReference: Text; boundExponent: Pure };
  screened?: { coefficient: Text; mottDensity: Text; boundExponent?: Pure };
  /** taken where a row names none; by default "merging" where there are parameters for it, else "dilute" */ model?: DopantModel;
  mottDensity?: Text;
  solubility?: Text;
  centre?: string;
  source: unknown;
  sources?: Record<string, unknown>;
}

export interface MetalInput {
  id: string;
  name?: string;
  kind?: string;
  workFunction?: Text;
  barriers?: { material: string; carrier: 'n' | 'p'; height: Text; source: unknown; checked?: string; confidence?: string; note?: string }[];
  source: unknown;
  sources?: Record<string, unknown>;
}

/** Band offset of a pair, edge of `second` less that of `first`: constant + perX x, x of the alloy of the two. One of both edges. */
export interface OffsetInput {
  first: string;
  second: string;
  deltaEv?: { constant?: Text; perX?: Text };
  deltaEc?: { constant?: Text; perX?: Text };
  source: unknown;
}

export interface Custom {
  materials?: MaterialInput[];
  dopants?: DopantInput[];
  metals?: MetalInput[];
  /** win over the published ones, and count for own materials too */ offsets?: OffsetInput[];
}

export interface Design {
  format: typeof DESIGN_FORMAT;
  title: string;
  notes?: string;
  variables?: Variable[];
  conditions: Conditions;
  assumptions?: AssumptionsInput;
  crystal?: CrystalInput;
  top: ContactInput;
  layers: LayerInput[];
  interfaces?: InterfaceInput[];
  bottom: ContactInput;
  requirements?: Requirement[];
  custom?: Custom;
}
