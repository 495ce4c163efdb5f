import { readFile } from 'node:fs/promises';
import { createRequire } from 'node:module';
import type { FontFiles } from '../export/pdf.ts';
import { sheetPdf, sheetSvgs } from '../export/sheet-files.ts';
import { didYouMean, quoted } from '../quantity/wording.ts';
import { PAPERS, SHEET_STYLES } from '../sheet/look.ts';
import { reviewSheet } from '../sheet/review-sheet.ts';
import { parseArguments } from './arguments.ts';
import { EXIT, SET, TOLERANCES, UsageError, type Command } from './command.ts';
import { readDesignFile } from './design-file.ts';
import { takeFlags } from './flags.ts';
import { judged, tolerancesOf } from './judged.ts';
import { closeUpsOf, comparisonOf, cornerOf, workingsAsked } from './sheet-sections.ts';
import { solved } from './solved.ts';
import { writeWhole } from './write-file.ts';

const usage = 'sheet FILE -o OUT.pdf|OUT.svg [--set NAME=VALUE ...] [--style screen|slide|journal] [--paper A4|letter] [--author A] [--date D] [--revision R] [--tolerances all|stated|none] [--over FILE ...] [--worst-corner] [--contacts] [--workings FIGURE ...]';

/**
 * Solves a design, judges its requirements, and writes the review sheet: one PDF, or an SVG a page (OUT-1.svg, OUT-2.svg, ...). More sections where they are asked for: other designs laid over
 * this one, the plate at the worst corner, the contacts from near, the workings of figures.
 */
export const sheet: Command = {
  usage,
  summary: 'write the review sheet: plate, tables, requirements, sources',
  options: [
    ['-o OUT, --output OUT', 'a PDF, or an SVG a page (OUT-1.svg, OUT-2.svg, ...), each written whole or not at all'],
    ['--style WORD', 'screen (the default), slide, or journal (black and white)'],
    ['--paper WORD', 'A4 (the default) or letter'],
    ['--author A, --date D, --revision R', 'for the title block; no date is set unless it is given, so the same design gives the same bytes'],
    ['--over FILE', 'another design laid over this one, with what differs and what was changed; up to three times'],
    ['--worst-corner', 'the plate where the hardest requirement is at its worst'],
    ['--contacts', 'each metal contact from near'],
    ['--workings FIGURE', 'how a figure comes about, as an appendix; layers.cap.ecMinusEf, junctions.0.builtin, contacts.top.rhoC; any number of times'],
    SET, TOLERANCES,
  ],
  notes: '',
  async run(args, streams) {
    const known = { '-o': 'output', '--output': 'output', '--style': 'style', '--paper': 'paper', '--author': 'author', '--date': 'date', '--revision': 'revision', '--tolerances': 'tolerances' };
    const { rest, flags, repeated } = takeFlags(args, ['--worst-corner', '--contacts'], ['--over', '--workings'], Object.keys(known));
    const { file, set, options } = parseArguments(rest, usage, known);
    const { output, author = '', date = '', revision = '' } = options;
    if (output === undefined) throw new UsageError('no output is named; write -o OUT.pdf or -o OUT.svg');
    const ending = /\.(pdf|svg)$/i.exec(output)?.[1].toLowerCase();
    if (ending === undefined) throw new UsageError(`${quoted(output)} ends in neither .pdf nor .svg, the two forms that are written`);
    const style = one('--style', options.style, SHEET_STYLES);
    const paper = one('--paper', options.paper, PAPERS);
    const tolerances = tolerancesOf(options.tolerances);
    const design = await readDesignFile(file, streams);
    const result = solved(design, set, streams);
    if (result === null) return EXIT.noAnswer;
    const requirements = judged(design, set, tolerances);
    const of = { design, result, set, requirements, tolerances };
    const comparison = await comparisonOf(file, repeated['--over'], streams);
    if (comparison === null) return EXIT.noAnswer;
    const pages = reviewSheet({
      ...of, author, date, revision, style, paper, comparison, workings: workingsAsked(of, repeated['--workings']),
      ...(flags.has('--worst-corner') ? { corner: cornerOf(of) } : {}), ...(flags.has('--contacts') ? { closeUps: closeUpsOf(of) } : {}),
    });
    if (ending === 'pdf') await writeWhole(output, sheetPdf(pages, await installedFonts(), { title: design.title, author, provenance: result.provenance }));
    else for (const { name, text } of sheetSvgs(pages, output.slice(0, -'.svg'.length))) await writeWhole(name, text);
    return EXIT.done;
  },
};

/** The first of `words` where nothing is said; capitals do not count. */
function one<W extends string>(option: string, value: string | undefined, words: readonly W[]): W {
  if (value === undefined) return words[0];
  const found = words.find((word) => word.toLowerCase() === value.toLowerCase());
  if (found === undefined) throw new UsageError(`${option} is ${quoted(value)}; ${words.join(', ')} would do${didYouMean(value, words)}`);
  return found;
}

/** The faces as they are installed beside the other packages. */
async function installedFonts(): Promise<FontFiles> {
  const packages = createRequire(import.meta.url);
  try {
    const [normal, bold] = await Promise.all(['DejaVuSans', 'DejaVuSans-Bold'].map((name) => readFile(packages.resolve(`dejavu-fonts-ttf/ttf/${name}.ttf`))));
    return { normal, bold };
  } catch {
    throw new UsageError('the letters of the PDF are not installed; run npm ci, or write -o OUT.svg');
  }
}
