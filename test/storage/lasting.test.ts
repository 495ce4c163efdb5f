import { describe, expect, it } from 'vitest';
import { Lasting, type StorageGuard } from '../../src/storage/lasting.ts';

/** A browser that notes what it is asked. */
function browser(already: boolean, answer: boolean | Error): { guard: StorageGuard; asked: string[] } {
  const asked: string[] = [];
  const note = async (what: string, value: boolean | Error): Promise<boolean> => {
    asked.push(what);
    if (value instanceof Error) throw value;
    return value;
  };
  return { asked, guard: { persisted: () => note('persisted', already), persist: () => note('persist', answer) } };
}

describe('a browser that is asked to keep the projects when its disk runs short', () => {
  it('is asked once, and believed when it promises', async () => {
    const { guard, asked } = browser(false, true);
    const lasting = new Lasting(guard);
    expect(await Promise.all([lasting.ask(), lasting.ask()])).toEqual([true, false]);
    expect(await lasting.ask()).toBe(false);
    expect(asked).toEqual(['persisted', 'persist']);
    expect(lasting.clearable).toBe(false);
  });

  it('is not asked again for what it promised before', async () => {
    const { guard, asked } = browser(true, false);
    const lasting = new Lasting(guard);
    await lasting.ask();
    expect(asked).toEqual(['persisted']);
    expect(lasting.clearable).toBe(false);
  });

  it('may clear them when it refuses, fails, or knows no such promise', async () => {
    for (const guard of [browser(false, false).guard, browser(false, new Error('no')).guard, null]) {
      const lasting = new Lasting(guard);
      expect(lasting.clearable).toBe(false);
      expect(await lasting.ask()).toBe(true);
      expect(lasting.clearable).toBe(true);
    }
  });
});
