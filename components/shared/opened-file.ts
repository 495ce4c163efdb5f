/** The part of a browser's file handle that is used here; the standard types leave the asking for leave out. */
export interface FileHandle {
  readonly kind: string;
  readonly name: string;
  getFile(): Promise<File>;
  createWritable(): Promise<{ write(data: Blob): Promise<void>; close(): Promise<void>; abort(): Promise<void> }>;
  queryPermission?(of: { mode: 'readwrite' }): Promise<PermissionState>;
  requestPermission?(of: { mode: 'readwrite' }): Promise<PermissionState>;
}

/** What became of writing back: a sentence for the person, and where nothing was written why. */
export type WrittenBack = { kind: 'written'; said: string } | { kind: 'refused' | 'gone' | 'changed' | 'failed'; said: string };

/**
 * A file that a design was opened from, for as long as the page stays open. It is written only while it is as it was read or last written here: what another program did to it
 * is never overwritten unasked.
 */
export class OpenedFile {
  readonly name: string;
  readonly #handle: FileHandle;
  /** ms; of the file as this page knows it */ #modified: number;
  /** the one writing at a time */ #writing: Promise<WrittenBack> | null = null;

  /** @param read  the file as it was when it was read */
  constructor(handle: FileHandle, read: Pick<File, 'lastModified'>) {
    this.name = handle.name;
    this.#handle = handle;
    this.#modified = read.lastModified;
  }

  /**
   * Writes the file anew. To be called from a press: the browser may ask the person for leave. Never rejects; where it fails the file is as it was.
   *
   * @param over  although another program changed it
   */
  write(content: Promise<Blob>, over = false): Promise<WrittenBack> {
    this.#writing ??= this.#write(content, over).finally(() => (this.#writing = null));
    return this.#writing;
  }

  async #write(content: Promise<Blob>, over: boolean): Promise<WrittenBack> {
    const { name } = this;
    // Made meanwhile: a refusal below must not leave a failure that nobody hears of.
    content.catch(() => undefined);
    try {
      if (!(await this.#allowed())) return { kind: 'refused', said: `This page was not allowed to write ${name}. Nothing was written there.` };
      const there = await this.#handle.getFile();
      if (there.lastModified !== this.#modified && !over) return { kind: 'changed', said: `${name} was changed by something else since it was opened here. Nothing was written over it.` };
      const blob = await content;
      const writable = await this.#handle.createWritable();
      try {
        await writable.write(blob);
      } catch (error) {
        // What was written so far is thrown away; the file itself is untouched until the writing is closed.
        await writable.abort().catch(() => undefined);
        throw error;
      }
      await writable.close();
      this.#modified = (await this.#handle.getFile()).lastModified;
      return { kind: 'written', said: `Saved to ${name}.` };
    } catch (error) {
      const kind = error instanceof DOMException ? error.name : '';
      if (kind === 'NotFoundError') return { kind: 'gone', said: `${name} is not there any more: it was moved, renamed or deleted. Nothing was written.` };
      if (kind === 'NotAllowedError' || kind === 'SecurityError' || kind === 'NoModificationAllowedError') return { kind: 'refused', said: `This page may not write ${name}. Nothing was written there.` };
      return { kind: 'failed', said: `${name} could not be written (${error instanceof Error ? error.message : String(error)}). The file is as it was.` };
    }
  }

  async #allowed(): Promise<boolean> {
    const mode = { mode: 'readwrite' } as const;
    if ((await this.#handle.queryPermission?.(mode)) === 'granted') return true;
    // Browsers without the question ask when the writing begins.
    return this.#handle.requestPermission === undefined || (await this.#handle.requestPermission(mode)) === 'granted';
  }
}

type OpenPicker = (options: { multiple: false; types: { description: string; accept: Record<string, string[]> }[] }) => Promise<FileHandle[]>;

/**
 * Lets the person pick a design file with the picker that hands over the file itself, where there is one.
 *
 * @returns null where the person thinks better of it; undefined where there is no such picker
 */
export async function pickedHandle(): Promise<FileHandle | null | undefined> {
  const picker = (window as { showOpenFilePicker?: OpenPicker }).showOpenFilePicker;
  if (picker === undefined) return undefined;
  try {
    return (await picker.call(window, { multiple: false, types: [{ description: 'JSON', accept: { 'application/json': ['.json'] } }] }))[0] ?? null;
  } catch (error) {
    // Some browsers have the picker and forbid it here (a frame, a policy).
    return error instanceof DOMException && error.name === 'AbortError' ? null : undefined;
  }
}

/** The handle of a dropped file, to be asked for while the drop is being told; null where the browser gives none. */
export async function droppedHandle(transfer: DataTransfer): Promise<FileHandle | null> {
  const item = [...transfer.items].find(({ kind }) => kind === 'file') as (DataTransferItem & { getAsFileSystemHandle?(): Promise<FileHandle | null> }) | undefined;
  try {
    const handle = (await item?.getAsFileSystemHandle?.()) ?? null;
    return handle?.kind === 'file' ? handle : null;
  } catch {
    // The file can be read all the same.
    return null;
  }
}
