import type { FontFiles } from './pdf.ts';

let files: Promise<FontFiles> | null = null;

/**
 * The faces of PDF files, fetched from the page's own server when the first one is made. In the browser only.
 *
 * @throws {Error} with a sentence, where they cannot be had; the next call tries again
 */
export function pdfFonts(): Promise<FontFiles> {
  files ??= Promise.all([
    // Literal addresses: that is how the build finds the files and puts them beside the page.
    read(new URL('../../node_modules/dejavu-fonts-ttf/ttf/DejaVuSans.ttf', import.meta.url)),
    read(new URL('../../node_modules/dejavu-fonts-ttf/ttf/DejaVuSans-Bold.ttf', import.meta.url)),
  ]).then(
    ([normal, bold]) => ({ normal, bold }),
    (error: unknown) => {
      files = null;
      throw error;
    },
  );
  return files;
}

async function read(address: URL): Promise<Uint8Array> {
  const answer = await fetch(address).catch(() => null);
  if (!answer?.ok) throw new Error('the letters of the PDF could not be loaded');
  return new Uint8Array(await answer.arrayBuffer());
}
