import { ledgerTables, type LedgerTable } from '../result/ledger.ts';
import { figureText } from '../result/figure-text.ts';
import { requirementQuantity, type RequirementQuantityName } from '../design/requirement-quantities.ts';
import { writeNumber } from '../quantity/write-quantity.ts';
import { BLOCKS, marginWords, unansweredWords, verdictWords } from '../requirements/verdict.ts';
import type { RequirementResult, Result } from '../result/types.ts';
import { printedUnits } from '../quantity/printed-units.ts';
import { heldTogether } from './lines.ts';
import type { Cell, SheetTable } from './table.ts';

/** Columns of the ledger that say more than its usual ones do, for a review. */
const ALSO: Record<LedgerTable['id'], readonly string[]> = { layers: ['gap'], junctions: [], contacts: [] };
const TITLES: Record<LedgerTable['id'], string> = { layers: 'Layers as solved', junctions: 'Junctions', contacts: 'Contacts' };

/** The ledger's tables on paper. A column without one figure in it is named under the heading instead of taking room. */
export function resultTables(result: Result): SheetTable[] {
  return ledgerTables(result).map((table) => {
    const wanted = table.columns.filter((c) => c.usual || ALSO[table.id].includes(c.id));
    const columns = wanted.filter((c) => table.rows.some((row) => row.cells[c.id].value !== null));
    const without = wanted.filter((c) => !columns.includes(c));
    return {
      title: TITLES[table.id],
      note: without.length === 0 ? undefined : `Without a figure here: ${without.map((c) => c.heading).join(', ')}.`,
      columns: [{ heading: table.of.replace(/^./, (first) => first.toUpperCase()), align: 'start' }, ...columns.map((c) => ({ heading: heldTogether(c.heading), unit: c.unit === '' ? undefined : c.unit, align: c.kind === 'figure' && c.id !== 'ionised' ? ('end' as const) : ('start' as const) }))],
      rows: table.rows.map((row) => [[
        [{ text: row.name }],
        ...columns.map((c): Cell => {
          const { lines, note } = row.cells[c.id];
          return [...lines.map((text) => ({ text })), ...(note === undefined ? [] : [{ text: note, faint: true }])];
        }),
      ]]),
    };
  });
}

/** The requirements with their worst cases; null without any. */
export function requirementTable(rows: readonly RequirementResult[], at: { temperature: string; range: string | null }): SheetTable | null {
  if (rows.length === 0) return null;
  return {
    title: 'Requirements',
    columns: [
      { heading: 'Quantity', align: 'start' }, { heading: 'Of', align: 'start' }, { heading: 'Limit', align: 'start' }, { heading: 'Over', align: 'start' },
      { heading: 'Worst case', align: 'start' }, { heading: 'Where that is', align: 'start', wide: true }, { heading: 'Margin', align: 'start' }, { heading: 'Verdict', align: 'start' },
    ],
    rows: rows.map((row) => {
      const verdict = verdictWords(row);
      const { words } = requirementQuantity(row.quantity as RequirementQuantityName);
      const unit = row.unit === '' ? '' : ` ${printedUnits(row.unit)}`;
      const value = (v: number | boolean): string => (typeof v === 'boolean' ? (v ? 'yes' : 'no') : `${figureText(v)}${unit}`);
      const limit = typeof row.limit === 'boolean' ? (row.limit ? 'must be' : 'must not be') : `${row.bound === 'max' ? '≤' : '≥'} ${printedUnits(writeNumber(row.limit, 6))}${unit}`;
      const remarks = [
        ...(row.corners_sufficed ? [] : ['worse inside the ranges than at their corners']),
        ...(row.unanswered === null ? [] : [printedUnits(unansweredWords(row) as string)]),
      ];
      return [[
        [{ text: heldTogether(words.replace(' - ', ' − ')) }],
        [{ text: row.of }],
        [{ text: limit }],
        [{ text: row.over === 'temperatureRange' && at.range !== null ? at.range : at.temperature }],
        [{ text: row.blocks ? BLOCKS : row.worst === null ? '–' : value(row.worst) }],
        [{ text: row.at === null ? '–' : printedUnits(row.at.words) }, ...remarks.map((text) => ({ text, faint: true }))],
        [{ text: row.worst === null && !row.blocks ? '–' : printedUnits(marginWords(row)) }],
        [{ text: verdict.replace(' ', '\u00a0'), bold: true, trouble: verdict !== 'met' }],
      ]];
    }),
  };
}
