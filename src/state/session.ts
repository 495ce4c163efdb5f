import type { Complaint } from '../design/complaint.ts';
import type { Design } from '../design/types.ts';
import type { Answer, Result } from '../result/types.ts';
import { History, type HistoryRecord } from './history.ts';
import { loneVariant, parked, type VariantList } from './variants.ts';
import { changedView, readView, type View } from './view.ts';

/** How a question to the solver ended: answered; overtaken by a newer one or cancelled; or broken by a fault of ours. */
export type SolveOutcome = { kind: 'answered'; answer: Answer } | { kind: 'dropped' } | { kind: 'fault'; message: string };
/** Asks the solver; the worker's client in the page, a plain function in tests. */
export type Solve = (design: Design) => Promise<SolveOutcome>;

/** What is known about the design. */
export interface Findings {
  /** of the last question; "initial" before the first */ status: 'initial' | 'pending' | 'complete' | 'error';
  /** the last good one; kept when the design can no longer be solved */ result: Result | null;
  /** the result belongs to an earlier design than the one on the page */ stale: boolean;
  /** why the present design has no result: what is wrong with it, */ complaints: Complaint[];
  /** or why the solver gave no accepted answer, or what broke */ refusal: string | null;
}

/** What is neither saved nor undone: where the pointer is, what is chosen. */
export interface Moment {
  depth_nm: number | null;
  chosen: { kind: 'layer' | 'interface' | 'contact'; index: number } | null;
}

const NOTHING_KNOWN: Findings = { status: 'initial', result: null, stale: false, complaints: [], refusal: null };
const NOWHERE: Moment = { depth_nm: null, chosen: null };

/**
 * The open project while it is open: design, history, view, moment, and what the solver says. It knows no storage and no page.
 *
 * Fires plain events when something changed: `design` (also after undo, redo, opening and another variant), `findings`, `view`, `moment`, `variants`. The last design asked for
 * wins. While it is awaited, a result of an earlier one may be shown, marked stale, so that the bands follow the hand; never one older than what is
 * shown, and never anything of the project that was open before.
 */
export class Session extends EventTarget {
  #design: Design;
  #history: History;
  #view: View = {};
  #variants: VariantList;
  #moment: Moment = NOWHERE;
  #findings: Findings = NOTHING_KNOWN;
  #asked = 0;
  /** number of the question whose outcome is shown */ #shown = 0;
  /** number of the first question of this project */ #first = 1;
  readonly #solve: Solve;

  constructor(design: Design, solve: Solve, now?: () => number) {
    super();
    this.#design = design;
    this.#solve = solve;
    this.#history = new History(now);
    this.#variants = loneVariant(design);
  }

  get design(): Design {
    return this.#design;
  }
  get findings(): Findings {
    return this.#findings;
  }
  get view(): View {
    return this.#view;
  }
  get moment(): Moment {
    return this.#moment;
  }
  get undoLabel(): string | null {
    return this.#history.undoLabel;
  }
  get redoLabel(): string | null {
    return this.#history.redoLabel;
  }
  get historyRecord(): HistoryRecord {
    return this.#history.toRecord();
  }

  /** With the open one as it is now. */
  get variants(): VariantList {
    return parked(this.#variants, { design: this.#design, history: this.#history.toRecord() });
  }

  /** Opens another design: nothing of the last one stays, and it is asked for at once. */
  open(design: Design, kept: { history?: unknown; view?: unknown; variants?: VariantList } = {}): void {
    this.#view = readView(kept.view);
    this.#variants = kept.variants ?? loneVariant(design);
    this.#begin(design, kept.history, ['variants', 'design', 'view', 'moment']);
  }

  /** Takes up what a command has made of `variants`. Another open one comes onto the page with its own history, as a project does. */
  changeVariants(next: VariantList): void {
    const { open } = this.#variants;
    this.#variants = next;
    const variant = next.list.find(({ id }) => id === next.open)!;
    if (next.open === open) return this.#tell('variants');
    this.#begin(variant.design, variant.history, ['variants', 'design', 'moment']);
  }

  #begin(design: Design, history: unknown, told: readonly string[]): void {
    this.#design = design;
    this.#history.restore(history);
    this.#moment = NOWHERE;
    this.#findings = NOTHING_KNOWN;
    this.#first = this.#asked + 1;
    for (const what of told) this.#tell(what);
    this.#ask();
  }

  /** Takes up an edit. @returns whether it changed anything */
  edit(next: Design, label: string, join?: string): boolean {
    if (!this.#history.record(this.#design, next, label, join)) return false;
    this.#become(next);
    return true;
  }

  /** The next edit is a step of its own, whatever it would join. */
  seal(): void {
    this.#history.seal();
  }

  /** @returns what was taken back, in words; null when there was nothing */
  undo(): string | null {
    const label = this.#history.undoLabel;
    const back = this.#history.undo(this.#design);
    if (back === null) return null;
    this.#become(back, true);
    return label;
  }

  /** @returns what was done again, in words; null when there was nothing */
  redo(): string | null {
    const label = this.#history.redoLabel;
    const forth = this.#history.redo(this.#design);
    if (forth === null) return null;
    this.#become(forth, true);
    return label;
  }

  changeView(change: View): void {
    this.#view = changedView(this.#view, change);
    this.#tell('view');
  }

  changeMoment(change: Partial<Moment>): void {
    this.#moment = { ...this.#moment, ...change };
    this.#tell('moment');
  }

  /** Asks again for the design as it stands: after a cancelled or broken solve. */
  askAgain(): void {
    this.#ask();
  }

  /** @param follow  a chosen layer that stands elsewhere in `design` stays chosen: the next key must not fall on its neighbour */
  #become(design: Design, follow = false): void {
    if (follow) this.#follow(design);
    this.#design = design;
    const { chosen } = this.#moment;
    if (chosen !== null && chosen.kind !== 'contact' && chosen.index >= design.layers.length - (chosen.kind === 'interface' ? 1 : 0)) this.changeMoment({ chosen: null });
    this.#tell('design');
    this.#ask();
  }

  #follow({ layers }: Design): void {
    const { chosen } = this.#moment;
    if (chosen?.kind !== 'layer') return;
    const name = this.#design.layers[chosen.index]?.name;
    const places = layers.flatMap((layer, i) => (layer.name === name ? [i] : []));
    if (places.length === 1 && places[0] !== chosen.index) this.changeMoment({ chosen: { ...chosen, index: places[0] } });
  }

  #ask(): void {
    const number = ++this.#asked;
    // What was wrong stays on show until the answer: a message that blinks at every key cannot be read.
    this.#find({ status: 'pending', stale: this.#findings.result !== null });
    this.#solve(this.#design).then(
      (outcome) => this.#take(number, outcome),
      (error: unknown) => this.#take(number, { kind: 'fault', message: error instanceof Error ? error.message : String(error) }),
    );
  }

  #take(number: number, outcome: SolveOutcome): void {
    if (number < this.#first || number <= this.#shown) return;
    if (number !== this.#asked) {
      if (outcome.kind !== 'answered' || outcome.answer.kind !== 'result') return;
      this.#shown = number;
      return this.#find({ result: outcome.answer.result, stale: true });
    }
    this.#shown = number;
    const stale = this.#findings.result !== null;
    if (outcome.kind === 'dropped') return this.#find({ status: 'error', stale, complaints: [], refusal: 'Solving was stopped before it came to an answer.' });
    if (outcome.kind === 'fault') return this.#find({ status: 'error', stale, complaints: [], refusal: `The program itself failed while solving (${outcome.message}). The design is unharmed.` });
    const { answer } = outcome;
    if (answer.kind === 'result') return this.#find({ status: 'complete', result: answer.result, stale: false, complaints: [], refusal: null });
    if (answer.kind === 'complaints') return this.#find({ status: 'error', stale, complaints: answer.complaints, refusal: null });
    return this.#find({ status: 'error', stale, complaints: [], refusal: answer.reason });
  }

  #find(change: Partial<Findings>): void {
    this.#findings = { ...this.#findings, ...change };
    this.#tell('findings');
  }

  #tell(what: string): void {
    this.dispatchEvent(new Event(what));
  }
}
