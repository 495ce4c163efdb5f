import { LitElement, html, nothing, type PropertyValues, type TemplateResult } from 'lit';
import type { Design } from '../../src/design/types.ts';
import type { Result } from '../../src/result/types.ts';
import type { Known } from '../../src/workings/known.ts';
import { mathText, signOf } from '../../src/workings/math.ts';
import { shown, type ShownStep, type Step } from '../../src/workings/step.ts';
import { originText, workingsText } from '../../src/workings/text.ts';
import { panelWorkings } from '../../src/workings/panel-workings.ts';
import { workingsOf } from '../../src/workings/workings-of.ts';
import type { Workings } from '../../src/workings/workings.ts';
import { tell } from '../shared/events.ts';
import { look } from '../shared/look.ts';
import { mathTemplate } from './math-template.ts';
import type { AskedFigure } from './workings-controller.ts';
import { styles } from './hm-workings.styles.ts';

/** Narrower than this there is no room beside a table: the workings lie over the page. */
const NARROW = '(max-width: 56rem)';

/**
 * How a figure comes about, beside the page: its formula with every value and source, the assumptions, and what a simpler formula would give. Where there is no room
 * beside the page it lies over it. Escape closes it, and the focus returns to the figure that was asked.
 *
 * @fires hm-closed  it was closed, by whatever way
 * @fires hm-say     the workings were copied, or could not be
 */
export class HmWorkings extends LitElement {
  static override styles = [look, styles];
  static override properties = {
    design: { attribute: false },
    result: { attribute: false },
    stale: { type: Boolean },
    asked: { attribute: false },
  };

  /** the one that the result is of */ declare design: Design | null;
  declare result: Result | null;
  /** the result belongs to an earlier design than `design` */ declare stale: boolean;
  /** the figure, of the ledger by its place or of a panel with what it is of; null: closed */ declare asked: AskedFigure | null;
  private workings: Workings | null = null;
  /** what had the focus when it was opened */ private asker: HTMLElement | null = null;

  constructor() {
    super();
    this.design = null;
    this.result = null;
    this.stale = false;
    this.asked = null;
  }

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    removeEventListener('keydown', this.key);
  }

  private get dialog(): HTMLDialogElement {
    return this.renderRoot.querySelector('dialog')!;
  }

  /** Closes the panel and gives the focus back to the figure. */
  close(): void {
    this.dialog.close();
  }

  protected override willUpdate(changed: PropertyValues): void {
    const { asked, design, result } = this;
    if (!['asked', 'design', 'result', 'stale'].some((key) => changed.has(key))) return;
    // A panel's figure is of the design that the panel had, whatever becomes of the page's.
    if (asked && 'text' in asked) {
      if (changed.has('asked')) this.workings = tried(() => panelWorkings(asked));
      return;
    }
    // Of an earlier stack's figures the last workings stay, dimmed with the rest of the page: its design is no longer here.
    if (this.stale && !changed.has('asked')) return;
    this.workings = asked && design && result && !this.stale ? tried(() => workingsOf(design, result, asked)) : null;
  }

  protected override updated(changed: PropertyValues): void {
    const { dialog } = this;
    if (changed.has('asked')) {
      if (this.asked === null) return void dialog.close();
      const asker = focused();
      if (!dialog.open) this.open(asker);
      else if (asker && !this.renderRoot.contains(asker)) this.asker = asker;
      this.side();
      this.renderRoot.querySelector<HTMLElement>('h2')!.focus();
      dialog.scrollTop = 0;
    }
    for (const box of this.renderRoot.querySelectorAll<HTMLElement>('.formula')) box.tabIndex = box.scrollWidth > box.clientWidth ? 0 : -1;
  }

  /** Away from the figure, so that both are seen. */
  private side(): void {
    const box = this.asker?.getBoundingClientRect();
    this.dialog.classList.toggle('left', box !== undefined && box.left + box.width / 2 > innerWidth / 2);
  }

  private open(asker: HTMLElement | null): void {
    this.asker = asker;
    addEventListener('keydown', this.key);
    // Beside the page the page stays in reach; over it, it does not.
    if (matchMedia(NARROW).matches) this.dialog.showModal();
    else this.dialog.show();
  }

  /** A panel beside the page gets no Escape of its own. */
  private readonly key = (event: KeyboardEvent): void => {
    if (event.key !== 'Escape' || event.defaultPrevented) return;
    const path = event.composedPath();
    if (!path.includes(this) && !(this.asker && path.includes(this.asker))) return;
    event.preventDefault();
    this.close();
  };

  private closed(): void {
    removeEventListener('keydown', this.key);
    this.asked = null;
    if (this.asker?.isConnected) this.asker.focus();
    this.asker = null;
    this.dispatchEvent(new CustomEvent('hm-closed'));
  }

  private async copy(): Promise<void> {
    if (this.workings === null) return;
    try {
      await navigator.clipboard.writeText(workingsText(this.workings));
      tell(this, 'hm-say', { text: 'Workings copied as text.' });
    } catch {
      tell(this, 'hm-say', { text: 'The browser did not allow copying.', urgent: true });
    }
  }

  override render(): TemplateResult {
    const w = this.workings;
    return html`<dialog aria-labelledby="heading" @close=${this.closed}>
      <header>
        <h2 id="heading" tabindex="-1">${w?.title ?? 'Workings'}</h2>
        ${w === null ? nothing : html`<button type="button" @click=${this.copy}>Copy as text</button>`}
        <button type="button" @click=${this.close}>Close</button>
      </header>
      <div class="sheet">${w === null ? html`<p>The workings stand here once the stack on the page is solved.</p>` : this.renderWorkings(w)}</div>
    </dialog>`;
  }

  private renderWorkings(w: Workings): TemplateResult {
    const steps = w.steps.map(shown);
    const last = steps.at(-1);
    const before = steps.slice(0, -1);
    return html`
      ${this.stale && !(this.asked && 'text' in this.asked) ? html`<p class="quiet">Of the stack before the last change.</p>` : nothing}
      <p class="value">${w.value.map((line) => html`<span>${line}${w.unit === '' || line === '–' || line.endsWith(w.unit) || line.includes('%') ? '' : ` ${w.unit}`}</span>`)}</p>
      <p class="words">${w.words}</p>
      ${last === undefined ? nothing : html`<ol>${this.renderStep(last)}</ol>`} ${w.remarks.map((remark) => html`<p>${remark}</p>`)}
      ${before.length === 0 ? nothing : html`<h3>What goes into it</h3><ol>${before.map((step) => this.renderStep(step))}</ol>`}
      ${w.simpler === null
        ? nothing
        : html`<details>
            <summary>The simpler way: ${w.simpler.difference}</summary>
            <p class="note">By ${w.simpler.words}.</p>
            <ol>${w.simpler.steps.map((step: Step) => this.renderStep(shown(step)))}</ol>
          </details>`}
      ${w.rivals.length === 0 ? nothing : html`<h3>Other values</h3><ul>${w.rivals.map((rival) => html`<li>${rival.words}: ${rival.value}${rival.source === '' ? nothing : html`<span class="source">${rival.source}</span>`}</li>`)}</ul>`}
      ${w.assumptions.length === 0 ? nothing : html`<h3>Assumed</h3><ul>${w.assumptions.map((sentence) => html`<li>${sentence}</li>`)}</ul>`}
      ${w.accuracy === '' ? nothing : html`<h3>Accuracy</h3><p>${w.accuracy}</p>`}
    `;
  }

  private renderStep({ math, symbols, result, note }: ShownStep): TemplateResult {
    return html`<li class="step">
      <div class="formula">${mathTemplate(math, 'block')}</div>
      ${result === null ? nothing : html`<p class="comes">${mathTemplate(signNode(result.known))} = ${result.value} ${result.known.unit}</p>`}
      ${note === '' ? nothing : html`<p class="note">${note}</p>`}
      ${symbols.length === 0
        ? nothing
        : html`<table>
            <caption class="spoken">Values that go in</caption>
            <thead class="spoken"><tr><th scope="col">Sign</th><th scope="col">Value</th><th scope="col">Meaning and source</th></tr></thead>
            <tbody>${symbols.map(({ known, sign, value }, i) => html`<tr><th scope="row">${mathTemplate(sign)}</th><td class="number">${value} ${known.unit}</td><td>${known.words}<span class="source">${sourceWords(symbols, i)}</span></td></tr>`)}</tbody>
          </table>`}
    </li>`;
  }
}

/** Where a value stands; a work that was named for an earlier value of the same line is not named in full again. */
function sourceWords(symbols: ShownStep['symbols'], i: number): string {
  const text = originText(symbols[i].known.origin);
  const first = symbols.findIndex(({ known }) => originText(known.origin) === text);
  return first === i || symbols[i].known.origin.from !== 'source' ? text : `the same work as for ${mathText(symbols[first].sign)}`;
}

const signNode = (known: Known): ReturnType<typeof signOf> => signOf(known.sign);

/** A result that is not of this design, as between a change and its answer, has no workings. */
function tried(work: () => Workings): Workings | null {
  try {
    return work();
  } catch (error) {
    if (error instanceof RangeError) return null;
    throw error;
  }
}

/** The element that has the focus, through every shadow root. */
function focused(): HTMLElement | null {
  let at = document.activeElement;
  while (at?.shadowRoot?.activeElement) at = at.shadowRoot.activeElement;
  return at instanceof HTMLElement ? at : null;
}

customElements.define('hm-workings', HmWorkings);

declare global {
  interface HTMLElementTagNameMap {
    'hm-workings': HmWorkings;
  }
}
