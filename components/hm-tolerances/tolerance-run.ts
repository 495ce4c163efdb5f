import type { ReactiveController, ReactiveControllerHost } from 'lit';
import type { Complaint } from '../../src/design/complaint.ts';
import type { Design } from '../../src/design/types.ts';
import { planVariations, type VariationPlan, type VariationRequest } from '../../src/tolerance/plan.ts';
import { variationResult, type VariationResult } from '../../src/tolerance/result.ts';
import { variationJob, type VariationRows } from '../../src/tolerance/variations.ts';
import type { WorkerPool } from '../../src/workers/pool.ts';

/** What is known so far is put together this often at most, ms; more seldom where that itself takes long. */
const LOOK_MS = 250;
const LOOK_SHARE = 10;

/** What a run has come to. The plan says what its figures are limited by. */
export interface Found {
  plan: VariationPlan;
  result: VariationResult;
}

/**
 * One tolerance run at a time over all cores: initial, pending, complete, stopped or error. What has come in is kept when it is stopped, and shown while it
 * runs. A newer run takes the place of the one before.
 */
export class ToleranceRun implements ReactiveController {
  status: 'initial' | 'pending' | 'complete' | 'stopped' | 'error' = 'initial';
  progress: { done: number; total: number } | null = null;
  found: Found | null = null;
  /** what is wrong with the request or the design */ complaints: Complaint[] = [];
  /** why the program failed, in words */ reason: string | null = null;
  readonly #host: ReactiveControllerHost;
  #stop: AbortController | null = null;

  constructor(host: ReactiveControllerHost) {
    this.#host = host;
    host.addController(this);
  }

  hostDisconnected(): void {
    this.stop();
  }

  stop(): void {
    this.#stop?.abort();
  }

  async start(design: Design, request: VariationRequest, pool: WorkerPool): Promise<void> {
    this.stop();
    const planned = planVariations(design, request);
    if (!planned.ok) {
      pool.close();
      return this.#become({ status: 'error', complaints: planned.complaints, reason: null, progress: null });
    }
    const { plan } = planned;
    const job = variationJob(plan);
    const mine = new AbortController();
    this.#stop = mine;
    const chunks = new Map<number, VariationRows>();
    let next = performance.now() + LOOK_MS;
    this.#become({ status: 'pending', complaints: [], reason: null, progress: { done: 0, total: 1 } });
    try {
      const { stopped } = await pool.run<VariationRows>({ kind: 'variations', design, request }, job, {
        signal: mine.signal,
        onChunk: (chunk, rows) => void chunks.set(chunk, rows),
        onProgress: (progress) => {
          if (this.#stop !== mine) return;
          const begin = performance.now();
          if (begin >= next) {
            this.found = { plan, result: variationResult(plan, chunks) };
            next = performance.now() + Math.max(LOOK_MS, LOOK_SHARE * (performance.now() - begin));
          }
          this.#become({ progress });
        },
      });
      if (this.#stop !== mine) return;
      if (chunks.size > 0) this.found = { plan, result: variationResult(plan, chunks) };
      this.#become({ status: stopped ? 'stopped' : 'complete', progress: null });
    } catch (error) {
      if (this.#stop !== mine) return;
      this.#become({ status: 'error', progress: null, reason: `The program itself failed (${error instanceof Error ? error.message : String(error)}).` });
    } finally {
      // Idle workers hold memory, and the next run starts them within a blink.
      pool.close();
      if (this.#stop === mine) this.#stop = null;
    }
  }

  #become(change: Partial<Pick<this, 'status' | 'progress' | 'complaints' | 'reason'>>): void {
    Object.assign(this, change);
    this.#host.requestUpdate();
  }
}
