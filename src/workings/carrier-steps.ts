import { levelInForce } from '../../solver/dopants.ts';
import { gapSteps, type Worked } from './bands-steps.ts';
import type { Context, Point } from './context.ts';
import type { Expression } from './expression.ts';
import { formula } from './formula.ts';
import { DESIGN, known, SOLVED, thermal, WORKED, type Known } from './known.ts';
import { dopantAsks, type Asks } from './published.ts';
import { statesSteps } from './states-steps.ts';
import { equation, step, type Step } from './step.ts';

/** The neutral point as formulas: what every figure of a layer is made of. */
export interface Neutral {
  level: Known;
  gap: Known;
  n: Known;
  p: Known;
  kT: Known;
  nc: Known;
  nv: Known;
  /** lines of gap and densities of states */ ground: Step[];
  /** n and p from the level */ nStep: Step;
  pStep: Step;
  /** of each dopant row, and compensating charges */ ionised: { row: number; donor: boolean; known: Known; step: Step | null }[];
  /** lines of the levels' depths and shares of bound states */ levels: Step[];
  /** the neutrality that fixes the level */ balance: Step;
}

export function neutralOf(context: Context, point: Point, mark = ''): Neutral {
  const { bands, values } = point;
  const gap = gapSteps(context, point);
  const nc = statesSteps(context, point, 'n');
  const nv = statesSteps(context, point, 'p');
  const kT = thermal(bands.T);
  const of = point.layer.name;
  const level = known(mark === '' ? 'E_c−E_F' : `(E_c−E_F)_${mark}`, `band edge above the Fermi level in neutral ${of}`, point.ecMinusEf, 'eV', SOLVED);
  const n = known('n', `electrons in neutral ${of}`, values.n, 'cm⁻³', WORKED);
  const p = known('p', `holes in neutral ${of}`, values.p, 'cm⁻³', WORKED);
  const nStep = step(n, density(context, nc.known, formula`-${level}`, kT, bands.kaneN));
  const pStep = step(p, density(context, nv.known, formula`${level} - ${gap.known}`, kT, bands.kaneP));
  const levels: Step[] = [];
  const ionised = point.charge.levels.map((l) => charged(context, point, l, level, gap.known, kT, levels));
  const plus: Expression = { kind: 'sum', terms: [p, ...ionised.filter((l) => l.donor).map((l) => l.known)].map((k) => ({ sign: 1, of: { kind: 'known', of: k } })) };
  const minus: Expression = { kind: 'sum', terms: [n, ...ionised.filter((l) => !l.donor).map((l) => l.known)].map((k) => ({ sign: 1, of: { kind: 'known', of: k } })) };
  return {
    level, gap: gap.known, n, p, kT, nc: nc.known, nv: nv.known, nStep, pStep, ionised, levels,
    ground: [...gap.steps, ...nc.steps, ...nv.steps],
    balance: equation(level, plus, minus, 'Charge neutrality: the level at which both sides are equal, found by a safeguarded Newton search in logarithms.'),
  };
}

/** Everything up to the level: bands, ionisation, the balance. */
export function groundOf(n: Neutral): Step[] {
  return [...n.ground, ...n.levels, ...n.ionised.flatMap((l) => (l.step ? [l.step] : [])), n.nStep, n.pStep, n.balance];
}

/** Carriers by the statistics in force. */
function density(context: Context, states: Known, above: Expression, kT: Known, kane: number): Expression {
  const eta = formula`(${above}) / ${kT}`;
  const plain = context.stack.assumptions.statistics === 'boltzmann';
  if (kane > 0) {
    const a = formula`${known('α', 'non-parabolicity', kane, 'eV⁻¹', WORKED)} * ${kT}`;
    return plain ? formula`${states} * kaneBoltzmann(${eta}, ${a})` : formula`${states} * kane(${eta}, ${a})`;
  }
  return plain ? formula`${states} * exp(${eta})` : formula`${states} * fermi(${eta})`;
}

type Level = Point['charge']['levels'][number];

/** The charge of one level: all of it, or by its occupancy. */
function charged(context: Context, point: Point, level: Level, ecMinusEf: Known, gap: Known, kT: Known, lines: Step[]): Neutral['ionised'][number] {
  const kind = level.donor ? 'D' : 'A';
  const power = level.donor ? '+' : '−';
  const at = `layers[${point.index}].dopants[${level.row}]`;
  const dopant = level.row < 0 ? null : point.layer.dopants[level.row];
  const many = point.charge.levels.filter((l) => l.donor === level.donor && l.row >= 0).length > 1;
  const tag = dopant === null ? ',comp' : many ? `,${dopant.id ?? level.row + 1}` : '';
  if (dopant === null) return { row: -1, donor: level.donor, known: known(`N_${kind}${tag}^${power}`, 'compensating charge, always ionised', level.density, 'cm⁻³', DESIGN, { path: `layers[${point.index}].dopants` }), step: null };
  const name = dopant.id ?? dopant.kind;
  const N = known(`N_${kind}${tag}`, `active ${name}`, level.density, 'cm⁻³', DESIGN, { path: at });
  const { depth, bound } = levelSteps(context, point, level.row, level, tag, N, lines);
  const share = chargedShare(level, ecMinusEf, gap, kT, depth, bound, gOf(context, point, level.row, tag));
  const value = shareValue(level, point, ecMinusEf.value);
  const ion = known(`N_${kind}${tag}^${power}`, `ionised ${name}`, value * level.density, 'cm⁻³', WORKED);
  return { row: level.row, donor: level.donor, known: ion, step: step(ion, formula`${N} * (${share})`) };
}

export function asksOf(context: Context, point: Point, row: number): Asks {
  const { id } = point.layer.dopants[row];
  if (id !== null) return dopantAsks(context.catalogue, point.layer.material.id, id);
  return (path, sign, words, value, unit, scale = 1) => known(sign, words, value ?? Number.NaN, unit, DESIGN, { scale, path: `layers[${point.index}].dopants[${row}].${path}` });
}

function gOf(context: Context, point: Point, row: number, tag: string): Known {
  return asksOf(context, point, row)('degeneracy', `g${tag === '' ? '' : `_${tag.slice(1)}`}`, 'degeneracy of the level', point.layer.dopants[row].degeneracy, '');
}

/** Depth and share of bound states in force, with the law that gives them. */
function levelSteps(context: Context, point: Point, row: number, level: Level, tag: string, N: Known, lines: Step[]): { depth: Known; bound: Known } {
  const d = point.layer.dopants[row];
  const ask = asksOf(context, point, row);
  const force = levelInForce(d, level.density);
  const E0 = ask('depth', `ΔE_0${tag}`, 'depth of the level', d.depth, 'eV');
  const one = known(`b${tag === '' ? '' : `_${tag.slice(1)}`}`, 'share of dopants that keep a bound state', force.bound, '', WORKED);
  const depth = known(`ΔE${tag === '' ? '' : `_${tag.slice(1)}`}`, 'depth of the level in force', force.depth, 'eV', WORKED);
  if (d.model === 'merging' && d.merging) {
    const m = d.merging;
    lines.push(
      step(depth, formula`${E0} / (1 + (${N} / ${ask('merging.depthReference', 'N_ref', 'reference of the depth', m.depthReference, 'cm⁻³')}) ^ ${ask('merging.depthExponent', 'c', 'exponent of the depth', m.depthExponent, '')})`, 'The level moves to the band as its states merge with it.'),
      step(one, formula`1 / (1 + (${N} / ${ask('merging.boundReference', 'N_b', 'reference of the bound share', m.boundReference, 'cm⁻³')}) ^ ${ask('merging.boundExponent', 'd', 'exponent of the bound share', m.boundExponent, '')})`),
    );
    return { depth, bound: one };
  }
  if (d.model === 'screened' && d.screened) {
    const s = d.screened;
    lines.push(
      step(depth, formula`max(0, ${E0} - ${ask('screened.coefficient', 'a', 'screening of the depth', s.coefficient, 'eV cm')} * ${N} ^ (1 / 3))`),
      step(one, formula`1 / (1 + (${N} / ${ask('screened.mottDensity', 'N_Mott', 'Mott density', s.mottDensity, 'cm⁻³')}) ^ ${ask('screened.boundExponent', 'd', 'exponent of the bound share', s.boundExponent, '')})`),
    );
    return { depth, bound: one };
  }
  lines.push(step(one, d.model === 'complete' ? formula`0` : formula`1`, d.model === 'complete' ? 'Complete ionisation, as the design asks: no bound state.' : 'Dilute: every dopant keeps its bound state.'));
  return { depth: E0, bound: one };
}

/** 1 − b + b/(1 + g exp(distance)). */
function chargedShare(level: Level, ecMinusEf: Known, gap: Known, kT: Known, depth: Known, bound: Known, g: Known): Expression {
  const over = level.donor ? formula`(${depth} - ${ecMinusEf}) / ${kT}` : formula`(${depth} - (${gap} - ${ecMinusEf})) / ${kT}`;
  if (level.bound === 0) return formula`1 - ${bound}`;
  return level.bound === 1 ? formula`1 / (1 + ${g} * exp(${over}))` : formula`1 - ${bound} + ${bound} / (1 + ${g} * exp(${over}))`;
}

/** The charged share of a level at any Fermi level. */
export function shareValue(level: Level, point: Point, ecMinusEf: number): number {
  const { bands } = point;
  const over = level.donor ? level.depth - ecMinusEf : level.depth - (bands.gap - ecMinusEf);
  return 1 - level.bound + level.bound / (1 + Math.exp(level.logG + over / bands.kT));
}

/** Charged share of one row with every line that it takes, in the neutral layer and where it is depleted. */
export function shareSteps(context: Context, point: Point, row: number, neutral: Neutral): { neutral: Worked; depleted: Worked } | null {
  const level = point.charge.levels.find((l) => l.row === row);
  const found = neutral.ionised.find((l) => l.row === row);
  if (!level || !found) return null;
  const own: Step[] = [];
  const kind = level.donor ? 'D' : 'A';
  const tag = found.known.sign.replace(/^N_[DA]/, '').replace(/\^.*$/, '');
  const N = known(`N_${kind}${tag}`, `active ${point.layer.dopants[row].id ?? point.layer.dopants[row].kind}`, level.density, 'cm⁻³', DESIGN, { path: `layers[${point.index}].dopants[${row}]` });
  const { depth, bound } = levelSteps(context, point, row, level, tag, N, own);
  const g = gOf(context, point, row, tag);
  const share = (words: string, mark: string, at: Known): Worked => {
    const value = shareValue(level, point, at.value);
    const k = known(`s_${mark}`, words, 100 * value, '%', WORKED);
    return { known: k, steps: [step(k, formula`100 * (${chargedShare(level, at, neutral.gap, neutral.kT, depth, bound, g)})`, '')] };
  };
  const far = known('E_c−E_F', level.donor ? 'Fermi level at the far band, where the donor is depleted' : 'Fermi level at the far band, where the acceptor is depleted', level.donor ? point.bands.gap : 0, 'eV', WORKED);
  const name = point.layer.dopants[row].id ?? point.layer.dopants[row].kind;
  const inNeutral = share(`ionised share of ${name} in the neutral layer`, `neutral${tag}`, neutral.level);
  return { neutral: { known: inNeutral.known, steps: [...own, ...inNeutral.steps] }, depleted: share(`ionised share of ${name} where the layer is depleted`, `depleted${tag}`, far) };
}
