import { isRefusal, solveStack, type CrystalMaterial, type Solution, type Stack } from '../../solver/index.ts';
import { NM_PER_CM } from '../../solver/units.ts';
import type { Result } from '../../src/result/types.ts';
import { barrier, doped, layer, stackOf } from '../solver/stack-fixtures.ts';
import { CRYSTAL } from '../solver/poisson-fixtures.ts';

/** Invented crystals, near the usual ones: the drawing is tested here, not the parameters. */
export const WIDE: CrystalMaterial = { ...CRYSTAL, id: 'wide', gap: { zeroK: 1.9, alpha: 5e-4, beta: 200 }, affinity: 3.75, permittivity: 12, electronMass: [0.09], holeMass: [0.5] };
export const NARROW: CrystalMaterial = { ...CRYSTAL, id: 'narrow', gap: { zeroK: 1.52, alpha: 5.4e-4, beta: 204 }, affinity: 4.07, permittivity: 12.9, electronMass: [0.067], holeMass: [0.5], nonParabolicity: { electron: 0.6 } };
export const OXIDE: CrystalMaterial = { ...CRYSTAL, id: 'oxide', insulator: true, gap: { zeroK: 8.9, alpha: 0, beta: 1 }, affinity: 0.95, permittivity: 3.9 };

export function solved(stack: Stack, title: string): Result {
  const solution = solveStack(stack);
  if (isRefusal(solution)) throw new Error(solution.reason);
  return toResult(solution, title);
}

/** The solver's answer in the document's units; what the drawing does not read stays empty. */
function toResult(s: Solution, title: string): Result {
  const p = s.profiles;
  const list = (values: ArrayLike<number>): number[] => Array.from(values);
  const nm = (cm: number | null): number | null => (cm === null ? null : cm * NM_PER_CM);
  const affinity = (i: number): number => s.layers[p.layer[i]].affinity;
  return {
    format: 'halfmark-result/1', title, conditions: { temperature_K: s.stack.temperature, bias_V: 0 },
    layers: s.layers.map((l, i) => {
      const material = s.stack.layers[i].material;
      return {
        name: l.name, material: material.id, x: null, thickness_nm: s.stack.layers[i].thickness * NM_PER_CM, gap_eV: l.gap, affinity_eV: l.affinity, ec_minus_ef_eV: l.ecMinusEf, ef_minus_ev_eV: l.efMinusEv,
        n_cm3: l.n, p_cm3: l.p, ni_cm3: l.ni,
        ionised: l.ionised.map((r) => ({ dopant: r.dopant, kind: r.kind, concentration_cm3: r.concentration, ionised_cm3: r.ionised, fraction: r.fraction, fraction_depleted: r.fractionDepleted, level_eV: r.depth })),
        regime: l.regime, type: l.type, debye_nm: nm(l.debyeLength), mobility_cm2_Vs: null, mobility_n_cm2_Vs: l.mobilityN, mobility_p_cm2_Vs: l.mobilityP, resistivity_ohm_cm: l.resistivity, sheet_ohm: l.sheetResistance,
        fully_depleted: l.fullyDepleted, insulator: l.insulator, boltzmann: { ec_minus_ef_eV: l.boltzmann.ecMinusEf, n_cm3: l.boltzmann.n, p_cm3: l.boltzmann.p }, nc_cm3: l.nc, nv_cm3: l.nv,
        kane_n_per_eV: 0, kane_p_per_eV: 0,
      };
    }),
    junctions: s.junctions.map((j) => ({
      above: s.layers[j.index].name, below: s.layers[j.index + 1].name, builtin_V: j.builtIn, delta_ec_eV: j.deltaEc, delta_ev_eV: j.deltaEv, class: j.class, alignment: j.alignment, sheet_charge_cm2: j.sheetCharge, peak_field_V_cm: j.peakField,
      depletion_above_nm: nm(j.depletionAbove), depletion_below_nm: nm(j.depletionBelow), depletion_approximation_above_nm: nm(j.depletionApproximationAbove), depletion_approximation_below_nm: nm(j.depletionApproximationBelow),
      capacitance_F_cm2: j.capacitance,
    })),
    contacts: s.contacts.map((c) => {
      const boundary = c.side === 'top' ? s.stack.top : s.stack.bottom;
      return {
        side: c.side, kind: c.kind, metal: boundary.kind === 'barrier' ? boundary.metal : null, barrier_n_eV: c.barrierN, barrier_p_eV: c.barrierP, barrier_source: c.barrierSource, lowering_eV: c.lowering, surface_field_V_cm: c.surfaceField,
        e00_meV: c.e00 === null ? null : 1000 * c.e00, transport: c.transport, depletion_nm: nm(c.depletion),
        rho_c_ohm_cm2: c.rhoC, rho_c_n_ohm_cm2: c.rhoCn, rho_c_p_ohm_cm2: c.rhoCp, rho_c_closed_form_ohm_cm2: c.rhoCClosedForm, closed_form: c.closedForm, rho_c_floor_ohm_cm2: c.rhoCFloor, saturation_A_cm2: c.saturationCurrent,
        transmission: c.transmission, blocks: c.blocks, rho_c_error: c.rhoError,
      };
    }),
    profile: {
      z_nm: list(p.z).map((z) => z * NM_PER_CM), layer: list(p.layer), ec_eV: list(p.ec), ev_eV: list(p.ev), ef_eV: list(p.ec).map(() => 0), vacuum_eV: list(p.ec).map((e, i) => e + affinity(i)),
      potential_V: list(p.psi).map((psi) => psi - p.psi[p.psi.length - 1]), field_V_cm: list(p.field), n_cm3: list(p.n), p_cm3: list(p.p), ionised_donors_cm3: list(p.ionisedDonors), ionised_acceptors_cm3: list(p.ionisedAcceptors), charge_cm3: list(p.charge),
    },
    quality: { converged: true, newton_updates: s.quality.newtonUpdates, last_update_V: s.quality.lastUpdate, mesh_nodes: s.quality.meshNodes, mesh_error_V: s.quality.meshError, gauss_error: s.quality.gaussError },
    provenance: { program: '0', model: '0', presets: '', design: '' }, warnings: s.warnings,
  };
}

const metal = (height: number, name: string, carrier: 'n' | 'p' = 'n'): ReturnType<typeof barrier> => ({ ...barrier(height, carrier), metal: name }) as ReturnType<typeof barrier>;

/** Stacks that between them show every mark. */
export const STACKS: Record<string, () => Result> = {
  diode: () => solved(stackOf([layer('emitter', 300, [doped('acceptor', 1e18)]), layer('base', 1200, [doped('donor', 3e16)])]), 'Step diode'),
  schottky: () => solved(stackOf([layer('cap', 400, [doped('donor', 1e17)]), layer('substrate', 300_000, [doped('donor', 2e18)])], { top: metal(0.72, 'Ti/Au') }), 'Metal on a lightly doped layer'),
  channel: () =>
    solved(
      stackOf(
        [layer('cap', 15, [doped('donor', 3e18, 0.006)], NARROW), layer('supply', 30, [doped('donor', 2e18, 0.02)], WIDE), layer('spacer', 4, [], WIDE), layer('channel', 60, [doped('acceptor', 1e15, 0.03)], NARROW), layer('buffer', 400, [doped('acceptor', 5e15, 0.03)], WIDE)],
        { top: metal(0.8, 'Pt') },
      ),
      'Modulation-doped channel',
    ),
  tunnel: () => solved(stackOf([layer('p++', 40, [doped('acceptor', 8e19, 0.02, 'complete')], NARROW), layer('n++', 40, [doped('donor', 2e19, 0.006, 'complete')], NARROW), layer('base', 500, [doped('donor', 2e17, 0.006)], NARROW)]), 'Tunnel junction'),
  frozen: () => solved(stackOf([layer('film', 200, [doped('donor', 1e16), doped('acceptor', 1e15)]), layer('wafer', 500_000, [doped('acceptor', 1e15)])], { T: 20, top: metal(0.4, 'Al') }), 'Cryogenic layer'),
  gate: () => solved(stackOf([layer('oxide', 5, [], OXIDE), layer('body', 2000, [doped('acceptor', 5e16)])], { top: { kind: 'barrier', source: { from: 'workFunction', workFunction: 4.1, slope: 1 }, metal: 'Al', imageForce: false } }), 'Metal, oxide, body'),
  two: () => solved(stackOf([layer('n cap', 30, [doped('donor', 2e19)]), layer('n', 500, [doped('donor', 1e16)]), layer('p', 500, [doped('acceptor', 1e17)])], { top: metal(0.5, 'NiSi'), bottom: metal(0.45, 'Pt', 'p') }), 'Metals at both ends'),
};
