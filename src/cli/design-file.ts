import { readFile, stat } from 'node:fs/promises';
import { InputError } from '../design/complaint.ts';
import { MOST_CHARACTERS, readDesign } from '../design/read.ts';
import type { Design } from '../design/types.ts';
import { quoted } from '../quantity/wording.ts';
import { UsageError, type Streams } from './command.ts';

/** @throws {UsageError} a file that cannot be read  @throws {InputError} one that is no design */
export async function readDesignFile(file: string, streams: Streams): Promise<Design> {
  const reading = readDesign(file === '-' ? await streams.stdin() : await textOf(file));
  if (!reading.ok) throw new InputError(reading.complaints);
  return reading.design;
}

async function textOf(file: string): Promise<string> {
  try {
    const { size } = await stat(file);
    // A file of bytes beyond any design is not even read.
    if (size > 4 * MOST_CHARACTERS) throw new UsageError(`${quoted(file)} has ${Math.round(size / 1e6)} MB; a design of more than ${MOST_CHARACTERS / 1e6} MB is not read`);
    return await readFile(file, 'utf8');
  } catch (error) {
    if (error instanceof UsageError) throw error;
    const code = (error as NodeJS.ErrnoException).code;
    throw new UsageError(code === 'ENOENT' ? `there is no file ${quoted(file)}` : code === 'EISDIR' ? `${quoted(file)} is a folder; name a design file in it` : `${quoted(file)} cannot be read (${code ?? 'unknown reason'})`);
  }
}
