import type { KindName } from '../quantity/kinds.ts';
import { KINDS } from '../quantity/kinds.ts';
import { readQuantity } from '../quantity/read-quantity.ts';
import type { Scope } from '../quantity/expression.ts';
import { quoted } from '../quantity/wording.ts';
import type { Complaint } from './complaint.ts';

export interface Bounds {
  /** in the solver's unit, with the words that the person reads */
  least?: [number, string];
  most?: [number, string];
  /** what it bounds, with its article: "a thickness"; by default the kind's words */ of?: string;
  /** zero is refused as well as what lies below */ positive?: boolean;
  /** where a tolerance carries a value past `least` or `most` that lies within them by itself, it ends there: no more than all atoms are active */ holds?: boolean;
}

/**
 * Asks the texts of a design for their values and collects what is wrong with them, so that a person reads all of it at once.
 * A text that is wrong gives NaN; whoever asks looks at `complaints` before the numbers go further.
 */
export class Asker {
  readonly complaints: Complaint[] = [];

  /** @param unmoved  where `scope` has values moved within their tolerances: the same without a move */
  constructor(readonly scope: Scope, readonly unmoved: (() => Scope) | null = null) {}

  quantity(text: unknown, kind: KindName, path: string, bounds: Bounds = {}): number {
    const reading = readQuantity(text, kind, this.scope);
    if (!reading.ok) return this.wrong(path, reading.message);
    const { value } = reading;
    const refuse = (limit: string): number => this.wrong(path, `${capital(bounds.of ?? (kind === 'number' ? 'this' : KINDS[kind].words))} must be ${limit}; ${quoted(text)} was given`);
    if (bounds.positive && !(value > 0)) return refuse('above zero');
    if (bounds.least && below(value, bounds.least[0])) return this.#ends(text, kind, bounds) ? bounds.least[0] : refuse(`at least ${bounds.least[1]}`);
    if (bounds.most && above(value, bounds.most[0])) return this.#ends(text, kind, bounds) ? bounds.most[0] : refuse(`at most ${bounds.most[1]}`);
    return value;
  }

  /** Whether it is a tolerance alone that carries the value past its bounds, and ends at them. */
  #ends(text: unknown, kind: KindName, { holds = false, least, most }: Bounds): boolean {
    if (!holds || this.unmoved === null) return false;
    const reading = readQuantity(text, kind, this.unmoved());
    return reading.ok && !(least && below(reading.value, least[0])) && !(most && above(reading.value, most[0]));
  }

  /** undefined stays undefined */
  maybe(text: unknown, kind: KindName, path: string, bounds: Bounds = {}): number | undefined {
    return text === undefined ? undefined : this.quantity(text, kind, path, bounds);
  }

  wrong(path: string, message: string): number {
    this.complaints.push({ path, message });
    return NaN;
  }
}

const below = (value: number, least: number): boolean => !(value >= least * (1 - Math.sign(least) * 1e-12));
const above = (value: number, most: number): boolean => !(value <= most * (1 + Math.sign(most) * 1e-12));

function capital(words: string): string {
  return words[0].toUpperCase() + words.slice(1);
}
