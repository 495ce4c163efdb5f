import type { Design } from '../../src/design/types.ts';
import type { Drawing } from '../../src/drawing/shapes.ts';
import type { SizedAnswer } from '../../src/requirements/size.ts';
import { fileName, saveFile, type FileOutcome } from '../shared/save-file.ts';

export type SizingFile = '.svg' | '.png' | '.csv';

const TYPES: Record<SizingFile, string> = { '.svg': 'image/svg+xml', '.png': 'image/png', '.csv': 'text/csv' };

/**
 * Writes the picture of a sizing, or its margins as a table. What makes the files is fetched with the first one.
 *
 * @param draw  the picture in the size of a slide
 */
export async function saveSizing(ending: SizingFile, answer: SizedAnswer, design: Design, draw: () => Drawing): Promise<{ name: string; outcome: FileOutcome | null }> {
  const name = fileName(`${design.title} margins against ${answer.variable}`, ending);
  const outcome = await saveFile(name, TYPES[ending], contentOf(ending, answer, design, draw)).catch(() => null);
  return { name, outcome };
}

async function contentOf(ending: SizingFile, answer: SizedAnswer, design: Design, draw: () => Drawing): Promise<Blob> {
  if (ending === '.csv') {
    const { marginsCsv } = await import('../../src/requirements/margins-csv.ts');
    return new Blob([marginsCsv(answer, design)], { type: TYPES[ending] });
  }
  const { svgText } = await import('../../src/drawing/svg-text.ts');
  const svg = svgText(draw());
  if (ending === '.svg') return new Blob([svg], { type: TYPES[ending] });
  const { plateSvgToPng } = await import('../../src/export/png.ts');
  return plateSvgToPng(svg, 2);
}
