import type { Profiles } from '../../solver/index.ts';
import type { Job } from '../batch/job.ts';
import { complaintLine, type Complaint } from '../design/complaint.ts';
import { toStack } from '../design/stack.ts';
import type { Design } from '../design/types.ts';
import { mobilityNotes } from '../result/mobility-note.ts';
import { provenanceOf } from '../result/provenance.ts';
import { solveFigures, type SolvedAnswer } from '../result/solve-design.ts';
import type { Provenance } from '../result/types.ts';
import { MOST_POINTS, readAxis, type Axis, type AxisRequest } from './axis.ts';
import { findFigures, type Figure } from './figures.ts';

export interface SweepRequest {
  axis: AxisRequest;
  /** a second axis: the figures are then a matrix, the first axis running fastest */ second?: AxisRequest;
  /** paths (figures.ts); none gives the usual ones */ figures?: readonly string[];
  /** values of variables and of the temperature for the whole sweep */ set?: Readonly<Record<string, string>>;
}

/** A sweep that has been read and found possible. */
export interface SweepPlan {
  design: Design;
  axes: Axis[];
  figures: Figure[];
  set: Readonly<Record<string, string>>;
  points: number;
}

/** One solved point: a number or null for each figure; or no figures at all and the reason. */
export type SweepPoint = { values: (number | null)[] } | { gap: string };

export interface SweepResult {
  format: 'halfmark-sweep/1';
  title: string;
  axes: { variable: string; words: string; unit: string; scale: 'linear' | 'log'; values: number[] }[];
  /** values [points], the first axis running fastest; null where a point has no such figure, is a gap, or was not reached */
  figures: { path: string; words: string; unit: string; log: boolean; values: (number | null)[] }[];
  /** points without an answer, and why */ gaps: { index: number; reason: string }[];
  /** points that were solved or found to be gaps */ done: number;
  /** some were not reached */ partial: boolean;
  /** what the figures leave out at their temperatures */ notes: string[];
  provenance: Provenance;
}

/** Points that follow each other in one chunk, each starting from the last; the first of a chunk starts afresh, so its digits do not depend on who computed what before. */
export const CHAIN = 16;

/**
 * Reads a sweep and says all that is wrong with it before anything is solved: unknown names, empty or reversed ranges, and ends that the design does not take. Complaints have the
 * paths "variable", "from", "to", "points", "figure" (with "second." in front for the second axis), or those of the design.
 */
export function planSweep(design: Design, request: SweepRequest): { ok: true; plan: SweepPlan } | { ok: false; complaints: Complaint[] } {
  const set = request.set ?? {};
  const base = toStack(design, set);
  if (!base.ok) return { ok: false, complaints: base.complaints };
  const complaints: Complaint[] = [];
  const axes: Axis[] = [];
  [request.axis, ...(request.second ? [request.second] : [])].forEach((asked, a) => {
    const prefix = a === 0 ? '' : 'second.';
    const reading = readAxis(design, asked, set);
    if (reading.ok) axes.push(reading.axis);
    else complaints.push(...reading.complaints.map((c) => ({ ...c, path: `${prefix}${c.path}` })));
  });
  const figures = findFigures(design, request.figures ?? []);
  if (!figures.ok) complaints.push(...figures.complaints);
  if (complaints.length > 0 || !figures.ok) return { ok: false, complaints };
  if (axes.length === 2 && axes[0].place.name === axes[1].place.name) return refused('second.variable', 'is the variable of the first axis; name another one');
  const points = axes.reduce((product, axis) => product * axis.values.length, 1);
  if (points > MOST_POINTS) return refused('points', `give ${points} points together, more than the ${MOST_POINTS} that are taken; ask for fewer`);
  const plan: SweepPlan = { design, axes, figures: figures.figures, set, points };
  const ends = endComplaints(plan);
  return ends.length > 0 ? { ok: false, complaints: ends } : { ok: true, plan };
}

const refused = (path: string, message: string): { ok: false; complaints: Complaint[] } => ({ ok: false, complaints: [{ path, message }] });

/** The ends of each axis are put into the design: what it does not take there is wrong input, and said at once. */
function endComplaints(plan: SweepPlan): Complaint[] {
  return plan.axes.flatMap((axis, a) =>
    [0, axis.values.length - 1].flatMap((at) => {
      const { design, set } = putAt(plan, [axis.place.put(plan.design, axis.texts[at])]);
      const reading = toStack(design, set);
      if (reading.ok) return [];
      const { path, message: why } = reading.complaints[0];
      // What stands elsewhere in the design, such as a formula that has no value there, is named.
      const message = path.startsWith('custom.') ? `the design cannot be solved there: ${path} ${why}` : why;
      return [{ path: `${a === 0 ? '' : 'second.'}${at === 0 ? 'from' : 'to'}`, message }];
    }),
  );
}

function putAt(plan: SweepPlan, parts: { design: Design; set: Record<string, string> }[]): { design: Design; set: Record<string, string> } {
  return { design: parts[parts.length - 1].design, set: Object.assign({}, plan.set, ...parts.map((p) => p.set)) };
}

/** The design and the overrides of one point. */
export function atPoint(plan: SweepPlan, index: number): { design: Design; set: Record<string, string> } {
  const parts: { design: Design; set: Record<string, string> }[] = [];
  let design = plan.design;
  let left = index;
  for (const { place, values, texts } of plan.axes) {
    const part = place.put(design, texts[left % values.length]);
    left = Math.floor(left / values.length);
    design = part.design;
    parts.push(part);
  }
  return putAt(plan, parts);
}

/** Why an answer is none, in one line. */
export function reasonOf(answer: Extract<SolvedAnswer, { kind: 'complaints' | 'refused' }>): string {
  return answer.kind === 'refused' ? `no accepted answer: ${answer.reason}` : complaintLine(answer.complaints[0]);
}

/** Points of one chain: at most CHAIN neighbours in one row of the matrix. */
function chainRange(plan: SweepPlan, chunk: number): [from: number, to: number] {
  const row = plan.axes[0].values.length;
  const perRow = Math.ceil(row / CHAIN);
  const start = Math.floor(chunk / perRow) * row;
  const from = (chunk % perRow) * CHAIN;
  return [start + from, start + Math.min(row, from + CHAIN)];
}

/** The points of one chain, one at a time. */
function* chainPoints(plan: SweepPlan, chunk: number): Generator<SweepPoint, void, void> {
  const [from, to] = chainRange(plan, chunk);
  let last: Profiles | undefined;
  for (let index = from; index < to; index++) {
    const { design, set } = atPoint(plan, index);
    const solve = (warmStart?: Profiles): ReturnType<typeof solveFigures<(number | null)[]>> => solveFigures(design, { set, warmStart }, (rows) => plan.figures.map((figure) => figure.read(rows)));
    let answer = solve(last);
    // What came before must not decide whether there is an answer.
    if (answer.kind === 'refused' && last !== undefined) answer = solve();
    if (answer.kind === 'figures') {
      last = answer.profiles;
      yield { values: answer.figures };
    } else yield { gap: reasonOf(answer) };
  }
}

export function sweepJob(plan: SweepPlan): Job<SweepPoint[]> {
  const row = plan.axes[0].values.length;
  return {
    chunks: Math.ceil(row / CHAIN) * (plan.points / row),
    size: (chunk) => chainRange(plan, chunk)[1] - chainRange(plan, chunk)[0],
    run: (chunk) => [...chainPoints(plan, chunk)],
  };
}

/** Points by index from the chunks of the job, whole or in part. */
export function pointsOf(plan: SweepPlan, chunks: ReadonlyMap<number, SweepPoint[]>): Map<number, SweepPoint> {
  const out = new Map<number, SweepPoint>();
  for (const [chunk, points] of [...chunks].sort(([a], [b]) => a - b)) points.forEach((point, i) => out.set(chainRange(plan, chunk)[0] + i, point));
  return out;
}

/** The sweep as a document; of a stopped one what was reached. */
export function sweepResult(plan: SweepPlan, chunks: ReadonlyMap<number, SweepPoint[]>): SweepResult {
  const points = pointsOf(plan, chunks);
  const gaps: SweepResult['gaps'] = [];
  const columns = plan.figures.map(() => new Array<number | null>(plan.points).fill(null));
  for (const [index, point] of points) {
    if ('gap' in point) gaps.push({ index, reason: point.gap });
    else point.values.forEach((value, f) => (columns[f][index] = value));
  }
  return {
    format: 'halfmark-sweep/1',
    title: plan.design.title,
    axes: plan.axes.map(({ place, unit, scale, values }) => ({ variable: place.name, words: place.words, unit, scale, values })),
    figures: plan.figures.map(({ path, words, unit, log }, f) => ({ path, words, unit, log, values: columns[f] })),
    gaps,
    done: points.size,
    partial: points.size < plan.points,
    notes: sweepNotes(plan),
    provenance: provenanceOf(plan.design, plan.set),
  };
}

/** What the figures of a sweep leave out at its temperatures. */
export function sweepNotes({ design, set, axes, figures }: SweepPlan): string[] {
  const swept = axes.find(({ place }) => place.kind === 'temperature');
  const base = toStack(design, set);
  const temperatures_K = swept?.values ?? (base.ok ? [base.stack.temperature] : []);
  return mobilityNotes(figures.map(({ path }) => ({ name: path, temperatures_K })));
}
