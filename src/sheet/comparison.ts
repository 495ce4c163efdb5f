import type { Variant } from '../drawing/marks/variants.ts';
import type { Design } from '../design/types.ts';
import { cellDifference, loneRows, partnerRow } from '../result/ledger-difference.ts';
import { ledgerTables, type LedgerTable } from '../result/ledger.ts';
import type { Result } from '../result/types.ts';
import { changeLog } from '../state/change-log.ts';
import { printedUnits } from '../quantity/printed-units.ts';
import { heldTogether } from './lines.ts';
import type { Cell, SheetTable } from './table.ts';

/** Another design laid beside the sheet's own: a variant of the project, or a file. */
export interface SheetVariant extends Variant {
  design: Design;
}

/** More lines than these on one plate are not told apart. */
export const MOST_VARIANTS = 3;

/** Where each of the other results comes from. */
export function originTable(base: { name: string; result: Result }, variants: readonly SheetVariant[]): SheetTable {
  return {
    title: 'Laid over each other',
    columns: [{ heading: 'Name', align: 'start' }, { heading: 'Title', align: 'start', wide: true }, { heading: 'Temperature', unit: 'K', align: 'end' }, { heading: 'Design', align: 'start' }],
    rows: [base, ...variants].map(({ name, result }) => [[[{ text: name }], [{ text: result.title }], [{ text: String(Number(result.conditions.temperature_K.toPrecision(6))) }], [{ text: result.provenance.design }]]]),
  };
}

/**
 * Every usual figure in which one of the variants differs: the sheet's own value, and of each variant its value with the change and the per cent of the sheet's own. Rows that read the
 * same stay out.
 */
export function differenceTable(base: { name: string; result: Result }, variants: readonly SheetVariant[]): SheetTable {
  const tables = ledgerTables(base.result);
  const others = variants.map((variant) => ledgerTables(variant.result));
  const lone = others.flatMap((other, v) => loneRows(tables, other).flatMap(({ here, there }) => [
    ...(here.length > 0 ? [`${here.join(', ')} only in ${base.name}.`] : []),
    ...(there.length > 0 ? [`${there.join(', ')} only in ${variants[v].name}.`] : []),
  ]));
  // With two others there is room for a column each of change and per cent; with three they share one.
  const apart = variants.length < 3;
  const rows = tables.flatMap((table) => table.rows.flatMap((row) => table.columns.filter((column) => column.usual || ALSO.includes(column.id)).flatMap((column): Cell[][][] => {
    const cell = row.cells[column.id];
    const beside = others.map((other) => {
      const there = other.find(({ id }) => id === table.id);
      const partner = there && partnerRow(table, row, other);
      return partner ? { cell: partner.cells[column.id], change: cellDifference(column, partner.cells[column.id], cell) } : null;
    });
    if (beside.every((found) => found === null || found.change === null)) return [];
    return [[[
      [{ text: nameOf(table, row.name) }],
      [{ text: `${heldTogether(column.heading)}${column.unit === '' ? '' : ` (${column.unit})`}` }],
      cell.lines.map((text) => ({ text })),
      ...beside.flatMap((found): Cell[] => {
        if (found === null) return apart ? [DASH, DASH, DASH] : [DASH, DASH];
        if (found.change === null) return apart ? [[{ text: 'the same', faint: true }], [], []] : [[{ text: 'the same', faint: true }], []];
        const value = found.cell.lines.map((text) => ({ text }));
        const { change, percent } = found.change;
        return apart ? [value, words(change), words(percent)] : [value, [...words(change), ...words(percent)]];
      }),
    ]]];
  })));
  return {
    title: `What is different from ${base.name}`,
    note: [`Change: the value less that of ${base.name}; per cent of it.`, ...lone].join(' '),
    columns: [
      { heading: 'Of', align: 'start' }, { heading: 'Figure', align: 'start' }, { heading: base.name, align: 'end' },
      ...variants.flatMap(({ name }) => [name, ...(apart ? ['change', 'per cent'] : ['change, per cent'])].map((heading) => ({ heading, align: 'end' as const }))),
    ],
    rows: rows.length > 0 ? rows : [[[[{ text: 'No figure reads differently.' }]]]],
  };
}

const DASH: Cell = [{ text: '–' }];
/** Columns of the ledger that are compared besides its usual ones. */
const ALSO: readonly string[] = ['thickness', 'gap'];

const words = (text: string | null): Cell => (text === null ? [] : [{ text }]);

function nameOf(table: LedgerTable, name: string): string {
  return table.id === 'contacts' ? `${name} contact` : name;
}

/** What leads from the sheet's own design to a variant, a sentence each. */
export function changeSentences(base: Design, variant: Design): string[] {
  const log = changeLog(base, variant).map(printedUnits);
  return log.length > 0 ? log : ['The two designs are the same.'];
}
