import type { Design } from '../../src/design/types.ts';
import { writeDesign } from '../../src/design/write.ts';
import { drawPlate, type PlateOptions } from '../../src/drawing/plate.ts';
import type { StyleName } from '../../src/drawing/styles.ts';
import type { Result } from '../../src/result/types.ts';

/** How the plate looks on the page; an exported one looks the same. */
export type PlateLook = Partial<Pick<PlateOptions, 'depth' | 'window' | 'energyWindow' | 'shading' | 'vacuum' | 'levels' | 'hidden' | 'moved'>>;

/** px of the exported plate, for a slide of 16 to 9, and for one column of a journal. */
const SIZES: Record<StyleName, [width: number, height: number]> = { light: [1280, 720], dark: [1280, 720], slide: [1280, 720], journal: [720, 540] };

/** What makes the files, and is not on the page already, is fetched when the first one is asked for: the page opens without it. */
export async function plateSvg(result: Result, look: PlateLook, style: StyleName): Promise<string> {
  const { svgText } = await import('../../src/drawing/svg-text.ts');
  const [width, height] = SIZES[style];
  // Dragged figures keep the places they were dragged to, which are px of the page's own plate.
  return svgText(drawPlate(result, { ...look, moved: {}, style, width, height, frame: 'full' }));
}

export async function svgBlob(result: Result, look: PlateLook, style: StyleName): Promise<Blob> {
  return new Blob([await plateSvg(result, look, style)], { type: 'image/svg+xml' });
}

/** Twice the size of the SVG. */
export async function pngBlob(result: Result, look: PlateLook, style: StyleName): Promise<Blob> {
  const [{ plateSvgToPng }, svg] = await Promise.all([import('../../src/export/png.ts'), plateSvg(result, look, style)]);
  return plateSvgToPng(svg, 2);
}

export async function csvBlob(result: Result): Promise<Blob> {
  const { profileCsv } = await import('../../src/export/profile-csv.ts');
  return new Blob([profileCsv(result)], { type: 'text/csv' });
}

export async function tsvBlob(result: Result): Promise<Blob> {
  const { ledgerTsv } = await import('../../src/export/ledger-tsv.ts');
  return new Blob([ledgerTsv(result)], { type: 'text/tab-separated-values' });
}

export async function designBlob(design: Design): Promise<Blob> {
  return new Blob([writeDesign(design)], { type: 'application/json' });
}
