import { ledgerTables, tableTsv } from '../result/ledger.ts';
import type { Result } from '../result/types.ts';

/**
 * The whole ledger as tab-separated text for a spreadsheet: the tables of layers, junctions (where there are any) and contacts with all their columns, an empty line between them.
 * A heading row with units each; empty cells where a figure does not apply.
 */
export function ledgerTsv(result: Result): string {
  return `${ledgerTables(result).map((table) => tableTsv(table)).join('\n\n')}\n`;
}
