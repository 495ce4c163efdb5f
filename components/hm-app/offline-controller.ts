import type { ReactiveController, ReactiveControllerHost } from 'lit';
import type { OfflineCopy } from '../../src/offline/register.ts';

/** What may end an edit that is under way. */
const ENDS = ['pointerup', 'pointercancel', 'focusout', 'keyup'] as const;

/**
 * Says that a newer build of the page waits, once nothing is being typed or dragged. It changes nothing under the person's hands: a reload does.
 */
export class OfflineController implements ReactiveController {
  readonly #copy: OfflineCopy;
  readonly #say: (text: string) => void;
  #held = false;
  #owed = false;

  constructor(host: ReactiveControllerHost, copy: OfflineCopy, say: (text: string) => void) {
    this.#copy = copy;
    this.#say = say;
    host.addController(this);
  }

  hostConnected(): void {
    addEventListener('pointerdown', this.#hold, { capture: true });
    for (const end of ENDS) addEventListener(end, this.#maybe, { capture: true });
    this.#copy.addEventListener('update', this.#update);
    if (this.#copy.state === 'update') this.#update();
  }

  hostDisconnected(): void {
    removeEventListener('pointerdown', this.#hold, { capture: true });
    for (const end of ENDS) removeEventListener(end, this.#maybe, { capture: true });
    this.#copy.removeEventListener('update', this.#update);
  }

  readonly #hold = (): void => void (this.#held = true);

  readonly #maybe = (event: Event): void => {
    if (event.type === 'pointerup' || event.type === 'pointercancel') this.#held = false;
    // What the event brings about comes first: a text is accepted, a focus goes elsewhere.
    if (this.#owed) setTimeout(() => this.#owed && this.#update());
  };

  readonly #update = (): void => {
    this.#owed = this.#held || typing();
    if (!this.#owed) this.#say('A newer version of this page is ready. It comes with the next reload, when no other tab shows the old one; your work stays.');
  };
}

/** Whether the focus is in a field whose text differs from what was accepted. */
function typing(): boolean {
  let box = document.activeElement;
  while (box?.shadowRoot?.activeElement) box = box.shadowRoot.activeElement;
  if (!(box instanceof HTMLInputElement || box instanceof HTMLTextAreaElement)) return false;
  const field = (box.getRootNode() as ShadowRoot).host as (HTMLElement & { value?: string }) | undefined;
  return field?.localName === 'hm-field' && field.value !== box.value;
}
