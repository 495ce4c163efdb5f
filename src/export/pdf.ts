import { plainText, type Drawing } from '../drawing/shapes.ts';
import { pageOf, PT_PER_PX, type Faces } from './pdf-page.ts';
import { pdfNumber, PdfObjects, pdfText } from './pdf-objects.ts';
import { PdfStructure } from './pdf-structure.ts';
import { PdfTypeface } from './pdf-typeface.ts';
import { printable } from './printable.ts';

/** Font files of the document, TrueType. */
export interface FontFiles {
  normal: Uint8Array;
  bold: Uint8Array;
}

/** Properties that a reader of PDF shows. */
export interface PdfProperties {
  title: string;
  author: string;
  subject: string;
  /** the program and its version */ creator: string;
}

/**
 * Drawings as a PDF file, one a page: vectors, and text as text in an embedded font; where the drawings say what their shapes belong to, with headings, tables and figures told
 * to programs that read aloud. The same drawings and fonts give the same bytes on every machine.
 *
 * @throws {RangeError} no drawing; a drawing with paints or paths that are not written here
 */
export function pdfOf(drawings: readonly Drawing[], fonts: FontFiles, properties: PdfProperties): Uint8Array {
  if (drawings.length === 0) throw new RangeError('a PDF needs at least one page');
  const faces: Faces = { normal: new PdfTypeface(fonts.normal, 'DejaVuSans'), bold: new PdfTypeface(fonts.bold, 'DejaVuSans-Bold') };
  const objects = new PdfObjects();
  const root = objects.reserve();
  const tree = objects.reserve();
  const structure = new PdfStructure();
  const pages = drawings.map((drawing, page) => ({ drawing, ...pageOf(drawing, faces, { structure, page }) }));
  // The faces are written when every page has said what it shows.
  const bold = drawings.some((d) => d.shapes.some((s) => s.kind === 'text' && s.weight === 'bold' && printable(plainText(s.runs)) !== ''));
  const fontNames = `/F1 ${faces.normal.write(objects)} 0 R${bold ? ` /F2 ${faces.bold.write(objects)} 0 R` : ''}`;
  const numbers = pages.map(({ drawing, content, resources }, page) =>
    objects.add(
      `<< /Type /Page /Parent ${tree} 0 R /MediaBox [0 0 ${pdfNumber(drawing.width * PT_PER_PX)} ${pdfNumber(drawing.height * PT_PER_PX)}] /Resources << /Font << ${fontNames} >> ${resources} >> /Contents ${objects.stream(content)} 0 R /StructParents ${page} /Tabs /S >>`,
    ),
  );
  objects.set(tree, `<< /Type /Pages /Kids [${numbers.map((number) => `${number} 0 R`).join(' ')}] /Count ${numbers.length} >>`);
  const told = structure.empty ? '' : `/MarkInfo << /Marked true >> /StructTreeRoot ${structure.write(objects, numbers)} 0 R `;
  objects.set(root, `<< /Type /Catalog /Pages ${tree} 0 R ${told}/Lang (en) /ViewerPreferences << /DisplayDocTitle true >> >>`);
  const { title, author, subject, creator } = properties;
  const rows = Object.entries({ Title: title, Author: author, Subject: subject, Creator: creator }).filter(([, text]) => text !== '');
  const info = objects.add(`<< ${rows.map(([key, text]) => `/${key} ${pdfText(printable(text))}`).join(' ')} >>`);
  return objects.file(root, info);
}
