/**
 * What comes out of the solver, in the solver's own units (eV, V, cm, cm^-3, K; see units.ts).
 *
 * Electron energy is up and the Fermi level is the zero of every energy here. Ec(z) = EcFlat(z) - psi(z), where the flat bands
 * hang from the common vacuum level (EcFlat = -chi). z = 0 lies at the top contact and grows into the stack.
 */

export type Regime = 'degenerate' | 'freeze-out' | 'intrinsic' | 'extrinsic';

export interface IonisedRow {
  /** dopant id, null when given outright */ dopant: string | null;
  kind: 'donor' | 'acceptor';
  /** active concentration, cm^-3 */ concentration: number;
  ionised: number;
  /** ionised/concentration in the neutral layer; 0 concentration gives 1 */ fraction: number;
  /** the same where the layer is depleted (EF at midgap side: farthest from this dopant's own band) */ fractionDepleted: number;
  /** level depth in force, eV (after merging or screening) */ depth: number;
}

/** Figures of one layer by itself (charge neutrality), at its middle if graded. */
export interface LayerFigures {
  name: string;
  gap: number;
  affinity: number;
  nc: number;
  nv: number;
  ecMinusEf: number;
  efMinusEv: number;
  n: number;
  p: number;
  ni: number;
  ionised: IonisedRow[];
  regime: Regime;
  type: 'n' | 'p' | 'i';
  /** null in an insulator */ debyeLength: number | null;
  mobilityN: number | null;
  mobilityP: number | null;
  /** ohm cm; null when a needed mobility is missing */ resistivity: number | null;
  /** ohm */ sheetResistance: number | null;
  /** no part of a doped layer is neutral; false in an undoped one */ fullyDepleted: boolean;
  boltzmann: { ecMinusEf: number; n: number; p: number };
  insulator: boolean;
}

export type AlignmentSource = 'published' | 'natural' | 'affinity' | 'own' | 'same';

export interface JunctionFigures {
  /** interface below layer `index` */ index: number;
  /** neutral psi below less that above, V; null beside an insulator */ builtIn: number | null;
  /** value below less value above, eV */ deltaEc: number;
  deltaEv: number;
  class: 'straddling' | 'staggered' | 'broken';
  alignment: AlignmentSource;
  /** all fixed charge on it, polarisation included, +q, cm^-2 */ sheetCharge: number;
  /** largest |field| in the junction's own space charge, V/cm (junction.ts) */ peakField: number;
  /** from the interface to where the net charge falls to half of the dopants', cm; null without doping */ depletionAbove: number | null;
  depletionBelow: number | null;
  depletionApproximationAbove: number | null;
  depletionApproximationBelow: number | null;
  /** zero bias, dQ/dV of the solved charge, F/cm^2; null where it has no meaning (capacitance.ts) */ capacitance: number | null;
}

export interface ContactFigures {
  side: 'top' | 'bottom';
  kind: 'neutral' | 'barrier' | 'pinned' | 'open';
  barrierN: number | null;
  barrierP: number | null;
  barrierSource: 'given' | 'measured' | 'pinned' | 'ideal' | null;
  /** image-force lowering by the closed form, eV */ lowering: number | null;
  /** -dpsi/dz just inside, V/cm */ surfaceField: number;
  /** eV */ e00: number | null;
  transport: 'thermionic' | 'thermionic-field' | 'field' | null;
  /** cm */ depletion: number | null;
  /** specific contact resistivity at zero bias through the solved barrier, both carriers in parallel, ohm cm^2; null at ends that are no barrier and where a note says why */ rhoC: number | null;
  rhoCn: number | null;
  rhoCp: number | null;
  /** the majority's with T = 1: nothing conducts better */ rhoCFloor: number | null;
  /** by the closed form named, depletion approximation, no image force */ rhoCClosedForm: number | null;
  closedForm: 'thermionic' | 'thermionic-field' | 'field' | null;
  /** A T^2 exp(-phi/kT) of the majority at the metal, lowered barrier, A/cm^2 */ saturationCurrent: number | null;
  transmission: 'wkb' | 'kemble' | 'exact' | null;
  /** what passes is too little for a finite resistivity: rhoC is beyond the largest number. False where none could be worked out, and at an end that is no barrier */ blocks: boolean;
  /** relative, of the integrals of rhoC */ rhoError: number | null;
  /** why there is no rhoC, or what to keep in mind with it */ rhoCNotes: string[];
}

/** Every mesh node, an interface twice (once for each side). All arrays [nodes]. */
export interface Profiles {
  z: Float64Array;
  layer: Int32Array;
  ec: Float64Array;
  ev: Float64Array;
  psi: Float64Array;
  field: Float64Array;
  n: Float64Array;
  p: Float64Array;
  ionisedDonors: Float64Array;
  ionisedAcceptors: Float64Array;
  /** p - n + N_D+ - N_A- with compensating charges, cm^-3 */ charge: Float64Array;
}

/** How good the answer is; see quality.ts for what is accepted. */
export interface Quality {
  converged: boolean;
  newtonUpdates: number;
  /** V */ lastUpdate: number;
  /** looks at the charge or the properties of a mesh node, over all meshes that it took (poisson-work.ts) */ looks: number;
  meshNodes: number;
  /** estimated error in psi, V */ meshError: number;
  /** charge balance over the stack and each layer, share of the largest sheet charge */ gaussError: number;
  method: 'compact' | 'box';
}

export interface Solution {
  stack: import('./stack.ts').Stack;
  layers: LayerFigures[];
  junctions: JunctionFigures[];
  contacts: ContactFigures[];
  profiles: Profiles;
  quality: Quality;
  warnings: string[];
}

/** No accepted answer, and why. Never carries figures. */
export interface Refusal {
  refused: true;
  reason: string;
  quality: Quality | null;
}

export function isRefusal(r: object): r is Refusal {
  return 'refused' in r;
}
