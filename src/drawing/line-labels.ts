import { runsWidth } from './glyph-widths.ts';
import type { PlotArea } from './plot-frame.ts';
import type { Shape, TextRun } from './shapes.ts';
import type { Style } from './styles.ts';

/** Labels on a picture, each on a piece of ground; one that would lie on another is left out. */
export class Labels {
  readonly shapes: Shape[] = [];
  readonly #taken: { x: number; y: number; w: number; h: number }[] = [];

  constructor(
    private readonly area: PlotArea,
    private readonly style: Style,
  ) {}

  /** Room that no label takes, centred on a place. */
  keep(x: number, y: number, w: number, h: number): void {
    this.#taken.push({ x: x - w / 2, y: y - h / 2, w, h });
  }

  /** @returns whether there was room with its middle at one of the places, tried in turn */
  put(role: string, places: readonly { x: number; y: number }[], runs: TextRun[], look: { fill?: string; bold?: boolean } = {}): boolean {
    const size = this.style.smallSize;
    const w = runsWidth(runs, size) * (look.bold ? 1.1 : 1) + 6;
    const h = 1.35 * size;
    const { left, right, top, bottom } = this.area;
    for (const place of places) {
      const box = { x: place.x - w / 2, y: place.y - h / 2, w, h };
      if (box.x < left || box.x + w > right || box.y < top || box.y + h > bottom) continue;
      if (this.#taken.some((t) => box.x < t.x + t.w + 2 && t.x < box.x + w + 2 && box.y < t.y + t.h + 1 && t.y < box.y + h + 1)) continue;
      this.#taken.push(box);
      this.shapes.push({ kind: 'rect', role: `${role}-ground`, ...box, fill: this.style.ground });
      this.shapes.push({ kind: 'text', role, x: place.x, y: place.y + 0.36 * size, size, anchor: 'middle', runs, fill: look.fill ?? this.style.ink, ...(look.bold ? { weight: 'bold' as const } : {}) });
      return true;
    }
    return false;
  }
}

/** Points along a line for its label: the middle first, then nearer the ends. */
export function labelPlaces(line: readonly { x: number; y: number }[]): { x: number; y: number }[] {
  return [0.5, 0.35, 0.65, 0.2, 0.8].map((share) => line[Math.round(share * (line.length - 1))]);
}
