import type { ReactiveController, ReactiveControllerHost } from 'lit';
import type { Findings } from '../../src/state/session.ts';

/** A result that is stale for less than this is not dimmed: while something is dragged the next one is already on its way, ms. */
const AFTER_MS = 150;

/** Whether what is shown is to be dimmed, because it belongs to an earlier design. */
export class StaleController implements ReactiveController {
  dim = false;
  readonly #host: ReactiveControllerHost;
  #timer: ReturnType<typeof setTimeout> | undefined;

  constructor(host: ReactiveControllerHost) {
    this.#host = host;
    host.addController(this);
  }

  hostDisconnected(): void {
    clearTimeout(this.#timer);
  }

  follow({ status, stale }: Findings): void {
    clearTimeout(this.#timer);
    if (stale && status !== 'error') this.#timer = setTimeout(() => this.#become(true), AFTER_MS);
    else this.#become(stale);
  }

  #become(dim: boolean): void {
    this.dim = dim;
    this.#host.requestUpdate();
  }
}
