/**
 * The ledger as data: what a row, a column and a cell of it are. Tables of the layers, the junctions and the contacts, made from a result.
 *
 * A cell keeps the number beside its text, so that sorting and copying never read a rounded text back.
 */
import { textCell } from '../export/text-cell.ts';
import { contactColumns } from './ledger-contacts.ts';
import { junctionColumns } from './ledger-junctions.ts';
import { layerColumns } from './ledger-layers.ts';
import type { Result } from './types.ts';

export type TableId = 'layers' | 'junctions' | 'contacts';

export interface Cell {
  /** lines as shown; one as a rule, one a dopant for the ionised shares */ lines: string[];
  /** in the column's unit; what sorting compares; null sorts last */ value: number | string | null;
  /** says more than the figure can; shown small beside it */ note?: string;
}

export interface Column<Row> {
  id: string;
  /** short heading, symbols of the field: "Ec − EF" */ heading: string;
  /** the heading in words */ words: string;
  /** empty for words and pure numbers */ unit: string;
  kind: 'words' | 'figure';
  /** shown before anyone has chosen columns */ usual: boolean;
  cell(row: Row, result: Result): Cell;
}

export interface LedgerColumn extends Omit<Column<unknown>, 'cell'> {}

export interface LedgerRow {
  /** place in the result's list of that kind, whatever the order shown */ index: number;
  name: string;
  cells: Record<string, Cell>;
}

export interface LedgerTable {
  id: TableId;
  title: string;
  /** heading of the rows' names */ of: string;
  columns: LedgerColumn[];
  rows: LedgerRow[];
}

export function ledgerTables(result: Result): LedgerTable[] {
  const tables = [
    table('layers', 'Layers', 'layer', layerColumns, result.layers, (layer) => layer.name, result),
    table('junctions', 'Junctions', 'junction', junctionColumns, result.junctions, (j) => `${j.above} / ${j.below}`, result),
    table('contacts', 'Contacts', 'contact', contactColumns, result.contacts, (c) => c.side, result),
  ];
  return tables.filter((t) => t.rows.length > 0);
}

function table<Row>(id: TableId, title: string, of: string, columns: Column<Row>[], rows: Row[], nameOf: (row: Row) => string, result: Result): LedgerTable {
  return {
    id,
    title,
    of,
    columns: columns.map(({ cell: _, ...column }) => column),
    rows: rows.map((row, index) => ({ index, name: nameOf(row), cells: Object.fromEntries(columns.map((c) => [c.id, c.cell(row, result)])) })),
  };
}

export interface Order {
  /** a column's id, or "" for the rows' own order (top to bottom) */ column: string;
  descending: boolean;
}

/** Rows in an order; equal rows keep their place in the stack, cells without a figure come last either way. */
export function sortedRows(table: LedgerTable, order: Order): LedgerRow[] {
  const sign = order.descending ? -1 : 1;
  if (order.column === '') return order.descending ? [...table.rows].reverse() : [...table.rows];
  return [...table.rows].sort((a, b) => {
    const [x, y] = [a.cells[order.column]?.value ?? null, b.cells[order.column]?.value ?? null];
    if (x === null || y === null) return (x === null ? 1 : 0) - (y === null ? 1 : 0) || a.index - b.index;
    const compared = typeof x === 'number' && typeof y === 'number' ? x - y : String(x).localeCompare(String(y));
    return sign * compared || a.index - b.index;
  });
}

/**
 * The table as tab-separated text: units in the heading row, figures with all the digits that a spreadsheet can use, rows and columns as shown.
 */
export function tableTsv(table: LedgerTable, columns: LedgerColumn[] = table.columns, rows: LedgerRow[] = table.rows): string {
  const heading = [table.of, ...columns.map((c) => (c.unit === '' ? c.heading : `${c.heading} (${c.unit})`))];
  const lines = rows.map((row) => [row.name, ...columns.map((c) => plainCell(row.cells[c.id]))]);
  return [heading, ...lines].map((line) => line.map(field).join('\t')).join('\n');
}

function plainCell(cell: Cell): string {
  if (typeof cell.value === 'number') return Number.isFinite(cell.value) ? String(Number(cell.value.toPrecision(7))) : '';
  return cell.value === null ? '' : cell.value;
}

/** Figures stay figures; a name must not leave its field, nor be taken for a formula. */
function field(text: string): string {
  return text !== '' && Number.isFinite(Number(text)) ? text.trim() : textCell(text);
}

/** One line on how good the answer is. */
export function qualityLine(result: Result): string {
  const q = result.quality;
  const error = q.mesh_error_V * 1000;
  return `${q.converged ? 'Accepted' : 'Not accepted'}: mesh error ${error < 0.001 ? 'below 0.001' : error.toPrecision(2)} mV on ${q.mesh_nodes} nodes, charge balanced to ${q.gauss_error.toExponential(0).replace('e-', 'e−')}, ${q.newton_updates} Newton ${q.newton_updates === 1 ? 'update' : 'updates'}.`;
}
