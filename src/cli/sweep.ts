import { allChunks, shardChunks, totalOf } from '../batch/job.ts';
import { InputError, type Complaint } from '../design/complaint.ts';
import { sweepCsvHeading, sweepCsvRows } from '../sweep/csv.ts';
import { planSweep, pointsOf, sweepJob, sweepNotes, sweepResult, type SweepPoint, type SweepRequest } from '../sweep/sweep.ts';
import { parseArguments } from './arguments.ts';
import { EXIT, SET, UsageError, type Command } from './command.ts';
import { readDesignFile } from './design-file.ts';
import { shardOf, takeFlags, wholeNumber } from './flags.ts';
import { longRun } from './long-run.ts';

const usage = 'sweep FILE --variable NAME --from A --to B --points N [--log] [--second NAME --from2 A --to2 B --points2 N [--log2]] [--figure PATH ...] [--csv] [--shard I/N] [--workers N] [--set NAME=VALUE ...]';
const VALUED = { '--variable': 'variable', '--from': 'from', '--to': 'to', '--points': 'points', '--second': 'variable2', '--from2': 'from2', '--to2': 'to2', '--points2': 'points2', '--shard': 'shard', '--workers': 'workers' } as const;
const FLAGS = ['--log', '--log2', '--csv'];
/** A row of a table that was stopped before its point was solved. */
const NOT_REACHED: SweepPoint = { gap: 'not reached: the sweep was stopped' };
/** Where a complaint about a request belongs on the command line. */
const PLACES: Readonly<Record<string, string>> = {
  variable: '--variable', from: '--from', to: '--to', points: '--points', figure: '--figure', 'second.variable': '--second', 'second.from': '--from2', 'second.to': '--to2', 'second.points': '--points2',
};

/** Solves a design along one or two axes and prints the figures. */
export const sweep: Command = {
  usage,
  summary: 'solve along one or two axes, print the figures as JSON or CSV',
  options: [
    ['--variable NAME', 'what is swept: a variable of the design, temperature, or a place such as layers[0].thickness'],
    ['--from A, --to B', 'its ends with their units, the lower one first'],
    ['--points N', 'how many values, both ends among them'],
    ['--log', 'spaced evenly in the logarithm'],
    ['--second NAME, --from2, --to2, --points2, --log2', 'the same of a second axis; the first runs fastest'],
    ['--figure PATH', 'a figure such as layers.cap.sheet_ohm or contacts.top.rho_c_ohm_cm2, any number of times; by default the usual ones'],
    ['--csv', 'print a table instead of JSON'],
    ['--shard I/N', 'only part I of N, with --csv; the parts in their order are the whole table'],
    ['--workers N', 'threads at most; all cores by default'],
    SET,
  ],
  notes: 'A point without an answer leaves a gap with its reason. Ends with 3 where no point has one. After Ctrl-C: the points that were reached; in the table the others are gaps whose reason is that they were not.',
  async run(args, streams) {
    const { rest, flags, repeated } = takeFlags(args, FLAGS, ['--figure'], Object.keys(VALUED));
    const { file, set, options } = parseArguments(rest, usage, { ...VALUED, ...Object.fromEntries([...FLAGS, '--figure'].map((f) => [f, f])) });
    const axis = (suffix: '' | '2'): SweepRequest['axis'] => {
      const [variable, from, to, points] = (['variable', 'from', 'to', 'points'] as const).map((key) => {
        const value = options[`${key}${suffix}`];
        if (value === undefined) throw new UsageError(`${key === 'variable' && suffix === '2' ? '--second' : `--${key}${suffix}`} is missing; usage: halfmark ${usage}`);
        return value;
      });
      return { variable, from, to, points: wholeNumber(`--points${suffix}`, points, '21'), scale: flags.has(`--log${suffix}`) ? 'log' : 'linear' };
    };
    const two = flags.has('--log2') || ['variable2', 'from2', 'to2', 'points2'].some((key) => options[key] !== undefined);
    const request: SweepRequest = { axis: axis(''), ...(two ? { second: axis('2') } : {}), figures: repeated['--figure'], set };
    const shard = options.shard === undefined ? null : shardOf(options.shard);
    if (shard && !flags.has('--csv')) throw new UsageError('--shard prints a part of a table; add --csv, then the parts in their order are the whole');
    const workers = options.workers === undefined ? undefined : Math.max(1, wholeNumber('--workers', options.workers, '2'));
    const design = await readDesignFile(file, streams);
    const planned = planSweep(design, request);
    if (!planned.ok) throw new InputError(planned.complaints.map(onCommandLine));
    const { plan } = planned;
    const job = sweepJob(plan);
    const chunks = shard ? shardChunks(job.chunks, ...shard) : allChunks(job);
    const { values, stopped } = await longRun({ kind: 'sweep', design, request }, job, chunks, streams, workers);
    const points = pointsOf(plan, values);
    const reached = points.size;
    const of = totalOf(job, chunks);
    const gaps = [...points.values()].flatMap((point) => ('gap' in point ? [point.gap] : []));
    if (flags.has('--csv')) {
      const whole = pointsOf(plan, new Map(chunks.map((chunk) => [chunk, values.get(chunk) ?? Array.from({ length: job.size(chunk) }, () => NOT_REACHED)])));
      streams.out(`${shard && shard[0] > 1 ? '' : sweepCsvHeading(plan)}${sweepCsvRows(plan, whole)}`);
    } else streams.out(`${JSON.stringify(sweepResult(plan, values), null, 1)}\n`);
    for (const note of sweepNotes(plan)) streams.error(`halfmark: ${note}\n`);
    if (gaps.length > 0) streams.error(`halfmark: ${gaps.length} of ${reached} points have no answer; the first: ${gaps[0].replace(/[\r\n\u2028\u2029]+/g, ' ')}\n`);
    if (stopped) {
      streams.error(`halfmark: stopped; this is partial: ${reached} of ${of} points\n`);
      return EXIT.stopped;
    }
    return gaps.length > 0 && gaps.length === reached ? EXIT.noAnswer : EXIT.done;
  },
};

function onCommandLine({ path, message }: Complaint): Complaint {
  return { path: Object.hasOwn(PLACES, path) ? PLACES[path] : path, message };
}
