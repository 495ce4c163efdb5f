import type { ReactiveController, ReactiveControllerHost } from 'lit';
import type { Design } from '../../src/design/types.ts';
import { choicesFor, type Choices } from './choices.ts';

/** Holds what the menus offer for the design on the page; made anew when the design's own entries change. */
export class ChoicesController implements ReactiveController {
  choices: Choices = { materials: [], dopants: [], metals: [] };
  readonly #host: ReactiveControllerHost;
  readonly #failed: () => void;
  /** the own entries that the menus hold; no design has this one */ #shown: unknown = this;

  constructor(host: ReactiveControllerHost, failed: () => void) {
    this.#host = host;
    this.#failed = failed;
    host.addController(this);
  }

  hostConnected(): void {}

  follow({ custom }: Design): void {
    if (custom === this.#shown) return;
    this.#shown = custom;
    choicesFor(custom).then((choices) => {
      // A later design may have asked meanwhile.
      if (custom !== this.#shown) return;
      this.choices = choices;
      this.#host.requestUpdate();
    }, this.#failed);
  }
}
