import { quoted } from '../quantity/wording.ts';
import type { Complaint } from './complaint.ts';
import { migrate } from './migrate.ts';
import { shapeComplaints } from './shape-complaints.ts';
import type { Design } from './types.ts';

/** The largest file that is read, in characters. */
export const MOST_CHARACTERS = 5e6;

export type DesignReading = { ok: true; design: Design } | { ok: false; complaints: Complaint[] };

/**
 * Reads a design document from text: its size, its JSON, its version and its shape. What the texts in it mean (units, names, ranges) is asked by
 * to-stack.ts, so that a design with a mistyped thickness can still be opened and mended.
 */
export function readDesign(text: string): DesignReading {
  const fail = (path: string, message: string): DesignReading => ({ ok: false, complaints: [{ path, message }] });
  if (text.length > MOST_CHARACTERS) return fail('', `the file has ${Math.round(text.length / 1e6)} MB; a design of more than ${MOST_CHARACTERS / 1e6} MB is not read`);
  if (text.trim() === '') return fail('', 'the file is empty; a design is a JSON document');
  let document: unknown;
  try {
    document = JSON.parse(text.replace(/^\ufeff/, ''));
  } catch (error) {
    return fail('', `this is no JSON document: ${jsonFault(text, error)}`);
  }
  return checkDesign(document);
}

/** The same for a document that is already an object. The design returned is a copy. */
export function checkDesign(document: unknown): DesignReading {
  const climbed = migrate(document);
  if (!climbed.ok) return { ok: false, complaints: [climbed.complaint] };
  const complaints = shapeComplaints(climbed.document);
  if (complaints.length > 0) return { ok: false, complaints };
  return { ok: true, design: structuredClone(climbed.document) as Design };
}

/** Line and column of the fault, where the engine tells the place. */
function jsonFault(text: string, error: unknown): string {
  const message = error instanceof Error ? error.message : String(error);
  const at = /position (\d+)/.exec(message);
  if (!at) return `${quoted(message)}`;
  const before = text.slice(0, Number(at[1]));
  const line = before.split('\n').length;
  const column = before.length - before.lastIndexOf('\n');
  const found = text.slice(Number(at[1]), Number(at[1]) + 1);
  return found === '' ? `it ends too early, at line ${line}` : `line ${line}, column ${column} has ${quoted(found)} where something else belongs`;
}
