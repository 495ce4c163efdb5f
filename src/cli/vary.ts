import { readFile } from 'node:fs/promises';
import { allChunks, shardChunks } from '../batch/job.ts';
import { InputError, type Complaint } from '../design/complaint.ts';
import { didYouMean, quoted } from '../quantity/wording.ts';
import type { Distribution } from '../tolerance/draw.ts';
import type { InputChoice } from '../tolerance/inputs.ts';
import { planVariations, type VariationPlan, type VariationRequest } from '../tolerance/plan.ts';
import { variationReport } from '../tolerance/report.ts';
import { variationResult } from '../tolerance/result.ts';
import { readShards, writeShard } from '../tolerance/shards.ts';
import { variationJob, type VariationRows } from '../tolerance/variations.ts';
import { parseArguments } from './arguments.ts';
import { EXIT, JSON_OPTION, SET, UsageError, type Command, type Streams } from './command.ts';
import { readDesignFile } from './design-file.ts';
import { shardOf, takeFlags, wholeNumber } from './flags.ts';
import { tolerancesOf } from './judged.ts';
import { longRun } from './long-run.ts';
import { solved } from './solved.ts';

const usage = 'vary FILE --count N [--seed S] [--distribution normal|uniform] [--tolerances all|stated] [--tolerance INPUT=T ...] [--draw INPUT=normal|uniform ...] [--figure PATH ...] [--json] [--shard I/N | --gather FILE] [--workers N] [--set NAME=VALUE ...]';
const VALUED = { '--count': 'count', '--seed': 'seed', '--distribution': 'distribution', '--tolerances': 'tolerances', '--shard': 'shard', '--gather': 'gather', '--workers': 'workers' } as const;
const REPEATED = ['--figure', '--tolerance', '--draw'];
const DISTRIBUTIONS: readonly Distribution[] = ['normal', 'uniform'];

/** Draws a design within its tolerances many times and prints how its figures spread and how many variations meet the requirements. */
export const vary: Command = {
  usage,
  summary: 'draw the design within its tolerances, print spreads and yield',
  options: [
    ['--count N', 'how many variations'],
    ['--seed S', 'of the random numbers, 1 by default; the same seed gives the same answer whatever the workers and shards'],
    ['--distribution WORD', 'normal: a tolerance is two standard deviations (the default); uniform: even within it'],
    ['--tolerances WORD', 'which count: all (the default; where none is stated, the usual one) or stated'],
    ['--tolerance INPUT=T', 'another tolerance of one input for this run, such as "cap thickness=3 %", any number of times; "0 %" leaves it where it is'],
    ['--draw INPUT=WORD', 'another distribution of one input, normal or uniform, any number of times'],
    ['--figure PATH', 'a figure such as layers.cap.sheet_ohm or contacts.top.rho_c_ohm_cm2, any number of times; by default the usual ones'],
    JSON_OPTION,
    ['--shard I/N', 'compute only part I of N and print it for --gather'],
    ['--gather FILE', 'print the run whose parts are in the file, one after the other in any order; - reads them from standard input'],
    ['--workers N', 'threads at most; all cores by default'],
    SET,
  ],
  notes: 'Requirements of the design are judged in every variation. Ends with 3 where no variation has an answer. After Ctrl-C: the spreads of the variations that were reached.',
  async run(args, streams) {
    const { rest, flags, repeated } = takeFlags(args, ['--json'], REPEATED, Object.keys(VALUED));
    const { file, set, options } = parseArguments(rest, usage, { ...VALUED, ...Object.fromEntries(['--json', ...REPEATED].map((name) => [name, name])) });
    if (options.count === undefined) throw new UsageError(`--count is missing; say how many variations, such as --count 1000`);
    if (options.shard !== undefined && options.gather !== undefined) throw new UsageError('--shard computes a part and --gather puts parts together; use one of them at a time');
    const request: VariationRequest = {
      count: wholeNumber('--count', options.count, '1000'),
      seed: options.seed === undefined ? 1 : wholeNumber('--seed', options.seed, '1'),
      distribution: options.distribution === undefined ? 'normal' : distributionOf('--distribution', options.distribution),
      tolerances: tolerancesOf(options.tolerances),
      figures: repeated['--figure'],
      inputs: inputChoices(repeated['--tolerance'], repeated['--draw']),
      set,
    };
    const shard = options.shard === undefined ? null : shardOf(options.shard);
    const workers = options.workers === undefined ? undefined : Math.max(1, wholeNumber('--workers', options.workers, '2'));
    const design = await readDesignFile(file, streams);
    const planned = planVariations(design, request);
    if (!planned.ok) throw new InputError(planned.complaints.map(onCommandLine));
    const { plan } = planned;
    // The design as it stands must have an accepted answer; why it has none is said once, not once a variation.
    if (solved(design, set, streams) === null) return EXIT.noAnswer;
    const job = variationJob(plan);
    if (shard) {
      const chunks = shardChunks(job.chunks, ...shard);
      const { values, stopped } = await longRun({ kind: 'variations', design, request }, job, chunks, streams, workers);
      streams.out(writeShard(plan, values));
      if (stopped) streams.error(`halfmark: stopped; this part is partial: ${values.size} of ${chunks.length} pieces. Run it again: --gather refuses a run with pieces missing\n`);
      return stopped ? EXIT.stopped : EXIT.done;
    }
    const { values, stopped } = options.gather === undefined ? await longRun({ kind: 'variations', design, request }, job, allChunks(job), streams, workers) : { values: await gathered(plan, options.gather, streams), stopped: false };
    const result = variationResult(plan, values);
    streams.out(flags.has('--json') ? `${JSON.stringify(result, null, 1)}\n` : variationReport(result));
    // The report holds the notes itself.
    if (flags.has('--json')) for (const note of result.notes) streams.error(`halfmark: ${note}\n`);
    if (stopped) {
      streams.error(`halfmark: stopped; this is partial: ${result.done} of ${result.count} variations\n`);
      return EXIT.stopped;
    }
    return result.gaps.length === result.done ? EXIT.noAnswer : EXIT.done;
  },
};

async function gathered(plan: VariationPlan, file: string, streams: Streams): Promise<Map<number, VariationRows>> {
  let text: string;
  try {
    text = file === '-' ? await streams.stdin() : await readFile(file, 'utf8');
  } catch (error) {
    throw new UsageError(`${quoted(file)} cannot be read (${(error as NodeJS.ErrnoException).code ?? 'unknown reason'})`);
  }
  const reading = readShards(plan, text);
  if (!reading.ok) throw new UsageError(`--gather ${quoted(file)}${reading.complaint.path === '' ? '' : ` ${reading.complaint.path}`}: ${reading.complaint.message}`);
  return reading.chunks;
}

function distributionOf(option: string, text: string): Distribution {
  if ((DISTRIBUTIONS as readonly string[]).includes(text)) return text as Distribution;
  throw new UsageError(`${option} is ${quoted(text)}; normal or uniform would do${didYouMean(text, DISTRIBUTIONS)}`);
}

/** "cap thickness=3 %" and "cap thickness=uniform" by their inputs. */
function inputChoices(tolerances: readonly string[], draws: readonly string[]): Record<string, InputChoice> {
  const out = new Map<string, InputChoice>();
  const add = (option: string, example: string, texts: readonly string[], choice: (value: string) => InputChoice): void => {
    for (const text of texts) {
      const at = text.lastIndexOf('=');
      if (at < 1) throw new UsageError(`${option} is ${quoted(text)}; it takes INPUT=${example}, such as ${option} "cap thickness=${example}"`);
      const label = text.slice(0, at).trim();
      out.set(label, { ...out.get(label), ...choice(text.slice(at + 1).trim()) });
    }
  };
  add('--tolerance', '3 %', tolerances, (tolerance) => ({ tolerance }));
  add('--draw', 'uniform', draws, (word) => ({ distribution: distributionOf('--draw', word) }));
  return Object.fromEntries(out);
}

function onCommandLine({ path, message }: Complaint): Complaint {
  if (path.startsWith('inputs.')) return { path: `input ${quoted(path.slice('inputs.'.length))}`, message };
  return { path: ['count', 'seed', 'figure'].includes(path) ? `--${path}` : path, message };
}
