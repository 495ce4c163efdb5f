import { basename } from 'node:path';
import { closeUps } from '../contacts/close-up.ts';
import { InputError } from '../design/complaint.ts';
import type { Design } from '../design/types.ts';
import { didYouMean, quoted } from '../quantity/wording.ts';
import { hardest, solveCorner } from '../requirements/corner.ts';
import type { Tolerances } from '../requirements/uncertainties.ts';
import { ledgerTables, type LedgerTable } from '../result/ledger.ts';
import type { RequirementResult, Result } from '../result/types.ts';
import { MOST_VARIANTS } from '../sheet/comparison.ts';
import type { SheetInput } from '../sheet/review-sheet.ts';
import { workingsOf } from '../workings/workings-of.ts';
import type { Asked } from '../workings/workings.ts';
import { UsageError, type Streams } from './command.ts';
import { readDesignFile } from './design-file.ts';
import { solved } from './solved.ts';

/** What the sheet is of. */
interface Of {
  design: Design;
  result: Result;
  set: Record<string, string>;
  requirements: readonly RequirementResult[];
  tolerances: Tolerances;
}

/**
 * Designs in other files, solved, to be laid over the sheet's own. Each goes by the name of its file.
 *
 * @returns null after saying why one of them has no accepted answer
 */
export async function comparisonOf(file: string, others: readonly string[], streams: Streams): Promise<SheetInput['comparison'] | null> {
  if (others.length === 0) return undefined;
  if (others.length > MOST_VARIANTS) throw new UsageError(`--over names ${others.length} designs; no more than ${MOST_VARIANTS} can be told apart on one plate`);
  const variants: NonNullable<SheetInput['comparison']>['variants'][number][] = [];
  for (const other of others) {
    const design = await readDesignFile(other, streams);
    const result = solved(design, {}, streams);
    if (result === null) return null;
    variants.push({ name: stem(other), design, result });
  }
  return { base: stem(file), variants };
}

function stem(file: string): string {
  return file === '-' ? 'standard input' : basename(file).replace(/(\.halfmark)?\.json$/i, '');
}

/** The stack where the hardest of the requirements is at its worst. */
export function cornerOf({ design, set, requirements, tolerances }: Of): SheetInput['corner'] {
  const row = hardest(requirements);
  if (row === null) throw new UsageError(`--worst-corner needs a requirement with a worst case, and ${requirements.length === 0 ? 'the design states none' : 'none of them has one'}`);
  const answer = solveCorner(design, row, { set, tolerances });
  if (answer.kind === 'none') throw new UsageError(`the worst corner has no picture: ${answer.reason}`);
  return answer.corner;
}

/** The metal contacts from near. */
export function closeUpsOf({ design, set }: Of): SheetInput['closeUps'] {
  const answer = closeUps(design, { set });
  if (answer.kind === 'complaints') throw new InputError(answer.complaints);
  if (answer.kind === 'refused') throw new UsageError(`the contacts have no picture: ${answer.reason}`);
  if (answer.contacts.length === 0) throw new UsageError('--contacts needs a metal contact, and the design has none');
  return answer.contacts;
}

/** The workings of figures of the ledger, named "layers.cap.sheet", "junctions.0.builtin", "contacts.top.rhoC". */
export function workingsAsked({ design, result, set }: Of, paths: readonly string[]): SheetInput['workings'] {
  const tables = ledgerTables(result);
  return paths.map((path) => workingsOf(design, result, askedFor(path, tables), set));
}

/** Names of layers may hold dots: the column is what stands behind the last one. */
function askedFor(path: string, tables: readonly LedgerTable[]): Asked {
  const known = tables.flatMap((table) => table.rows.flatMap((row) => table.columns.map((column) => ({
    path: `${table.id}.${table.id === 'junctions' ? row.index : row.name}.${column.id}`, asked: { table: table.id, index: row.index, column: column.id },
  }))));
  const byIndex = /^layers\.(\d+)\.(\w+)$/.exec(path);
  const found = known.find((k) => k.path === path) ?? (byIndex ? known.find(({ asked }) => asked.table === 'layers' && asked.index === Number(byIndex[1]) && asked.column === byIndex[2]) : undefined);
  if (!found) throw new UsageError(`there is no figure ${quoted(path)} to show the workings of${didYouMean(path, known.map((k) => k.path)) || `; ${known[0].path} would do`}`);
  return found.asked;
}
