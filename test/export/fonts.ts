import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import type { FontFiles } from '../../src/export/pdf.ts';

const read = (name: string): Uint8Array => readFileSync(join(import.meta.dirname, `../../node_modules/dejavu-fonts-ttf/ttf/${name}.ttf`));

/** The faces that the PDF embeds. */
export const FONTS: FontFiles = { normal: read('DejaVuSans'), bold: read('DejaVuSans-Bold') };
