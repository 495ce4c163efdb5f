/**
 * Differences between two JSON documents, each with what it takes to go back. Paths run through objects by key and through lists by index.
 *
 * A list that grew or shrank differs by one splice (what stood between the common head and the common tail), so putting a layer in does not rewrite all
 * layers below it. Keys whose value is undefined count as absent, as they do in JSON.
 */
export type Json = null | boolean | number | string | Json[] | { [key: string]: Json | undefined };

export type Path = (string | number)[];
export type Change =
  /** the value at a path; a side that is missing means that the key was not there */
  | { path: Path; before?: Json; after?: Json }
  /** in the list at a path, from index `at`: these out, those in */
  | { path: Path; at: number; out: Json[]; into: Json[] };

/** @returns every change that leads from `before` to `after`; none where they are equal */
export function difference(before: Json | undefined, after: Json | undefined, path: Path = []): Change[] {
  if (before === after) return [];
  if (Array.isArray(before) && Array.isArray(after)) return ofLists(before, after, path);
  if (isObject(before) && isObject(after)) {
    const keys = new Set([...Object.keys(before), ...Object.keys(after)]);
    return [...keys].flatMap((key) => difference(before[key], after[key], [...path, key]));
  }
  return [{ path, ...(before === undefined ? {} : { before }), ...(after === undefined ? {} : { after }) }];
}

/** The changes that lead back, in the order in which they must be made. */
export function inverse(changes: readonly Change[]): Change[] {
  return changes
    .map((change): Change => {
      if ('at' in change) return { path: change.path, at: change.at, out: change.into, into: change.out };
      return { path: change.path, ...('after' in change ? { before: change.after } : {}), ...('before' in change ? { after: change.before } : {}) };
    })
    .reverse();
}

/**
 * @returns the document after the changes; parts that did not change are shared with the one given
 * @throws {RangeError} the document is not the one that these changes start from
 */
export function apply(document: Json, changes: readonly Change[]): Json {
  return changes.reduce((now, change) => changed(now, change, 0) as Json, document);
}

/** Equal as JSON: the order of keys does not count. */
export function same(a: Json | undefined, b: Json | undefined): boolean {
  return difference(a, b).length === 0;
}

function ofLists(before: Json[], after: Json[], path: Path): Change[] {
  const shorter = Math.min(before.length, after.length);
  let head = 0;
  while (head < shorter && same(before[head], after[head])) head++;
  let tail = 0;
  while (tail < shorter - head && same(before[before.length - 1 - tail], after[after.length - 1 - tail])) tail++;
  const out = before.slice(head, before.length - tail);
  const into = after.slice(head, after.length - tail);
  if (out.length !== into.length) return [{ path, at: head, out, into }];
  return out.flatMap((item, i) => difference(item, into[i], [...path, head + i]));
}

function changed(node: Json | undefined, change: Change, depth: number): Json | undefined {
  if (depth < change.path.length) {
    const key = change.path[depth];
    if (Array.isArray(node) && typeof key === 'number' && key < node.length) return node.map((item, i) => (i === key ? (changed(item, change, depth + 1) as Json) : item));
    if (!isObject(node) || typeof key !== 'string') throw new RangeError(`nothing at ${change.path.join('.')}`);
    const { [key]: old, ...rest } = node;
    const next = changed(old, change, depth + 1);
    // Keys keep their order where they can: the document is meant to be read.
    if (next === undefined) return rest;
    return old === undefined ? { ...rest, [key]: next } : { ...node, [key]: next };
  }
  if ('at' in change) {
    if (!Array.isArray(node) || !same(node.slice(change.at, change.at + change.out.length), change.out)) throw new RangeError(`another list at ${change.path.join('.')}`);
    return [...node.slice(0, change.at), ...change.into, ...node.slice(change.at + change.out.length)];
  }
  if (!same(node, change.before)) throw new RangeError(`another value at ${change.path.join('.')}`);
  return change.after;
}

function isObject(value: Json | undefined): value is { [key: string]: Json | undefined } {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}
