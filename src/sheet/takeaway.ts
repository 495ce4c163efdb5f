import { reviewSheet, type SheetInput } from './review-sheet.ts';

export type SheetForm = 'pdf' | 'svg' | 'png';

/** px of a PNG for each px of the sheet. */
const PNG_SCALE = 2;

/**
 * The review sheet as a file, in the browser: one PDF, or an archive of one SVG or PNG a page. What writes the form that is asked for, and the letters of the PDF, are fetched at the
 * first call.
 *
 * @throws {Error} with a sentence: the letters could not be loaded, the browser draws no picture
 */
export async function sheetTakeaway(form: SheetForm, input: SheetInput): Promise<Blob> {
  const pages = reviewSheet(input);
  const { archiveOf, sheetPdf, sheetSvgs } = await import('../export/sheet-files.ts');
  if (form === 'pdf') {
    const { pdfFonts } = await import('../export/pdf-fonts.ts');
    const bytes = sheetPdf(pages, await pdfFonts(), { title: input.title?.trim() || input.design.title, author: input.author, provenance: input.result.provenance });
    return blobOf(bytes, 'application/pdf');
  }
  const svgs = sheetSvgs(pages, 'sheet');
  if (form === 'svg') return blobOf(archiveOf(svgs.map(({ name, text }) => ({ name, bytes: new TextEncoder().encode(text) }))), 'application/zip');
  const { plateSvgToPng } = await import('../export/png.ts');
  const files: { name: string; bytes: Uint8Array }[] = [];
  // One after the other: a page at double size takes some 14 MB while it is drawn.
  for (const { name, text } of svgs) files.push({ name: name.replace(/svg$/, 'png'), bytes: new Uint8Array(await (await plateSvgToPng(text, PNG_SCALE)).arrayBuffer()) });
  return blobOf(archiveOf(files), 'application/zip');
}

function blobOf(bytes: Uint8Array, type: string): Blob {
  return new Blob([bytes as Uint8Array<ArrayBuffer>], { type });
}
