import type { Profiles } from '../../solver/index.ts';
import type { Job } from '../batch/job.ts';
import type { Complaint } from '../design/complaint.ts';
import type { Design } from '../design/types.ts';
import type { Regime, Result } from '../result/types.ts';
import { solveDesign } from '../result/solve-design.ts';
import { CHAIN, planSweep, reasonOf } from './sweep.ts';

export interface FilmRequest {
  /** as typed, the lower first */ from: string;
  to: string;
  frames: number;
  scale?: 'linear' | 'log';
  set?: Readonly<Record<string, string>>;
}

/** The whole result at one temperature, or why there is none. */
export type Frame = { temperature_K: number; result: Result; /** of each layer */ regimes: Regime[] } | { temperature_K: number; gap: string };

export interface FilmPlan {
  design: Design;
  /** K, coldest first */ temperatures: number[];
  set: Readonly<Record<string, string>>;
}

/** A sweep over the temperature that keeps whole results. Complaints as those of a sweep; "points" is the count of frames. */
export function planFilm(design: Design, { from, to, frames, scale, set = {} }: FilmRequest): { ok: true; plan: FilmPlan } | { ok: false; complaints: Complaint[] } {
  const planned = planSweep(design, { axis: { variable: 'temperature', from, to, points: frames, scale }, set });
  return planned.ok ? { ok: true, plan: { design, temperatures: planned.plan.axes[0].values, set } } : planned;
}

export function filmJob({ design, temperatures, set }: FilmPlan): Job<Frame[]> {
  const range = (chunk: number): number[] => temperatures.slice(chunk * CHAIN, (chunk + 1) * CHAIN);
  return {
    chunks: Math.ceil(temperatures.length / CHAIN),
    size: (chunk) => range(chunk).length,
    run(chunk) {
      let last: Profiles | undefined;
      return range(chunk).map((temperature_K): Frame => {
        const options = { set: { ...set, temperature: `${temperature_K} K` } };
        let answer = solveDesign(design, { ...options, warmStart: last });
        // What came before must not decide whether there is an answer.
        if (answer.kind === 'refused' && last !== undefined) answer = solveDesign(design, options);
        if (answer.kind !== 'result') return { temperature_K, gap: reasonOf(answer) };
        last = answer.profiles;
        return { temperature_K, result: answer.result, regimes: answer.result.layers.map((layer) => layer.regime) };
      });
    },
  };
}

/** Frames in order of their temperature; of a stopped film those that were reached. */
export function framesOf(chunks: ReadonlyMap<number, Frame[]>): Frame[] {
  return [...chunks].sort(([a], [b]) => a - b).flatMap(([, frames]) => frames);
}
