import type { Profiles, Stack } from '../../solver/index.ts';
import { align } from '../../solver/alignment.ts';
import { toStack } from '../design/stack.ts';
import type { Design } from '../design/types.ts';
import { readVariables } from '../design/variables.ts';
import { KINDS, type KindName } from '../quantity/kinds.ts';
import { inUnit, type Value } from '../quantity/units.ts';
import { cornerStack, solveCornerStack, type CornerPlace } from '../requirements/corner.ts';
import type { Tolerances, Uncertainty } from '../requirements/uncertainties.ts';
import { resultOf } from '../result/from-solution.ts';
import { contextAt, type BarrierShift, type Context, type Shifts } from './context.ts';
import { formula } from './formula.ts';
import { DESIGN, known, WORKED, type Known, type Origin } from './known.ts';
import { step, type Step } from './step.ts';

interface CornerWorkings {
  context: Context;
  /** a line a tolerance that is moved */ steps: Step[];
}

const NO_PROVENANCE = { program: '', model: '', presets: '', design: '' } as const;
/** Where a default tolerance stands, as src/requirements/uncertainties.ts has it. */
const DEFAULT: Origin = { from: 'usual tolerance' };

/**
 * A design solved at a corner of its tolerances, with lines that say how each value got there.
 *
 * @param judged  start from where a judgement of all requirements starts, so that the figures are its own to the last digit
 * @returns why there is no answer there, in words
 */
export function cornerContext(design: Design, place: CornerPlace, set: Readonly<Record<string, string>> = {}, tolerances: Tolerances = 'all', judged = false): CornerWorkings | string {
  const at = cornerStack(design, place, set, tolerances);
  if (typeof at === 'string') return at;
  const { stack, moves } = at;
  const shifts = { barriers: {} as Shifts['barriers'], offsets: new Map<number, { stack: Stack; amount: number }>() };
  for (const { of, count, before, after } of moves) {
    if (of.default?.of === 'barrier') shifts.barriers[of.default.at === 0 ? 'top' : 'bottom'] = barrierShift(design, of, count, before);
    if (of.default?.of === 'offset') shifts.offsets.set(of.default.at, { stack: before, amount: align(after).interfaces[of.default.at].deltaEc - align(before).interfaces[of.default.at].deltaEc });
  }
  const solution = solveCornerStack(stack, judged ? startOf(design, set, place) : undefined);
  if (typeof solution === 'string') return solution;
  return { context: contextAt(design, stack, resultOf(solution, design.title, NO_PROVENANCE), shifts), steps: moves.map(({ of, count }) => moveStep(design, set, of, count)) };
}

/** The first point that a judgement solves, from which all others start; none where the corner is that point itself, or it has no answer. */
function startOf(design: Design, set: Readonly<Record<string, string>>, place: CornerPlace): Profiles | undefined {
  const reading = toStack(design, set);
  if (!reading.ok) return undefined;
  const { requirements, stack, temperatureRange } = reading;
  const temperature = temperatureRange === null || requirements.some(({ over }) => over === 'temperature') ? stack.temperature : temperatureRange[0];
  if (place.tolerances.length === 0 && place.temperature_K === temperature) return undefined;
  const first = solveCornerStack({ ...stack, temperature });
  return typeof first === 'string' ? undefined : first.profiles;
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
  const at = plain(there.scope.value(name) as Value)[0];
  const result = known(`${sign}_c`, `${name} at this corner`, at, unit, WORKED);
  const note = unit === '' && (at < 0 || at > 1) ? 'An active or compensated share ends at 0 and at 1.' : '';
  if (tolerance.kind === 'share') return step(result, formula`${v} * (1 + ${c} * ${known('t', `tolerance of ${name}`, tolerance.share, '%', DESIGN, { scale: 0.01, path: `${path}.tolerance` })})`, note);
  return step(result, formula`${v} + ${c} * ${known('t', `tolerance of ${name}`, plain(tolerance.amount)[0], unit, DESIGN, { path: `${path}.tolerance` })}`, note);
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
