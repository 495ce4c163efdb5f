import type { ReactiveController, ReactiveControllerHost } from 'lit';
import { complaintLine } from '../../src/design/complaint.ts';
import type { Design } from '../../src/design/types.ts';
import type { Variant as LaidOver } from '../../src/drawing/marks/variants.ts';
import type { Session, SolveOutcome } from '../../src/state/session.ts';
import { SolverClient, type WorkerSide } from '../../src/workers/client.ts';
import { heldVariants, NO_VARIANTS, type SolvedVariant, type VariantsShown } from '../hm-variants/variants-shown.ts';

/** Solves the variants that are looked at beside the one on the page, one after another in a worker of their own; what was solved is not solved again. */
export class OverlayController implements ReactiveController {
  /** what the desk and the plate are shown; the same objects while nothing has changed */ shown: VariantsShown = NO_VARIANTS;
  over: LaidOver[] = [];
  against: LaidOver | null = null;
  readonly #host: ReactiveControllerHost;
  readonly #client: SolverClient;
  readonly #solved = new WeakMap<Design, SolvedVariant>();
  #running = false;
  #key: readonly unknown[] = [];

  constructor(host: ReactiveControllerHost, start: () => WorkerSide) {
    this.#host = host;
    this.#client = new SolverClient(start);
    host.addController(this);
  }

  hostDisconnected(): void {
    this.#client.close();
  }

  /** To be called before each drawing of the page. */
  follow(session: Session): void {
    const all = session.variants;
    const { over, against } = heldVariants(session.view.variants, all);
    const wanted = all.list.filter(({ id }) => over.includes(id) || id === against);
    const next = wanted.find(({ design }) => !this.#solved.has(design));
    if (next !== undefined && !this.#running) void this.#solve(next.design);
    const known = new Map(wanted.map(({ id, design }) => [id, this.#solved.get(design) ?? PENDING] as const));
    const key = [all.open, ...all.list.flatMap(({ id, name, removed, design }) => [id, name, removed, design]), '', ...over, '', against, ...known.values()];
    if (key.length === this.#key.length && key.every((part, i) => part === this.#key[i])) return;
    this.#key = key;
    this.shown = { all, over, against, solved: known };
    const laid = (id: string): LaidOver[] => {
      const result = known.get(id)?.result ?? null;
      return result === null ? [] : [{ name: all.list.find((variant) => variant.id === id)!.name, result }];
    };
    this.over = over.flatMap(laid);
    this.against = against === null ? null : (laid(against)[0] ?? null);
  }

  async #solve(design: Design): Promise<void> {
    this.#running = true;
    const outcome = await this.#client.solve(design);
    this.#running = false;
    if (outcome.kind !== 'dropped') this.#solved.set(design, known(outcome));
    this.#host.requestUpdate();
  }
}

const PENDING: SolvedVariant = { status: 'pending', result: null, reason: null };

function known(outcome: Exclude<SolveOutcome, { kind: 'dropped' }>): SolvedVariant {
  if (outcome.kind === 'fault') return { status: 'refused', result: null, reason: `the program itself failed (${outcome.message})` };
  const { answer } = outcome;
  if (answer.kind === 'result') return { status: 'result', result: answer.result, reason: null };
  return { status: 'refused', result: null, reason: answer.kind === 'complaints' ? complaintLine(answer.complaints[0]) : answer.reason };
}
