import type { Design } from '../design/types.ts';
import type { Result } from '../result/types.ts';
import { parameterWords } from '../parameters/parameter-words.ts';
import { parametersInUse, type ParameterRow } from './parameters.ts';
import { printedUnits } from '../quantity/printed-units.ts';
import { inParts, type Cell, type SheetTable } from './table.ts';

const CHECKED = { page: 'seen in print', memory: 'from memory of the work', computed: 'computed' } as const;
/** Values of one row, so that no row grows beyond a page and is cut. */
const MOST_VALUES = 12;

/** Every parameter in use, and the works that they stand in, numbered as they are first met. */
export function sourceTables(design: Design, result: Result): SheetTable[] {
  const rows = parametersInUse(design, result);
  const works = citedWorks(rows);
  const parameters: SheetTable = {
    title: 'Parameters in use and where they stand',
    note: 'Seen in print: the figure was read on the page cited. From memory: the work is cited from memory, look it up before you rely on the figure. Computed: derived from others, as the remark says. Own value: entered in this design.',
    columns: [{ heading: 'Of', align: 'start' }, { heading: 'Values', align: 'start', wide: true }, { heading: 'Source', align: 'start' }, { heading: 'Checked', align: 'start' }, { heading: 'Remark', align: 'start', wide: true }],
    rows: rows.flatMap((row) => {
      const source: Cell = [{ text: `[${works.indexOf(row.work) + 1}]` }];
      return inParts(row.values, MOST_VALUES).map((values): Cell[][] => [[[{ text: row.of }], [{ text: values.map(valueText).join('; ') }], source, [{ text: checkedWords(row) }], [{ text: printedUnits(row.origin.note) }]]]);
    }),
  };
  const cited: SheetTable = {
    title: 'Works cited',
    columns: [{ heading: 'No.', align: 'end' }, { heading: 'Work', align: 'start', wide: true }],
    rows: works.map((work, i) => [[[{ text: `[${i + 1}]` }], [{ text: work }]]]),
  };
  return [parameters, cited];
}

/** The works behind parameters in the order in which they are met: a work's number is its place. */
export function citedWorks(rows: readonly ParameterRow[]): string[] {
  return [...new Set(rows.map(({ work }) => work))];
}

function valueText({ path, text }: { path: string; text: string }): string {
  return `${parameterWords(path)} ${printedUnits(text)}`;
}

function checkedWords({ origin, own }: ParameterRow): string {
  if (own) return 'own value';
  if (origin.checked === null) return '–';
  return `${CHECKED[origin.checked]}${origin.confidence === '' || origin.confidence === 'high' ? '' : `, ${origin.confidence} confidence`}`;
}
