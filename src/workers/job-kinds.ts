import { closeUpSteps } from '../contacts/close-up.ts';
import { rankMetals } from '../contacts/rank-metals.ts';
import { solveCorner } from '../requirements/corner.ts';
import { judging } from '../requirements/judge.ts';
import { sizeSteps } from '../requirements/size.ts';
import { solveDesign } from '../result/solve-design.ts';
import type { JobInput, JobKind, JobSeen, JobValue } from './job-messages.ts';

/** A job in small steps: each says how far it is, and may tell something that it has seen. */
export type JobSteps<K extends JobKind> = Generator<{ done: number; of: number; seen?: JobSeen<K> }, JobValue<K>>;

/** How each kind of job is begun. */
export const JOB_KINDS: { readonly [K in JobKind]: (input: JobInput<K>) => JobSteps<K> } = {
  judge: ({ design, options }) => judging(design, options),
  size: ({ design, options }) => sizeSteps(design, options),
  metals: ({ design, options }) => rankMetals(design, options),
  closeUp: ({ design, options }) => closeUpSteps(design, options),
  result: ({ design }) => inOne(() => {
    const answer = solveDesign(design);
    return answer.kind === 'result' ? { kind: 'result', result: answer.result } : answer;
  }),
  corner: ({ design, row }) => inOne(() => solveCorner(design, row)),
};

/** A job of one solve: it has no steps to tell of. */
function* inOne<V>(work: () => V): Generator<never, V> {
  return work();
}
