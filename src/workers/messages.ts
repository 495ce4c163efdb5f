import type { Design } from '../design/types.ts';
import type { Answer } from '../result/types.ts';

/** What the page asks of the worker. Every request has a number of its own, and its reply bears it. */
export type Request = { kind: 'solve'; number: number; design: Design };

/** What the worker replies. */
export type Reply =
  | { kind: 'answer'; number: number; answer: Answer; /** time in the worker, ms */ took_ms: number }
  /** our own bug: it threw */ | { kind: 'fault'; number: number; message: string };
