import type { ReactiveController, ReactiveControllerHost } from 'lit';
import type { HalfmarkEvents } from '../shared/events.ts';

/** A remark that asks for nothing leaves the page after this, ms. */
const STAYS_MS = 12_000;

/** The one remark that the page is making. An urgent one stays until the next. */
export class RemarkController implements ReactiveController {
  remark: HalfmarkEvents['hm-say'] | null = null;
  readonly #host: ReactiveControllerHost;
  #timer: ReturnType<typeof setTimeout> | undefined;

  constructor(host: ReactiveControllerHost) {
    this.#host = host;
    host.addController(this);
  }

  hostDisconnected(): void {
    clearTimeout(this.#timer);
  }

  readonly say = (text: string, urgent = false): void => {
    // An equal sentence is spoken only if the region changes.
    this.#become({ text: this.remark?.text === text ? `${text} ` : text, urgent });
    if (!urgent) this.#timer = setTimeout(() => this.#become(null), STAYS_MS);
  };

  #become(remark: HalfmarkEvents['hm-say'] | null): void {
    clearTimeout(this.#timer);
    this.remark = remark;
    this.#host.requestUpdate();
  }
}
