/** What a browser has for making its storage last. */
export type StorageGuard = Pick<StorageManager, 'persist' | 'persisted'>;

/**
 * Whether the browser may clear by itself what it keeps for this page, when its disk runs short. Unasked every browser may; asked, some promise not to, some ask the person,
 * some judge for themselves. So the question waits until there is work of the person's own to keep.
 */
export class Lasting {
  #answer: 'not asked' | 'asking' | 'lasts' | 'clearable' = 'not asked';
  readonly #guard: StorageGuard | null;

  /** @param guard  null where the browser has none: on plain http away from this machine */
  constructor(guard: StorageGuard | null = navigator.storage ?? null) {
    this.#guard = guard;
  }

  /** The browser was asked and has refused, or cannot promise anything. */
  get clearable(): boolean {
    return this.#answer === 'clearable';
  }

  /** Asks once a visit. Never rejects: a browser that fails to answer has promised nothing. @returns whether there is an answer now that was not there before */
  async ask(): Promise<boolean> {
    if (this.#answer !== 'not asked') return false;
    this.#answer = 'asking';
    const guard = this.#guard;
    // Where it was promised before, nobody is asked again.
    const lasts = guard === null ? false : await guard.persisted().then((already) => already || guard.persist()).catch(() => false);
    this.#answer = lasts ? 'lasts' : 'clearable';
    return true;
  }
}
