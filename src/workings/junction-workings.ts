import { align } from '../../solver/alignment.ts';
import { netDoping } from '../../solver/charge.ts';
import type { Stack } from '../../solver/index.ts';
import { spaceChargeOf } from '../../solver/depletion.ts';
import { EPSILON_0 } from '../../solver/constants.ts';
import { CM_PER_NM } from '../../solver/units.ts';
import { differenceText } from '../result/figure-text.ts';
import type { JunctionResult } from '../result/types.ts';
import { affinitySteps, gapSteps, permittivitySteps } from './bands-steps.ts';
import { groundOf, neutralOf } from './carrier-steps.ts';
import { NO_SHIFTS, pointOf, type Context, type Point } from './context.ts';
import { formula } from './formula.ts';
import { capacitanceLaw, poisson } from './governing.ts';
import { charge, DESIGN, known, SOLVED, vacuumPermittivity, WORKED, type Known } from './known.ts';
import { offsetRivals, offsetSteps } from './offset-steps.ts';
import { sheetChargeSteps } from './polarisation-steps.ts';
import { lastResult, law, step, type Step } from './step.ts';
import { textbookSteps } from './textbook-steps.ts';
import type { Found, Simpler } from './workings.ts';

const MEV_PER_EV = 1e3;
const KV_PER_V = 1e-3;
const FARAD_PER_NF = 1e-9;

/** Both sides of an interface, with the values at it. */
export interface Sides {
  above: Point;
  below: Point;
}

function sidesOf(context: Context, index: number): Sides {
  return { above: pointOf(context, index, context.stack.layers[index].thickness), below: pointOf(context, index + 1, 0) };
}

/** The workings of one figure of a junction; null for a column that this part does not know. */
export function junctionWorkings(context: Context, index: number, column: string): Found | null {
  const row = context.result.junctions[index];
  const sides = sidesOf(context, index);
  switch (column) {
    case 'builtin':
      return builtIn(context, index, row, sides);
    case 'deltaEc':
    case 'deltaEv':
      return { ...offset(context, index, row, sides, column), rivals: offsetRivals(context, index, sides) };
    case 'class':
      return lineUp(context, index, row, sides);
    case 'sheetCharge':
      return { steps: sheetChargeSteps(context, index, row.sheet_charge_cm2), rests: ['stack'] };
    case 'peakField':
      return peakField(context, index, row, sides);
    case 'depletionAbove':
    case 'depletionBelow':
      return depletion(context, index, row, sides, column === 'depletionAbove');
    case 'capacitance':
      return capacitance(context, row, sides);
    default:
      return null;
  }
}

function offset(context: Context, index: number, row: JunctionResult, sides: Sides, column: 'deltaEc' | 'deltaEv'): Found {
  const shift = context.shifts.offsets.get(index);
  if (shift) return movedOffset(context, index, row, sides, column, shift);
  const { steps, deltaEc, deltaEv, remark } = offsetSteps(context, index, sides);
  const gapA = gapSteps(context, sides.above);
  const gapB = gapSteps(context, sides.below);
  const [a, b] = [{ ...gapA.known, sign: 'E_g,above', words: `gap of ${row.above}` }, { ...gapB.known, sign: 'E_g,below', words: `gap of ${row.below}` }];
  const gaps = [...gapA.steps, ...gapB.steps];
  const chiA = { ...affinitySteps(context, sides.above).known, sign: 'χ_above' };
  const chiB = { ...affinitySteps(context, sides.below).known, sign: 'χ_below' };
  const wanted = column === 'deltaEc' ? deltaEc : deltaEv;
  const value = column === 'deltaEc' ? row.delta_ec_eV : row.delta_ev_eV;
  let simpler: Simpler | null = null;
  if (row.alignment !== 'affinity' && row.alignment !== 'same') {
    const rule = known(column === 'deltaEc' ? 'ΔE_c,aff' : 'ΔE_v,aff', 'by the affinity rule', column === 'deltaEc' ? chiA.value - chiB.value : chiA.value - chiB.value + a.value - b.value, 'eV', WORKED);
    simpler = { words: 'the electron affinity rule', steps: [step(rule, column === 'deltaEc' ? formula`${chiA} - ${chiB}` : formula`${chiA} - ${chiB} + ${a} - ${b}`)], difference: `${differenceText(MEV_PER_EV * (rule.value - value), 3)} meV` };
  }
  if (wanted !== null) return { steps, remarks: [remark], simpler, rests: ['alignment', 'bands'] };
  const result = known(column === 'deltaEc' ? 'ΔE_c' : 'ΔE_v', column === 'deltaEc' ? 'step of Ec' : 'step of Ev', value, 'eV', WORKED);
  return {
    steps: [...steps, ...gaps, step(result, column === 'deltaEc' ? formula`${deltaEv!} + ${b} - ${a}` : formula`${deltaEc!} + ${a} - ${b}`)],
    remarks: [remark], simpler, rests: ['alignment', 'bands'],
  };
}

/** An offset that its tolerance has moved: the nominal one by its rule, then the tolerance; the gaps do not move. */
function movedOffset(context: Context, index: number, row: JunctionResult, sides: Sides, column: 'deltaEc' | 'deltaEv', { stack, amount }: { stack: Stack; amount: number }): Found {
  const alignment = align(stack);
  const flat = alignment.interfaces[index];
  const nominal: JunctionResult = { ...row, delta_ec_eV: flat.deltaEc, delta_ev_eV: flat.deltaEv, class: flat.class, alignment: flat.source };
  const plain: Context = { ...context, stack, alignment, shifts: NO_SHIFTS, result: { ...context.result, junctions: context.result.junctions.map((j, i) => (i === index ? nominal : j)) } };
  const found = offset(plain, index, nominal, sides, 'deltaEc');
  const last = lastResult(found)!;
  const base: Known = { ...last, sign: 'ΔE_c,0', words: 'step of Ec without its tolerance' };
  const ec = known('ΔE_c', 'step of Ec at this corner', row.delta_ec_eV, 'eV', WORKED);
  const steps = [...found.steps.map((s): Step => (s.kind === 'formula' && s.result === last ? { ...s, result: base } : s)), step(ec, formula`${base} + ${known('Δ', 'tolerance of the offset at this corner', amount, 'eV', WORKED)}`)];
  if (column === 'deltaEc') return { ...found, steps, simpler: null };
  const [gapA, gapB] = [gapSteps(context, sides.above), gapSteps(context, sides.below)];
  const [a, b] = [{ ...gapA.known, sign: 'E_g,above' }, { ...gapB.known, sign: 'E_g,below' }];
  return { ...found, simpler: null, steps: [...gapA.steps, ...gapB.steps, ...steps, step(known('ΔE_v', 'step of Ev at this corner', row.delta_ev_eV, 'eV', WORKED), formula`${ec} + ${a} - ${b}`)] };
}

function lineUp(context: Context, index: number, row: JunctionResult, sides: Sides): Found {
  const ec = offset(context, index, row, sides, 'deltaEc');
  const ev = offset(context, index, row, sides, 'deltaEv');
  const words = {
    straddling: 'Both edges of one gap lie inside the other: the steps have opposite signs, or one of them is none (type I).',
    staggered: 'Both edges step the same way, and the gaps still overlap (type II).',
    broken: 'The valence edge of one side lies above the conduction edge of the other (type III).',
  }[row.class];
  const last = ec.steps.at(-1) === undefined ? [] : ec.steps;
  return { steps: [...last, ...ev.steps.filter((s) => s.kind === 'law' || !last.some((t) => t.kind !== 'law' && t.result.sign === s.result.sign))], remarks: [words, ...(ec.remarks ?? [])], rests: ['alignment', 'bands'] };
}

function builtIn(context: Context, index: number, row: JunctionResult, sides: Sides): Found {
  if (row.builtin_V === null) return { steps: [], remarks: ['Beside an insulator there is no neutral level, and so no built-in potential.'], rests: [] };
  const [a, b] = [neutralOf(context, sides.above, 'above'), neutralOf(context, sides.below, 'below')];
  const ec = offset(context, index, row, sides, 'deltaEc');
  const step_ = known('ΔE_c', 'step of Ec, below less above', row.delta_ec_eV, 'eV', WORKED);
  const result = known('V_bi', 'built-in potential', row.builtin_V, 'V', WORKED);
  const [ta, tb] = [textbookSteps(context, sides.above, 'above'), textbookSteps(context, sides.below, 'below')];
  const simple = known('V_bi,B', 'by the textbook', row.delta_ec_eV + ta.level.value - tb.level.value, 'V', WORKED);
  return {
    steps: [...groundOf(a), ...groundOf(b), ...ec.steps, step(result, formula`${step_} + ${a.level} - ${b.level}`, 'Energies in eV over q are potentials in V.')],
    remarks: ec.remarks,
    simpler: { words: 'Boltzmann statistics, every dopant ionised', steps: [...ta.steps, ...tb.steps, step(simple, formula`${step_} + ${ta.level} - ${tb.level}`)], difference: `${differenceText(MEV_PER_EV * (simple.value - row.builtin_V), 3)} mV` },
    rests: ['carriers', 'bands', 'alignment'],
  };
}

/** The depletion approximation of an abrupt junction, where it has a meaning. */
interface Approximation {
  steps: Step[];
  above: Known;
  below: Known;
  field: Known;
  epsAbove: Known;
  epsBelow: Known;
}

function approximation(context: Context, row: JunctionResult, { above, below }: Sides): Approximation | null {
  const [wa, wb] = [row.depletion_approximation_above_nm, row.depletion_approximation_below_nm];
  if (wa === null || wb === null || row.builtin_V === null) return null;
  const doping = (point: Point, mark: string): Known => known(`N_${mark}`, `net active doping of ${point.layer.name} at the interface`, Math.abs(netDoping(point.charge)), 'cm⁻³', DESIGN, { path: `layers[${point.index}].dopants` });
  const [na, nb] = [doping(above, 'above'), doping(below, 'below')];
  const epsA = permittivitySteps(context, above);
  const epsB = permittivitySteps(context, below);
  const [ea, eb] = [{ ...epsA.known, sign: 'ε_above' }, { ...epsB.known, sign: 'ε_below' }];
  const V = known('V_bi', 'built-in potential', row.builtin_V, 'V', WORKED);
  const width = (sign: string, nm: number): Known => known(sign, 'depletion width by the depletion approximation', nm * CM_PER_NM, 'nm', WORKED, { scale: CM_PER_NM });
  const [a, b] = [width('W_above', wa), width('W_below', wb)];
  const common = formula`2 * ${ea} * ${eb} * ${vacuumPermittivity} * abs(${V}) / (${charge} * (${ea} * ${na} + ${eb} * ${nb}))`;
  const field = known('E_peak', 'largest field by the depletion approximation', (charge.value * na.value * a.value) / (ea.value * EPSILON_0), 'kV/cm', WORKED, { scale: 1 / KV_PER_V });
  return {
    steps: [step(a, formula`sqrt(${common} * ${nb} / ${na})`, 'Sze and Ng, Physics of Semiconductor Devices (2007), sections 2.2 and 2.7; from memory.'), step(b, formula`sqrt(${common} * ${na} / ${nb})`)],
    above: a, below: b, field, epsAbove: ea, epsBelow: eb,
  };
}

const fieldStep = (sides: Sides, a: Approximation): Step => {
  const N = known('N_above', `net active doping of ${sides.above.layer.name} at the interface`, Math.abs(netDoping(sides.above.charge)), 'cm⁻³', DESIGN);
  return step(a.field, formula`${charge} * ${N} * ${a.above} / (${a.epsAbove} * ${vacuumPermittivity})`);
};

/** Nodes of the solved profile that lie in the two layers of a junction: where a figure was read. */
function nodeOfField(context: Context, from: number, to: number, size: number): number {
  const { profiles } = context;
  let found = from;
  for (let s = from; s <= to; s++) if (Math.abs(Math.abs(profiles.field[s]) - size) < Math.abs(Math.abs(profiles.field[found]) - size)) found = s;
  return found;
}

const GOVERNING = 'Poisson’s equation with the carriers and ionised dopants of every depth, solved over the whole stack at one Fermi level.';

function peakField(context: Context, index: number, row: JunctionResult, sides: Sides): Found {
  const space = spaceChargeOf(context.stack, context.profiles);
  const s = nodeOfField(context, space.ranges[index][0], space.ranges[index + 1][1], row.peak_field_V_cm);
  const z = known('z_peak', 'depth of the node where the field is largest', context.profiles.z[s], 'nm', SOLVED, { scale: CM_PER_NM, path: 'profile.z_nm' });
  const at = known('E_z', `field at the depth of ${Number((z.value / CM_PER_NM).toPrecision(6))} nm`, context.profiles.field[s], 'kV/cm', SOLVED, { scale: 1 / KV_PER_V, path: 'profile.field_V_cm' });
  const peak = known('E_peak', 'largest field in the junction’s own space charge', row.peak_field_V_cm, 'kV/cm', SOLVED, { scale: 1 / KV_PER_V });
  const a = approximation(context, row, sides);
  return {
    steps: [law(poisson(), GOVERNING), step(peak, formula`abs(${at})`)],
    remarks: [`Read at ${Number((z.value / CM_PER_NM).toPrecision(6))} nm from the top.`],
    simpler: a && { words: 'depletion approximation', steps: [...a.steps, fieldStep(sides, a)], difference: factor(a.field.value, row.peak_field_V_cm) },
    rests: ['stack', 'carriers', 'bands', 'alignment'], solved: true,
  };
}

export function factor(its: number, mine: number): string {
  return mine !== 0 && Number.isFinite(its / mine) ? `factor ${Number((its / mine).toPrecision(3))}` : 'no ratio';
}

function depletion(context: Context, index: number, row: JunctionResult, sides: Sides, isAbove: boolean): Found {
  const nm = isAbove ? row.depletion_above_nm : row.depletion_below_nm;
  if (nm === null) return { steps: [], remarks: ['Without doping there is no dopant charge for the solved charge to be compared with.'], rests: [] };
  const space = spaceChargeOf(context.stack, context.profiles);
  const start = isAbove ? space.ranges[index][1] : space.ranges[index + 1][0];
  const zi = known('z_i', 'depth of the interface', context.profiles.z[start], 'nm', SOLVED, { scale: CM_PER_NM, path: 'profile.z_nm' });
  const ze = known('z_e', 'depth where the net charge falls to half of the dopants’', context.profiles.z[start] + (isAbove ? -1 : 1) * nm * CM_PER_NM, 'nm', SOLVED, { scale: CM_PER_NM, path: 'profile.charge_cm3' });
  const width = known('W', 'depletion width', nm * CM_PER_NM, 'nm', SOLVED, { scale: CM_PER_NM });
  const a = approximation(context, row, sides);
  const its = a && (isAbove ? a.above : a.below);
  const thickness = context.stack.layers[isAbove ? index : index + 1].thickness;
  return {
    steps: [law(poisson(), GOVERNING), step(width, formula`abs(${ze} - ${zi})`)],
    remarks: nm === 0 ? ['The layer is neutral or accumulated at the interface: nothing is depleted.'] : nm * CM_PER_NM >= thickness * (1 - 1e-9) ? ['The depletion edge lies beyond the layer: all of it counts.'] : [],
    simpler: a && its && { words: 'depletion approximation', steps: isAbove ? a.steps.slice(0, 1) : a.steps.slice(1), difference: factor(its.value, width.value) },
    rests: ['stack', 'carriers', 'bands', 'alignment'], solved: true,
  };
}

function capacitance(context: Context, row: JunctionResult, sides: Sides): Found {
  if (row.capacitance_F_cm2 === null) return { steps: [], remarks: ['A capacitance has a meaning only between two neutral sides of opposite kinds with a depletion between them.'], rests: [] };
  const moved = known('dQ/dV', 'charge moved per volt, from the linear equation for a small voltage on the solved charge', row.capacitance_F_cm2, 'nF/cm²', SOLVED, { scale: FARAD_PER_NF });
  const C = known('C', 'capacitance at zero bias, low frequency', row.capacitance_F_cm2, 'nF/cm²', SOLVED, { scale: FARAD_PER_NF });
  const a = approximation(context, row, sides);
  let simpler: Simpler | null = null;
  if (a) {
    const simple = known('C_approx', 'by the depletion approximation', 1 / (a.above.value / (a.epsAbove.value * EPSILON_0) + a.below.value / (a.epsBelow.value * EPSILON_0)), 'nF/cm²', WORKED, { scale: FARAD_PER_NF });
    simpler = { words: 'depletion approximation', steps: [...a.steps, step(simple, formula`1 / (${a.above} / (${a.epsAbove} * ${vacuumPermittivity}) + ${a.below} / (${a.epsBelow} * ${vacuumPermittivity}))`)], difference: factor(simple.value, C.value) };
  }
  return { steps: [law(poisson(), GOVERNING), law(capacitanceLaw(), 'A small voltage is put on the n side; electrons and donors there follow its level, holes and acceptors keep theirs. C is the hole charge that moves, over the voltage.'), step(C, formula`${moved}`)], simpler, rests: ['stack', 'carriers', 'bands', 'alignment'], solved: true };
}

