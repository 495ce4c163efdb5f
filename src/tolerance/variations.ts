import { isRefusal, solveBands, type Profiles, type SolveOptions, type SolvedBands, type Stack } from '../../solver/index.ts';
import type { Job } from '../batch/job.ts';
import { scoreOf } from '../requirements/margin.ts';
import { figureOf } from '../requirements/quantities.ts';
import { askedResult, type AskedResult } from '../result/asked-result.ts';
import { drawCounts, reachOf, type Distribution } from './draw.ts';
import { MovedStacks } from './moved-stacks.ts';
import type { VariationPlan } from './plan.ts';

/**
 * What some variations gave. Values are [variations x columns], row by row; null where there is no figure. `met` is [variations x requirements]: 1 met, 0 not met, -1 not known. JSON
 * keeps every digit of it, so that shards can be put together later.
 */
export interface VariationRows {
  values: (number | null)[];
  met: number[];
  /** variations of this chunk without an answer, and why; their values are null */ gaps: { index: number; reason: string }[];
}

/** Variations in one chunk. */
export const CHUNK = 32;
/** Ends of a tolerance are solved finer, so that small effects can be told apart, V. */
const FINE = 1e-5;

/** The first chunk is the nominal design; one follows for each uncertainty, at both ends of its tolerance with the others nominal; then come the variations. */
export interface ChunkOfVariations {
  kind: 'nominal' | 'ends' | 'draws';
  /** of the uncertainty, or of the first variation */ first: number;
  count: number;
}

export function chunkOf(plan: VariationPlan, chunk: number): ChunkOfVariations {
  if (chunk === 0) return { kind: 'nominal', first: 0, count: 1 };
  const inputs = plan.uncertainties.length;
  if (chunk <= inputs) return { kind: 'ends', first: chunk - 1, count: 2 };
  const first = (chunk - 1 - inputs) * CHUNK;
  return { kind: 'draws', first, count: Math.min(CHUNK, plan.request.count - first) };
}

/** Chunks of a whole run. */
export function variationChunks({ uncertainties, request }: VariationPlan): number {
  return 1 + uncertainties.length + Math.ceil(request.count / CHUNK);
}

/** A tolerance run as a job. Every solve starts from the nominal solution at its temperature: what comes before in a chunk decides nothing. */
export function variationJob(plan: VariationPlan): Job<VariationRows> {
  const runner = new VariationRunner(plan);
  return {
    chunks: variationChunks(plan),
    size: (chunk) => chunkOf(plan, chunk).count,
    run: (chunk) => runner.run(chunkOf(plan, chunk)),
  };
}

class VariationRunner {
  readonly #plan: VariationPlan;
  readonly #stacks: MovedStacks;
  readonly #reaches: number[];
  readonly #distributions: Distribution[];
  /** profiles of the nominal design by temperature; none where it has no answer */ readonly #start = new Map<string, Profiles | undefined>();

  constructor(plan: VariationPlan) {
    this.#plan = plan;
    this.#stacks = new MovedStacks(plan.varied, plan.set, plan.uncertainties, plan.stack);
    this.#reaches = plan.uncertainties.map(reachOf);
    this.#distributions = plan.uncertainties.map(({ distribution }) => distribution);
  }

  run({ kind, first, count }: ChunkOfVariations): VariationRows {
    const { uncertainties, request } = this.#plan;
    const nominal = uncertainties.map(() => 0);
    const rows: VariationRows = { values: [], met: [], gaps: [] };
    for (let i = 0; i < count; i++) {
      if (kind === 'draws') this.#add(rows, first + i, drawCounts(request.seed, first + i, this.#reaches, this.#distributions), undefined);
      else this.#add(rows, i, kind === 'nominal' ? nominal : nominal.map((_, u) => (u === first ? 2 * i - 1 : 0)), FINE);
    }
    return rows;
  }

  #add(rows: VariationRows, index: number, counts: readonly number[], accuracy: number | undefined): void {
    const read = this.#read(counts, accuracy);
    if (typeof read === 'string') {
      const { columns } = this.#plan;
      rows.gaps.push({ index, reason: read });
      for (let c = 0; c < columns.length; c++) rows.values.push(null);
      for (const { kind } of columns) if (kind === 'requirement') rows.met.push(-1);
      return;
    }
    rows.values.push(...read.values);
    rows.met.push(...read.met);
  }

  /** The figures of one variation, or why it has none. */
  #read(counts: readonly number[], accuracy: number | undefined): { values: (number | null)[]; met: number[] } | string {
    const stack = this.#stacks.at(counts);
    if (typeof stack === 'string') return stack;
    return orReason(() => {
      const solved = this.#solve(stack, accuracy);
      return typeof solved === 'string' ? solved : figuresOf(this.#plan, solved);
    });
  }

  /** At every temperature of the plan; or why there is none at one of them. */
  #solve(stack: Stack, accuracy: number | undefined): SolvedStack[] | string {
    const out: SolvedStack[] = [];
    for (const temperature of this.#plan.temperatures) {
      const answer = solved({ ...stack, temperature }, { accuracy, warmStart: this.#nominal(temperature) });
      if (typeof answer === 'string') return answer;
      out.push(answer);
    }
    return out;
  }

  #nominal(temperature: number): Profiles | undefined {
    const key = String(temperature);
    if (!this.#start.has(key)) {
      const answer = bandsOf({ ...this.#plan.stack, temperature }, {});
      this.#start.set(key, typeof answer === 'string' ? undefined : answer.profiles);
    }
    return this.#start.get(key);
  }
}

interface SolvedStack {
  result: AskedResult;
  stack: Stack;
}

function figuresOf({ columns }: VariationPlan, solved: readonly SolvedStack[]): { values: (number | null)[]; met: number[] } {
  const values: (number | null)[] = [];
  const met: number[] = [];
  for (const column of columns) {
    if (column.kind === 'figure') {
      values.push(column.figure.read(solved[0].result));
      continue;
    }
    const { requirement } = column;
    let worst: { figure: number; score: number } | null = null;
    let known = true;
    for (const at of requirement.over === 'temperature' ? solved.slice(0, 1) : solved) {
      const figure = figureOf(requirement, at);
      if (figure === null) known = false;
      else if (worst === null || scoreOf(requirement, figure) < worst.score) worst = { figure, score: scoreOf(requirement, figure) };
    }
    // Of a contact that blocks the figure is beyond every number: known not to meet its limit, but in no spread.
    values.push(known && worst !== null && Number.isFinite(worst.figure) ? worst.figure : null);
    // One temperature at which it fails is enough to know.
    met.push(worst !== null && worst.score < 0 ? 0 : known ? 1 : -1);
  }
  return { values, met };
}

/** From the profiles of a like stack, and afresh where that comes to nothing. */
function solved(stack: Stack, options: SolveOptions): SolvedStack | string {
  let answer = bandsOf(stack, options);
  if (typeof answer === 'string' && options.warmStart !== undefined) answer = bandsOf(stack, { ...options, warmStart: undefined });
  return typeof answer === 'string' ? answer : { result: askedResult(answer), stack };
}

function bandsOf(stack: Stack, options: SolveOptions): SolvedBands | string {
  return orReason(() => {
    const answer = solveBands(stack, options);
    return isRefusal(answer) ? `no accepted answer: ${answer.reason}` : answer;
  });
}

/** What the solver refuses at its door, such as a gap that closes, is the reason of a gap. */
function orReason<T>(work: () => T | string): T | string {
  try {
    return work();
  } catch (error) {
    if (!(error instanceof RangeError)) throw error;
    return error.message;
  }
}
