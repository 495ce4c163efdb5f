import { build } from 'esbuild';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { Worker } from 'node:worker_threads';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Job } from '../../src/batch/job.ts';
import type { JobSpec } from '../../src/batch/spec.ts';
import { planVariations } from '../../src/tolerance/plan.ts';
import { variationResult } from '../../src/tolerance/result.ts';
import { variationJob } from '../../src/tolerance/variations.ts';
import type { PoolReply, PoolRequest } from '../../src/workers/pool-messages.ts';
import { poolReplies } from '../../src/workers/pool-replies.ts';
import { WorkerPool, type PoolSide } from '../../src/workers/pool.ts';
import { toleranced } from '../tolerance/designs.ts';

const spec: JobSpec = { kind: 'map', design: toleranced, request: { layer: 0 } };
/** Chunk c takes a turn of the event loop and gives 10 c. */
const job: Job<number> = { chunks: 6, size: (c) => c + 1, run: (c) => 10 * c };

/** A worker inside this thread, which replies one turn later; `stuck` chunks never come back, as a long solve. */
class InsideWorker implements PoolSide {
  static living = 0;
  static started = 0;
  onmessage: PoolSide['onmessage'] = null;
  onerror: PoolSide['onerror'] = null;
  readonly heard: PoolRequest[] = [];
  readonly #reply: (request: PoolRequest) => PoolReply | null;
  #ended = false;
  constructor(of: Job<unknown> = job, readonly stuck: number[] = []) {
    InsideWorker.living++;
    InsideWorker.started++;
    this.#reply = poolReplies(() => of);
  }
  postMessage(request: PoolRequest): void {
    if (this.#ended) throw new Error('spoken to after its end');
    this.heard.push(request);
    if (request.kind === 'run' && this.stuck.includes(request.chunk)) return;
    const data = this.#reply(request);
    if (data) setTimeout(() => this.onmessage?.({ data }));
  }
  terminate(): void {
    if (!this.#ended) InsideWorker.living--;
    this.#ended = true;
  }
}

describe('a pool of workers', () => {
  it('gives every chunk, whatever the number of workers', async () => {
    for (const size of [1, 2, 4]) {
      const pool = new WorkerPool(() => new InsideWorker(), size);
      const seen: number[] = [];
      const { values, stopped } = await pool.run<number>(spec, job, { onProgress: ({ done, total }) => seen.push(done / total) });
      expect(stopped).toBe(false);
      expect([...values].sort(([a], [b]) => a - b)).toEqual([0, 1, 2, 3, 4, 5].map((c) => [c, 10 * c]));
      expect(seen).toEqual([...seen].sort((a, b) => a - b));
      expect(seen[5]).toBe(1);
      expect(pool.members).toBe(size);
      pool.close();
      expect(InsideWorker.living).toBe(0);
    }
  });

  it('opens a job once in each worker and closes it at the end', async () => {
    const sides: InsideWorker[] = [];
    const pool = new WorkerPool(() => (sides.push(new InsideWorker()), sides[sides.length - 1]), 2);
    await pool.run(spec, job);
    await pool.run(spec, job);
    for (const { heard } of sides) expect(heard.filter((m) => m.kind !== 'run').map((m) => [m.kind, m.job])).toEqual([['open', 1], ['close', 1], ['open', 2], ['close', 2]]);
    pool.close();
  });

  it('leaves nothing running when it is cancelled, and gives what it had', async () => {
    const pool = new WorkerPool(() => new InsideWorker(job, [2, 3]), 2);
    const stop = new AbortController();
    const outcome = pool.run<number>(spec, job, { signal: stop.signal });
    await new Promise((resolve) => setTimeout(resolve, 20));
    stop.abort();
    const { values, stopped } = await outcome;
    expect(stopped).toBe(true);
    expect([...values.keys()].sort()).toEqual([0, 1]);
    expect([InsideWorker.living, pool.members]).toEqual([0, 0]);
    // It can be used again.
    expect((await pool.run<number>(spec, { ...job, chunks: 2 })).values.size).toBe(2);
    pool.close();
    expect(InsideWorker.living).toBe(0);
  });

  it('starts nothing for a job that is cancelled before it begins', async () => {
    const before = InsideWorker.started;
    const pool = new WorkerPool(() => new InsideWorker(), 2);
    expect(await pool.run(spec, job, { signal: AbortSignal.abort() })).toEqual({ values: new Map(), stopped: true });
    expect(InsideWorker.started).toBe(before);
  });

  it('goes on with other jobs when one is cancelled', async () => {
    const pool = new WorkerPool(() => new InsideWorker(job, [5]), 2);
    const stop = new AbortController();
    const first = pool.run<number>(spec, job, { signal: stop.signal });
    const second = pool.run<number>(spec, { ...job, chunks: 5 });
    await new Promise((resolve) => setTimeout(resolve, 20));
    stop.abort();
    expect((await first).stopped).toBe(true);
    expect((await second).values.size).toBe(5);
    pool.close();
  });

  it('tells of a fault and ends what worked on that job', async () => {
    const faulty: Job<number> = { ...job, run: (c) => { if (c === 1) throw new Error('broken'); return c; } };
    const pool = new WorkerPool(() => new InsideWorker(faulty, [0]), 2);
    await expect(pool.run(spec, faulty)).rejects.toThrow('broken');
    pool.close();
    expect(InsideWorker.living).toBe(0);
    const dead = new WorkerPool(() => {
      const side = new InsideWorker(job, [0]);
      setTimeout(() => side.onerror?.({ message: 'not loaded' }));
      return side;
    }, 1);
    await expect(dead.run(spec, job)).rejects.toThrow('not loaded');
    expect(InsideWorker.living).toBe(0);
  });
});

describe('threads of Node', () => {
  const folder = mkdtempSync(join(tmpdir(), 'halfmark-pool-'));
  const script = join(folder, 'thread.mjs');
  const exits: Promise<number>[] = [];
  beforeAll(async () => {
    await build({
      stdin: { contents: "import { serveThread } from './src/workers/pool-thread.ts'; serveThread();", resolveDir: join(import.meta.dirname, '../..'), loader: 'ts' },
      bundle: true, platform: 'node', format: 'esm', outfile: script, logLevel: 'error',
      banner: { js: "import { createRequire as requireFor } from 'node:module'; const require = requireFor(import.meta.url);" },
    });
  });
  afterAll(() => rmSync(folder, { recursive: true }));

  function thread(): PoolSide {
    const worker = new Worker(pathToFileURL(script));
    exits.push(new Promise((resolve) => worker.on('exit', resolve)));
    const side: PoolSide = { onmessage: null, onerror: null, postMessage: (m) => worker.postMessage(m), terminate: () => void worker.terminate() };
    worker.on('message', (data: PoolReply) => side.onmessage?.({ data }));
    return side;
  }

  it('give the same bytes as one thread, whatever their number', async () => {
    const request = { count: 70, seed: 5, figures: ['layers.n.sheet_ohm', 'junctions.0.builtin_V'] };
    const reading = planVariations(toleranced, request);
    if (!reading.ok) throw new Error();
    const here = variationJob(reading.plan);
    const alone = new Map(Array.from({ length: here.chunks }, (_, c) => [c, here.run(c)]));
    const expected = JSON.stringify(variationResult(reading.plan, alone));
    for (const size of [1, 2, 4]) {
      const pool = new WorkerPool(thread, size);
      const { values } = await pool.run<ReturnType<typeof here.run>>({ kind: 'variations', design: toleranced, request }, here);
      pool.close();
      expect(JSON.stringify(variationResult(reading.plan, values))).toBe(expected);
    }
  });

  it('have all ended after a cancelled run', async () => {
    const reading = planVariations(toleranced, { count: 100000, seed: 5 });
    if (!reading.ok) throw new Error();
    const pool = new WorkerPool(thread, 2);
    const stop = new AbortController();
    const { values, stopped } = await pool.run({ kind: 'variations', design: toleranced, request: { count: 100000, seed: 5 } }, variationJob(reading.plan), { signal: stop.signal, onChunk: () => stop.abort() });
    expect([stopped, values.size]).toEqual([true, 1]);
    // The one that was computing has been ended, the one that had just replied waits for other work until the pool closes.
    expect(pool.members).toBe(1);
    pool.close();
    // Every thread that was ever started here has exited.
    expect((await Promise.all(exits)).length).toBe(1 + 2 + 4 + 2);
  });
});
