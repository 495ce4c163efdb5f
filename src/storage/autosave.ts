import type { SaveOutcome } from './project-store.ts';
import type { ProjectRecord } from './record.ts';
import { storageFailure, type StorageFailure } from './failure.ts';

/** How it stands with saving. */
export type SavingState =
  | { kind: 'saved'; /** the browser has refused to promise that it keeps it when its disk runs short */ clearable?: true }
  /** changed, and about to be saved */ | { kind: 'waiting' }
  | { kind: 'saving' }
  | { kind: 'failed'; failure: StorageFailure }
  /** saved by another tab in between: nothing more is written until the person has chosen */ | { kind: 'conflict'; other: ProjectRecord | null };

/** Quiet time after the last change, ms, and the longest that a change waits while others keep coming. */
const DELAY_MS = 400;
const LONGEST_MS = 3000;
/** Time until a failed save is tried again, ms. */
const AGAIN_MS = 10_000;

/** Saves a while after the last change, at once when asked to; one save at a time; what fails is tried again. */
export class Autosave {
  #state: SavingState = { kind: 'saved' };
  #changed = false;
  #firstChange = 0;
  #running: Promise<void> | null = null;
  #timer: ReturnType<typeof setTimeout> | undefined;
  readonly #save: () => Promise<SaveOutcome>;
  readonly #told: (state: SavingState) => void;

  /**
   * @param save  saves the project as it is when called
   * @param told  hears of every new state
   */
  constructor(save: () => Promise<SaveOutcome>, told: (state: SavingState) => void) {
    this.#save = save;
    this.#told = told;
  }

  get state(): SavingState {
    return this.#state;
  }

  /** Whether something is not saved yet. */
  get unsaved(): boolean {
    return this.#changed || this.#running !== null;
  }

  /** The project changed. */
  touch(): void {
    const now = Date.now();
    if (!this.#changed) this.#firstChange = now;
    this.#changed = true;
    if (this.#state.kind === 'conflict') return;
    if (this.#running === null && this.#state.kind !== 'failed') this.#become({ kind: 'waiting' });
    this.#later(Math.max(0, Math.min(DELAY_MS, this.#firstChange + LONGEST_MS - now)));
  }

  /** Saves what is not saved yet, now. */
  async flush(): Promise<void> {
    clearTimeout(this.#timer);
    await this.#running;
    if (!this.#changed || this.#state.kind === 'conflict') return;
    this.#running ??= this.#once().finally(() => (this.#running = null));
    await this.#running;
  }

  /** Another tab was heard to have saved: nothing more is written until the person has chosen. */
  meet(other: ProjectRecord | null): void {
    clearTimeout(this.#timer);
    this.#become({ kind: 'conflict', other });
  }

  /** Another project is open now, or the conflict is settled: nothing is owed any more. */
  reset(): void {
    clearTimeout(this.#timer);
    this.#changed = false;
    this.#become({ kind: 'saved' });
  }

  async #once(): Promise<void> {
    this.#changed = false;
    this.#become({ kind: 'saving' });
    // A save that throws has not saved: what is owed stays owed.
    const outcome = await this.#save().catch((error: unknown): SaveOutcome => ({ kind: 'failed', failure: storageFailure(error) }));
    if (outcome.kind === 'saved') {
      if (this.#changed) this.#later(DELAY_MS);
      return this.#become({ kind: this.#changed ? 'waiting' : 'saved' });
    }
    this.#changed = true;
    if (outcome.kind === 'conflict') return this.#become(outcome);
    this.#later(AGAIN_MS);
    this.#become(outcome);
  }

  #later(delay: number): void {
    clearTimeout(this.#timer);
    this.#timer = setTimeout(() => void this.flush(), delay);
  }

  #become(state: SavingState): void {
    if (state.kind === this.#state.kind && (state.kind === 'saved' || state.kind === 'waiting')) return;
    this.#state = state;
    this.#told(state);
  }
}

/** The state in words, for the line under the project's name. */
export function savingWords(state: SavingState): string {
  switch (state.kind) {
    case 'saved':
      return state.clearable ? 'All changes saved; this browser may clear them' : 'All changes saved in this browser';
    case 'waiting':
      return 'Changes about to be saved';
    case 'saving':
      return 'Saving';
    case 'failed':
      return `Not saved. ${state.failure.sentence}`;
    case 'conflict':
      return state.other === null ? 'Not saved: this project was deleted in another tab' : 'Not saved: this project was changed in another tab';
  }
}
