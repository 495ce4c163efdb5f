import type { Design } from '../design/types.ts';
import type { Judgement } from '../requirements/judge.ts';
import type { Answer } from '../result/types.ts';

/** What the page asks of the worker. Every request has a number of its own, and its reply bears it. */
export type Request = { kind: 'solve'; number: number; design: Design };

/** What the worker replies. */
export type Reply =
  | { kind: 'answer'; number: number; answer: Answer; /** time in the worker, ms */ took_ms: number }
  /** our own bug: it threw */ | { kind: 'fault'; number: number; message: string };

/** Asked of a worker that judges requirements over temperatures and tolerances: one a run, since it takes many solves. */
export type JudgeRequest = { kind: 'judge'; number: number; design: Design };
export type JudgeReply =
  | { kind: 'progress'; number: number; done: number; of: number }
  | { kind: 'judged'; number: number; judgement: Judgement }
  | { kind: 'fault'; number: number; message: string };
