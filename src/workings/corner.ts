import { isRefusal, solveStack, type Profiles, type Stack } from '../../solver/index.ts';
import { align } from '../../solver/alignment.ts';
import { complaintLine } from '../design/complaint.ts';
import { toStack } from '../design/stack.ts';
import type { Design } from '../design/types.ts';
import { readVariables } from '../design/variables.ts';
import { KINDS, type KindName } from '../quantity/kinds.ts';
import { inUnit, type Value } from '../quantity/units.ts';
import { uncertaintiesOf, type Tolerances, type Uncertainty } from '../requirements/uncertainties.ts';
import { resultOf } from '../result/from-solution.ts';
import { contextAt, type BarrierShift, type Context, type Shifts } from './context.ts';
import { formula } from './formula.ts';
import { DESIGN, known, WORKED, type Known, type Origin } from './known.ts';
import { step, type Step } from './step.ts';

/** A temperature and tolerances by name, each as a signed count of its whole: what a judgement tells of a corner. */
export interface CornerPlace {
  temperature_K: number;
  tolerances: readonly { name: string; count: number }[];
}

export interface SolvedCorner {
  context: Context;
  /** a line a tolerance that is moved */ steps: Step[];
}

/** Accepted estimate of the mesh error in psi, V: that of the search for worst cases. */
const ACCURACY = 1e-5;
const NO_PROVENANCE = { program: '', model: '', presets: '', design: '' } as const;
/** Where a default tolerance stands, as src/requirements/uncertainties.ts has it. */
const DEFAULT: Origin = { from: 'usual tolerance' };

/**
 * A design solved at a corner of its tolerances, with lines that say how each value got there.
 *
 * @param judged  start from where a judgement of all requirements starts, so that the figures are its own to the last digit
 * @returns why there is no answer there, in words
 */
export function solvedCorner(design: Design, place: CornerPlace, set: Readonly<Record<string, string>> = {}, tolerances: Tolerances = 'all', judged = false): SolvedCorner | string {
  const all = uncertaintiesOf(design, set, tolerances);
  const moved = place.tolerances.map(({ name, count }) => ({ count, of: pick(all, name, place, count) }));
  if (moved.some(({ of }) => of === undefined)) return 'it was judged over other tolerances';
  const moves = moved as { of: Uncertainty; count: number }[];
  const byVariable = Object.fromEntries(moves.flatMap(({ of, count }) => (of.variable === null ? [] : [[of.variable, count]])));
  const reading = toStack(design, set, byVariable);
  if (!reading.ok) return complaintLine(reading.complaints[0]);
  const shifts = { barriers: {} as Shifts['barriers'], offsets: new Map<number, { stack: Stack; amount: number }>() };
  let stack: Stack = { ...reading.stack, temperature: place.temperature_K };
  for (const { of, count } of moves) {
    const next = of.apply(stack, count);
    if (of.default?.of === 'barrier') shifts.barriers[of.default.at === 0 ? 'top' : 'bottom'] = barrierShift(design, of, count, stack);
    if (of.default?.of === 'offset') shifts.offsets.set(of.default.at, { stack, amount: align(next).interfaces[of.default.at].deltaEc - align(stack).interfaces[of.default.at].deltaEc });
    stack = next;
  }
  try {
    const warmStart = judged ? startOf(design, set, place) : undefined;
    let solution = solveStack(stack, { accuracy: ACCURACY, ...(warmStart ? { warmStart } : {}) });
    if (isRefusal(solution) && warmStart) solution = solveStack(stack, { accuracy: ACCURACY });
    if (isRefusal(solution)) return solution.reason;
    return { context: contextAt(design, stack, resultOf(solution, design.title, NO_PROVENANCE), shifts), steps: moves.map(({ of, count }) => moveStep(design, set, of, count)) };
  } catch (error) {
    if (!(error instanceof RangeError)) throw error;
    return error.message;
  }
}

/** The first point that a judgement solves, from which all others start; none where the corner is that point itself, or it has no answer. */
function startOf(design: Design, set: Readonly<Record<string, string>>, place: CornerPlace): Profiles | undefined {
  const reading = toStack(design, set);
  if (!reading.ok) return undefined;
  const { requirements, stack, temperatureRange } = reading;
  const temperature = temperatureRange === null || requirements.some(({ over }) => over === 'temperature') ? stack.temperature : temperatureRange[0];
  if (place.tolerances.length === 0 && place.temperature_K === temperature) return undefined;
  const first = solveStack({ ...stack, temperature }, { accuracy: ACCURACY });
  return isRefusal(first) ? undefined : first.profiles;
}

/** Two tolerances may bear one name, a variable's and a default's: then the one of this place in the list. */
function pick(all: readonly Uncertainty[], name: string, { tolerances }: CornerPlace, count: number): Uncertainty | undefined {
  const same = all.filter(({ label }) => label === name);
  const before = tolerances.filter((t) => t.name === name);
  return same[Math.max(0, before.findIndex((t) => t.count === count))] ?? same[0];
}

function barrierShift(design: Design, { default: of }: Uncertainty, count: number, stack: Stack): BarrierShift {
  const side = of!.at === 0 ? 'top' : 'bottom';
  const nominal = stack[side];
  const contact = design[side];
  const own = contact.kind === 'barrier' ? (contact.carrier ?? 'n') : 'n';
  return { nominal, carrier: nominal.kind === 'barrier' && nominal.source.from !== 'workFunction' ? nominal.source.carrier : own, amount: count * of!.size };
}

/** How far a tolerance is moved: of a variable its value there, of a default the factor or the difference that it puts on. */
function moveStep(design: Design, set: Readonly<Record<string, string>>, of: Uncertainty, count: number): Step {
  const c = known('c', `share of the tolerance that is moved: ${of.words(count)}`, count, '', WORKED);
  if (of.default !== null) {
    const isShare = of.default.of === 'doping' || of.default.of === 'thickness';
    const t = known('t', `usual tolerance of ${of.label}`, of.default.size, isShare ? '%' : 'meV', DEFAULT, { scale: isShare ? 0.01 : 1e-3, path: of.label });
    return isShare ? step(known('f', `factor on ${of.label}`, 1 + count * of.default.size, '', WORKED), formula`1 + ${c} * ${t}`) : step(known('Δ', `what ${of.label} is raised by`, count * of.default.size, 'eV', WORKED), formula`${c} * ${t}`, of.default.of === 'offset' ? 'Between two compositions of one alloy no more than their gaps differ.' : '');
  }
  const { temperature: _, ...overrides } = set;
  const name = of.variable as string;
  const nominal = readVariables(design.variables ?? [], overrides);
  const there = readVariables(design.variables ?? [], overrides, { [name]: count });
  const tolerance = nominal.tolerances.get(name)!;
  const [value, unit] = plain(nominal.scope.value(name) as Value);
  const path = `variables ${name}`;
  const sign = name.replace(/_/g, '');
  const v = known(sign, `${name} as the design has it`, value, unit, DESIGN, { path });
  const result = known(`${sign}_c`, `${name} at this corner`, plain(there.scope.value(name) as Value)[0], unit, WORKED);
  if (tolerance.kind === 'share') return step(result, formula`${v} * (1 + ${c} * ${known('t', `tolerance of ${name}`, tolerance.share, '%', DESIGN, { scale: 0.01, path: `${path}.tolerance` })})`);
  return step(result, formula`${v} + ${c} * ${known('t', `tolerance of ${name}`, plain(tolerance.amount)[0], unit, DESIGN, { path: `${path}.tolerance` })}`);
}

/** A value in the solver's unit of its kind. */
function plain(value: Value): [number, string] {
  for (const kind of Object.keys(KINDS) as KindName[]) {
    const at = inUnit(value, KINDS[kind].unit);
    if (at !== null) return [at, KINDS[kind].unit];
  }
  return [typeof value === 'number' ? value : Number.NaN, ''];
}

/** A value that is shown and its printed figure, in words: "its printed 1.2e-7 and this one are 0.01 % apart". */
export function againWords(before: number, now: Pick<Known, 'value' | 'scale'>): string {
  const apart = Math.abs(now.value / now.scale / before - 1);
  return apart < 1e-6 || !Number.isFinite(apart) ? 'Solved once more at this corner, with the same figure.' : `Solved once more at this corner: ${Number((100 * apart).toPrecision(2))} % from the figure shown, which started from another stack; scores closer than 0.2 % are the mesh’s.`;
}
