import { allChunks, shardChunks } from '../batch/job.ts';
import { InputError, type Complaint } from '../design/complaint.ts';
import { sweepCsvHeading, sweepCsvRows } from '../sweep/csv.ts';
import { planSweep, pointsOf, sweepJob, sweepResult, type SweepRequest } from '../sweep/sweep.ts';
import { parseArguments } from './arguments.ts';
import { EXIT, UsageError, type Command } from './command.ts';
import { readDesignFile } from './design-file.ts';
import { shardOf, takeFlags, wholeNumber } from './flags.ts';
import { longRun } from './long-run.ts';

const usage = 'sweep FILE --variable NAME --from A --to B --points N [--log] [--second NAME --from2 A --to2 B --points2 N [--log2]] [--figure PATH ...] [--csv] [--shard I/N] [--workers N] [--set NAME=VALUE ...]';
const VALUED = { '--variable': 'variable', '--from': 'from', '--to': 'to', '--points': 'points', '--second': 'variable2', '--from2': 'from2', '--to2': 'to2', '--points2': 'points2', '--shard': 'shard', '--workers': 'workers' } as const;
const FLAGS = ['--log', '--log2', '--csv'];
/** Where a complaint about a request belongs on the command line. */
const PLACES: Readonly<Record<string, string>> = {
  variable: '--variable', from: '--from', to: '--to', points: '--points', figure: '--figure', 'second.variable': '--second', 'second.from': '--from2', 'second.to': '--to2', 'second.points': '--points2',
};

/** Solves a design along one or two axes and prints the figures. */
export const sweep: Command = {
  usage,
  summary: 'solve along one or two axes, print the figures as JSON or CSV',
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
    const { values } = await longRun({ kind: 'sweep', design, request }, job, chunks, streams, workers);
    const points = pointsOf(plan, values);
    if (flags.has('--csv')) streams.out(`${shard && shard[0] > 1 ? '' : sweepCsvHeading(plan)}${sweepCsvRows(plan, points)}`);
    else streams.out(`${JSON.stringify(sweepResult(plan, values), null, 1)}\n`);
    const gaps = [...points.values()].flatMap((point) => ('gap' in point ? [point.gap] : []));
    if (gaps.length > 0) streams.error(`halfmark: ${gaps.length} of ${points.size} points have no answer; the first: ${gaps[0].replace(/[\r\n\u2028\u2029]+/g, ' ')}\n`);
    return gaps.length > 0 && gaps.length === points.size ? EXIT.noAnswer : EXIT.done;
  },
};

function onCommandLine({ path, message }: Complaint): Complaint {
  return { path: Object.hasOwn(PLACES, path) ? PLACES[path] : path, message };
}
