import { assumptionsInForce } from './assumptions.ts';
import type { Context } from './context.ts';
import { shown, type Step } from './step.ts';
import type { Found, Workings } from './workings.ts';

/** The workings of a figure from what its part found, with the assumptions and the accuracy of the stack that it was read from. @param context  null where no stack was solved for it */
export function assembled(found: Found, context: Context | null, of: Pick<Workings, 'asked' | 'title' | 'words' | 'value' | 'unit'>): Workings {
  return {
    ...of,
    steps: distinct(found.steps),
    remarks: found.remarks ?? [],
    assumptions: context === null ? [] : assumptionsInForce(context, found.rests),
    simpler: found.simpler ? { ...found.simpler, steps: distinct(found.simpler.steps) } : null,
    accuracy: [context === null ? '' : accuracyWords(found, context), found.accuracy ?? ''].filter((text) => text !== '').join(' '),
    rivals: found.rivals ?? [],
  };
}

function accuracyWords({ solved, steps }: Found, { result: { quality: q } }: Context): string {
  if (solved) return `The solved potential is good to ${(1000 * q.mesh_error_V).toPrecision(2)} mV by the estimate of the mesh (${q.mesh_nodes} nodes); charge is balanced to ${q.gauss_error.toExponential(0).replace('e-', 'e−')}.`;
  if (steps.some(({ kind }) => kind === 'equation')) return 'Worked out from local charge neutrality, which is closed to rounding: no mesh error enters.';
  return steps.length > 0 ? 'Worked out from local values: no mesh error enters.' : '';
}

/** Two parts of a figure may need the same line: the first stands. The last line is the figure and stays last. */
function distinct(steps: readonly Step[]): Step[] {
  const keyOf = (s: Step): string => {
    const { text, symbols, result } = shown(s);
    return JSON.stringify([text, result?.value, symbols.map(({ known, value }) => [known.path, value])]);
  };
  const last = steps.at(-1);
  const seen = new Set<string>(last === undefined ? [] : [keyOf(last)]);
  return steps.filter((s) => {
    if (s === last) return true;
    const key = keyOf(s);
    return !seen.has(key) && seen.add(key);
  });
}
