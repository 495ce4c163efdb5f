import type { CloseUpAnswer, CloseUpOptions } from '../contacts/close-up.ts';
import type { MetalRow, RankAnswer, RankOptions } from '../contacts/rank-metals.ts';
import type { Design } from '../design/types.ts';
import type { CornerAnswer } from '../requirements/corner.ts';
import type { JudgeOptions, Judgement } from '../requirements/judge.ts';
import type { LookedAt, SearchedRange, SizeOptions, SizeResult } from '../requirements/size.ts';
import type { Answer, RequirementResult } from '../result/types.ts';

/**
 * The long computations that a panel of the page can start. A further kind is a row here and a row in job-kinds.ts. Everything in it survives a structured
 * clone.
 */
export interface Jobs {
  judge: { input: { design: Design; options?: Omit<JudgeOptions, 'warmStart'> }; value: Judgement; seen: never };
  size: { input: { design: Design; options: SizeOptions }; value: SizeResult; seen: LookedAt | SearchedRange };
  metals: { input: { design: Design; options: RankOptions }; value: RankAnswer; seen: MetalRow };
  closeUp: { input: { design: Design; options?: CloseUpOptions }; value: CloseUpAnswer; seen: never };
  /** a design beside the page's own, such as a variant for the review sheet */ result: { input: { design: Design }; value: Answer; seen: never };
  corner: { input: { design: Design; row: RequirementResult }; value: CornerAnswer; seen: never };
}

export type JobKind = keyof Jobs;
export type JobInput<K extends JobKind> = Jobs[K]['input'];
export type JobValue<K extends JobKind> = Jobs[K]['value'];
/** What a job can tell before it has ended, piece by piece. */
export type JobSeen<K extends JobKind> = Jobs[K]['seen'];

/** Solves so far, how many are expected in all, and what was seen since the last word. */
export interface JobProgress<K extends JobKind = JobKind> {
  done: number;
  of: number;
  seen: JobSeen<K>[];
}

/** Every request has a number of its own, and what comes back bears it. */
export type JobRequest = { [K in JobKind]: { kind: K; number: number; input: JobInput<K> } }[JobKind];

export type JobReply =
  | ({ kind: 'progress'; number: number } & JobProgress)
  | { kind: 'done'; number: number; value: JobValue<JobKind> }
  /** our own bug: it threw */ | { kind: 'fault'; number: number; message: string };
