import { isRefusal, solveBands, type Profiles, type Stack } from '../../solver/index.ts';
import { complaintLine } from '../design/complaint.ts';
import type { ReadRequirement } from '../design/requirements.ts';
import { toStack } from '../design/stack.ts';
import type { Design } from '../design/types.ts';
import { askedResult } from '../result/asked-result.ts';
import { scoreOf } from './margin.ts';
import { figureOf } from './quantities.ts';
import type { Uncertainty } from './uncertainties.ts';

/** A temperature, and for each uncertainty a signed count of its tolerance, -1 to 1, in the order of the uncertainties. */
export interface Point {
  /** K */ temperature: number;
  counts: readonly number[];
}

/** What was found at a point: a score and a figure for each requirement, or why there is none. */
export interface Reading {
  point: Point;
  /** null where there is no figure */ scores: readonly (number | null)[];
  figures: readonly (number | null)[];
  /** why nothing was solved there */ refusal: string | null;
}

/** Accepted estimate of the mesh error in psi, V: 4e-4 of kT at 300 K, so that corners can be told apart. */
export const CORNER_ACCURACY = 1e-5;

/**
 * Solves a design at points of its temperature range and tolerances. No point is solved twice. Every solve starts from the first accepted
 * answer, so that a reading does not depend on what was asked before it.
 */
export class PointSolver {
  /** solves so far */ evaluations = 0;
  readonly #stacks = new Map<string, Stack | string>();
  readonly #readings = new Map<string, Reading>();
  #start: Profiles | undefined;

  constructor(
    readonly design: Design,
    readonly set: Readonly<Record<string, string>>,
    readonly requirements: readonly ReadRequirement[],
    readonly uncertainties: readonly Uncertainty[],
    start?: Profiles,
  ) {
    this.#start = start;
  }

  at(point: Point): Reading {
    const key = `${point.temperature}|${point.counts.join()}`;
    let reading = this.#readings.get(key);
    if (!reading) {
      reading = this.#solve(point);
      this.#readings.set(key, reading);
    }
    return reading;
  }

  has(point: Point): boolean {
    return this.#readings.has(`${point.temperature}|${point.counts.join()}`);
  }

  #solve(point: Point): Reading {
    this.evaluations++;
    const nothing = this.requirements.map(() => null);
    const refused = (refusal: string): Reading => ({ point, scores: nothing, figures: nothing, refusal });
    const stack = this.#stackAt(point);
    if (typeof stack === 'string') return refused(stack);
    try {
      let bands = solveBands(stack, { accuracy: CORNER_ACCURACY, ...(this.#start ? { warmStart: this.#start } : {}) });
      // A start from far away must not cost an answer.
      if (isRefusal(bands) && this.#start) bands = solveBands(stack, { accuracy: CORNER_ACCURACY });
      if (isRefusal(bands)) return refused(bands.reason);
      this.#start ??= bands.profiles;
      const solved = { result: askedResult(bands), stack };
      const figures = this.requirements.map((r) => figureOf(r, solved));
      return { point, figures, scores: figures.map((f, r) => (f === null ? null : scoreOf(this.requirements[r], f))), refusal: null };
    } catch (error) {
      // What the solver refuses at its door, such as a gap that closes at this temperature.
      if (!(error instanceof RangeError)) throw error;
      return refused(error.message);
    }
  }

  /** The stack of a point, or what is wrong with the design there (a composition beyond 1). */
  #stackAt(point: Point): Stack | string {
    const moves: Record<string, number> = {};
    this.uncertainties.forEach((u, i) => {
      if (u.variable !== null && point.counts[i] !== 0) moves[u.variable] = point.counts[i];
    });
    const key = JSON.stringify(moves);
    let read = this.#stacks.get(key);
    if (read === undefined) {
      const reading = toStack(this.design, this.set, moves);
      read = reading.ok ? reading.stack : complaintLine(reading.complaints[0]);
      this.#stacks.set(key, read);
    }
    if (typeof read === 'string') return read;
    let stack: Stack = { ...read, temperature: point.temperature };
    this.uncertainties.forEach((u, i) => { stack = u.apply(stack, point.counts[i]); });
    return stack;
  }
}
