import type { Stack } from '../../solver/index.ts';
import { complaintLine } from '../design/complaint.ts';
import type { ReadRequirement } from '../design/requirements.ts';
import { toStack } from '../design/stack.ts';
import type { Design } from '../design/types.ts';
import type { RequirementResult } from '../result/types.ts';
import { absenceOf } from './absence.ts';
import { casesOf, requirementResult } from './judge.ts';
import { PointSolver, type Point } from './point.ts';
import { exactText, type SizedVariable } from './sized-variable.ts';
import { uncertaintiesOf, type Tolerances, type Uncertainty } from './uncertainties.ts';
import { temperatureWriter } from './words.ts';
import { NOISE, type Progress, type WorstCaseOptions } from './worst-case.ts';

/** A corner at which a requirement was found to be worst. */
interface Corner {
  /** K; null is the design's own temperature, which may move with the variable */ temperature: number | null;
  counts: readonly number[];
  /** how far the score moves with each uncertainty there; not known where there is no answer */ effects?: readonly number[];
}

/** Scores of the requirements at a value of the variable, each at the worst of the corners known so far. */
export interface Look {
  scores: (number | null)[];
  corners: (Corner | null)[];
  points: (Point | null)[];
  /** why there is no answer, where there is none */ refusal: string | null;
}

/** The design at one value of the variable. */
interface At {
  solver: PointSolver;
  requirements: readonly ReadRequirement[];
  stack: Stack;
  temperature: number;
  range: [number, number] | null;
}

/**
 * A design of which one variable is moved. Judging the whole worst case at every value would take minutes; so a value is looked at in those corners that
 * were worst somewhere, and whatever comes out is judged in full, which may add corners (an exchange method: Blankenship and Falk, J. Optim.
 * Theory Appl. 19, 261, 1976; from memory).
 */
export class SizingStudy {
  readonly #at = new Map<number, At | string>();
  readonly #corners: Corner[][];
  readonly #rows = new Map<number, RequirementResult[]>();
  readonly uncertainties: readonly Uncertainty[];

  constructor(readonly design: Design, readonly set: Readonly<Record<string, string>>, readonly variable: SizedVariable, readonly requirements: readonly ReadRequirement[], tolerances: Tolerances) {
    this.uncertainties = uncertaintiesOf(design, set, tolerances);
    this.#corners = requirements.map(() => []);
  }

  get evaluations(): number {
    let sum = 0;
    for (const at of this.#at.values()) if (typeof at !== 'string') sum += at.solver.evaluations;
    return sum;
  }

  look(value: number): Look {
    const at = this.#design(value);
    const empty = this.requirements.map(() => null);
    if (typeof at === 'string') return { scores: [...empty], corners: [...empty], points: [...empty], refusal: at };
    const out: Look = { scores: [], corners: [], points: [], refusal: null };
    for (const [i, corners] of this.#corners.entries()) {
      let least: number | null = null;
      let corner: Corner | null = null;
      let found: Point | null = null;
      for (const c of corners.length > 0 ? corners : this.#unmoved(at, i)) {
        const point = { temperature: c.temperature ?? at.temperature, counts: c.counts };
        const reading = at.solver.at(point);
        const score = reading.scores[i];
        if (score !== null && least !== null && score >= least) continue;
        [least, corner, found] = [score, c, point];
        if (score !== null) continue;
        out.refusal ??= reading.refusal ?? absenceOf(at.requirements[i], at.stack);
        break;
      }
      out.scores.push(least);
      out.corners.push(corner);
      out.points.push(found);
    }
    return out;
  }

  /**
   * Judges a value in full.
   *
   * @returns whether that showed a corner worse than those known
   */
  *judge(value: number, options: WorstCaseOptions): Generator<Progress, boolean> {
    const at = this.#design(value);
    if (typeof at === 'string') return false;
    const before = this.look(value).scores;
    const cases = yield* casesOf(at.solver, at.temperature, at.range, options);
    const words = temperatureWriter(this.design);
    this.#rows.set(value, at.requirements.map((r, i) => requirementResult(r, i, cases[i], at.stack, this.uncertainties, words)));
    let grown = false;
    cases.forEach(({ reading, effects, unanswered }, i) => {
      const over = (T: number): number | null => (at.requirements[i].over === 'temperature' ? null : T);
      const known = before[i];
      const first = this.#corners[i].length === 0;
      if (unanswered.length > 0) {
        if (known !== null || first) grown = this.#add(i, { temperature: over(unanswered[0].point.temperature), counts: unanswered[0].point.counts }) || grown;
      } else if (reading !== null && (first || (known !== null && (reading.scores[i] as number) < known - NOISE))) {
        grown = this.#add(i, { temperature: over(reading.point.temperature), counts: reading.point.counts, effects }) || grown;
      }
    });
    return grown;
  }

  /** The rows of a value that was judged in full. */
  rows(value: number): RequirementResult[] | null {
    return this.#rows.get(value) ?? null;
  }

  /** Where nothing has been judged yet: no tolerance moved, at the ends of the temperatures. */
  #unmoved({ requirements, range }: At, i: number): Corner[] {
    const counts = this.uncertainties.map(() => 0);
    const temperatures = requirements[i].over === 'temperatureRange' && range ? range : [null];
    return temperatures.map((temperature) => ({ temperature, counts }));
  }

  #add(i: number, corner: Corner): boolean {
    const same = (c: Corner): boolean => c.temperature === corner.temperature && c.counts.join() === corner.counts.join();
    if (this.#corners[i].some(same)) return false;
    this.#corners[i].push(corner);
    return true;
  }

  #design(value: number): At | string {
    let at = this.#at.get(value);
    if (at === undefined) {
      const set = { ...this.set, [this.variable.name]: exactText(this.variable, value) };
      const reading = toStack(this.design, set);
      at = reading.ok ? { solver: new PointSolver(this.design, set, reading.requirements, this.uncertainties), requirements: reading.requirements, stack: reading.stack, temperature: reading.stack.temperature, range: reading.temperatureRange } : complaintLine(reading.complaints[0]);
      this.#at.set(value, at);
    }
    return at;
  }
}
