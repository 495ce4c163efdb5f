import type { ReactiveController, ReactiveControllerHost } from 'lit';
import type { OfflineCopy } from '../../src/offline/register.ts';

/** Says that a newer build of the page waits. It changes nothing under the person's hands: a reload does. */
export class OfflineController implements ReactiveController {
  readonly #copy: OfflineCopy;
  readonly #say: (text: string) => void;

  constructor(host: ReactiveControllerHost, copy: OfflineCopy, say: (text: string) => void) {
    this.#copy = copy;
    this.#say = say;
    host.addController(this);
  }

  hostConnected(): void {
    this.#copy.addEventListener('update', this.#update);
    if (this.#copy.state === 'update') this.#update();
  }

  hostDisconnected(): void {
    this.#copy.removeEventListener('update', this.#update);
  }

  readonly #update = (): void => this.#say('A newer version of this page is ready. It comes with the next reload, when no other tab shows the old one; your work stays.');
}
