/** End points of the segments of path data with M, L, C and Z; a pass-through parser for tests, strict about what it does not know. */
export function pathPoints(d: string): { command: string; x: number; y: number }[] {
  const points: { command: string; x: number; y: number }[] = [];
  for (const [, command, rest] of d.matchAll(/([A-Za-z])([^A-Za-z]*)/g)) {
    if (command === 'Z') continue;
    const numbers = rest.trim().split(/[\s,]+/).map(Number);
    if (!['M', 'L', 'C'].includes(command) || numbers.some((n) => !Number.isFinite(n)) || numbers.length !== (command === 'C' ? 6 : 2)) throw new Error(`unknown path segment ${command}${rest}`);
    points.push({ command, x: numbers[numbers.length - 2], y: numbers[numbers.length - 1] });
  }
  return points;
}

/** y of a line path at an x, straight between its points. */
export function pathY(d: string, x: number): number {
  const points = pathPoints(d);
  for (let i = 1; i < points.length; i++) {
    const [a, b] = [points[i - 1], points[i]];
    if (a.x <= x && x <= b.x && b.x > a.x) return a.y + ((x - a.x) / (b.x - a.x)) * (b.y - a.y);
  }
  throw new Error(`the path has nothing at ${x}`);
}

/** Shortest distance from a point to the straight lines between a path's points, px: where a curve is steep, a rounded x alone would move its y. */
export function distanceTo(points: { command: string; x: number; y: number }[], x: number, y: number): number {
  let least = Infinity;
  for (let i = 1; i < points.length; i++) {
    const [a, b] = [points[i - 1], points[i]];
    if (b.command === 'M') continue;
    const [dx, dy] = [b.x - a.x, b.y - a.y];
    const t = Math.min(Math.max(((x - a.x) * dx + (y - a.y) * dy) / (dx * dx + dy * dy || 1), 0), 1);
    least = Math.min(least, Math.hypot(a.x + t * dx - x, a.y + t * dy - y));
  }
  return least;
}
