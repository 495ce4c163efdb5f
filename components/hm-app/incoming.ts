import type { ReactiveController, ReactiveControllerHost } from 'lit';
import { fileTooLarge } from '../../src/storage/backup-bounds.ts';
import { droppedHandle, OpenedFile, pickedHandle, type FileHandle } from '../shared/opened-file.ts';

/** A text that came to the page, and what it came as. */
export interface Incoming {
  text: string;
  /** name of the file; empty for a text that was pasted */ name: string;
  /** the file itself, where the browser lets it be written back */ file?: OpenedFile;
}

/**
 * Files dropped on the page, texts pasted into it (not into a field), files chosen by a picker, and designs inside the page's address.
 */
export class IncomingController implements ReactiveController {
  readonly #host: ReactiveControllerHost;
  readonly #take: (incoming: Incoming) => void;
  readonly #refuse: (sentence: string) => void;
  /** something is being dragged over the page */ over = false;

  constructor(host: ReactiveControllerHost, take: (incoming: Incoming) => void, refuse: (sentence: string) => void) {
    this.#host = host;
    this.#take = take;
    this.#refuse = refuse;
    host.addController(this);
  }

  hostConnected(): void {
    addEventListener('dragover', this.#dragOver);
    addEventListener('dragleave', this.#dragLeave);
    addEventListener('drop', this.#drop);
    addEventListener('paste', this.#paste);
    addEventListener('hashchange', this.takeLink);
  }

  hostDisconnected(): void {
    removeEventListener('dragover', this.#dragOver);
    removeEventListener('dragleave', this.#dragLeave);
    removeEventListener('drop', this.#drop);
    removeEventListener('paste', this.#paste);
    removeEventListener('hashchange', this.takeLink);
  }

  /** Lets the person pick a file. */
  async pick(): Promise<void> {
    const handle = await pickedHandle();
    if (handle === null) return;
    if (handle !== undefined) return this.#readHandle(handle);
    const input = document.createElement('input');
    input.type = 'file';
    input.accept = '.json,application/json';
    input.addEventListener('change', () => void this.#read(input.files?.[0]));
    input.click();
  }

  /** Takes the design out of the address, if it carries one: a reload does not open it again. */
  readonly takeLink = async (): Promise<void> => {
    const address = location.href;
    if (!address.includes('#design=')) return;
    history.replaceState(null, '', location.pathname + location.search);
    try {
      const { textOfLink } = await import('../../src/export/link.ts');
      this.#take({ text: await textOfLink(address), name: 'The link' });
    } catch (error) {
      this.#refuse(error instanceof Error ? error.message : String(error));
    }
  };

  readonly #dragOver = (event: DragEvent): void => {
    if (!event.dataTransfer?.types.includes('Files')) return;
    event.preventDefault();
    if (!this.over) {
      this.over = true;
      this.#host.requestUpdate();
    }
  };

  readonly #dragLeave = (event: DragEvent): void => {
    // The pointer left the window, not just one element for the next.
    if (event.relatedTarget !== null) return;
    this.over = false;
    this.#host.requestUpdate();
  };

  readonly #drop = (event: DragEvent): void => {
    this.over = false;
    this.#host.requestUpdate();
    const file = event.dataTransfer?.files[0];
    if (file === undefined) return;
    event.preventDefault();
    // The browser answers for the item only while it tells of the drop.
    void droppedHandle(event.dataTransfer!).then((handle) => this.#read(file, handle));
  };

  readonly #paste = (event: ClipboardEvent): void => {
    const target = event.composedPath()[0];
    if (target instanceof HTMLInputElement || target instanceof HTMLTextAreaElement) return;
    const text = event.clipboardData?.getData('text/plain') ?? '';
    // Anything else on the clipboard was meant for another place.
    if (text.trimStart().startsWith('{')) this.#take({ text, name: '' });
  };

  async #readHandle(handle: FileHandle): Promise<void> {
    try {
      await this.#read(await handle.getFile(), handle);
    } catch (error) {
      this.#refuse(`${handle.name} could not be read (${error instanceof Error ? error.message : String(error)}).`);
    }
  }

  async #read(file: File | undefined, handle: FileHandle | null = null): Promise<void> {
    if (file === undefined) return;
    // It is not even read: the reader would refuse it anyway.
    const tooLarge = fileTooLarge(file);
    if (tooLarge !== null) return this.#refuse(tooLarge);
    try {
      this.#take({ text: await file.text(), name: file.name, ...(handle === null ? {} : { file: new OpenedFile(handle, file) }) });
    } catch (error) {
      this.#refuse(`${file.name} could not be read (${error instanceof Error ? error.message : String(error)}).`);
    }
  }
}
