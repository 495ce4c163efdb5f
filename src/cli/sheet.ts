import { readFile, writeFile } from 'node:fs/promises';
import { createRequire } from 'node:module';
import type { FontFiles } from '../export/pdf.ts';
import { sheetPdf, sheetSvgs } from '../export/sheet-files.ts';
import { didYouMean, quoted } from '../quantity/wording.ts';
import { PAPERS, SHEET_STYLES } from '../sheet/look.ts';
import { reviewSheet } from '../sheet/review-sheet.ts';
import { parseArguments } from './arguments.ts';
import { EXIT, UsageError, type Command } from './command.ts';
import { readDesignFile } from './design-file.ts';
import { judged, tolerancesOf } from './judged.ts';
import { solved } from './solved.ts';

const usage = 'sheet FILE -o OUT.pdf|OUT.svg [--set NAME=VALUE ...] [--style screen|slide|journal] [--paper A4|letter] [--author A] [--date D] [--revision R] [--tolerances all|stated|none]';

/** Solves a design, judges its requirements, and writes the review sheet: one PDF, or an SVG a page (OUT-1.svg, OUT-2.svg, ...). */
export const sheet: Command = {
  usage,
  summary: 'write the review sheet: plate, tables, requirements, sources',
  async run(args, streams) {
    const known = { '-o': 'output', '--output': 'output', '--style': 'style', '--paper': 'paper', '--author': 'author', '--date': 'date', '--revision': 'revision', '--tolerances': 'tolerances' };
    const { file, set, options } = parseArguments(args, usage, known);
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
    const pages = reviewSheet({ design, result, requirements: judged(design, set, tolerances), tolerances, set, author, date, revision, style, paper });
    if (ending === 'pdf') await write(output, sheetPdf(pages, await installedFonts(), { title: design.title, author, provenance: result.provenance }));
    else for (const { name, text } of sheetSvgs(pages, output.slice(0, -'.svg'.length))) await write(name, text);
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

async function write(file: string, content: string | Uint8Array): Promise<void> {
  try {
    await writeFile(file, content);
  } catch (error) {
    throw new UsageError(`${quoted(file)} cannot be written (${(error as NodeJS.ErrnoException).code ?? 'unknown reason'})`);
  }
}
