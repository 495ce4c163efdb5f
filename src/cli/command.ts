import type { PoolSide } from '../workers/pool.ts';

/** What a command reads and writes besides files. */
export interface Streams {
  out(text: string): void;
  error(text: string): void;
  stdin(): Promise<string>;
  /** a line on a terminal that the next one overwrites; absent where nobody watches */ progress?(text: string): void;
  /** starts a thread for long computations; absent where there are none, and all is done in this one */ startWorker?(): PoolSide;
  /** threads that the machine runs at once */ cores?: number;
  /** listens for Ctrl-C from now on: the signal aborts at the first, and a second one ends the program as ever; absent where nobody can press it */ stopSignal?(): AbortSignal;
}

export interface Command {
  /** "compute FILE [--set NAME=VALUE ...]" */ usage: string;
  summary: string;
  /** every option of `usage` in words, for "halfmark COMMAND --help" */ options: readonly (readonly [option: string, words: string])[];
  /** what it prints, and when it ends with which code, where that is more than the list of all commands says */ notes: string;
  run(args: readonly string[], streams: Streams): Promise<number>;
}

/** 128 + 2, as shells count a program that Ctrl-C has ended. */
export const EXIT = { done: 0, requirementNotMet: 1, wrongInput: 2, noAnswer: 3, stopped: 130 } as const;

/** Options that several commands share, in the same words. */
export const SET = ['--set NAME=VALUE', 'value of a variable of the design, or of temperature, for this run; any number of times'] as const;
export const TOLERANCES = ['--tolerances WORD', 'which tolerances count: all (the default; where none is stated, the usual one), stated, or none'] as const;
export const JSON_OPTION = ['--json', 'print JSON instead of lines'] as const;

/** The command line itself is wrong: one line, no stack trace. */
export class UsageError extends Error {
  override readonly name = 'UsageError';
}
