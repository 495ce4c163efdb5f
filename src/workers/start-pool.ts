import { WorkerPool, type PoolSide } from './pool.ts';

/** A pool of the page over all cores. The builder reads this very form of the address. */
export function startPool(size = navigator.hardwareConcurrency || 2): WorkerPool {
  return new WorkerPool(() => new Worker(new URL('./pool-worker.ts', import.meta.url), { type: 'module', name: 'batch' }) as unknown as PoolSide, size);
}
