import { LitElement, nothing } from 'lit';
import type { HalfmarkEvents } from '../shared/events.ts';
import { tell } from '../shared/events.ts';
import type { HmHelp } from './hm-help.ts';

/**
 * Stands in the page for the help, which is fetched when it is first asked for: by F1, or by the act "help" from anywhere in the page.
 * @fires hm-say  it could not be fetched
 */
export class HmHelpDoor extends LitElement {
  private readonly act = (event: Event): void => {
    if ((event as CustomEvent<HalfmarkEvents['hm-act']>).detail.act === 'help') void this.show();
  };
  private readonly key = (event: KeyboardEvent): void => {
    if (event.key !== 'F1' || event.ctrlKey || event.metaKey || event.altKey || event.shiftKey) return;
    event.preventDefault();
    void this.show();
  };

  override connectedCallback(): void {
    super.connectedCallback();
    addEventListener('hm-act', this.act);
    // Before a field keeps the key to itself.
    addEventListener('keydown', this.key, { capture: true });
  }

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    removeEventListener('hm-act', this.act);
    removeEventListener('keydown', this.key, { capture: true });
  }

  async show(): Promise<void> {
    try {
      await import('./hm-help.ts');
    } catch {
      return tell(this, 'hm-say', { text: 'The help could not be fetched.', urgent: true });
    }
    const there = this.renderRoot.querySelector<HmHelp>('hm-help') ?? document.createElement('hm-help');
    if (!there.isConnected) this.renderRoot.append(there);
    await there.show();
  }

  override render(): typeof nothing {
    return nothing;
  }
}

customElements.define('hm-help-door', HmHelpDoor);

declare global {
  interface HTMLElementTagNameMap {
    'hm-help-door': HmHelpDoor;
  }
}
