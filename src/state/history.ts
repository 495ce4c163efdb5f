import type { Design } from '../design/types.ts';
import { apply, difference, inverse, type Change, type Json } from './difference.ts';

/** One step that undo takes back: what it was, in words, and its differences. */
export interface Step {
  label: string;
  changes: Change[];
}

/** What is kept through a reload; plain JSON. The newest step is last in `past`, the next one to redo last in `future`. */
export interface HistoryRecord {
  past: Step[];
  future: Step[];
}

/** How much is remembered: steps, and characters of their differences as JSON. The oldest go first. */
export const HISTORY_LIMITS = { steps: 1000, characters: 4_000_000 } as const;
/** Edits of one kind that follow each other within this time are one burst of typing or one drag, ms. */
export const BURST_MS = 3000;

interface Burst {
  key: string;
  until: number;
}

/**
 * Undo and redo of a design by differences and their inverses. It holds no design: the caller gives the present one and gets the next.
 *
 * Edits with one `join` key become one step while the burst lasts. An edit that changes nothing is not remembered, and a burst that ends where it began
 * leaves no step behind.
 */
export class History {
  #past: Step[] = [];
  #future: Step[] = [];
  #burst: Burst | null = null;
  readonly #now: () => number;
  readonly #limits: { steps: number; characters: number };

  /** @param now clock, ms; given by tests */
  constructor(now: () => number = () => Date.now(), limits: { steps: number; characters: number } = HISTORY_LIMITS) {
    this.#now = now;
    this.#limits = limits;
  }

  /** What undo would take back, in words; null when there is nothing. */
  get undoLabel(): string | null {
    return this.#past.at(-1)?.label ?? null;
  }

  get redoLabel(): string | null {
    return this.#future.at(-1)?.label ?? null;
  }

  /** Remembers the edit that led from `before` to `after`. @returns whether it changed anything */
  record(before: Design, after: Design, label: string, join?: string): boolean {
    const changes = difference(before as unknown as Json, after as unknown as Json);
    if (changes.length === 0) return false;
    const last = this.#past.at(-1);
    const joins = join !== undefined && last !== undefined && this.#burst?.key === join && this.#now() <= this.#burst.until;
    let burst = join === undefined ? null : { key: join, until: this.#now() + BURST_MS };
    if (joins) {
      const start = apply(before as unknown as Json, inverse(last.changes));
      this.#past.pop();
      const whole = difference(start, after as unknown as Json);
      if (whole.length > 0) this.#past.push({ label, changes: whole });
      // A burst that came back to its start leaves no step to join: the next edit begins one.
      else burst = null;
    } else {
      this.#past.push({ label, changes });
    }
    this.#future = [];
    this.#burst = burst;
    this.#trim();
    return true;
  }

  /** Ends the burst: the next edit is a step of its own. */
  seal(): void {
    this.#burst = null;
  }

  /** @returns the design before the last step, or null when there is none */
  undo(present: Design): Design | null {
    return this.#move(present, this.#past, this.#future, inverse);
  }

  /** @returns the design after the step last undone, or null when there is none */
  redo(present: Design): Design | null {
    return this.#move(present, this.#future, this.#past, (changes) => [...changes]);
  }

  toRecord(): HistoryRecord {
    return { past: [...this.#past], future: [...this.#future] };
  }

  /** Takes up what an earlier visit remembered; something else than a record of steps leaves it empty. */
  restore(record: unknown): void {
    const { past, future } = readHistory(record);
    this.#past = [...past];
    this.#future = [...future];
    this.#burst = null;
  }

  #move(present: Design, from: Step[], to: Step[], direction: (changes: Change[]) => Change[]): Design | null {
    const step = from.at(-1);
    if (step === undefined) return null;
    this.#burst = null;
    let next: Design;
    try {
      next = apply(present as unknown as Json, direction(step.changes)) as unknown as Design;
    } catch (error) {
      if (!(error instanceof RangeError)) throw error;
      // The steps belong to another design (a record mixed up in storage): they lead nowhere from here.
      this.restore(null);
      return null;
    }
    from.pop();
    to.push(step);
    return next;
  }

  #trim(): void {
    let characters = 0;
    let keep = 0;
    while (keep < this.#past.length && keep < this.#limits.steps) {
      characters += JSON.stringify(this.#past[this.#past.length - 1 - keep]).length;
      if (characters > this.#limits.characters && keep > 0) break;
      keep++;
    }
    if (keep < this.#past.length) this.#past = this.#past.slice(this.#past.length - keep);
  }
}

/** @returns what an earlier visit kept, or an empty history where that is something else than a record of steps */
export function readHistory(record: unknown): HistoryRecord {
  return isRecord(record) ? record : { past: [], future: [] };
}

function isRecord(value: unknown): value is HistoryRecord {
  if (typeof value !== 'object' || value === null) return false;
  const { past, future } = value as Partial<HistoryRecord>;
  return [past, future].every((list) => Array.isArray(list) && list.every(isStep));
}

function isStep(value: unknown): value is Step {
  if (typeof value !== 'object' || value === null) return false;
  const { label, changes } = value as Partial<Step>;
  return typeof label === 'string' && Array.isArray(changes) && changes.every(isChange);
}

function isChange(value: unknown): value is Change {
  if (typeof value !== 'object' || value === null) return false;
  const change = value as { path?: unknown; at?: unknown; out?: unknown; into?: unknown };
  if (!Array.isArray(change.path) || !change.path.every((key) => typeof key === 'string' || typeof key === 'number')) return false;
  return !('at' in change) || (typeof change.at === 'number' && Array.isArray(change.out) && Array.isArray(change.into));
}
