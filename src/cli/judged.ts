import { InputError } from '../design/complaint.ts';
import type { Design } from '../design/types.ts';
import { didYouMean, quoted } from '../quantity/wording.ts';
import { judge } from '../requirements/judge.ts';
import type { Tolerances } from '../requirements/uncertainties.ts';
import type { RequirementResult } from '../result/types.ts';
import { UsageError } from './command.ts';

const TOLERANCES: readonly Tolerances[] = ['all', 'stated', 'none'];

/** @throws {UsageError} a word that is none of them */
export function tolerancesOf(text: string | undefined): Tolerances {
  if (text === undefined) return 'all';
  if ((TOLERANCES as readonly string[]).includes(text)) return text as Tolerances;
  throw new UsageError(`--tolerances is ${quoted(text)}; ${TOLERANCES.join(', ')} would do${didYouMean(text, TOLERANCES)}`);
}

/**
 * The requirements of a design, judged.
 *
 * @throws {InputError} the design is wrong
 */
export function judged(design: Design, set: Record<string, string>, tolerances: Tolerances = 'all'): RequirementResult[] {
  const judgement = judge(design, { set, tolerances });
  if (judgement.kind === 'complaints') throw new InputError(judgement.complaints);
  return judgement.requirements;
}
