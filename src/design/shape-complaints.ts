import * as v from 'valibot';
import { didYouMean, quoted } from '../quantity/wording.ts';
import type { Complaint } from './complaint.ts';
import { designShape } from './shape.ts';

/** Keys that every object has without being asked: JSON can carry them, a schema would not see them. */
const INHERITED = new Set(['__proto__', ...Object.getOwnPropertyNames(Object.prototype)]);
const MOST_DEPTH = 40;
/** Values in a document of which every fault is told: some 2000 layers. */
const MOST_PARTS = 50_000;
/** Inherited keys that are told one by one. */
const MOST_HIDDEN = 100;

/** Everything that is wrong with the shape of a document; empty when it is a design. */
export function shapeComplaints(document: unknown): Complaint[] {
  const { hidden, parts } = walked(document);
  if (hidden.length > 0) return hidden;
  // Hundreds of thousands of faults would hold the page up for seconds and be read by nobody: of a huge document the first one is told.
  const answer = v.safeParse(designShape, document, { abortEarly: parts > MOST_PARTS });
  if (answer.success) return [];
  return unique(answer.issues.flatMap((issue) => complaintsOf(issue, '')));
}

function complaintsOf(issue: v.BaseIssue<unknown>, above: string): Complaint[] {
  const path = pathOf(issue.path, above);
  if (issue.type === 'union' && issue.issues) return unionComplaints(issue, path);
  if (issue.type === 'strict_object' && issue.expected === 'never') {
    const key = String(issue.path?.at(-1)?.key);
    const parent = issue.path?.at(-1)?.input;
    return [{ path, message: `there is no key ${quoted(key)} here${didYouMean(key, keysBeside(parent, path))}` }];
  }
  if (issue.received === 'undefined') return [{ path, message: 'is missing' }];
  if (issue.type === 'min_length') return [{ path, message: issue.input === '' ? 'is empty; give it a name' : 'is empty; at least one is needed' }];
  if (issue.type === 'max_length') return [{ path, message: `is too long; at most ${String(issue.requirement)} are read` }];
  if (issue.type === 'variant' || issue.type === 'picklist' || issue.type === 'literal') {
    const words = options(issue);
    return [{ path, message: `is ${quoted(issue.input)}; ${listed(words)} would do${typeof issue.input === 'string' ? didYouMean(issue.input, words) : ''}` }];
  }
  return [{ path, message: `is ${quoted(issue.input)}; ${expectedWords(issue)} belongs here` }];
}

/** Of a value that may be one of several things: what is wrong with the one that it most resembles. */
function unionComplaints(issue: v.BaseIssue<unknown>, path: string): Complaint[] {
  if (issue.input !== null && typeof issue.input === 'object' && !Array.isArray(issue.input)) {
    const meant = meantOption(schemaAt(path), issue.input);
    if (meant) {
      const answer = v.safeParse(meant as v.GenericSchema, issue.input);
      if (!answer.success) return answer.issues.flatMap((i) => complaintsOf(i, path));
    }
  }
  const words = [...new Set((issue.issues as v.BaseIssue<unknown>[]).filter((i) => (i.path?.length ?? 0) === 0).map(expectedWords))];
  return [{ path, message: `is ${quoted(issue.input)}; ${words.join(' or ')} belongs here` }];
}

function pathOf(path: v.BaseIssue<unknown>['path'], above: string): string {
  let out = above;
  for (const item of path ?? []) {
    if (typeof item.key === 'number') out += `[${item.key}]`;
    else out += out === '' ? String(item.key) : `.${String(item.key)}`;
  }
  return out;
}

function expectedWords(issue: v.BaseIssue<unknown>): string {
  if (issue.type === 'picklist' || issue.type === 'literal' || issue.type === 'variant') return listed(options(issue));
  // A quantity says in its message what belongs in its place (shape.ts).
  if (issue.type === 'string' && !issue.message.startsWith('Invalid')) return issue.message;
  const words: Record<string, string> = { string: 'text in quotes', number: 'a number', boolean: 'true or false', array: 'a list', tuple: 'a list of two', strict_tuple: 'a list of two', object: 'an object', strict_object: 'an object', Object: 'an object', Array: 'a list' };
  return words[issue.type] ?? words[issue.expected ?? ''] ?? String(issue.expected);
}

function options(issue: v.BaseIssue<unknown>): string[] {
  return [...String(issue.expected).matchAll(/"([^"]*)"/g)].map((m) => m[1]);
}

const listed = (words: string[]): string => (words.length < 2 ? `"${words[0]}"` : `${words.slice(0, -1).map((w) => `"${w}"`).join(', ')} or "${words[words.length - 1]}"`);

/** Schemas of valibot, as far as they are walked here. */
interface Walked {
  type: string;
  literal?: unknown;
  wrapped?: Walked;
  options?: Walked[];
  entries?: Record<string, Walked>;
  item?: Walked;
  items?: Walked[];
}

/** The objects that may stand at a place: options of a union and of a variant taken apart. */
function alternatives(schema: Walked): Walked[] {
  if (schema.wrapped) return alternatives(schema.wrapped);
  // A picklist has options as well, but they are words.
  if (schema.type === 'union' || schema.type === 'variant') return (schema.options as Walked[]).flatMap(alternatives);
  return [schema];
}

function schemaAt(path: string): Walked[] {
  let at: Walked[] = [designShape as unknown as Walked];
  for (const step of path.split(/[.[\]]+/).filter((s) => s !== '')) {
    at = at.flatMap((s) => {
      if (s.item) return alternatives(s.item);
      if (s.items) return s.items[Number(step)] ? alternatives(s.items[Number(step)]) : [];
      return s.entries && Object.hasOwn(s.entries, step) ? alternatives(s.entries[step]) : [];
    });
  }
  return at;
}

/** The alternative that an object was meant as: a fixed word that agrees counts before the number of keys that do. */
function meantOption(schemas: Walked[], input: object): Walked | null {
  let best: Walked | null = null;
  let most = -1;
  for (const s of schemas) {
    if (!s.entries) continue;
    let score = 0;
    for (const [key, entry] of Object.entries(s.entries)) {
      if (!Object.hasOwn(input, key)) continue;
      const literal = alternatives(entry)[0]?.literal;
      score += literal !== undefined && literal === (input as Record<string, unknown>)[key] ? 100 : 1;
    }
    if (score > most) [most, best] = [score, s];
  }
  return best;
}

/** The keys that the object at this place may have, for "did you mean". */
function keysBeside(parent: unknown, path: string): string[] {
  const above = path.replace(/(?:^|\.)[^.[\]]*$|\[[^\]]*\]$/, '');
  const meant = parent !== null && typeof parent === 'object' ? meantOption(schemaAt(above), parent) : null;
  return Object.keys(meant?.entries ?? {}).filter((k) => !Object.hasOwn(parent as object, k));
}

/** Looks at every value once: keys that no design may have, and how many values there are. */
function walked(document: unknown): { hidden: Complaint[]; parts: number } {
  const hidden: Complaint[] = [];
  let parts = 0;
  const open: { value: unknown; path: string; depth: number }[] = [{ value: document, path: '', depth: 0 }];
  for (let item = open.pop(); item; item = open.pop()) {
    const { value, path, depth } = item;
    parts++;
    if (value === null || typeof value !== 'object') continue;
    if (depth > MOST_DEPTH) return { hidden: [{ path: path.slice(0, 80), message: 'is nested too deeply to be a design' }], parts };
    for (const key of Object.keys(value)) {
      const place = Array.isArray(value) ? `${path}[${key}]` : path === '' ? key : `${path}.${key}`;
      if (INHERITED.has(key)) hidden.push({ path: place, message: `there is no key ${quoted(key)} here` });
      else open.push({ value: (value as Record<string, unknown>)[key], path: place, depth: depth + 1 });
    }
    if (hidden.length > MOST_HIDDEN) break;
  }
  return { hidden, parts };
}

function unique(complaints: Complaint[]): Complaint[] {
  const seen = new Set<string>();
  return complaints.filter((c) => {
    const line = `${c.path}\n${c.message}`;
    return seen.has(line) ? false : (seen.add(line), true);
  });
}
