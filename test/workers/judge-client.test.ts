import { describe, expect, it } from 'vitest';
import { JudgeClient, type JudgeSide } from '../../src/workers/judge-client.ts';
import type { JudgeReply, JudgeRequest } from '../../src/workers/messages.ts';
import { designFixture } from '../state/design-fixture.ts';

class Sham implements JudgeSide {
  sent: JudgeRequest[] = [];
  ended = false;
  onmessage: JudgeSide['onmessage'] = null;
  onerror: JudgeSide['onerror'] = null;
  postMessage(message: JudgeRequest) {
    this.sent.push(message);
  }
  terminate() {
    this.ended = true;
  }
  reply(reply: JudgeReply) {
    this.onmessage?.({ data: reply } as MessageEvent<JudgeReply>);
  }
}

function rig() {
  const workers: Sham[] = [];
  const client = new JudgeClient(() => (workers.push(new Sham()), workers.at(-1)!));
  return { workers, client };
}
const judgement = { kind: 'judged' as const, requirements: [], evaluations: 5 };

describe('the client of the judge', () => {
  it('tells of progress, gives the judgement, and ends the worker', async () => {
    const { workers, client } = rig();
    const seen: number[][] = [];
    const run = client.judge(designFixture(), (done, of) => seen.push([done, of]));
    workers[0].reply({ kind: 'progress', number: 1, done: 2, of: 9 });
    workers[0].reply({ kind: 'judged', number: 1, judgement });
    workers[0].reply({ kind: 'progress', number: 1, done: 9, of: 9 });
    expect(await run).toEqual({ kind: 'judged', judgement });
    expect(seen).toEqual([[2, 9]]);
    expect(workers[0].ended).toBe(true);
  });

  it('drops the running judgement for a newer question, or when cancelled', async () => {
    const { workers, client } = rig();
    const first = client.judge(designFixture(), () => {});
    const second = client.judge(designFixture(), () => {});
    expect(await first).toEqual({ kind: 'dropped' });
    expect(workers[0].ended).toBe(true);
    workers[0].reply({ kind: 'judged', number: 2, judgement });
    client.cancel();
    expect(await second).toEqual({ kind: 'dropped' });
    client.cancel();
  });

  it('tells of a fault, whether thrown inside or of the worker itself', async () => {
    const { workers, client } = rig();
    const thrown = client.judge(designFixture(), () => {});
    workers[0].reply({ kind: 'fault', number: 1, message: 'bad' });
    expect(await thrown).toEqual({ kind: 'fault', message: 'bad' });
    const broken = client.judge(designFixture(), () => {});
    workers[1].onerror?.({ message: '' } as ErrorEvent);
    expect(await broken).toEqual({ kind: 'fault', message: 'the worker could not be loaded' });
  });
});
