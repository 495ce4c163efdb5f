/** What became of a file: written where the person said, handed to the browser's downloads, or given up by the person. */
export type FileOutcome = 'written' | 'downloaded' | 'given up';

/** The picker of files to write, where a browser has one; the standard types leave it out. */
type SavePicker = (options: { suggestedName: string; types: { description: string; accept: Record<string, string[]> }[] }) => Promise<{
  createWritable(): Promise<{ write(data: Blob): Promise<void>; close(): Promise<void> }>;
}>;

/**
 * Writes a file: through the picker where there is one, else as a download. To be called from a press of a button; what takes time to make is handed over as a promise, so that the
 * picker opens while the press still counts.
 *
 * @throws what making the content threw, or the disk
 */
export async function saveFile(name: string, type: string, content: Blob | Promise<Blob>): Promise<FileOutcome> {
  const picker = (window as { showSaveFilePicker?: SavePicker }).showSaveFilePicker;
  if (picker === undefined) {
    download(name, await content);
    return 'downloaded';
  }
  let handle: Awaited<ReturnType<SavePicker>>;
  try {
    const ending = /\.[a-z]+$/.exec(name)?.[0] ?? '.txt';
    handle = await picker.call(window, { suggestedName: name, types: [{ description: ending.slice(1).toUpperCase(), accept: { [type]: [ending] } }] });
  } catch (error) {
    if (error instanceof DOMException && error.name === 'AbortError') return 'given up';
    // Some browsers have the picker and forbid it here (a frame, a policy): the download always works.
    download(name, await content);
    return 'downloaded';
  }
  const writable = await handle.createWritable();
  await writable.write(await content);
  await writable.close();
  return 'written';
}

function download(name: string, content: Blob): void {
  const link = document.createElement('a');
  link.href = URL.createObjectURL(content);
  link.download = name;
  link.click();
  // The browser reads the address after the click returns.
  setTimeout(() => URL.revokeObjectURL(link.href), 60_000);
}

/** A title as the name of a file: letters, digits, dashes; never empty, never longer than most systems take. */
export function fileName(title: string, ending: string): string {
  const stem = title.normalize('NFKD').replace(/[^\p{L}\p{N}]+/gu, '-').replace(/^-+|-+$/g, '').slice(0, 60);
  return `${stem === '' ? 'design' : stem}${ending}`;
}
