import { InputError } from '../design/complaint.ts';
import type { Design } from '../design/types.ts';
import { quoted } from '../quantity/wording.ts';
import { writeNumber } from '../quantity/write-quantity.ts';
import { sizeSteps, type LookedAt, type SearchedRange, type SizedAnswer, type SizedEdge, type SizeOptions, type SizeResult } from '../requirements/size.ts';
import { onOneLine, requirementWords, standingWords } from '../requirements/verdict.ts';
import { parseArguments } from './arguments.ts';
import { EXIT, JSON_OPTION, SET, TOLERANCES, UsageError, type Command, type Streams } from './command.ts';
import { readDesignFile } from './design-file.ts';
import { tolerancesOf } from './judged.ts';

const usage = 'size FILE --variable NAME [--from A --to B] [--points N] [--set NAME=VALUE ...] [--tolerances all|stated|none] [--json]';
const POINTS = { least: 5, most: 1000 };
/** Least time between two lines of progress, and two looks for a Ctrl-C, ms. */
const BETWEEN = 200;

/** Finds the values of a variable that meet every requirement in its worst case. */
export const size: Command = {
  usage,
  summary: 'find the values of a variable that meet every requirement',
  options: [
    ['--variable NAME', 'the variable of the design that is moved'],
    ['--from A, --to B', 'range that is searched, such as 1e17 cm^-3; by default the range that the variable states'],
    ['--points N', `values of the first scan, ${POINTS.least} to ${POINTS.most}; 25 by default`],
    SET, TOLERANCES, JSON_OPTION,
  ],
  notes: 'Every end of an interval that is printed was judged in full. Ends with 1 where no value meets everything. After Ctrl-C: the values looked at, none of them judged in full.',
  async run(args, streams) {
    const { file, set, options } = parseArguments(args, usage, { '--variable': 'variable', '--from': 'from', '--to': 'to', '--points': 'points', '--tolerances': 'tolerances' }, { '--json': 'json' });
    const { variable, from, to } = options;
    if (variable === undefined) throw new UsageError(`no variable is named; usage: halfmark ${usage}`);
    const answer = await sized(await readDesignFile(file, streams), {
      variable, set, tolerances: tolerancesOf(options.tolerances),
      ...(from === undefined ? {} : { from }), ...(to === undefined ? {} : { to }), ...(options.points === undefined ? {} : { points: pointsOf(options.points) }),
    }, streams);
    if (answer.kind === 'complaints') throw new InputError(answer.complaints);
    if (answer.kind === 'partial') {
      streams.out(options.json === undefined ? partialText(answer) : `${JSON.stringify(answer, null, 1)}\n`);
      streams.error(`halfmark: stopped; ${answer.looked.length} values of ${variable} were looked at, and nothing is judged in full\n`);
      return EXIT.stopped;
    }
    streams.out(options.json === undefined ? sizedText(answer) : `${JSON.stringify(answer, null, 1)}\n`);
    if (answer.intervals.length > 0) return EXIT.done;
    if (answer.best !== null) return EXIT.requirementNotMet;
    streams.error(`halfmark: no accepted answer at any value of ${answer.variable}: ${onOneLine(answer.refusal ?? 'a figure is missing')}\n`);
    return EXIT.noAnswer;
  },
};

/** What a search that was stopped has seen: scores of the requirements (0 at the limit, above where met) in the corners known by then. */
interface Partial extends SearchedRange {
  kind: 'partial';
  looked: LookedAt[];
}

/** Sizes with a breath now and then, in which a Ctrl-C is heard. */
async function sized(design: Design, options: SizeOptions, streams: Streams): Promise<SizeResult | Partial> {
  const steps = sizeSteps(design, options);
  let range: SearchedRange | null = null;
  const looked = new Map<number, LookedAt>();
  let breathed = -Infinity;
  let signal: AbortSignal | undefined;
  for (;;) {
    const step = steps.next();
    if (step.done) {
      if (signal !== undefined) streams.progress?.('');
      return step.value;
    }
    const { seen, done, of } = step.value;
    if (seen !== undefined && 'variable' in seen) range = seen;
    else if (seen !== undefined) looked.set(seen.value, seen);
    const now = performance.now();
    if (now - breathed < BETWEEN) continue;
    breathed = now;
    signal ??= streams.stopSignal?.();
    streams.progress?.(`${done} of about ${of} solves`);
    await new Promise((resolve) => setTimeout(resolve));
    if (!signal?.aborted || range === null) continue;
    streams.progress?.('');
    return { kind: 'partial', ...range, looked: [...looked.values()].sort((a, b) => a.value - b.value) };
  }
}

function partialText({ variable, unit, looked }: Partial): string {
  const words = ({ scores }: LookedAt): string => (scores.some((s) => s === null) ? 'no answer' : scores.every((s) => (s as number) >= 0) ? 'meets everything looked at so far' : 'misses');
  return `${[
    `partial: stopped before anything was judged in full; ${variable} was looked at in`,
    ...looked.map((at) => `  ${writeNumber(at.value, 4)}${unit === '' ? '' : ` ${unit}`}: ${words(at)}`),
  ].map(onOneLine).join('\n')}\n`;
}

function pointsOf(text: string): number {
  const points = Number(text);
  if (!Number.isInteger(points) || points < POINTS.least || points > POINTS.most) throw new UsageError(`--points is ${quoted(text)}; a whole number from ${POINTS.least} to ${POINTS.most} would do`);
  return points;
}

/** The answer in lines: each interval with what ends it, the best point with its margins, or the nearest miss with what blocks it. */
function sizedText(answer: SizedAnswer): string {
  const { variable, intervals, best, blockers } = answer;
  const lines: string[] = [];
  for (const { from, to } of intervals) lines.push(`${variable} from ${from.text} to ${to.text} meets every requirement`, `  lower end: ${edgeWords(from)}`, `  upper end: ${edgeWords(to)}`);
  if (intervals.length === 0) {
    lines.push(`no value of ${variable} in its range meets every requirement${best === null ? '' : `; the nearest is ${best.text}`}`);
    for (const { words, met_somewhere } of blockers) lines.push(`  blocked by: ${words}, ${met_somewhere ? 'which other values meet' : 'which no value meets'}`);
  } else if (best !== null) lines.push(`best: ${best.text}, where the least margin is largest`);
  for (const row of best?.requirements ?? []) lines.push(`  ${row.met ? 'met' : 'not met'}: ${requirementWords(row)}, ${standingWords(row)}${row.at === null ? '' : ` at ${row.at.words}`}`);
  for (const caution of best?.cautions ?? []) lines.push(`  caution: ${caution}`);
  if (answer.refusal !== null) lines.push(`some values have no answer: ${answer.refusal}`);
  if (!answer.confirmed) lines.push('not confirmed: a worse corner turned up at the last judgement; narrow the range');
  return `${lines.map(onOneLine).join('\n')}\n`;
}

function edgeWords(edge: SizedEdge): string {
  if (edge.reason === 'range') return 'the end of the range';
  const at = edge.at === null ? '' : ` at ${edge.at}`;
  return edge.reason === 'no answer' ? `beyond it there is no answer for ${edge.requirement?.words}${at}` : `${edge.requirement?.words}${at}`;
}
