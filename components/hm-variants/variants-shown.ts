import type { Result } from '../../src/result/types.ts';
import type { VariantList } from '../../src/state/variants.ts';

/** What the project remembers of how its variants are looked at. */
export interface VariantsView {
  /** ids of those laid over the plate */ over?: string[];
  /** id of the one whose figures the ledger compares with */ against?: string | null;
}

/** How far a variant that is not on the page is known. */
export interface SolvedVariant {
  status: 'pending' | 'result' | 'refused';
  result: Result | null;
  /** why it has no result, in words */ reason: string | null;
}

export interface VariantsShown {
  all: VariantList;
  over: readonly string[];
  against: string | null;
  /** those laid over the plate or compared with */ solved: ReadonlyMap<string, SolvedVariant>;
}

/** With the one on the page the plate holds four. */
export const MOST_OVER = 3;

export const NO_VARIANTS: VariantsShown = { all: { open: '', list: [] }, over: [], against: null, solved: new Map() };

/** What is laid over and compared with: of what the project remembers, perhaps by another version of the page, that which is there and is not on the page itself. */
export function heldVariants(remembered: unknown, { open, list }: VariantList): Required<VariantsView> {
  const { over, against } = (typeof remembered === 'object' && remembered !== null ? remembered : {}) as VariantsView;
  const there = (id: unknown): boolean => id !== open && list.some((variant) => variant.id === id && !variant.removed);
  return { over: Array.isArray(over) ? [...new Set(over)].filter(there).slice(0, MOST_OVER) : [], against: there(against) ? (against as string) : null };
}
