import { toStack } from '../design/stack.ts';
import type { Design } from '../design/types.ts';
import type { Tolerances } from '../requirements/uncertainties.ts';
import type { Distribution } from './draw.ts';
import { variedInputs, withChosenTolerances, type InputChoices } from './inputs.ts';

/** A row of the list of what a run will move, before it is made. */
export interface InputRow {
  label: string;
  /** the variable whose tolerance it is; null of a default, which only the run can change */ variable: string | null;
  /** in force, as text; what is wrong stands here as it was typed */ tolerance: string;
  /** of this run, not of the design or the defaults */ changed: boolean;
  /** what it is without the run's own choice */ usual: string;
  /** chosen for this row; null: as the others */ distribution: Distribution | null;
  /** values at its ends; null where it does not move */ span: [string, string] | null;
  complaint: string | null;
}

/** @returns null while the design cannot be read */
export function inputRows(design: Design, run: { tolerances: Tolerances; distribution: Distribution; choices: InputChoices }): InputRow[] | null {
  const plain = toStack(design, {});
  if (!plain.ok) return null;
  const base = variedInputs(design, {}, plain.stack, { ...run, choices: {} }).inputs;
  const known = choicesFor(base.map(({ label }) => label), run.choices);
  const varied = withChosenTolerances(design, known);
  const reading = toStack(varied, {});
  const { inputs, complaints } = reading.ok ? variedInputs(varied, {}, reading.stack, { ...run, choices: known }) : { inputs: [], complaints: [] };
  return base.map(({ label, variable, tolerance: usual }): InputRow => {
    const choice = Object.hasOwn(known, label) ? known[label] : {};
    const own = inputs.find((input) => input.label === label);
    return {
      label, variable, usual, tolerance: choice.tolerance ?? usual, changed: choice.tolerance !== undefined, distribution: choice.distribution ?? null, span: own?.span ?? null,
      complaint: complaints.find(({ path }) => path === `inputs.${label}`)?.message ?? null,
    };
  });
}

/** Choices of inputs that are there: a layer may have been renamed since. */
export function choicesFor(labels: readonly string[], choices: InputChoices): InputChoices {
  return Object.fromEntries(Object.entries(choices).filter(([label]) => labels.includes(label)));
}
