import type { Design } from '../../src/design/types.ts';
import type { LooseEntry } from '../../src/design/entry-key.ts';
import type { ShelfItem } from '../../src/storage/shelf.ts';

/**
 * What elements tell of a person's acts. They bubble and cross shadow roots; setting a property from code is silent.
 */
export interface HalfmarkEvents {
  /** a change of the design, made by one of the commands of src/state/commands */
  'hm-edit': { next: Design; /** in words, for undo: "thickness of cap" */ label: string; /** edits of one drag or one burst of typing share a key and undo as one */ join?: string };
  /** the pointer (or the reading cursor moved by keys) stands at this depth; null when it leaves */
  'hm-depth': { depth_nm: number | null };
  /** a layer, an interface (by the layer above) or an end was chosen; null: nothing */
  'hm-choose': { kind: 'layer' | 'interface' | 'contact'; index: number } | null;
  /** a change of the view, not of the design: never undone */
  'hm-view': { change: Record<string, unknown> };
  /** one of the page's own acts, from a button or a menu */
  'hm-act': { act: PageAct };
  /** another name for the open project */
  'hm-rename': { name: string };
  /** size a variable so that this requirement of the design is met */
  'hm-size': { requirement: number };
  /** an act on one of the projects in the list, or on all of them */
  'hm-project': ProjectAct;
  /** an act on one of the variants of the open project */
  'hm-variant': VariantAct;
  /** what lies on the person's shelf, after what was asked has been done */
  'hm-shelf': ShelfWish;
  /** open a starter as a project of its own */
  'hm-starter': { id: string };
  /** something that the page should say: politely, or at once */
  'hm-say': { text: string; urgent?: boolean };
}

export type PageAct =
  | 'undo' | 'redo' | 'projects' | 'starters' | 'leave' | 'sheet' | 'about' | 'help' | 'open-file'
  /** stop the running solve */ | 'cancel'
  /** solve once more */ | 'again'
  /** stop the running judgement of the requirements; begin it anew */ | 'judge-stop' | 'judge-again'
  /** after another tab saved the same project */ | 'keep-mine' | 'take-other';

export type ProjectAct =
  | { act: 'open' | 'copy' | 'bin' | 'restore' | 'delete'; id: string }
  | { act: 'rename'; id: string; name: string }
  | { act: 'new' | 'backup' }
  | { act: 'restore-backup'; text: string }
  | { act: 'rescue' | 'forget'; /** of a damaged record */ key: number };

export type VariantAct = { act: 'add'; name: string } | { act: 'rename'; id: string; name: string } | { act: 'open' | 'remove' | 'take-back' | 'delete'; id: string };

/** `answer` hears the whole shelf; null where the browser keeps none. */
export type ShelfWish = ({ act: 'look' } | { act: 'put'; entries: readonly LooseEntry[] } | { act: 'drop'; key: string }) & { answer(items: readonly ShelfItem[] | null): void };

/** The one way an element speaks. */
export function tell<K extends keyof HalfmarkEvents>(from: EventTarget, name: K, detail: HalfmarkEvents[K]): void {
  from.dispatchEvent(new CustomEvent(name, { detail, bubbles: true, composed: true }));
}
