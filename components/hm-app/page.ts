import type { Session } from '../../src/state/session.ts';
import type { Keeper } from '../../src/storage/keeper.ts';
import type { SolverClient } from '../../src/workers/client.ts';
import type { IncomingController } from './incoming.ts';
import type { JudgingController } from './judging-controller.ts';
import type { ProjectDesk } from './project-desk.ts';

/** What carries out a person's acts is given of the page. */
export interface Page {
  readonly session: Session;
  readonly solver: SolverClient;
  /** there once the page is connected */ readonly keeper: Keeper;
  /** there once the page is connected */ readonly desk: ProjectDesk;
  readonly judging: JudgingController;
  readonly incoming: IncomingController;
  /** Says a sentence; an urgent one stays until the next. */
  say(text: string, urgent?: boolean): void;
  /** The page's own element of that name: a dialog, mostly. */
  element<K extends keyof HTMLElementTagNameMap>(name: K): HTMLElementTagNameMap[K];
  /** The question whether to lose what could not be saved. */
  readonly unsavedQuestion: { show(): void; close(): void };
  requestUpdate(): void;
}
