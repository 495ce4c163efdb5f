import { bandWords, majorityBarrier, rankingSentence, regimeOf, valueOf, valueWords } from '../contacts/metal-words.ts';
import { rankMetals, type RankAnswer, type RankOptions, type Ranking } from '../contacts/rank-metals.ts';
import { InputError } from '../design/complaint.ts';
import type { ContactInput, Design } from '../design/types.ts';
import { quoted } from '../quantity/wording.ts';
import { onOneLine } from '../requirements/verdict.ts';
import { decimalText, figureText } from '../result/figure-text.ts';
import { parseArguments } from './arguments.ts';
import { EXIT, JSON_OPTION, SET, TOLERANCES, UsageError, type Command, type Streams } from './command.ts';
import { readDesignFile } from './design-file.ts';
import { tolerancesOf } from './judged.ts';

const usage = 'metals FILE [--side top|bottom] [--set NAME=VALUE ...] [--tolerances all|stated|none] [--json]';
/** Least time between two lines of progress, ms. */
const BETWEEN_LINES = 200;

/** Ranks every metal on one end of the stack by its worst contact resistivity. */
export const metals: Command = {
  usage,
  summary: 'rank the metals on one end of the stack by their worst contact resistivity',
  options: [['--side WORD', 'top or bottom; by default the end that has a metal now, the top first'], SET, TOLERANCES, JSON_OPTION],
  notes: '',
  async run(args, streams) {
    const { file, set, options } = parseArguments(args, usage, { '--side': 'side', '--tolerances': 'tolerances' }, { '--json': 'json' });
    const design = await readDesignFile(file, streams);
    const side = sideOf(options.side, design);
    const answer = ranked(design, { side, set, tolerances: tolerancesOf(options.tolerances) }, streams);
    if (answer.kind === 'complaints') throw new InputError(answer.complaints);
    streams.out(options.json === undefined ? rankingText(answer, design[side]) : `${JSON.stringify(answer, null, 1)}\n`);
    return answer.rows.some(({ worst_ohm_cm2, blocks }) => worst_ohm_cm2 !== null || blocks !== null) ? EXIT.done : EXIT.noAnswer;
  },
};

/** The end asked for; by default the one that has a metal now, the top first. */
function sideOf(text: string | undefined, design: Design): RankOptions['side'] {
  if (text === 'top' || text === 'bottom') return text;
  if (text !== undefined) throw new UsageError(`--side is ${quoted(text)}; top or bottom would do`);
  return design.top.kind !== 'barrier' && design.bottom.kind === 'barrier' ? 'bottom' : 'top';
}

function ranked(design: Design, options: RankOptions, streams: Streams): RankAnswer {
  const steps = rankMetals(design, options);
  let shown = -Infinity;
  for (;;) {
    const step = steps.next();
    if (step.done) {
      if (shown > -Infinity) streams.progress?.('');
      return step.value;
    }
    const now = performance.now();
    if (now - shown < BETWEEN_LINES) continue;
    shown = now;
    streams.progress?.(`${step.value.done} of ${step.value.of} metals`);
  }
}

/** The ranking as a table in a terminal's fixed pitch, and the reasons of those without a figure. @param there  what is on this end now */
function rankingText(ranking: Ranking, there: ContactInput): string {
  const { rows, majority } = ranking;
  const heading = ['metal', `phi_B${majority} (eV)`, 'rho_c (ohm cm^2)', 'least ... most', 'worst', 'regime', 'barrier', 'worst at'];
  const known = rows.filter(({ reason }) => reason === null);
  const table = known.map((row) => [
    `${row.metal}${row.present ? ' *' : ''}`, decimalText(majorityBarrier(row, majority)), figureText(row.rho_c_ohm_cm2), bandWords(row), row.blocks === null ? figureText(row.worst_ohm_cm2) : 'blocks', regimeOf(row),
    barrierWords(row), row.worst_at ?? '–',
  ].map((cell) => onOneLine(cell).replace(/−/g, '-').replace('…', '...')));
  const widths = heading.map((text, i) => Math.max(text.length, ...table.map((cells) => cells[i].length)));
  const line = (cells: string[]): string => cells.map((cell, i) => (i === cells.length - 1 ? cell : cell.padEnd(widths[i]))).join('  ').trimEnd();
  return `${[
    onOneLine(rankingSentence(ranking)), '', line(heading), ...table.map(line),
    ...(known.some(({ present }) => present) ? ['', onOneLine(`* on the stack now${there.kind === 'barrier' && there.barrier !== undefined ? `, but with a barrier given as ${there.barrier}, which this table leaves out` : ''}`)] : []),
    ...(known.length < rows.length ? ['', 'without a figure:', ...rows.filter(({ reason }) => reason !== null).map(({ metal, reason }) => onOneLine(`  ${metal}: ${reason}`))] : []),
    ...ranking.notes.map((note) => onOneLine(`note: ${note}`)),
  ].join('\n')}\n`;
}

function barrierWords(row: Ranking['rows'][number]): string {
  const value = valueOf(row);
  if (value === null) return '–';
  const others = row.values.length - 1;
  return `${valueWords(value)}${others > 0 ? ` (${others} other${others === 1 ? '' : 's'})` : ''}`;
}
