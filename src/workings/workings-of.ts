import { ledgerTables } from '../result/ledger.ts';
import type { Result } from '../result/types.ts';
import type { Design } from '../design/types.ts';
import { assembled } from './assembled.ts';
import { contactWorkings } from './contact-workings.ts';
import { contextOf } from './context.ts';
import { junctionWorkings } from './junction-workings.ts';
import { layerWorkings } from './layer-workings.ts';
import type { Asked, Workings } from './workings.ts';

const TABLES = { layers: layerWorkings, junctions: junctionWorkings, contacts: contactWorkings };

/**
 * How a figure of the ledger comes about: the formulas with the values that went in, each with its source; the assumptions; what a simpler formula would give.
 *
 * @param design  the one that the result is of
 * @param set     values that were in force: variables by name, and "temperature"
 * @throws {RangeError} a result of another design, or a figure that the ledger does not have
 */
export function workingsOf(design: Design, result: Result, asked: Asked, set: Readonly<Record<string, string>> = {}): Workings {
  const table = ledgerTables(result).find(({ id }) => id === asked.table);
  const row = table?.rows.find(({ index }) => index === asked.index);
  const column = table?.columns.find(({ id }) => id === asked.column);
  const context = contextOf(design, result, set);
  const found = row === undefined ? null : TABLES[asked.table](context, asked.index, asked.column);
  if (row === undefined || column === undefined || found === null) throw new RangeError(`the ledger has no ${asked.column} in row ${asked.index} of ${asked.table}`);
  return assembled(found, context, { asked, title: `${column.heading} of ${asked.table === 'contacts' ? `the ${row.name} contact` : row.name}`, words: column.words, value: row.cells[column.id].lines, unit: column.unit });
}
