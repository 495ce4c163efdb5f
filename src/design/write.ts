import type { Design } from './types.ts';

/** A design as the text of its file: the keys in their order, two spaces, a last line end. What was read is written back whole. */
export function writeDesign(design: Design): string {
  return `${JSON.stringify(design, null, 2)}\n`;
}
