import { profileAt, type Stack } from '../../solver/index.ts';
import type { Complaint } from '../design/complaint.ts';
import type { Design } from '../design/types.ts';
import { readVariables } from '../design/variables.ts';
import { KINDS, type KindName } from '../quantity/kinds.ts';
import { readQuantity } from '../quantity/read-quantity.ts';
import { inUnit } from '../quantity/units.ts';
import { didYouMean, quoted } from '../quantity/wording.ts';
import { writeNumber, writeQuantity } from '../quantity/write-quantity.ts';
import { energyText, shareText } from '../requirements/amount-text.ts';
import { isShareOfAtoms } from '../requirements/governed.ts';
import { uncertaintiesOf, type Tolerances, type Uncertainty } from '../requirements/uncertainties.ts';
import { moved, readTolerance } from '../design/tolerance.ts';
import { kindOf } from '../sweep/places.ts';
import type { Distribution } from './draw.ts';

/** What one run is told of one input, by its label. */
export interface InputChoice {
  /** "3 %", "2 nm", "30 meV"; "0 %" leaves it where it is */ tolerance?: string;
  /** by default that of the run */ distribution?: Distribution;
}

export type InputChoices = Readonly<Record<string, InputChoice>>;

/** Something that a tolerance run moves. */
export interface VariedInput extends Uncertainty {
  distribution: Distribution;
  /** its ends as values, "285 nm" and "315 nm", no further than it is drawn; as changes where the value is none by itself */ span: [low: string, high: string];
}

/** The design with the tolerances of this run in its variables. */
export function withChosenTolerances(design: Design, choices: InputChoices): Design {
  if (!design.variables?.some(({ name }) => choiceOf(choices, name)?.tolerance !== undefined)) return design;
  return { ...design, variables: design.variables.map((v) => { const { tolerance } = choiceOf(choices, v.name) ?? {}; return tolerance === undefined ? v : { ...v, tolerance }; }) };
}

/**
 * What is moved, with the choices of this run in force.
 *
 * @param design  withChosenTolerances, read without complaint as `stack`
 * @returns the inputs, and what is wrong with the choices; the path of a complaint is "inputs.LABEL"
 */
export function variedInputs(design: Design, set: Readonly<Record<string, string>>, stack: Stack, run: { tolerances: Tolerances; distribution: Distribution; choices: InputChoices }): { inputs: VariedInput[]; complaints: Complaint[] } {
  const { tolerances, distribution, choices } = run;
  const complaints: Complaint[] = [];
  const inputs: VariedInput[] = [];
  for (const uncertainty of uncertaintiesOf(design, set, tolerances)) {
    const { label } = uncertainty;
    const choice = choiceOf(choices, label) ?? {};
    let own: Uncertainty | null = uncertainty;
    if (uncertainty.default !== null && choice.tolerance !== undefined) {
      const size = sizeOf(choice.tolerance, uncertainty.default, stack);
      if (typeof size === 'string') complaints.push({ path: `inputs.${label}`, message: `${quoted(choice.tolerance)} ${size}` });
      own = typeof size === 'string' || size === 0 ? null : resized(uncertainty, uncertainty.default, size, choice.tolerance.trim());
    }
    if (own) inputs.push({ ...own, distribution: choice.distribution ?? distribution, span: spanOf(own, design, set, stack) });
  }
  complaints.push(...unknownLabels(design, set, choices));
  return { inputs, complaints };
}

function choiceOf(choices: InputChoices, label: string): InputChoice | undefined {
  return Object.hasOwn(choices, label) ? choices[label] : undefined;
}

function unknownLabels(design: Design, set: Readonly<Record<string, string>>, choices: InputChoices): Complaint[] {
  const labels = uncertaintiesOf(design, set, 'all').map(({ label }) => label);
  const variables = (design.variables ?? []).map(({ name }) => name);
  return Object.keys(choices).flatMap((label): Complaint[] => {
    if (labels.includes(label)) return [];
    // A tolerance of zero takes a variable out of the list by itself.
    if (variables.includes(label)) return choices[label].tolerance === undefined ? [{ path: `inputs.${label}`, message: 'moves nothing: no quantity of the design uses this variable, or it has no tolerance; give it one' }] : [];
    return [{ path: `inputs.${label}`, message: `is nothing that this design leaves uncertain${didYouMean(label, [...labels, ...variables]) || `; ${labels.slice(0, 4).map((l) => quoted(l)).join(', ')} would do`}` }];
  });
}

type Default = NonNullable<Uncertainty['default']>;

/** The size of a tolerance in the measure of its default, a share or eV; or why it is none, as the end of a sentence that begins with the text. */
function sizeOf(text: string, { of, at }: Default, stack: Stack): number | string {
  const percent = /^\s*(?:±|\+\/-|\+-)?\s*(\d+\.?\d*|\.\d+)\s*%\s*$/.exec(text);
  if (of === 'barrier' || of === 'offset') {
    if (percent) return `is a share; a ${of} may pass through zero, so its tolerance is an energy such as "30 meV"`;
    return amount(text, 'energy', 'is negative; a tolerance counts to both sides');
  }
  const share = percent ? Number(percent[1]) / 100 : of === 'thickness' ? over(amount(text, 'length', 'is negative; a tolerance counts to both sides'), stack.layers[at].thickness) : 'is no share; a doping that no variable holds has a tolerance such as "20 %"';
  if (typeof share === 'string') return share;
  return share < 1 ? share : 'is the whole value or more, and nothing would be left at its lower end; a tolerance stays below 100 %';
}

function amount(text: string, kind: KindName, negative: string): number | string {
  const reading = readQuantity(text, kind);
  if (!reading.ok) return `is no tolerance here; write ${kind === 'length' ? 'a share such as "5 %", or a length such as "2 nm"' : 'an energy such as "30 meV"'}`;
  return reading.value < 0 ? negative : reading.value;
}

const over = (value: number | string, whole: number): number | string => (typeof value === 'string' ? value : value / whole);

/** The same quantity moved by another tolerance than its default. */
function resized(u: Uncertainty, { of, at, size: usual }: Default, size: number, tolerance: string): Uncertainty {
  const words = of === 'barrier' || of === 'offset' ? energyText : shareText;
  return { ...u, tolerance, origin: 'stated', default: { of, at, size }, apply: (stack, count) => u.apply(stack, (count * size) / usual), words: (count) => words(count * size) };
}

/** The value at both ends of the tolerance, where it is one number. */
function spanOf(u: Uncertainty, design: Design, set: Readonly<Record<string, string>>, stack: Stack): [string, string] {
  const changes: [string, string] = [u.words(-1), u.words(1)];
  if (u.variable !== null) {
    const { temperature: _, ...overrides } = set;
    const { scope } = readVariables(design.variables ?? [], overrides);
    const value = scope.value(u.variable);
    if (value === undefined) return changes;
    const tolerance = readTolerance(u.tolerance, value, scope);
    const kind = kindOf(value);
    const drawn = isShareOfAtoms(design, set, u.variable) ? (number: number): number => Math.min(Math.max(number, 0), 1) : (number: number): number => number;
    const text = (count: number): string | null => {
      const at = moved(value, tolerance, count);
      const number = kind === null ? null : inUnit(at, KINDS[kind].unit);
      return kind === null || number === null ? null : writeQuantity(drawn(number), kind);
    };
    const ends = [text(-1), text(1)];
    return ends[0] === null || ends[1] === null ? changes : [ends[0], ends[1]];
  }
  const layer = u.default === null ? undefined : stack.layers[u.default.at];
  if (u.default?.of === 'thickness' && layer) return [writeQuantity(layer.thickness * (1 - u.default.size), 'length'), writeQuantity(layer.thickness * (1 + u.default.size), 'length')];
  if (u.default?.of === 'doping' && layer) {
    const moving = (count: number): number => {
      const there = u.apply(stack, count).layers[u.default!.at];
      const row = there.dopants.find((d, i) => d !== layer.dopants[i]);
      return row?.concentration.kind === 'constant' ? profileAt(row.concentration, 0, there.thickness) : Number.NaN;
    };
    const [low, high] = [moving(-1), moving(1)];
    if (Number.isFinite(low + high)) return [`${writeNumber(low)} cm^-3`, `${writeNumber(high)} cm^-3`];
  }
  return changes;
}
