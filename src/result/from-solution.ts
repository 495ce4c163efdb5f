import { bandsAt, isAlloy, profileAt, type ContactFigures, type JunctionFigures, type LayerFigures, type Profiles, type Solution } from '../../solver/index.ts';
import { NM_PER_CM } from '../../solver/units.ts';
import { RESULT_FORMAT, type ContactResult, type JunctionResult, type LayerResult, type ProfileResult, type Provenance, type Result } from './types.ts';

const MEV_PER_EV = 1e3;

/** A solution in the solver's units as the result document. */
export function resultOf(solution: Solution, title: string, provenance: Provenance): Result {
  const { stack, quality } = solution;
  return {
    format: RESULT_FORMAT,
    title,
    conditions: { temperature_K: stack.temperature, bias_V: 0 },
    layers: solution.layers.map((figures, l) => layerResult(figures, solution, l)),
    junctions: solution.junctions.map((figures) => junctionResult(figures, solution)),
    contacts: solution.contacts.map((figures) => contactResult(figures, solution)),
    profile: profileResult(solution),
    quality: {
      converged: quality.converged, newton_updates: quality.newtonUpdates, last_update_V: quality.lastUpdate,
      mesh_nodes: quality.meshNodes, mesh_error_V: quality.meshError, gauss_error: quality.gaussError,
    },
    provenance,
    warnings: [...solution.warnings],
  };
}

/** One row each: of a layer, of a junction, of a contact. */
export function layerResult(f: LayerFigures, { stack }: Pick<Solution, 'stack'>, l: number): LayerResult {
  const layer = stack.layers[l];
  const { material } = layer;
  const majority = f.type === 'p' || (f.type === 'i' && f.p > f.n) ? f.mobilityP : f.mobilityN;
  const bands = bandsAt(layer, layer.thickness / 2, stack.temperature, stack.assumptions);
  return {
    name: f.name,
    material: material.id,
    x: isAlloy(material) ? profileAt(layer.x, layer.thickness / 2, layer.thickness) : null,
    thickness_nm: layer.thickness * NM_PER_CM,
    gap_eV: f.gap,
    affinity_eV: f.affinity,
    ec_minus_ef_eV: f.ecMinusEf,
    ef_minus_ev_eV: f.efMinusEv,
    n_cm3: f.n,
    p_cm3: f.p,
    ni_cm3: f.ni,
    ionised: f.ionised.map((row) => ({
      dopant: row.dopant, kind: row.kind, concentration_cm3: row.concentration, ionised_cm3: row.ionised, fraction: row.fraction, fraction_depleted: row.fractionDepleted, level_eV: row.depth,
    })),
    regime: f.regime,
    type: f.type,
    debye_nm: inNm(f.debyeLength),
    mobility_cm2_Vs: majority,
    mobility_n_cm2_Vs: f.mobilityN,
    mobility_p_cm2_Vs: f.mobilityP,
    resistivity_ohm_cm: f.resistivity,
    sheet_ohm: f.sheetResistance,
    fully_depleted: f.fullyDepleted,
    insulator: f.insulator,
    boltzmann: { ec_minus_ef_eV: f.boltzmann.ecMinusEf, n_cm3: f.boltzmann.n, p_cm3: f.boltzmann.p },
    nc_cm3: f.insulator ? 0 : f.nc,
    nv_cm3: f.insulator ? 0 : f.nv,
    kane_n_per_eV: bands.kaneN,
    kane_p_per_eV: bands.kaneP,
  };
}

export function junctionResult(f: JunctionFigures, { stack }: Pick<Solution, 'stack'>): JunctionResult {
  return {
    above: stack.layers[f.index].name,
    below: stack.layers[f.index + 1].name,
    builtin_V: f.builtIn,
    delta_ec_eV: f.deltaEc,
    delta_ev_eV: f.deltaEv,
    class: f.class,
    alignment: f.alignment,
    sheet_charge_cm2: f.sheetCharge,
    peak_field_V_cm: f.peakField,
    depletion_above_nm: inNm(f.depletionAbove),
    depletion_below_nm: inNm(f.depletionBelow),
    depletion_approximation_above_nm: inNm(f.depletionApproximationAbove),
    depletion_approximation_below_nm: inNm(f.depletionApproximationBelow),
    capacitance_F_cm2: f.capacitance,
  };
}

export function contactResult(f: ContactFigures, { stack }: Pick<Solution, 'stack'>): ContactResult {
  const boundary = stack[f.side];
  return {
    side: f.side,
    kind: f.kind,
    metal: boundary.kind === 'barrier' ? boundary.metal : null,
    barrier_n_eV: f.barrierN,
    barrier_p_eV: f.barrierP,
    barrier_source: f.barrierSource,
    lowering_eV: f.lowering,
    surface_field_V_cm: f.surfaceField,
    e00_meV: f.e00 === null ? null : f.e00 * MEV_PER_EV,
    transport: f.transport,
    depletion_nm: inNm(f.depletion),
    rho_c_ohm_cm2: finite(f.rhoC),
    rho_c_n_ohm_cm2: finite(f.rhoCn),
    rho_c_p_ohm_cm2: finite(f.rhoCp),
    rho_c_closed_form_ohm_cm2: finite(f.rhoCClosedForm),
    closed_form: f.closedForm,
    rho_c_floor_ohm_cm2: finite(f.rhoCFloor),
    saturation_A_cm2: f.saturationCurrent,
    transmission: f.transmission,
    blocks: f.blocks,
    rho_c_error: f.rhoError,
  };
}

function profileResult({ profiles, layers, stack }: Solution): ProfileResult {
  const bottom = profiles.psi[profiles.psi.length - 1];
  return {
    z_nm: Array.from(profiles.z, (z) => z * NM_PER_CM),
    layer: Array.from(profiles.layer),
    ec_eV: Array.from(profiles.ec),
    ev_eV: Array.from(profiles.ev),
    // Equilibrium: one level throughout, the zero of energy.
    ef_eV: new Array<number>(profiles.z.length).fill(0),
    vacuum_eV: vacuum(profiles, layers, stack),
    potential_V: Array.from(profiles.psi, (psi) => psi - bottom),
    field_V_cm: Array.from(profiles.field),
    n_cm3: Array.from(profiles.n),
    p_cm3: Array.from(profiles.p),
    ionised_donors_cm3: Array.from(profiles.ionisedDonors),
    ionised_acceptors_cm3: Array.from(profiles.ionisedAcceptors),
    charge_cm3: Array.from(profiles.charge),
  };
}

/** Ec plus the affinity of the place; in a layer whose composition is graded, the affinity there. */
function vacuum(profiles: Profiles, layers: LayerFigures[], stack: Solution['stack']): number[] {
  const tops: number[] = [];
  let top = 0;
  for (const layer of stack.layers) {
    tops.push(top);
    top += layer.thickness;
  }
  return Array.from(profiles.ec, (ec, s) => {
    const l = profiles.layer[s];
    const layer = stack.layers[l];
    if (layer.x.kind === 'constant' && !stack.assumptions.narrowing) return ec + layers[l].affinity;
    return ec + bandsAt(layer, profiles.z[s] - tops[l], stack.temperature, stack.assumptions).affinity;
  });
}

/** JSON knows no infinity: a resistivity beyond the largest number is null. */
const finite = (value: number | null): number | null => (value !== null && Number.isFinite(value) ? value : null);

const inNm = (cm: number | null): number | null => (cm === null ? null : cm * NM_PER_CM);
