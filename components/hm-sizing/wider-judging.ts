import type { ReactiveControllerHost } from 'lit';
import type { Design } from '../../src/design/types.ts';
import type { Tolerances } from '../../src/requirements/uncertainties.ts';
import type { RequirementResult } from '../../src/result/types.ts';
import { setVariable } from '../../src/state/commands/index.ts';
import type { RunJob } from '../../src/workers/job-client.ts';
import type { JobInput } from '../../src/workers/job-messages.ts';
import { JobController } from '../hm-desk/job-controller.ts';

/** A value that was sized, and within which tolerances. */
export interface SizedPoint {
  design: Design;
  variable: string;
  text: string;
  counted: Tolerances;
}

/** Judges a value that was sized within fewer tolerances as the page judges every design: with all of them. */
export class WiderJudging {
  readonly #job: JobController<'judge'>;
  #of: unknown = null;
  #input: JobInput<'judge'> | null = null;

  constructor(host: ReactiveControllerHost) {
    this.#job = new JobController(host, 'judge');
  }

  /** @param key  what was found, by which a later call knows it again  @param point  asked only for what is new; null where there is nothing to judge */
  follow(run: RunJob | null, key: unknown, point: () => SizedPoint | null): void {
    if (key === this.#of) return;
    this.#of = key;
    this.#job.stop();
    const found = point();
    const index = found?.design.variables?.findIndex(({ name }) => name === found.variable) ?? -1;
    this.#input = found === null || found.counted === 'all' || index < 0 ? null : { design: setVariable(found.design, index, { value: found.text }) };
    if (this.#input !== null && run !== null) void this.#job.start(run, this.#input);
  }

  /** It has not come to its end yet. */
  get running(): boolean {
    return this.#input !== null && this.#job.progress !== null;
  }

  /** null where nothing more was to be judged, and until it is known */
  get rows(): readonly RequirementResult[] | null {
    const { value } = this.#job;
    return value !== null && value.input === this.#input && value.value.kind === 'judged' ? value.value.requirements : null;
  }
}
