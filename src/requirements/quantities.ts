import { BOLTZMANN } from '../../solver/constants.ts';
import { DEGENERATE_WITHIN } from '../../solver/layer.ts';
import { profileAt } from '../../solver/profile.ts';
import type { Stack } from '../../solver/index.ts';
import { REQUIREMENT_QUANTITIES, requirementQuantity, type RequirementQuantity, type RequirementQuantityName } from '../design/requirement-quantities.ts';
import type { ReadRequirement } from '../design/requirements.ts';
import type { AskedResult } from '../result/asked-result.ts';
import type { ContactResult, JunctionResult, LayerResult } from '../result/types.ts';

export { REQUIREMENT_QUANTITIES, requirementQuantity, type RequirementQuantity, type RequirementQuantityName };

/** What a figure is read from: the result, and the stack of which it is. */
export interface Solved {
  result: AskedResult;
  stack: Stack;
}

/** A figure in its result unit, Infinity of a contact that blocks, or null where there is none. Of a flag: how far it holds (above zero) or fails (below), in the quantity's `marginUnit`. */
type Reader = (solved: Solved, target: ReadRequirement['target']) => number | null;

const layer = (read: (row: LayerResult, solved: Solved, index: number) => number | null): Reader => (solved, { index }) => {
  const row = solved.result.layers[index];
  return row.insulator ? null : read(row, solved, index);
};
const junction = (read: (row: JunctionResult) => number | null): Reader => ({ result }, { index }) => read(result.junctions[index]);
const contact = (read: (row: ContactResult, solved: Solved) => number | null): Reader => (solved, { index }) => {
  const side = index === 0 ? 'top' : 'bottom';
  const row = solved.result.contacts.find((c) => c.side === side);
  return row === undefined ? null : read(row, solved);
};

const READERS: Record<RequirementQuantityName, Reader> = {
  // What blocks is known: it is worse than every limit from above.
  contactResistivity: contact((c) => (c.blocks ? Infinity : c.rho_c_ohm_cm2)),
  leakage: contact((c) => c.saturation_A_cm2),
  barrier: contact((c, solved) => (under(c, solved).p_cm3 > under(c, solved).n_cm3 ? c.barrier_p_eV : c.barrier_n_eV)),
  barrierN: contact((c) => c.barrier_n_eV),
  barrierP: contact((c) => c.barrier_p_eV),
  bandBending: contact((c, solved) => {
    const row = under(c, solved);
    const { ec_eV } = solved.result.profile;
    return row.insulator ? null : ec_eV[c.side === 'top' ? 0 : ec_eV.length - 1] - row.ec_minus_ef_eV;
  }),
  surfaceField: contact((c) => Math.abs(c.surface_field_V_cm)),
  sheetResistance: layer((l) => l.sheet_ohm),
  resistivity: layer((l) => l.resistivity_ohm_cm),
  carrierDensity: layer((l) => Math.max(l.n_cm3, l.p_cm3)),
  electronDensity: layer((l) => l.n_cm3),
  holeDensity: layer((l) => l.p_cm3),
  ionisedShare: layer((l) => (l.ionised.length === 0 ? null : Math.min(...l.ionised.map((row) => row.fraction)))),
  degenerate: layer((l, { result }) => DEGENERATE_WITHIN - Math.min(l.ec_minus_ef_eV, l.ef_minus_ev_eV) / (BOLTZMANN * result.conditions.temperature_K)),
  ecMinusEf: layer((l) => l.ec_minus_ef_eV),
  efMinusEv: layer((l) => l.ef_minus_ev_eV),
  solubility: layer((_, { stack }, index) => overSolubility(stack, index)),
  depletedShare: layer((l, solved, index) => depletedShare(l, solved, index)),
  // What is left of the layer has no sign of its own at zero: a depleted layer counts as just past it.
  fullyDepleted: layer((l, solved, index) => (l.fully_depleted ? Number.EPSILON : Math.min(0, (depletedShare(l, solved, index) ?? 0) - 1) - Number.EPSILON)),
  builtIn: junction((j) => size(j.builtin_V)),
  depletionWidth: (solved, target) => (target.kind === 'contact' ? contact((c) => c.depletion_nm)(solved, target) : junction((j) => sum(j.depletion_above_nm, j.depletion_below_nm))(solved, target)),
  depletionAbove: junction((j) => j.depletion_above_nm),
  depletionBelow: junction((j) => j.depletion_below_nm),
  peakField: junction((j) => j.peak_field_V_cm),
  capacitance: junction((j) => j.capacitance_F_cm2),
  conductionOffset: junction((j) => j.delta_ec_eV),
  valenceOffset: junction((j) => j.delta_ev_eV),
};

/** The figure that a requirement is about; null where the result has none, Infinity of the resistivity of a contact that blocks. */
export function figureOf(requirement: ReadRequirement, solved: Solved): number | null {
  const figure = READERS[requirement.quantity](solved, requirement.target);
  return figure === null || Number.isNaN(figure) ? null : figure;
}

/** The row of the layer that a contact touches. */
function under({ side }: ContactResult, { result }: Solved): LayerResult {
  return side === 'top' ? result.layers[0] : result.layers[result.layers.length - 1];
}

function depletedShare(row: LayerResult, { result }: Solved, index: number): number | null {
  if (row.fully_depleted) return 1;
  const last = result.layers.length - 1;
  const top = index === 0 ? result.contacts.find((c) => c.side === 'top')?.depletion_nm : result.junctions[index - 1].depletion_below_nm;
  const bottom = index === last ? result.contacts.find((c) => c.side === 'bottom')?.depletion_nm : result.junctions[index].depletion_above_nm;
  // Undoped layers have nothing to deplete.
  if ((top ?? null) === null && (bottom ?? null) === null) return null;
  return Math.min(1, ((top ?? 0) + (bottom ?? 0)) / row.thickness_nm);
}

/** Points at which a graded profile is looked at for its largest value. */
const LOOKS = 64;

function overSolubility(stack: Stack, index: number): number | null {
  const { dopants, thickness } = stack.layers[index];
  const ratios = dopants.filter((d) => d.solubility !== undefined).map((d) => {
    let peak = 0;
    for (let k = 0; k <= LOOKS; k++) peak = Math.max(peak, profileAt(d.concentration, (thickness * k) / LOOKS, thickness));
    return (peak * d.activation) / (d.solubility as number);
  });
  return ratios.length === 0 ? null : Math.max(...ratios);
}

const size = (value: number | null): number | null => (value === null ? null : Math.abs(value));
const sum = (a: number | null, b: number | null): number | null => (a === null && b === null ? null : (a ?? 0) + (b ?? 0));
