import { styleOf } from '../drawing/styles.ts';

/** A rectangle of the mark, in its own units: 32 wide, 32 high. */
export interface MarkPart {
  x: number;
  y: number;
  width: number;
  height: number;
  fill: string;
}

/** Side of the square that the mark stands in, in its own units. */
export const MARK_SIDE = 32;

/** The program's mark: a layer whose states are filled to the half, and the Fermi level through it. Rectangles in the palette's colours, the later over the earlier. */
export function markParts(): MarkPart[] {
  const { ground, ink, occupancy } = styleOf('light');
  const dash = (x: number): MarkPart => ({ x, y: 14.75, width: 7, height: 2.5, fill: ink });
  return [
    { x: 3.75, y: 1.25, width: 24.5, height: 29.5, fill: ink },
    { x: 6.25, y: 3.75, width: 19.5, height: 24.5, fill: ground },
    { x: 6.25, y: 16, width: 19.5, height: 12.25, fill: occupancy },
    dash(2),
    dash(12),
    dash(22),
  ];
}

/** The mark as an SVG file. */
export function markSvg(): string {
  const parts = markParts().map(({ x, y, width, height, fill }) => `<rect x="${x}" y="${y}" width="${width}" height="${height}" fill="${fill}"/>`);
  return `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 ${MARK_SIDE} ${MARK_SIDE}">${parts.join('')}</svg>\n`;
}
