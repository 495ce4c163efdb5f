import { TAKE_OVER } from './messages.ts';

/** How it stands with working without a network. */
export type OfflineState =
  /** this page is not kept: from its sources, in a private window, on plain http away from this machine, or the browser cannot */ | 'none'
  /** being fetched for the first time */ | 'fetching'
  /** kept whole: it opens without a network */ | 'ready'
  /** kept whole, and a newer build is kept beside it and waits */ | 'update';

/** Least time between two looks for a newer build, ms. */
const LOOK_AGAIN_MS = 3_600_000;

/**
 * The copy of the page that this browser keeps. Fires plain events: `ready` once when the page is kept for the first time, `update` when a newer build
 * waits. It never takes over by itself: a reload takes it where no other tab shows the old one, and `apply` everywhere.
 */
export class OfflineCopy extends EventTarget {
  #state: OfflineState = 'none';
  #registration: ServiceWorkerRegistration | null = null;
  #looked = 0;
  readonly #container: ServiceWorkerContainer | null;
  readonly #reload: () => void;
  readonly #seen = (): void => {
    if (document.visibilityState === 'visible' && Date.now() - this.#looked > LOOK_AGAIN_MS) void this.look();
  };

  /**
   * @param container  the browser's; null on plain http and in some private windows
   * @param reload  tests give their own
   */
  constructor(container: ServiceWorkerContainer | null = navigator.serviceWorker ?? null, reload: () => void = () => location.reload()) {
    super();
    this.#container = container;
    this.#reload = reload;
  }

  get state(): OfflineState {
    return this.#state;
  }

  /** Has the page kept. Never rejects: without a copy the page works as before, with a network. */
  async start(): Promise<void> {
    // Written into the built page; the page from its sources has no build to keep.
    const worker = document.querySelector<HTMLMetaElement>('meta[name="offline-worker"]')?.content;
    if (this.#container === null || worker === undefined) return;
    try {
      this.#registration = await this.#container.register(new URL(worker, document.baseURI), { updateViaCache: 'none' });
    } catch {
      return;
    }
    this.#looked = Date.now();
    const { active, waiting, installing } = this.#registration;
    if (active !== null) this.#state = 'ready';
    this.#registration.addEventListener('updatefound', () => this.#follow(this.#registration!.installing));
    if (active !== null && waiting !== null) this.#become('update');
    this.#follow(installing);
    document.addEventListener('visibilitychange', this.#seen);
  }

  stop(): void {
    document.removeEventListener('visibilitychange', this.#seen);
  }

  /** Looks whether there is a newer build. */
  async look(): Promise<void> {
    this.#looked = Date.now();
    // Without a network there is none to be had.
    await this.#registration?.update().catch(() => {});
  }

  /** Lets the newer build take over and reloads this page with it. To be called after what is unsaved has been saved. @returns whether there is one */
  apply(): boolean {
    const waiting = this.#registration?.waiting ?? null;
    if (waiting === null || this.#container === null) return false;
    this.#container.addEventListener('controllerchange', this.#reload, { once: true });
    waiting.postMessage(TAKE_OVER);
    return true;
  }

  #follow(worker: ServiceWorker | null): void {
    if (worker === null) return;
    const first = this.#registration!.active === null;
    if (first) this.#state = 'fetching';
    const changed = (): void => {
      if (first && worker.state === 'activated') this.#become('ready');
      if (!first && worker.state === 'installed') this.#become('update');
      if (worker.state === 'redundant') {
        worker.removeEventListener('statechange', changed);
        if (first && this.#state === 'fetching') this.#state = 'none';
      }
    };
    worker.addEventListener('statechange', changed);
    changed();
  }

  #become(state: 'ready' | 'update'): void {
    if (this.#state === state) return;
    this.#state = state;
    this.dispatchEvent(new Event(state));
  }
}
