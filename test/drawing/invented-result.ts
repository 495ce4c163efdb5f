import type { LayerResult, Result } from '../../src/result/types.ts';

/**
 * A result made from formulas instead of the solver, so that kept drawings change with the drawing alone: a metal on an n layer (a parabola), a thin wide layer (a
 * straight line) and a thick p layer (an exponential). Its bands look like bands; they solve nothing.
 */
export function inventedResult(names: [string, string, string] = ['n cap', 'barrier', 'p base'], title = 'Invented stack'): Result {
  const profile: Result['profile'] = {
    z_nm: [], layer: [], ec_eV: [], ev_eV: [], ef_eV: [], vacuum_eV: [], potential_V: [], field_V_cm: [], n_cm3: [], p_cm3: [], ionised_donors_cm3: [], ionised_acceptors_cm3: [], charge_cm3: [],
  };
  const gaps = [1.1, 1.5, 1.1];
  const affinities = [4, 3.75, 4];
  const add = (z: number, layer: number, ec: number, field: number): void => {
    profile.z_nm.push(z);
    profile.layer.push(layer);
    profile.ec_eV.push(ec);
    profile.ev_eV.push(ec - gaps[layer]);
    profile.ef_eV.push(0);
    profile.vacuum_eV.push(ec + affinities[layer]);
    profile.potential_V.push(3 - ec - affinities[layer]);
    profile.field_V_cm.push(field);
    profile.n_cm3.push(2.8e19 * Math.exp(-ec / 0.02585));
    profile.p_cm3.push(2.5e19 * Math.exp((ec - gaps[layer]) / 0.02585));
    profile.ionised_donors_cm3.push(layer === 0 ? 1e18 : 0);
    profile.ionised_acceptors_cm3.push(layer === 2 ? 1e17 : 0);
    profile.charge_cm3.push(0);
  };
  for (let i = 0; i <= 40; i++) {
    const z = 2.5 * i;
    add(z, 0, 0.1 + 0.6 * Math.max(0, 1 - z / 60) ** 2, -2e5 * Math.max(0, 1 - z / 60));
  }
  for (let i = 0; i <= 4; i++) add(100 + 5 * i, 1, 0.35 + 0.025 * i, 5e4);
  for (let i = 0; i <= 60; i++) {
    const z = 120 + 2000 * (i / 60) ** 2;
    add(z, 2, 0.95 - 0.75 * Math.exp(-(z - 120) / 80), 9e4 * Math.exp(-(z - 120) / 80));
  }
  const layer = (i: number, values: Partial<LayerResult>): LayerResult => ({
    name: names[i], material: i === 1 ? 'wide' : 'narrow', x: i === 1 ? 0.3 : null, thickness_nm: 100, gap_eV: gaps[i], affinity_eV: affinities[i], ec_minus_ef_eV: 0.1, ef_minus_ev_eV: gaps[i] - 0.1,
    n_cm3: 1e18, p_cm3: 1e2, ni_cm3: 1e10, ionised: [], regime: 'extrinsic', type: 'n', debye_nm: 4, mobility_cm2_Vs: 500, mobility_n_cm2_Vs: 500, mobility_p_cm2_Vs: 200, resistivity_ohm_cm: 0.01, sheet_ohm: 100, fully_depleted: false, insulator: false,
    boltzmann: { ec_minus_ef_eV: 0.09, n_cm3: 1e18, p_cm3: 1e2 }, nc_cm3: 2.8e19, nv_cm3: 2.5e19, kane_n_per_eV: 0, kane_p_per_eV: 0, ...values,
  });
  const contact = { barrier_n_eV: null, barrier_p_eV: null, barrier_source: null, lowering_eV: null, surface_field_V_cm: 0, e00_meV: null, transport: null, depletion_nm: null,
    rho_c_ohm_cm2: null, rho_c_n_ohm_cm2: null, rho_c_p_ohm_cm2: null, rho_c_closed_form_ohm_cm2: null, closed_form: null, rho_c_floor_ohm_cm2: null, saturation_A_cm2: null, transmission: null, blocks: false, rho_c_error: null };
  const junction = {
    builtin_V: null, sheet_charge_cm2: 0, peak_field_V_cm: 1e5, depletion_above_nm: null, depletion_below_nm: null, depletion_approximation_above_nm: null, depletion_approximation_below_nm: null, capacitance_F_cm2: null,
  };
  return {
    format: 'halfmark-result/1', title, conditions: { temperature_K: 300, bias_V: 0 },
    layers: [
      layer(0, { ionised: [{ dopant: 'D', kind: 'donor', concentration_cm3: 1e18, ionised_cm3: 9e17, fraction: 0.9, fraction_depleted: 1, level_eV: 0.045 }] }),
      layer(1, { thickness_nm: 20, type: 'i', fully_depleted: true, ec_minus_ef_eV: 0.7, ef_minus_ev_eV: 0.8 }),
      layer(2, {
        thickness_nm: 2000, type: 'p', ec_minus_ef_eV: 0.95, ef_minus_ev_eV: 0.15, n_cm3: 1e3, p_cm3: 7.5e16,
        ionised: [{ dopant: 'A', kind: 'acceptor', concentration_cm3: 1e17, ionised_cm3: 7.5e16, fraction: 0.75, fraction_depleted: 1, level_eV: 0.1 }],
      }),
    ],
    junctions: [
      { ...junction, above: names[0], below: names[1], delta_ec_eV: 0.25, delta_ev_eV: -0.15, class: 'straddling', alignment: 'own' },
      { ...junction, above: names[1], below: names[2], delta_ec_eV: -0.25, delta_ev_eV: 0.15, class: 'straddling', alignment: 'own' },
    ],
    contacts: [
      { ...contact, side: 'top', kind: 'barrier', metal: 'M', barrier_n_eV: 0.7, barrier_p_eV: 0.4, barrier_source: 'given', lowering_eV: 0.03, surface_field_V_cm: -2e5, e00_meV: 12, transport: 'thermionic', depletion_nm: 60 },
      { ...contact, side: 'bottom', kind: 'neutral', metal: null },
    ],
    profile,
    quality: { converged: true, newton_updates: 5, last_update_V: 1e-12, mesh_nodes: 106, mesh_error_V: 1e-5, gauss_error: 1e-9 },
    provenance: { program: '0', model: '0', presets: '', design: '' }, warnings: [],
  };
}
