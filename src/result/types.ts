/**
 * The result document, version 1: what `halfmark compute` prints and the page, the drawing and the exports read.
 *
 * A name carries its unit after an underscore: `n_cm3` is per cm^3, `sheet_ohm` is ohm (per square). Electron energy is up; the zero of energy in
 * `profile` is the Fermi level of the bottom contact. A key that does not apply is null; a figure that the solver does not stand behind is null too.
 */
import type { Complaint } from '../design/complaint.ts';
import type { RequirementResult } from './requirement-result.ts';

export type { RequirementResult };

export const RESULT_FORMAT = 'halfmark-result/1';

export type Regime = 'degenerate' | 'freeze-out' | 'intrinsic' | 'extrinsic';

export interface IonisedResult {
  /** id of the preset or custom dopant; null for a row given outright */ dopant: string | null;
  kind: 'donor' | 'acceptor';
  /** the active one */ concentration_cm3: number;
  ionised_cm3: number;
  /** ionised over active, in the neutral layer */ fraction: number;
  /** the same where the layer is depleted */ fraction_depleted: number;
  /** depth of the level in force: of a donor below Ec, of an acceptor above Ev */ level_eV: number;
}

export interface LayerResult {
  name: string;
  material: string;
  /** composition at the middle of the layer; null for a crystal */ x: number | null;
  thickness_nm: number;
  gap_eV: number;
  affinity_eV: number;
  ec_minus_ef_eV: number;
  ef_minus_ev_eV: number;
  n_cm3: number;
  p_cm3: number;
  ni_cm3: number;
  ionised: IonisedResult[];
  regime: Regime;
  type: 'n' | 'p' | 'i';
  debye_nm: number | null;
  mobility_cm2_Vs: number | null;
  mobility_n_cm2_Vs: number | null;
  mobility_p_cm2_Vs: number | null;
  resistivity_ohm_cm: number | null;
  sheet_ohm: number | null;
  fully_depleted: boolean;
  insulator: boolean;
  boltzmann: { ec_minus_ef_eV: number; n_cm3: number; p_cm3: number };
  /** effective densities of states at the middle, at the band edge; 0 in an insulator */ nc_cm3: number;
  nv_cm3: number;
  /** Kane's alpha in force, 1/eV; 0 is a parabolic band */ kane_n_per_eV: number;
  kane_p_per_eV: number;
}

export interface JunctionResult {
  above: string;
  below: string;
  /** neutral psi below less that above; null beside an insulator */ builtin_V: number | null;
  /** value below less value above */ delta_ec_eV: number;
  delta_ev_eV: number;
  class: 'straddling' | 'staggered' | 'broken';
  /** what fixed the offsets; "same" where both sides are one material */ alignment: 'published' | 'natural' | 'affinity' | 'own' | 'same';
  /** +q, polarisation included */ sheet_charge_cm2: number;
  peak_field_V_cm: number;
  depletion_above_nm: number | null;
  depletion_below_nm: number | null;
  depletion_approximation_above_nm: number | null;
  depletion_approximation_below_nm: number | null;
  capacitance_F_cm2: number | null;
}

export interface ContactResult {
  side: 'top' | 'bottom';
  kind: 'neutral' | 'barrier' | 'pinned' | 'open';
  metal: string | null;
  /** without the image-force lowering */ barrier_n_eV: number | null;
  barrier_p_eV: number | null;
  barrier_source: 'given' | 'measured' | 'pinned' | 'ideal' | null;
  lowering_eV: number | null;
  surface_field_V_cm: number;
  e00_meV: number | null;
  transport: 'thermionic' | 'thermionic-field' | 'field' | null;
  depletion_nm: number | null;
  /** at zero bias through the solved barrier, both carriers in parallel; null at an end that is no barrier, where a warning says why, and beyond the largest number */ rho_c_ohm_cm2: number | null;
  rho_c_n_ohm_cm2: number | null;
  rho_c_p_ohm_cm2: number | null;
  /** depletion approximation, no image force */ rho_c_closed_form_ohm_cm2: number | null;
  closed_form: 'thermionic' | 'thermionic-field' | 'field' | null;
  /** the ballistic limit of the majority */ rho_c_floor_ohm_cm2: number | null;
  /** thermionic emission of the majority over the lowered barrier */ saturation_A_cm2: number | null;
  transmission: 'wkb' | 'kemble' | 'exact' | null;
  /** what passes is too little for a finite number, and rho_c is null for that */ blocks: boolean;
  /** relative, of the integrals over energy and depth */ rho_c_error: number | null;
}

/** Every mesh node, an interface twice (once for each side). All arrays of one length. */
export interface ProfileResult {
  z_nm: number[];
  /** index of the layer */ layer: number[];
  ec_eV: number[];
  ev_eV: number[];
  ef_eV: number[];
  /** local vacuum level: Ec plus the affinity there */ vacuum_eV: number[];
  /** psi less its value at the bottom */ potential_V: number[];
  /** -dpsi/dz */ field_V_cm: number[];
  n_cm3: number[];
  p_cm3: number[];
  ionised_donors_cm3: number[];
  ionised_acceptors_cm3: number[];
  charge_cm3: number[];
}

export interface QualityResult {
  converged: boolean;
  newton_updates: number;
  last_update_V: number;
  mesh_nodes: number;
  mesh_error_V: number;
  gauss_error: number;
}

export interface Provenance {
  program: string;
  model: string;
  /** sha256 over the presets */ presets: string;
  /** sha256 over the design in its canonical form, variables and temperature as solved */ design: string;
}

export interface Result {
  format: typeof RESULT_FORMAT;
  title: string;
  conditions: { temperature_K: number; bias_V: number };
  layers: LayerResult[];
  junctions: JunctionResult[];
  contacts: ContactResult[];
  profile: ProfileResult;
  /** only where they were asked for: they take many solves */ requirements?: RequirementResult[];
  quality: QualityResult;
  provenance: Provenance;
  warnings: string[];
}

/** The three ways a solve ends (our own bugs throw). */
export type Answer =
  | { kind: 'result'; result: Result }
  /** the design is wrong: where, and how to mend it */ | { kind: 'complaints'; complaints: Complaint[] }
  /** no accepted answer; never carries figures */ | { kind: 'refused'; reason: string };
