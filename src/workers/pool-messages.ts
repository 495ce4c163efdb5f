import type { JobSpec } from '../batch/spec.ts';

/** What a pool asks of its workers. A job has a number; a worker opens it once and then computes some of its chunks. */
export type PoolRequest = { kind: 'open'; job: number; spec: JobSpec } | { kind: 'run'; job: number; chunk: number } | { kind: 'close'; job: number };

/** What a worker replies to "run", and to nothing else. */
export type PoolReply =
  | { kind: 'chunk'; job: number; chunk: number; value: unknown }
  /** our own bug: it threw */ | { kind: 'fault'; job: number; chunk: number; message: string };
