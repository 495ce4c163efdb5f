import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { Result } from '../../src/result/types.ts';
import { PATIENCE_MS, SolverClient, type WorkerSide } from '../../src/workers/client.ts';
import type { Reply, Request } from '../../src/workers/messages.ts';
import { replyTo } from '../../src/workers/reply.ts';
import { designFixture } from '../state/design-fixture.ts';

/** A worker that replies when the test says so. */
class Sham implements WorkerSide {
  sent: Request[] = [];
  ended = false;
  onmessage: WorkerSide['onmessage'] = null;
  onerror: WorkerSide['onerror'] = null;
  postMessage(message: Request) {
    this.sent.push(message);
  }
  terminate() {
    this.ended = true;
  }
  reply(reply: Reply) {
    this.onmessage?.({ data: reply } as MessageEvent<Reply>);
  }
  answer(number: number, title: string) {
    this.reply({ kind: 'answer', number, answer: { kind: 'result', result: { title } as Result }, took_ms: 1 });
  }
}

let workers: Sham[];
let client: SolverClient;
const design = (title: string) => ({ ...designFixture(), title });
const titleOf = (outcome: Awaited<ReturnType<SolverClient['solve']>>) => (outcome.kind === 'answered' && outcome.answer.kind === 'result' ? outcome.answer.result.title : outcome.kind);

beforeEach(() => {
  vi.useFakeTimers();
  workers = [];
  client = new SolverClient(() => {
    const sham = new Sham();
    workers.push(sham);
    return sham;
  }, () => Date.now());
});
afterEach(() => void vi.useRealTimers());

describe('the client of the solver', () => {
  it('has one solve running and only the latest waiting', async () => {
    const [a, b, c] = ['a', 'b', 'c'].map((title) => client.solve(design(title)));
    expect(workers[0].sent).toHaveLength(1);
    workers[0].answer(1, 'a');
    expect(titleOf(await a)).toBe('a');
    expect(titleOf(await b)).toBe('dropped');
    expect(workers[0].sent.map((request) => request.kind === 'solve' && request.design.title)).toEqual(['a', 'c']);
    workers[0].answer(2, 'c');
    expect(titleOf(await c)).toBe('c');
    expect(workers).toHaveLength(1);
  });

  it('drops a reply whose number nobody waits for', async () => {
    const a = client.solve(design('a'));
    workers[0].answer(7, 'stray');
    workers[0].answer(1, 'a');
    expect(titleOf(await a)).toBe('a');
    workers[0].answer(1, 'again');
  });

  it('settles everything as dropped when cancelled, and asks another worker next', async () => {
    const a = client.solve(design('a'));
    const b = client.solve(design('b'));
    client.cancel();
    expect([titleOf(await a), titleOf(await b)]).toEqual(['dropped', 'dropped']);
    expect(workers[0].ended).toBe(true);
    const c = client.solve(design('c'));
    expect(workers).toHaveLength(2);
    workers[0].answer(2, 'from the dead worker');
    workers[1].answer(2, 'c');
    expect(titleOf(await c)).toBe('c');
  });

  it('stops a long solve for a newer question only after its patience', async () => {
    const a = client.solve(design('a'));
    const b = client.solve(design('b'));
    vi.advanceTimersByTime(PATIENCE_MS - 1);
    expect(workers).toHaveLength(1);
    vi.advanceTimersByTime(1);
    expect(titleOf(await a)).toBe('dropped');
    expect(workers).toHaveLength(2);
    workers[1].answer(2, 'b');
    expect(titleOf(await b)).toBe('b');
  });

  it('leaves a long solve running when nothing newer is asked', async () => {
    const a = client.solve(design('a'));
    vi.advanceTimersByTime(100 * PATIENCE_MS);
    expect(workers).toHaveLength(1);
    const b = client.solve(design('b'));
    expect(titleOf(await a)).toBe('dropped');
    workers[1].answer(2, 'b');
    expect(titleOf(await b)).toBe('b');
  });

  it('tells of a fault of the worker, and goes on with a new one', async () => {
    const a = client.solve(design('a'));
    workers[0].onerror?.({ message: 'killed' } as ErrorEvent);
    expect(await a).toEqual({ kind: 'fault', message: 'killed' });
    const b = client.solve(design('b'));
    workers[1].reply({ kind: 'fault', number: 2, message: 'thrown inside' });
    expect(await b).toEqual({ kind: 'fault', message: 'thrown inside' });
  });
});

describe('the reply of the worker', () => {
  const engine = () => ({ kind: 'refused', reason: 'why' }) as const;
  it('bears the number of the request and the time it took', () => {
    let clock = 0;
    const reply = replyTo({ kind: 'solve', number: 5, design: designFixture() }, engine, () => (clock += 3));
    expect(reply).toEqual({ kind: 'answer', number: 5, answer: { kind: 'refused', reason: 'why' }, took_ms: 3 });
  });

  it('is a fault when something throws inside', () => {
    const broken = () => {
      throw new RangeError('bad');
    };
    expect(replyTo({ kind: 'solve', number: 5, design: designFixture() }, broken, () => 0)).toEqual({ kind: 'fault', number: 5, message: 'bad' });
  });
});
