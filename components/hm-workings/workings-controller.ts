import { html, nothing, type ReactiveController, type ReactiveControllerHost, type TemplateResult } from 'lit';
import type { Design } from '../../src/design/types.ts';
import type { Result } from '../../src/result/types.ts';
import type { PanelFigure } from '../../src/workings/panel-figures.ts';
import type { Asked } from '../../src/workings/workings.ts';

const TABLES: readonly unknown[] = ['layers', 'junctions', 'contacts'];

/** A figure of the ledger by its place, or one of a panel that brings along what it is of. */
export type AskedFigure = Asked | PanelFigure;

/** Whether what an element told is a question for a figure's workings. */
function isAsked(told: unknown): told is AskedFigure {
  if (typeof told !== 'object' || told === null) return false;
  if ('asked' in told && 'text' in told) return true;
  const { table, index, column } = told as Record<string, unknown>;
  return TABLES.includes(table) && Number.isInteger(index) && typeof column === 'string';
}

/** Keeps which figure was asked for its workings. The panel that shows them is fetched at the first question. */
export class WorkingsController implements ReactiveController {
  private asked: AskedFigure | null = null;
  private there = false;
  private readonly host: ReactiveControllerHost;
  private readonly say: (text: string) => void;

  /** @param say  tells that the panel could not be fetched */
  constructor(host: ReactiveControllerHost, say: (text: string) => void) {
    this.host = host;
    this.say = say;
    host.addController(this);
  }

  hostConnected(): void {}

  async ask(asked: unknown): Promise<void> {
    if (!isAsked(asked)) return;
    try {
      await import('./hm-workings.ts');
    } catch {
      return this.say('The workings could not be fetched: reload the page to have them.');
    }
    this.there = true;
    this.asked = asked;
    this.host.requestUpdate();
  }

  render(design: Design, result: Result | null, stale: boolean): TemplateResult | typeof nothing {
    if (!this.there) return nothing;
    return html`<hm-workings .design=${design} .result=${result} .stale=${stale} .asked=${this.asked} @hm-closed=${this.closed}></hm-workings>`;
  }

  private readonly closed = (): void => {
    this.asked = null;
    this.host.requestUpdate();
  };
}
