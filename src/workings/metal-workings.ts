import type { BarrierValue } from '../contacts/barrier-values.ts';
import type { MetalPoint, MetalRow, Ranking } from '../contacts/rank-metals.ts';
import type { Design } from '../design/types.ts';
import type { PanelColumn } from '../quantity/panel-quantities.ts';
import type { Tolerances } from '../requirements/uncertainties.ts';
import { contactWorkings } from './contact-workings.ts';
import type { Context } from './context.ts';
import { againWords, cornerContext } from './corner.ts';
import { metalFigure } from './panel-figures.ts';
import type { Found } from './workings.ts';

/** A figure of a ranked metal, with the design in which the metals were ranked. */
export interface MetalAsked {
  table: 'metal';
  column: PanelColumn<'metal'>;
  design: Design;
  side: Ranking['side'];
  /** K, the design's own */ temperature_K: number;
  row: MetalRow;
  /** another value of the pair whose barrier is asked about; null: the one in use */ value: BarrierValue | null;
  tolerances: Tolerances;
}

const LEDGER = { barrierN: 'barrierN', barrierP: 'barrierP', rho: 'rhoC', least: 'rhoC', most: 'rhoC', worst: 'rhoC', e00OverKt: 'transport' } as const;

/** The metal put on the surface, solved at the design's temperature or at the corner that is asked about, and the ledger's own workings of it. */
export function metalWorkings({ column, design, side, temperature_K, row, value, tolerances }: MetalAsked): { found: Found; context: Context | null } {
  const nominal: MetalPoint = { temperature_K, tolerances: [] };
  const place = column === 'least' || column === 'most' || column === 'worst' ? row.points[column] : nominal;
  if (place === null) return { context: null, found: { steps: [], remarks: [`There is no figure: ${row.reason ?? 'it could not be worked out'}.`], rests: [] } };
  const corner = cornerContext({ ...design, [side]: (value ?? row).contact, requirements: [] }, place, {}, tolerances);
  if (typeof corner === 'string') return { context: null, found: { steps: [], remarks: [`There is no figure: ${corner}.`], rests: [] } };
  const { context, steps } = corner;
  const index = context.result.contacts.findIndex((c) => c.side === side);
  const found = contactWorkings(context, index, LEDGER[column])!;
  const shown = metalFigure(column, row);
  const now = context.result.contacts[index].rho_c_ohm_cm2;
  const solved = shown !== null && now !== null && column !== 'e00OverKt' && column !== 'barrierN' && column !== 'barrierP';
  const remarks = [...(column === 'worst' && row.worst_at !== null ? [`Worst at ${row.worst_at}, found among the corners of temperatures and tolerances.`] : column === 'least' || column === 'most' ? ['Found among the corners of the tolerances that move a contact on this surface.'] : []), ...(row.blocks !== null && (column === 'worst' || column === 'rho') ? ['It blocks there: what passes is too little for a finite resistivity.'] : []), ...(found.remarks ?? [])];
  return { context, found: { ...found, steps: [...steps, ...found.steps], remarks, accuracy: [found.accuracy ?? '', solved ? againWords(shown, { value: now, scale: 1 }) : ''].filter((text) => text !== '').join(' ') } };
}
