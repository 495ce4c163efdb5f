import type { ReactiveController, ReactiveControllerHost } from 'lit';

/**
 * Keeps the width, whole px, of an element's box: of the host itself, or of a part of it that every render holds. The host is drawn anew in the frame after a
 * change: drawing within the observer's own round would change what is being observed.
 */
export class WidthController implements ReactiveController {
  /** 0 until the page is laid out */ width = 0;
  private frame = 0;
  private readonly watch = new ResizeObserver(([entry]) => {
    const width = Math.round(entry.contentRect.width);
    // Nothing is laid out for a moment (hidden, or the window being resized): the last width is a better guess than none.
    if (width === 0) return;
    cancelAnimationFrame(this.frame);
    if (width === this.width) return;
    this.frame = requestAnimationFrame(() => {
      this.width = width;
      this.host.requestUpdate();
    });
  });
  private watched: Element | null = null;

  /** @param part  selector of the part within the host's shadow root */
  constructor(
    private readonly host: ReactiveControllerHost & Element,
    private readonly part: string | null = null,
  ) {
    host.addController(this);
  }

  hostConnected(): void {
    this.watched = null;
    this.find();
  }

  hostUpdated(): void {
    this.find();
  }

  hostDisconnected(): void {
    this.watch.disconnect();
    cancelAnimationFrame(this.frame);
  }

  private find(): void {
    if (this.watched) return;
    this.watched = this.part === null ? this.host : (this.host.shadowRoot?.querySelector(this.part) ?? null);
    if (this.watched) this.watch.observe(this.watched);
  }
}
