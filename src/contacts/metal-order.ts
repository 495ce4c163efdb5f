import type { Design } from '../design/types.ts';
import type { MetalRow, Ranking } from './rank-metals.ts';

export type OrderBy = 'worst' | 'rho' | 'barrier' | 'metal' | 'regime';

export interface MetalOrder {
  by: OrderBy;
  descending: boolean;
}

const REGIMES = ['field', 'thermionic-field', 'thermionic'];

/** The rows in an order; those without the figure come last either way, by name. */
export function orderedRows(rows: readonly MetalRow[], { by, descending }: MetalOrder, majority: Ranking['majority']): MetalRow[] {
  const value = (row: MetalRow): number | null => {
    switch (by) {
      // What blocks is the worst that there is, and known to be.
      case 'worst': return row.blocks === null ? row.worst_ohm_cm2 : Infinity;
      case 'rho': return row.blocks === 'here' ? Infinity : row.rho_c_ohm_cm2;
      case 'barrier': return majority === 'n' ? row.barrier_n_eV : row.barrier_p_eV;
      case 'regime': return row.transport === null ? null : REGIMES.indexOf(row.transport);
      case 'metal': return 0;
    }
  };
  const sign = descending ? -1 : 1;
  return [...rows].sort((a, b) => {
    const [x, y] = [value(a), value(b)];
    const byName = a.metal.localeCompare(b.metal);
    if (by === 'metal') return sign * byName;
    if (x === null || y === null) return (x === null ? 1 : 0) - (y === null ? 1 : 0) || byName;
    return sign * (x - y) || byName;
  });
}

/**
 * What a ranking depends on: everything of a design but its words, its limits and the metal that is on the surface, so that choosing one leaves the others' figures
 * as they are.
 */
export function rankingBasis({ title: _title, notes: _notes, requirements, ...rest }: Design, side: Ranking['side']): string {
  const contact = rest[side];
  const stated = contact.kind === 'barrier' ? { carrier: contact.carrier, pinning: contact.pinning, imageForce: contact.imageForce } : null;
  return JSON.stringify({ ...rest, [side]: stated, limits: requirements });
}
