/** What a command reads and writes besides files. */
export interface Streams {
  out(text: string): void;
  error(text: string): void;
  stdin(): Promise<string>;
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
