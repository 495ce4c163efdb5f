import { closeUps, type CloseUp } from '../contacts/close-up.ts';
import { complaintLine } from '../design/complaint.ts';
import type { Design } from '../design/types.ts';
import { hardest, solveCorner, type Corner } from '../requirements/corner.ts';
import { solveDesign } from '../result/solve-design.ts';
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

/** What is known once stays known while the design is the same object. */
const solvedDesigns = new WeakMap<Design, Result | string>();
const corners = new WeakMap<RequirementResult, Corner | string>();
const contacts = new WeakMap<Design, readonly CloseUp[] | string>();

/**
 * Solves what the further sections show.
 *
 * @returns the sections for the sheet, and of those that cannot be had why not, a sentence each
 */
export function furtherSections(design: Design, result: Result, requirements: readonly RequirementResult[] | null, wish: FurtherWish): { sections: Pick<SheetInput, 'comparison' | 'corner' | 'closeUps' | 'workings'>; missing: string[] } {
  const missing: string[] = [];
  const variants = wish.over.flatMap(({ name, design: other }): SheetVariant[] => {
    const found = solvedOf(other);
    if (typeof found !== 'string') return [{ name, design: other, result: found }];
    missing.push(`${name} has no result: ${found}.`);
    return [];
  });
  const row = wish.corner && requirements ? hardest(requirements) : null;
  const corner = row ? known(corners, row, () => cornerOf(design, row)) : null;
  const near = wish.contacts ? known(contacts, design, () => contactsOf(design)) : [];
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

function known<K extends object, V>(store: WeakMap<K, V>, key: K, make: () => V): V {
  if (!store.has(key)) store.set(key, make());
  return store.get(key)!;
}

function solvedOf(design: Design): Result | string {
  return known(solvedDesigns, design, () => {
    const answer = solveDesign(design);
    return answer.kind === 'result' ? answer.result : answer.kind === 'refused' ? answer.reason : complaintLine(answer.complaints[0]);
  });
}

function cornerOf(design: Design, row: RequirementResult): Corner | string {
  const answer = solveCorner(design, row);
  return answer.kind === 'corner' ? answer.corner : answer.reason;
}

function contactsOf(design: Design): readonly CloseUp[] | string {
  const answer = closeUps(design);
  return answer.kind === 'seen' ? answer.contacts : answer.kind === 'refused' ? answer.reason : complaintLine(answer.complaints[0]);
}
