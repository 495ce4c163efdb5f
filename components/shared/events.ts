import type { Design } from '../../src/design/types.ts';

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
  /** something that the page should say: politely, or at once */
  'hm-say': { text: string; urgent?: boolean };
}

/** The one way an element speaks. */
export function tell<K extends keyof HalfmarkEvents>(from: EventTarget, name: K, detail: HalfmarkEvents[K]): void {
  from.dispatchEvent(new CustomEvent(name, { detail, bubbles: true, composed: true }));
}
