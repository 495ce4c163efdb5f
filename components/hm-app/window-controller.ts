import type { ReactiveController, ReactiveControllerHost } from 'lit';

export interface WindowWishes {
  /** a key, before any element sees it: fields keep keys to themselves */ key(event: KeyboardEvent): void;
  /** the page is hidden or left: the last moment to save */ hidden(): void;
  /** whether leaving now would lose something: then the browser asks in its own words */ atRisk(): boolean;
}

/** Listens to the window for the page, and draws it anew when the system turns dark or light. */
export class WindowController implements ReactiveController {
  readonly #host: ReactiveControllerHost;
  readonly #wishes: WindowWishes;
  readonly #darkness = matchMedia('(prefers-color-scheme: dark)');

  constructor(host: ReactiveControllerHost, wishes: WindowWishes) {
    this.#host = host;
    this.#wishes = wishes;
    host.addController(this);
  }

  hostConnected(): void {
    this.#darkness.addEventListener('change', this.#redraw);
    document.addEventListener('visibilitychange', this.#hide);
    addEventListener('pagehide', this.#hide);
    addEventListener('beforeunload', this.#warn);
    addEventListener('keydown', this.#key, { capture: true });
  }

  hostDisconnected(): void {
    this.#darkness.removeEventListener('change', this.#redraw);
    document.removeEventListener('visibilitychange', this.#hide);
    removeEventListener('pagehide', this.#hide);
    removeEventListener('beforeunload', this.#warn);
    removeEventListener('keydown', this.#key, { capture: true });
  }

  readonly #redraw = (): void => this.#host.requestUpdate();
  readonly #key = (event: KeyboardEvent): void => this.#wishes.key(event);
  readonly #hide = (event: Event): void => {
    if (event.type === 'pagehide' || document.visibilityState === 'hidden') this.#wishes.hidden();
  };
  readonly #warn = (event: Event): void => {
    if (this.#wishes.atRisk()) event.preventDefault();
  };
}
