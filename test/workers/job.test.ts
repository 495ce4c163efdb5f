import { describe, expect, it } from 'vitest';
import { JobClient, type JobSide } from '../../src/workers/job-client.ts';
import { JOB_KINDS } from '../../src/workers/job-kinds.ts';
import type { JobReply, JobRequest } from '../../src/workers/job-messages.ts';
import { EVERY_MS, runJob } from '../../src/workers/job-replies.ts';
import { designFixture } from '../state/design-fixture.ts';

class Sham implements JobSide {
  sent: JobRequest[] = [];
  ended = false;
  onmessage: JobSide['onmessage'] = null;
  onerror: JobSide['onerror'] = null;
  postMessage(message: JobRequest) {
    this.sent.push(message);
  }
  terminate() {
    this.ended = true;
  }
  reply(reply: JobReply) {
    this.onmessage?.({ data: reply } as MessageEvent<JobReply>);
  }
}

function rig() {
  const workers: Sham[] = [];
  const client = new JobClient(() => (workers.push(new Sham()), workers.at(-1)!));
  return { workers, client };
}
const judgement = { kind: 'judged' as const, requirements: [], evaluations: 5 };
const input = () => ({ design: designFixture() });

describe('the client of the jobs', () => {
  it('tells of progress, gives the value, and keeps the worker for the next job', async () => {
    const { workers, client } = rig();
    const told: number[][] = [];
    const run = client.run('judge', input(), ({ done, of }) => told.push([done, of]));
    workers[0].reply({ kind: 'progress', number: 1, done: 2, of: 9, seen: [] });
    workers[0].reply({ kind: 'done', number: 1, value: judgement });
    workers[0].reply({ kind: 'progress', number: 1, done: 9, of: 9, seen: [] });
    expect(await run.outcome).toEqual({ kind: 'done', value: judgement });
    expect(told).toEqual([[2, 9]]);
    expect(workers[0].ended).toBe(false);
    client.run('size', { design: designFixture(), options: { variable: 'Ncap' } });
    expect(workers).toHaveLength(1);
    expect(workers[0].sent.map(({ kind, number }) => [kind, number])).toEqual([['judge', 1], ['size', 2]]);
  });

  it('ends the worker of a job that is cancelled, and that job alone', async () => {
    const { workers, client } = rig();
    const first = client.run('judge', input());
    const second = client.run('judge', input());
    first.cancel();
    expect(await first.outcome).toEqual({ kind: 'dropped' });
    expect(workers.map(({ ended }) => ended)).toEqual([true, false]);
    workers[1].reply({ kind: 'done', number: 2, value: judgement });
    expect((await second.outcome).kind).toBe('done');
    second.cancel();
    expect(workers[1].ended).toBe(false);
  });

  it('drops what comes late from another job', async () => {
    const { workers, client } = rig();
    const run = client.run('judge', input());
    workers[0].reply({ kind: 'done', number: 7, value: { ...judgement, evaluations: 1 } });
    workers[0].reply({ kind: 'done', number: 1, value: judgement });
    expect(await run.outcome).toEqual({ kind: 'done', value: judgement });
  });

  it('tells of a fault, whether thrown inside or of the worker itself, and trusts that worker no more', async () => {
    const { workers, client } = rig();
    const thrown = client.run('judge', input());
    workers[0].reply({ kind: 'fault', number: 1, message: 'bad' });
    expect(await thrown.outcome).toEqual({ kind: 'fault', message: 'bad' });
    const broken = client.run('judge', input());
    workers[1].onerror?.({ message: '' } as ErrorEvent);
    expect(await broken.outcome).toEqual({ kind: 'fault', message: 'the worker could not be loaded' });
    expect(workers.map(({ ended }) => ended)).toEqual([true, true]);
  });

  it('ends every worker when it is closed', async () => {
    const { workers, client } = rig();
    const done = client.run('judge', input());
    workers[0].reply({ kind: 'done', number: 1, value: judgement });
    await done.outcome;
    const [first, second] = [client.run('judge', input()), client.run('judge', input())];
    client.close();
    expect([await first.outcome, await second.outcome]).toEqual([{ kind: 'dropped' }, { kind: 'dropped' }]);
    expect(workers.every(({ ended }) => ended)).toBe(true);
  });
});

describe('the worker of the jobs', () => {
  /** Three steps, the clock going on by what is said before each look at it. */
  function replies(between_ms: number, kinds: Partial<typeof JOB_KINDS> = {}): JobReply[] {
    const out: JobReply[] = [];
    let time = 0;
    const three: typeof JOB_KINDS.size = function* () {
      for (let i = 1; i <= 3; i++) yield { done: i, of: 3, seen: { value: i, scores: [0] } };
      return { kind: 'complaints', complaints: [] };
    };
    runJob({ kind: 'size', number: 4, input: { design: designFixture(), options: { variable: 'Ncap' } } }, (reply) => out.push(reply), () => (time += between_ms), { ...JOB_KINDS, size: three, ...kinds });
    return out;
  }

  it('tells of every step where they are slow, of none where they are fast, and ends with the value', () => {
    expect(replies(2 * EVERY_MS).map(({ kind }) => kind)).toEqual(['progress', 'progress', 'progress', 'done']);
    expect(replies(0)).toEqual([{ kind: 'done', number: 4, value: { kind: 'complaints', complaints: [] } }]);
  });

  it('keeps what was seen between two words and tells it with the next', () => {
    const seen = replies(0.6 * EVERY_MS).flatMap((reply) => (reply.kind === 'progress' ? [reply.seen.map((look) => ('value' in look ? look.value : 'range'))] : []));
    expect(seen).toEqual([[1, 2]]);
  });

  it('tells what threw inside', () => {
    const broken: typeof JOB_KINDS.size = () => {
      throw new Error('bad');
    };
    expect(replies(0, { size: broken })).toEqual([{ kind: 'fault', number: 4, message: 'bad' }]);
  });

  it('judges the design that it is given', () => {
    const out: JobReply[] = [];
    runJob({ kind: 'judge', number: 1, input: { design: { ...designFixture(), requirements: [] } } }, (reply) => out.push(reply), () => 0);
    expect(out).toEqual([{ kind: 'done', number: 1, value: { kind: 'judged', requirements: [], evaluations: 0 } }]);
  });
});
