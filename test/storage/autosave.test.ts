import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { Autosave, savingWords, type SavingState } from '../../src/storage/autosave.ts';
import type { SaveOutcome } from '../../src/storage/project-store.ts';
import { storageFailure } from '../../src/storage/failure.ts';

let states: SavingState['kind'][];
let outcomes: SaveOutcome[];
let saves: number;
let autosave: Autosave;
const saved: SaveOutcome = { kind: 'saved', revision: 1 };
const full: SaveOutcome = { kind: 'failed', failure: storageFailure(Object.assign(new Error('x'), { name: 'QuotaExceededError' })) };

beforeEach(() => {
  vi.useFakeTimers();
  [states, outcomes, saves] = [[], [], 0];
  autosave = new Autosave(
    async () => {
      saves++;
      await new Promise((done) => setTimeout(done, 50));
      return outcomes.shift() ?? saved;
    },
    (state) => states.push(state.kind),
  );
});
afterEach(() => void vi.useRealTimers());

describe('saving as one works', () => {
  it('waits for a pause, then saves once', async () => {
    for (let i = 0; i < 5; i++) {
      autosave.touch();
      await vi.advanceTimersByTimeAsync(100);
    }
    expect(saves).toBe(0);
    await vi.advanceTimersByTimeAsync(1000);
    expect(saves).toBe(1);
    expect(states).toEqual(['waiting', 'saving', 'saved']);
  });

  it('does not wait for ever while changes keep coming', async () => {
    for (let i = 0; i < 50; i++) {
      autosave.touch();
      await vi.advanceTimersByTimeAsync(100);
    }
    expect(saves).toBe(1);
    await vi.advanceTimersByTimeAsync(1000);
    expect(saves).toBe(2);
  });

  it('saves at once when the page is about to hide, and nothing when nothing is owed', async () => {
    autosave.touch();
    const flushed = autosave.flush();
    await vi.advanceTimersByTimeAsync(60);
    await flushed;
    expect(saves).toBe(1);
    await autosave.flush();
    expect(saves).toBe(1);
    expect(autosave.unsaved).toBe(false);
  });

  it('saves again what changed while it was saving', async () => {
    autosave.touch();
    const flushed = autosave.flush();
    await vi.advanceTimersByTimeAsync(10);
    autosave.touch();
    await vi.advanceTimersByTimeAsync(45);
    await flushed;
    expect(autosave.unsaved).toBe(true);
    await vi.advanceTimersByTimeAsync(1000);
    expect(saves).toBe(2);
    expect(autosave.state.kind).toBe('saved');
  });

  it('keeps what it could not save and tries again', async () => {
    outcomes = [full, full];
    autosave.touch();
    await vi.advanceTimersByTimeAsync(1000);
    expect(autosave.state.kind).toBe('failed');
    expect(autosave.unsaved).toBe(true);
    await vi.advanceTimersByTimeAsync(30_000);
    expect(saves).toBe(3);
    expect(autosave.state.kind).toBe('saved');
  });

  it('writes nothing more after a conflict until it is settled', async () => {
    outcomes = [{ kind: 'conflict', other: null }];
    autosave.touch();
    await vi.advanceTimersByTimeAsync(1000);
    autosave.touch();
    await autosave.flush();
    await vi.advanceTimersByTimeAsync(60_000);
    expect(saves).toBe(1);
    expect(autosave.unsaved).toBe(true);
    autosave.reset();
    autosave.touch();
    await vi.advanceTimersByTimeAsync(1000);
    expect(saves).toBe(2);
  });

  it('says in words how it stands', () => {
    expect(savingWords({ kind: 'saved' })).toBe('All changes saved in this browser');
    expect(savingWords({ kind: 'saved', clearable: true })).toBe('All changes saved; this browser may clear them');
    expect(savingWords({ kind: 'failed', failure: (full as { failure: ReturnType<typeof storageFailure> }).failure })).toMatch(/no room.*file/);
    expect(savingWords({ kind: 'conflict', other: null })).toMatch(/deleted in another tab/);
  });
});

describe('a failure of storage', () => {
  const named = (name: string) => storageFailure(Object.assign(new Error('because'), { name }));
  it('has a code and a sentence that says what becomes of the work', () => {
    expect(['QuotaExceededError', 'VersionError', 'SecurityError', 'InvalidStateError', 'DataError'].map((name) => named(name).code)).toEqual(['full', 'newer', 'denied', 'lost', 'other']);
    expect(named('DataError').sentence).toContain('because');
    expect(storageFailure('odd').sentence).toContain('odd');
  });
});
