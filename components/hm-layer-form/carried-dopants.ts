import type { DopantRow } from '../../src/design/types.ts';
import type { DopantChoice } from '../shared/menus.ts';

export interface CarriedDopants {
  dopants: DopantRow[];
  /** what was exchanged, in words; empty when all dopants are known in the new material */ changes: string[];
}

/**
 * Dopant rows of a layer whose material changes: a dopant known in the new host stays, another becomes the first of its kind (donor, acceptor) there, and
 * that is said. Where the new host has none of its kind the row stays as it is, for the reader to complain of.
 *
 * @param rows     of the layer as it was
 * @param choices  all known dopants, of every host
 */
export function carriedDopants(rows: readonly DopantRow[], from: string, to: string, choices: readonly Pick<DopantChoice, 'id' | 'host' | 'kind'>[]): CarriedDopants {
  const changes: string[] = [];
  const dopants = rows.map((row) => {
    if (row.dopant === undefined) return row;
    const before = choices.find((c) => c.host === from && c.id === row.dopant);
    const here = choices.filter((c) => c.host === to);
    const same = here.find((c) => c.id === row.dopant);
    // The same element may be a donor in one host and an acceptor in another (Si in GaAs on the two sites).
    if (same && (!before || same.kind === before.kind)) return row;
    const next = before && here.find((c) => c.kind === before.kind);
    if (!next) return row;
    changes.push(`${row.dopant} became ${next.id}`);
    return { ...row, dopant: next.id };
  });
  return { dopants, changes };
}
