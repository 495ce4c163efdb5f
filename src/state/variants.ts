import type { Design } from '../design/types.ts';
import { freeName } from './commands/free-name.ts';
import type { HistoryRecord } from './history.ts';

/** A named copy of the design inside a project. Undo works within it. */
export interface Variant {
  id: string;
  name: string;
  /** put away; it can be taken back until it is deleted */ removed: boolean;
  design: Design;
  history: HistoryRecord;
}

/** The variants of a project in the order in which they were made. The open one is edited; what it holds here is as it was when it was last left. */
export interface VariantList {
  open: string;
  list: readonly Variant[];
}

/** What stands on the page: it belongs to the open variant. */
export type Present = Pick<Variant, 'design' | 'history'>;

const NO_HISTORY: HistoryRecord = { past: [], future: [] };
const FIRST = 'base';

/** A project that has been given no variants has one. */
export function loneVariant(design: Design): VariantList {
  return { open: FIRST, list: [{ id: FIRST, name: FIRST, removed: false, design, history: NO_HISTORY }] };
}

/** The list with what stands on the page put into the open variant. */
export function parked({ open, list }: VariantList, { design, history }: Present): VariantList {
  return { open, list: list.map((variant) => (variant.id === open ? { ...variant, design, history } : variant)) };
}

/** A copy of the open variant behind it, under a name that is free, which is the open one from now on. */
export function addVariant({ open, list }: VariantList, name: string, id: string = crypto.randomUUID()): VariantList {
  const at = list.findIndex((variant) => variant.id === open);
  const copy: Variant = { ...list[at], id, name: freeName(name.trim() || list[at].name, list.map((variant) => variant.name)), history: NO_HISTORY };
  return { open: id, list: [...list.slice(0, at + 1), copy, ...list.slice(at + 1)] };
}

export function openVariant(all: VariantList, id: string): VariantList {
  return all.list.some((variant) => variant.id === id && !variant.removed) ? { ...all, open: id } : all;
}

/** A name that another one has gets a number behind it; an empty one changes nothing. */
export function renameVariant(all: VariantList, id: string, name: string): VariantList {
  const wish = name.trim();
  if (wish === '' || all.list.some((variant) => variant.id === id && variant.name === wish)) return all;
  return changed(all, id, { name: freeName(wish, all.list.filter((variant) => variant.id !== id).map((variant) => variant.name)) });
}

/** Puts a variant away. If it is the open one, its neighbour is opened; the only one stays. */
export function removeVariant(all: VariantList, id: string): VariantList {
  const there = all.list.filter((variant) => !variant.removed);
  const at = there.findIndex((variant) => variant.id === id);
  if (at < 0 || there.length < 2) return all;
  const next = changed(all, id, { removed: true });
  return id === all.open ? { ...next, open: (there[at - 1] ?? there[at + 1]).id } : next;
}

export function takeBackVariant(all: VariantList, id: string): VariantList {
  return changed(all, id, { removed: false });
}

/** Deletes for good; only what was put away. */
export function deleteVariant(all: VariantList, id: string): VariantList {
  const list = all.list.filter((variant) => variant.id !== id || !variant.removed);
  return list.length === all.list.length ? all : { ...all, list };
}

function changed(all: VariantList, id: string, change: Partial<Variant>): VariantList {
  return { ...all, list: all.list.map((variant) => (variant.id === id ? { ...variant, ...change } : variant)) };
}
