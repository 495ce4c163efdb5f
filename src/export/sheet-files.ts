import { zipSync } from 'fflate';
import type { Drawing } from '../drawing/shapes.ts';
import { svgText } from '../drawing/svg-text.ts';
import type { Provenance } from '../result/types.ts';
import { pdfOf, type FontFiles } from './pdf.ts';

/** The pages of a sheet as one PDF. */
export function sheetPdf(pages: readonly Drawing[], fonts: FontFiles, of: { title: string; author: string; provenance: Provenance }): Uint8Array {
  const { provenance } = of;
  return pdfOf(pages, fonts, {
    title: `Review sheet: ${of.title}`, author: of.author, creator: `Halfmark ${provenance.program}`,
    subject: `model ${provenance.model}, parameters ${provenance.presets}, design ${provenance.design}`,
  });
}

/** The pages as SVG files, "NAME-1.svg" and on; a single page is "NAME.svg". */
export function sheetSvgs(pages: readonly Drawing[], name: string): { name: string; text: string }[] {
  return pages.map((page, i) => ({ name: pages.length === 1 ? `${name}.svg` : `${name}-${i + 1}.svg`, text: svgText(page) }));
}

/** Files in one archive. The time in it is the first that the format knows, so that the same files give the same bytes. */
export function archiveOf(files: readonly { name: string; bytes: Uint8Array }[]): Uint8Array {
  return zipSync(Object.fromEntries(files.map(({ name, bytes }) => [name, bytes])), { level: 6, mtime: new Date(1980, 0, 1) });
}
