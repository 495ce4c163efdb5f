import { describe, expect, it } from 'vitest';
import { isoLines } from '../../src/map/iso-lines.ts';

function field(columns: number, rows: number, f: (x: number, y: number) => number): Float64Array {
  return Float64Array.from({ length: columns * rows }, (_, i) => f(i % columns, Math.floor(i / columns)));
}

describe('lines of one value', () => {
  it('are straight and whole where the field is a plane', () => {
    const lines = isoLines(field(30, 20, (x, y) => 2 * x + y), 30, 20, 25.5);
    expect(lines).toHaveLength(1);
    for (const { x, y } of lines[0]) expect(2 * x + y).toBeCloseTo(25.5, 12);
    expect(lines[0].length).toBeGreaterThan(20);
  });

  it('close into a ring around a hill', () => {
    const [ring, ...others] = isoLines(field(41, 41, (x, y) => -Math.hypot(x - 20, y - 20)), 41, 41, -10.3);
    expect(others).toEqual([]);
    expect(ring[0]).toEqual(ring[ring.length - 1]);
    // Straight between nodes: the chord of a cell bends away from a circle of 10 by less than 1/(8 * 10).
    for (const { x, y } of ring) expect(Math.abs(Math.hypot(x - 20, y - 20) - 10.3)).toBeLessThan(0.013);
  });

  it('pass every crossed edge once, saddles included', () => {
    const columns = 37;
    const rows = 29;
    const f = field(columns, rows, (x, y) => Math.sin(x * 0.9) * Math.cos(y * 0.7) + 0.01 * x);
    let crossed = 0;
    for (let r = 0; r < rows; r++) for (let c = 0; c < columns; c++) {
      const high = f[r * columns + c] >= 0.05;
      if (c + 1 < columns && high !== f[r * columns + c + 1] >= 0.05) crossed++;
      if (r + 1 < rows && high !== f[(r + 1) * columns + c] >= 0.05) crossed++;
    }
    const lines = isoLines(f, columns, rows, 0.05);
    const points = lines.reduce((sum, line) => sum + line.length - (line[0].x === line[line.length - 1].x && line[0].y === line[line.length - 1].y ? 1 : 0), 0);
    expect(points).toBe(crossed);
    for (const line of lines) for (let k = 1; k < line.length; k++) expect(Math.hypot(line[k].x - line[k - 1].x, line[k].y - line[k - 1].y)).toBeLessThanOrEqual(Math.SQRT2 + 1e-12);
  });

  it('keep off cells where there is no number', () => {
    const f = field(10, 10, (x) => x);
    f[5] = NaN;
    for (const line of isoLines(f, 10, 10, 4.5)) for (const { y } of line) expect(y).toBeGreaterThanOrEqual(1);
  });
});
