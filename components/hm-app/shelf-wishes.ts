import type { LitElement } from 'lit';
import { storageFailure } from '../../src/storage/failure.ts';
import type { ProjectStore } from '../../src/storage/project-store.ts';
import type { HalfmarkEvents } from '../shared/events.ts';

/** Answers the wishes about the person's shelf from the store of this browser. Never rejects: what the browser throws is said, and the answer is null. */
export function answerShelfWishes(host: LitElement, store: () => ProjectStore, say: (text: string) => void): void {
  host.addEventListener('hm-shelf', (event) => {
    const wish = (event as CustomEvent<HalfmarkEvents['hm-shelf']>).detail;
    void answer(wish, store()).catch((error: unknown) => {
      if (wish.act !== 'look') say(storageFailure(error).sentence);
      wish.answer(null);
    });
  });
}

async function answer(wish: HalfmarkEvents['hm-shelf'], store: ProjectStore): Promise<void> {
  if (wish.act === 'put') await store.shelve(wish.entries);
  else if (wish.act === 'drop') await store.unshelve(wish.key);
  wish.answer(await store.shelf());
}
