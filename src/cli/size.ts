import { InputError } from '../design/complaint.ts';
import { quoted } from '../quantity/wording.ts';
import { size as sizeDesign, type SizedAnswer, type SizedEdge } from '../requirements/size.ts';
import { onOneLine, requirementWords, standingWords } from '../requirements/verdict.ts';
import { parseArguments } from './arguments.ts';
import { EXIT, UsageError, type Command } from './command.ts';
import { readDesignFile } from './design-file.ts';
import { tolerancesOf } from './judged.ts';

const usage = 'size FILE --variable NAME [--from A --to B] [--points N] [--set NAME=VALUE ...] [--tolerances all|stated|none] [--json]';
const POINTS = { least: 5, most: 1000 };

/** Finds the values of a variable that meet every requirement in its worst case. */
export const size: Command = {
  usage,
  summary: 'find the values of a variable that meet every requirement',
  async run(args, streams) {
    const { file, set, options } = parseArguments(args, usage, { '--variable': 'variable', '--from': 'from', '--to': 'to', '--points': 'points', '--tolerances': 'tolerances' }, { '--json': 'json' });
    const { variable, from, to } = options;
    if (variable === undefined) throw new UsageError(`no variable is named; usage: halfmark ${usage}`);
    const answer = sizeDesign(await readDesignFile(file, streams), {
      variable, set, tolerances: tolerancesOf(options.tolerances),
      ...(from === undefined ? {} : { from }), ...(to === undefined ? {} : { to }), ...(options.points === undefined ? {} : { points: pointsOf(options.points) }),
    });
    if (answer.kind === 'complaints') throw new InputError(answer.complaints);
    streams.out(options.json === undefined ? sizedText(answer) : `${JSON.stringify(answer, null, 1)}\n`);
    if (answer.intervals.length > 0) return EXIT.done;
    if (answer.best !== null) return EXIT.requirementNotMet;
    streams.error(`halfmark: no accepted answer at any value of ${answer.variable}: ${onOneLine(answer.refusal ?? 'a figure is missing')}\n`);
    return EXIT.noAnswer;
  },
};

function pointsOf(text: string): number {
  const points = Number(text);
  if (!Number.isInteger(points) || points < POINTS.least || points > POINTS.most) throw new UsageError(`--points is ${quoted(text)}; a whole number from ${POINTS.least} to ${POINTS.most} would do`);
  return points;
}

/** The answer in lines: each interval with what ends it, the best point with its margins, or the nearest miss with what blocks it. */
export function sizedText(answer: SizedAnswer): string {
  const { variable, intervals, best, blockers } = answer;
  const lines: string[] = [];
  for (const { from, to } of intervals) lines.push(`${variable} from ${from.text} to ${to.text} meets every requirement`, `  lower end: ${edgeWords(from)}`, `  upper end: ${edgeWords(to)}`);
  if (intervals.length === 0) {
    lines.push(`no value of ${variable} in its range meets every requirement${best === null ? '' : `; the nearest is ${best.text}`}`);
    for (const { words, met_somewhere } of blockers) lines.push(`  blocked by: ${words}, ${met_somewhere ? 'which other values meet' : 'which no value meets'}`);
  } else if (best !== null) lines.push(`best: ${best.text}, where the least margin is largest`);
  for (const row of best?.requirements ?? []) lines.push(`  ${row.met ? 'met' : 'not met'}: ${requirementWords(row)}, ${standingWords(row)}${row.at === null ? '' : ` at ${row.at.words}`}`);
  if (answer.refusal !== null) lines.push(`some values have no answer: ${answer.refusal}`);
  if (!answer.confirmed) lines.push('not confirmed: a worse corner turned up at the last judgement; narrow the range');
  return `${lines.map(onOneLine).join('\n')}\n`;
}

function edgeWords(edge: SizedEdge): string {
  if (edge.reason === 'range') return 'the end of the range';
  const at = edge.at === null ? '' : ` at ${edge.at}`;
  return edge.reason === 'no answer' ? `beyond it there is no answer for ${edge.requirement?.words}${at}` : `${edge.requirement?.words}${at}`;
}
