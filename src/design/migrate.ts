import { quoted } from '../quantity/wording.ts';
import type { Complaint } from './complaint.ts';
import { DESIGN_FORMAT } from './types.ts';

/** One step of the climb: takes a document of version `from`, returns one of `from + 1`. Each lives in a file of its own beside this one. */
export interface Migration {
  from: number;
  climb(document: Record<string, unknown>): Record<string, unknown>;
}

const NAME = 'halfmark-design';
const CURRENT = Number(DESIGN_FORMAT.split('/')[1]);
/** None yet: version 1 is the first. */
const MIGRATIONS: readonly Migration[] = [];

/**
 * Brings a document to today's version.
 *
 * @returns the document, or a complaint: no design at all, or one of a newer version
 * @throws {Error} a migration that does not move the version (our own bug)
 */
export function migrate(document: unknown, migrations: readonly Migration[] = MIGRATIONS, current = CURRENT): { ok: true; document: unknown } | { ok: false; complaint: Complaint } {
  if (document === null || typeof document !== 'object' || Array.isArray(document)) return no('', `this is no design; a design is an object that begins with "format": "${NAME}/${current}"`);
  const format = (document as Record<string, unknown>).format;
  if (format === undefined) return no('format', `is missing; a design says "format": "${NAME}/${current}"`);
  const found = typeof format === 'string' ? /^([a-z-]+)\/(\d{1,6})$/.exec(format) : null;
  if (!found || found[1] !== NAME) return no('format', `is ${quoted(format)}, which is no design of this program; "${NAME}/${current}" is read`);
  let version = Number(found[2]);
  if (version > current) return no('format', `is version ${version}, made by a newer program; this one reads up to version ${current}: update it, or save the design in the older form there`);
  let at = document as Record<string, unknown>;
  while (version < current) {
    const step = migrations.find((m) => m.from === version);
    if (!step) return no('format', `is version ${version}, which this program no longer reads; version ${current} is read`);
    at = step.climb(at);
    if (at.format !== `${NAME}/${version + 1}`) throw new Error(`the migration from version ${version} left the format at ${String(at.format)}`);
    version++;
  }
  return { ok: true, document: at };
}

function no(path: string, message: string): { ok: false; complaint: Complaint } {
  return { ok: false, complaint: { path, message } };
}
