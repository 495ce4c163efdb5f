import { complaintLine } from '../../src/design/complaint.ts';
import type { FurtherSolver } from '../../src/sheet/further.ts';
import type { JobInput, JobKind, JobValue } from '../../src/workers/job-messages.ts';
import type { RunJob } from '../../src/workers/job-client.ts';

/** The page's workers, as the sheet's further sections ask them. Rejects where a worker failed or was stopped. */
export function sheetSolver(run: RunJob): FurtherSolver {
  const asked = async <K extends JobKind>(kind: K, input: JobInput<K>): Promise<JobValue<K>> => {
    const outcome = await run(kind, input).outcome;
    if (outcome.kind === 'done') return outcome.value;
    throw new Error(outcome.kind === 'fault' ? outcome.message : 'the work was stopped');
  };
  return {
    result: async (design) => {
      const answer = await asked('result', { design });
      return answer.kind === 'result' ? answer.result : answer.kind === 'refused' ? answer.reason : complaintLine(answer.complaints[0]);
    },
    corner: async (design, row) => {
      const answer = await asked('corner', { design, row });
      return answer.kind === 'corner' ? answer.corner : answer.reason;
    },
    contacts: async (design) => {
      const answer = await asked('closeUp', { design });
      return answer.kind === 'seen' ? answer.contacts : answer.kind === 'refused' ? answer.reason : complaintLine(answer.complaints[0]);
    },
  };
}
