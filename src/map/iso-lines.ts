/** A line of one value: x and y of its points in turn, in units of the grid's columns and rows (0 is the first). Closed where its last point is its first. */
export type IsoLine = { x: number; y: number }[];

/** Edges of a cell, clockwise from the top: 0 top, 1 right, 2 bottom, 3 left. Which pairs a level cuts, by the corners above it (1 top left, 2 top right, 4 bottom right, 8 bottom left). */
const CUTS: readonly (readonly [number, number][])[] = [
  [], [[3, 0]], [[0, 1]], [[3, 1]], [[1, 2]], [[3, 0], [1, 2]], [[0, 2]], [[3, 2]], [[2, 3]], [[2, 0]], [[0, 1], [2, 3]], [[2, 1]], [[1, 3]], [[1, 0]], [[0, 3]], [],
];
/** The two saddles the other way round, where the middle of the cell lies above the level. */
const SADDLES: Readonly<Record<number, readonly [number, number][]>> = { 5: [[0, 1], [2, 3]], 10: [[3, 0], [1, 2]] };

/**
 * Lines on which a field takes a value: marching squares, the two-dimensional case of Lorensen and Cline, Computer Graphics (SIGGRAPH) 21, 163 (1987). Straight between the
 * corners of a cell; at a saddle the mean of the four corners decides which are joined. Cells with a corner that is not a number are left out.
 *
 * @param field  [rows x columns], row by row
 */
export function isoLines(field: ArrayLike<number>, columns: number, rows: number, level: number): IsoLine[] {
  /** by edge: the edges that a cell joins it with. A grid edge has one number: twice its upper left node, plus 1 for one that runs down. */
  const joined = new Map<number, number[]>();
  const join = (a: number, b: number): void => {
    joined.set(a, [...(joined.get(a) ?? []), b]);
    joined.set(b, [...(joined.get(b) ?? []), a]);
  };
  for (let r = 0; r + 1 < rows; r++) {
    for (let c = 0; c + 1 < columns; c++) {
      const i = r * columns + c;
      const [tl, tr, br, bl] = [field[i], field[i + 1], field[i + columns + 1], field[i + columns]];
      const sum = tl + tr + br + bl;
      if (Number.isNaN(sum)) continue;
      const code = (tl >= level ? 1 : 0) + (tr >= level ? 2 : 0) + (br >= level ? 4 : 0) + (bl >= level ? 8 : 0);
      if (code === 0 || code === 15) continue;
      const edges = [2 * i, 2 * (i + 1) + 1, 2 * (i + columns), 2 * i + 1];
      const cuts = code in SADDLES && sum >= 4 * level ? SADDLES[code] : CUTS[code];
      for (const [a, b] of cuts) join(edges[a], edges[b]);
    }
  }
  const place = (edge: number): { x: number; y: number } => {
    const i = edge >> 1;
    const down = (edge & 1) === 1;
    const u = (level - field[i]) / (field[down ? i + columns : i + 1] - field[i]);
    const along = Number.isFinite(u) ? Math.min(1, Math.max(0, u)) : 0.5;
    return { x: (i % columns) + (down ? 0 : along), y: Math.floor(i / columns) + (down ? along : 0) };
  };
  const lines: IsoLine[] = [];
  const walk = (start: number): void => {
    const line = [place(start)];
    let at = start;
    for (;;) {
      const next = joined.get(at)?.pop();
      if (next === undefined) break;
      const back = joined.get(next) as number[];
      back.splice(back.indexOf(at), 1);
      line.push(place(next));
      at = next;
    }
    lines.push(line);
  };
  // Open lines begin on edges that only one cell joins; what is left are rings.
  for (const [edge, others] of joined) if (others.length === 1) walk(edge);
  for (const [edge, others] of joined) if (others.length > 0) walk(edge);
  return lines;
}
