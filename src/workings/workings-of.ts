import { ledgerTables } from '../result/ledger.ts';
import type { Result } from '../result/types.ts';
import type { Design } from '../design/types.ts';
import { assumptionsInForce } from './assumptions.ts';
import { contactWorkings } from './contact-workings.ts';
import { contextOf } from './context.ts';
import { junctionWorkings } from './junction-workings.ts';
import { layerWorkings } from './layer-workings.ts';
import { shown, type Step } from './step.ts';
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
  const q = result.quality;
  return {
    asked,
    title: `${column.heading} of ${asked.table === 'contacts' ? `the ${row.name} contact` : row.name}`,
    words: column.words,
    value: row.cells[column.id].lines,
    unit: column.unit,
    steps: distinct(found.steps),
    remarks: found.remarks ?? [],
    assumptions: assumptionsInForce(context, found.rests),
    simpler: found.simpler ? { ...found.simpler, steps: distinct(found.simpler.steps) } : null,
    accuracy: [found.solved ? `The solved potential is good to ${(1000 * q.mesh_error_V).toPrecision(2)} mV by the estimate of the mesh (${q.mesh_nodes} nodes); charge is balanced to ${q.gauss_error.toExponential(0).replace('e-', 'e−')}.` : found.steps.some(({ kind }) => kind === 'equation') ? 'Worked out from local charge neutrality, which is closed to rounding: no mesh error enters.' : found.steps.length > 0 ? 'Worked out from local values: no mesh error enters.' : '', found.accuracy ?? ''].filter((text) => text !== '').join(' '),
    rivals: found.rivals ?? [],
  };
}

/** Two parts of a figure may need the same line: the first stands. */
function distinct(steps: readonly Step[]): Step[] {
  const seen = new Set<string>();
  return steps.filter((s) => {
    const { text, symbols, result } = shown(s);
    const key = JSON.stringify([text, result?.value, symbols.map(({ known, value }) => [known.path, value])]);
    return !seen.has(key) && seen.add(key);
  });
}
