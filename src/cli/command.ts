import type { PoolSide } from '../workers/pool.ts';

/** What a command reads and writes besides files. */
export interface Streams {
  out(text: string): void;
  error(text: string): void;
  stdin(): Promise<string>;
  /** a line on a terminal that the next one overwrites; absent where nobody watches */ progress?(text: string): void;
  /** starts a thread for long computations; absent where there are none, and all is done in this one */ startWorker?(): PoolSide;
  /** threads that the machine runs at once */ cores?: number;
}

export interface Command {
  /** "compute FILE [--set NAME=VALUE ...]" */ usage: string;
  summary: string;
  run(args: readonly string[], streams: Streams): Promise<number>;
}

export const EXIT = { done: 0, requirementNotMet: 1, wrongInput: 2, noAnswer: 3 } as const;

/** The command line itself is wrong: one line, no stack trace. */
export class UsageError extends Error {
  override readonly name = 'UsageError';
}
