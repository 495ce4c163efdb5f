import { differenceText, figureText } from './figure-text.ts';
import type { Cell, LedgerColumn, LedgerRow, LedgerTable, TableId } from './ledger.ts';

/** How a cell differs from the same one of another result. */
export interface CellDifference {
  /** of the other, as text */ other: string;
  /** present less other, as text with its sign; null for words, or where one has no figure */ change: string | null;
  /** change in per cent of the other; null where that says nothing: the other is zero, or the figure is an energy with an arbitrary zero */ percent: string | null;
}

/** Figures closer than this, relative to the larger, are the mesh's. */
const SAME = 1e-6;

/** Finds the row of the other result that stands for one: of the same name, and with equal names in the same order. */
export function partnerRow(table: LedgerTable, row: LedgerRow, others: readonly LedgerTable[]): LedgerRow | null {
  const other = others.find(({ id }) => id === table.id);
  const before = table.rows.filter(({ name, index }) => name === row.name && index < row.index).length;
  return other?.rows.filter(({ name }) => name === row.name)[before] ?? null;
}

/** @returns null where the two are the same */
export function cellDifference(column: LedgerColumn, cell: Cell, other: Cell): CellDifference | null {
  const text = other.lines.join(', ');
  // What reads the same is the same: a difference in digits that are not shown is the mesh's more often than not.
  if (cell.lines.join() === other.lines.join()) return null;
  if (column.kind === 'words' || typeof cell.value !== 'number' || typeof other.value !== 'number') return { other: text, change: null, percent: null };
  const change = cell.value - other.value;
  if (Math.abs(change) <= SAME * Math.max(Math.abs(cell.value), Math.abs(other.value))) return null;
  const percent = other.value === 0 ? null : (100 * change) / Math.abs(other.value);
  return { other: text, change: differenceText(change, 3), percent: percent === null ? null : `${percent > 0 ? '+' : ''}${figureText(percent, percentDigits(percent))} %` };
}

const percentDigits = (percent: number): number => (Math.abs(percent) >= 100 ? 3 : 2);

/** Rows that only one of the two results has, in words. */
export function loneRows(tables: readonly LedgerTable[], others: readonly LedgerTable[]): { id: TableId; here: string[]; there: string[] }[] {
  return tables.map((table) => {
    const other = others.find(({ id }) => id === table.id);
    const here = table.rows.filter((row) => partnerRow(table, row, others) === null).map(({ name }) => name);
    const there = (other?.rows ?? []).filter((row) => partnerRow(other!, row, tables) === null).map(({ name }) => name);
    return { id: table.id, here, there };
  }).filter(({ here, there }) => here.length + there.length > 0);
}
