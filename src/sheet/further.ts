import type { CloseUp } from '../contacts/close-up.ts';
import type { Design } from '../design/types.ts';
import { hardest, type Corner } from '../requirements/corner.ts';
import type { RequirementResult, Result } from '../result/types.ts';
import { workingsOf } from '../workings/workings-of.ts';
import type { Asked } from '../workings/workings.ts';
import type { SheetVariant } from './comparison.ts';
import type { SheetInput } from './review-sheet.ts';

/** Sections of a sheet that a person has switched on. */
export interface FurtherWish {
  /** designs to lay over the sheet's own */ over: readonly { name: string; design: Design }[];
  /** name of the sheet's own beside them */ base: string;
  corner: boolean;
  contacts: boolean;
  workings: readonly Asked[];
}

/** Who solves what the sections show; the page asks its workers. Text says why there is none, without a full stop. */
export interface FurtherSolver {
  result(design: Design): Promise<Result | string>;
  corner(design: Design, row: RequirementResult): Promise<Corner | string>;
  contacts(design: Design): Promise<readonly CloseUp[] | string>;
}

/** What is known once stays known while the design is the same object. */
const results = new WeakMap<Design, Promise<Result | string>>();
const corners = new WeakMap<RequirementResult, Promise<Corner | string>>();
const contacts = new WeakMap<Design, Promise<readonly CloseUp[] | string>>();

/**
 * What the further sections show, solved one after the other.
 *
 * @returns the sections for the sheet, and of those that cannot be had why not, a sentence each
 */
export async function furtherSections(design: Design, result: Result, requirements: readonly RequirementResult[] | null, wish: FurtherWish, solver: FurtherSolver): Promise<{ sections: Pick<SheetInput, 'comparison' | 'corner' | 'closeUps' | 'workings'>; missing: string[] }> {
  const missing: string[] = [];
  const variants: SheetVariant[] = [];
  for (const { name, design: other } of wish.over) {
    const found = await known(results, other, () => solver.result(other));
    if (typeof found === 'string') missing.push(`${name} has no result: ${found}.`);
    else variants.push({ name, design: other, result: found });
  }
  const row = wish.corner && requirements ? hardest(requirements) : null;
  const corner = row ? await known(corners, row, () => solver.corner(design, row)) : null;
  const near = wish.contacts ? await known(contacts, design, () => solver.contacts(design)) : [];
  if (typeof corner === 'string') missing.push(`The worst corner has no picture: ${corner}.`);
  if (typeof near === 'string') missing.push(`The contacts have no picture: ${near}.`);
  return {
    sections: {
      ...(variants.length > 0 ? { comparison: { base: wish.base, variants } } : {}),
      ...(corner !== null && typeof corner !== 'string' ? { corner } : {}),
      closeUps: typeof near === 'string' ? [] : near,
      workings: wish.workings.map((asked) => workingsOf(design, result, asked)),
    },
    missing,
  };
}

/** A solver that failed, a worker that was stopped, is asked again the next time. */
async function known<K extends object, V>(store: WeakMap<K, Promise<V | string>>, key: K, make: () => Promise<V | string>): Promise<V | string> {
  let making = store.get(key);
  if (making === undefined) {
    making = make();
    store.set(key, making);
  }
  try {
    return await making;
  } catch (error) {
    store.delete(key);
    return error instanceof Error ? error.message : String(error);
  }
}
