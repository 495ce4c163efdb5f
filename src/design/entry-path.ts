import type { Pure } from './types.ts';

/**
 * Values of an entry by their path: keys joined by dots; a named step of a list by its name ("otherValleys.X.gap.zeroK"), a step of `depth.points` or `barriers` by its number.
 * A list of pure numbers (a mass as a polynomial in T) is one value, written with semicolons; a range is written with " to ".
 */
type Node = Record<string, unknown> | unknown[];

const isNode = (value: unknown): value is Node => value !== null && typeof value === 'object';

/** The step from a node: what it leads to, and how the reader of designs writes it in a place. */
function step(node: Node, key: string): { key: string | number; place: string } | null {
  if (!Array.isArray(node)) return Object.hasOwn(node, key) ? { key, place: `.${key}` } : null;
  const named = node.findIndex((item) => isNode(item) && !Array.isArray(item) && Object.hasOwn(item, 'name') && item.name === key);
  const at = named >= 0 ? named : /^\d+$/.test(key) ? Number(key) : -1;
  return at >= 0 && at < node.length ? { key: at, place: `[${at}]` } : null;
}

interface Found {
  holder: Node;
  key: string | number;
  /** behind the entry's own place: ".otherValleys[0].gap.zeroK" */ place: string;
}

/** A name may hold dots itself, so the longest step that leads on is taken. */
function find(root: Node, keys: readonly string[], place: string): Found | null {
  for (let count = keys.length; count >= 1; count--) {
    const next = step(root, keys.slice(0, count).join('.'));
    if (next === null) continue;
    const value = (root as Record<string | number, unknown>)[next.key];
    if (count === keys.length) return pointOf(root, next.key, value, place + next.place);
    const found = isNode(value) ? find(value, keys.slice(count), place + next.place) : null;
    if (found !== null) return found;
  }
  return null;
}

/** A point of a depth is [x, depth]: the depth is its value. A barrier's value is its height. */
function pointOf(holder: Node, key: string | number, value: unknown, place: string): Found {
  if (Array.isArray(holder) && Array.isArray(value) && value.length === 2) return { holder: value, key: 1, place: `${place}[1]` };
  if (Array.isArray(holder) && isNode(value) && !Array.isArray(value) && Object.hasOwn(value, 'height')) return { holder: value, key: 'height', place: `${place}.height` };
  return { holder, key, place };
}

const valueOf = ({ holder, key }: Found): unknown => (holder as Record<string | number, unknown>)[key];
const isRange = (path: string): boolean => path.startsWith('validity');

/** @returns the value as a person edits it; null where the entry has none there */
export function textAtPath(entry: object, path: string): string | null {
  const found = find(entry as Node, path.split('.'), '');
  const value = found && valueOf(found);
  if (typeof value === 'string' || typeof value === 'number') return String(value);
  return Array.isArray(value) ? value.join(isRange(path) ? ' to ' : '; ') : null;
}

/** @returns where the reader of designs complains of it, behind the entry's own place; "." and the path for a value that is not there */
export function placeOfPath(entry: object, path: string): string {
  return find(entry as Node, path.split('.'), '')?.place ?? `.${path}`;
}

/**
 * Puts a text at a path of an entry that may be changed (a copy or a draft). Steps that are not there are made, as objects.
 * @throws {RangeError} the path leads through something that is no object
 */
export function putAtPath(entry: object, path: string, text: string): void {
  const found = find(entry as Node, path.split('.'), '') ?? made(entry as Node, path);
  const list = Array.isArray(valueOf(found));
  (found.holder as Record<string | number, unknown>)[found.key] = list ? partsOf(path, text) : text;
}

/** A list as its texts; pure numbers that a person writes are kept as written. */
export function partsOf(path: string, text: string): Pure[] {
  return text.split(isRange(path) ? /\s+to\s+/ : ';').map((part) => part.trim());
}

/** Takes a value out, and what then is empty above it. */
export function dropAtPath(entry: object, path: string): void {
  const found = find(entry as Node, path.split('.'), '');
  if (found === null || Array.isArray(found.holder)) return;
  delete found.holder[found.key as string];
  const above = path.slice(0, path.lastIndexOf('.'));
  if (path.includes('.') && Object.keys(found.holder).length === 0) dropAtPath(entry, above);
}

function made(entry: Node, path: string): Found {
  const keys = path.split('.');
  let node = entry;
  for (const key of keys.slice(0, -1)) {
    if (key === '__proto__') throw new RangeError(`no value at ${path}`);
    const record = node as Record<string, unknown>;
    if (!Object.hasOwn(record, key)) record[key] = {};
    const next = record[key];
    if (!isNode(next) || Array.isArray(next)) throw new RangeError(`no value at ${path}`);
    node = next;
  }
  return { holder: node, key: keys[keys.length - 1], place: `.${path}` };
}
