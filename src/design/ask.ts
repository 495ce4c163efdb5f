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
  /** zero is refused as well as what lies below */ positive?: boolean;
}

/**
 * Asks the texts of a design for their values and collects what is wrong with them, so that a person reads all of it at once.
 * A text that is wrong gives NaN; whoever asks looks at `complaints` before the numbers go further.
 */
export class Asker {
  readonly complaints: Complaint[] = [];
  constructor(readonly scope: Scope) {}

  quantity(text: unknown, kind: KindName, path: string, bounds: Bounds = {}): number {
    const reading = readQuantity(text, kind, this.scope);
    if (!reading.ok) return this.wrong(path, reading.message);
    const { value } = reading;
    const words = KINDS[kind].words.replace(/^an? /, '');
    if (bounds.positive && !(value > 0)) return this.wrong(path, `${quoted(text)} is not above zero; the ${words} must be positive`);
    if (bounds.least && !(value >= bounds.least[0] * (1 - Math.sign(bounds.least[0]) * 1e-12))) return this.wrong(path, `${quoted(text)} is below ${bounds.least[1]}, the least that is taken here`);
    if (bounds.most && !(value <= bounds.most[0] * (1 + Math.sign(bounds.most[0]) * 1e-12))) return this.wrong(path, `${quoted(text)} is above ${bounds.most[1]}, the most that is taken here`);
    return value;
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
