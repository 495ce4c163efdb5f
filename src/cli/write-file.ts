import { open, realpath, rename, rm, stat, writeFile } from 'node:fs/promises';
import { quoted } from '../quantity/wording.ts';
import { UsageError } from './command.ts';

/**
 * Writes a file whole or not at all: into a neighbour first, which then takes its place. What is no ordinary file (a pipe, a terminal) is written straight.
 *
 * @throws {UsageError} it cannot be written; what was there before is still there
 */
export async function writeWhole(file: string, content: string | Uint8Array): Promise<void> {
  try {
    const target = await targetOf(file);
    if (target === null) return await writeFile(file, content);
    const unfinished = `${target}.${process.pid}.part`;
    try {
      const handle = await open(unfinished, 'w');
      try {
        await handle.writeFile(content);
        await handle.sync();
      } finally {
        await handle.close();
      }
      await rename(unfinished, target);
    } catch (error) {
      await rm(unfinished, { force: true });
      throw error;
    }
  } catch (error) {
    const code = (error as NodeJS.ErrnoException).code;
    throw new UsageError(`${quoted(file)} cannot be written (${code === 'ENOENT' ? 'its folder is not there' : code === 'EISDIR' ? 'it is a folder' : (code ?? 'unknown reason')})`);
  }
}

/** The file that a link leads to; null for what cannot be replaced by another file. @throws a folder */
async function targetOf(file: string): Promise<string | null> {
  try {
    const target = await realpath(file);
    const found = await stat(target);
    if (found.isDirectory()) throw Object.assign(new Error(), { code: 'EISDIR' });
    return found.isFile() ? target : null;
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return file;
    throw error;
  }
}
