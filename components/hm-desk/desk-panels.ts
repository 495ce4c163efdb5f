import { html, type TemplateResult } from 'lit';
import type { Complaint } from '../../src/design/complaint.ts';
import type { Design } from '../../src/design/types.ts';
import type { Variant } from '../../src/drawing/marks/variants.ts';
import { ownRows, type OwnRows } from '../../src/parameters/own-entries.ts';
import type { Result } from '../../src/result/types.ts';
import type { RunJob } from '../../src/workers/job-client.ts';
import type { LedgerView } from '../hm-ledger/hm-ledger.ts';
import type { MetalsView } from '../hm-metals/hm-metals.ts';
import type { Verdicts } from '../hm-requirements/hm-requirements.ts';
import type { MapView } from '../hm-map/map-view.ts';
import type { SizingView } from '../hm-sizing/sizing-view.ts';
import type { SweepsView } from '../hm-sweeps/sweeps-view.ts';
import type { TolerancesView } from '../hm-tolerances/tolerances-view.ts';
import type { VariantsShown } from '../hm-variants/variants-shown.ts';
import type { HalfmarkEvents } from '../shared/events.ts';

/** Everything that a panel may be handed. Each takes what it shows and fires the page's own events. */
export interface DeskContext {
  design: Design;
  complaints: readonly Complaint[];
  result: Result | null;
  /** the result belongs to an earlier design */ stale: boolean;
  /** of the project; a panel keeps entries under its own key and changes them by hm-view */ view: Readonly<Record<string, unknown>>;
  chosen: HalfmarkEvents['hm-choose'];
  verdicts: Verdicts;
  variants: VariantsShown;
  /** the variant that the ledger compares with, once it is solved */ against: Variant | null;
  /** starts a job in a worker of its own */ run: RunJob;
  /** 'light' or 'dark', for drawings */ styleName: 'light' | 'dark';
  /** requirement that a variable is to be sized for, counted anew at each wish; null before the first */ sizeFor: { requirement: number; wish: number } | null;
}

/** A panel of the desk. A further one is a row here: its element is fetched when its tab is first opened. */
export interface DeskPanel {
  id: string;
  title: string;
  load(): Promise<unknown>;
  draw(context: DeskContext): TemplateResult;
  /** a short remark behind the title, for what must be seen while another tab is open */ remark?(context: DeskContext): { text: string; trouble: boolean } | null;
}

const known = new WeakMap<Design, OwnRows>();

/** The same object for the same design: the ledger is not drawn anew at every move of the pointer. */
function rowsOfOwn(design: Design): OwnRows {
  const rows = known.get(design) ?? ownRows(design);
  known.set(design, rows);
  return rows;
}

export const DESK_PANELS: readonly DeskPanel[] = [
  {
    id: 'ledger',
    title: 'Ledger',
    load: () => import('../hm-ledger/hm-ledger.ts'),
    draw: ({ design, result, view, chosen, stale, against }) => html`<hm-ledger .result=${result} .own=${rowsOfOwn(design)} .against=${against} .view=${(view.ledger ?? {}) as LedgerView} .chosen=${chosen} .stale=${stale} .workings=${true}></hm-ledger>`,
  },
  {
    id: 'requirements',
    title: 'Requirements',
    load: () => import('../hm-requirements/hm-requirements.ts'),
    draw: ({ design, complaints, verdicts }) => html`<hm-requirements .design=${design} .complaints=${complaints} .verdicts=${verdicts}></hm-requirements>`,
    remark: ({ verdicts: { rows, stale, status } }) => {
      if (rows.length === 0 || stale || status !== 'complete') return null;
      const unmet = rows.filter((row) => !row.met).length;
      return unmet === 0 ? { text: 'all met', trouble: false } : { text: `${unmet} not met`, trouble: true };
    },
  },
  {
    id: 'sizing',
    title: 'Sizing',
    load: () => import('../hm-sizing/hm-sizing.ts'),
    draw: ({ design, complaints, view, run, sizeFor, styleName }) => html`<hm-sizing .design=${design} .complaints=${complaints} .view=${(view.sizing ?? {}) as SizingView} .run=${run} .wish=${sizeFor} .styleName=${styleName}></hm-sizing>`,
  },
  {
    id: 'contacts',
    title: 'Contacts',
    load: () => import('../hm-contacts/hm-contacts.ts'),
    draw: ({ design, complaints, result, stale, view, run, styleName }) => html`<hm-contacts .design=${design} .complaints=${complaints} .result=${result} .stale=${stale} .view=${(view.metals ?? {}) as MetalsView} .run=${run} .styleName=${styleName}></hm-contacts>`,
  },
  {
    id: 'sweeps',
    title: 'Sweeps',
    load: () => import('../hm-sweeps/hm-sweeps.ts'),
    draw: ({ design, result, view, styleName }) => html`<hm-sweeps .design=${design} .result=${result} .view=${(view.sweeps ?? {}) as SweepsView} .styleName=${styleName}></hm-sweeps>`,
  },
  {
    id: 'map',
    title: 'Regime map',
    load: () => import('../hm-map/hm-map.ts'),
    draw: ({ design, view, chosen, styleName }) => html`<hm-map .design=${design} .view=${(view.map ?? {}) as MapView} .chosen=${chosen} .styleName=${styleName}></hm-map>`,
  },
  {
    id: 'tolerances',
    title: 'Tolerances',
    load: () => import('../hm-tolerances/hm-tolerances.ts'),
    draw: ({ design, complaints, view, styleName }) => html`<hm-tolerances .design=${design} .complaints=${complaints} .view=${(view.tolerances ?? {}) as TolerancesView} .styleName=${styleName}></hm-tolerances>`,
  },
  {
    id: 'variants',
    title: 'Variants',
    load: () => import('../hm-variants/hm-variants.ts'),
    draw: ({ variants }) => html`<hm-variants .shown=${variants}></hm-variants>`,
    remark: ({ variants: { all, over } }) => {
      const there = all.list.filter(({ removed }) => !removed).length;
      return there < 2 ? null : { text: `${all.list.find(({ id }) => id === all.open)!.name}${over.length > 0 ? `, ${over.length} over the plate` : `, ${there - 1} more`}`, trouble: false };
    },
  },
  {
    id: 'parameters',
    title: 'Parameters',
    load: () => import('../hm-parameters/hm-parameters.ts'),
    draw: ({ design, complaints }) => html`<hm-parameters .design=${design} .complaints=${complaints}></hm-parameters>`,
    remark: ({ design: { custom = {} } }) => {
      const own = (custom.materials?.length ?? 0) + (custom.dopants?.length ?? 0) + (custom.metals?.length ?? 0) + (custom.offsets?.length ?? 0);
      return own === 0 ? null : { text: own === 1 ? '1 own entry' : `${own} own entries`, trouble: false };
    },
  },
];
