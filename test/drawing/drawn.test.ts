import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { drawPlate, type PlateOptions } from '../../src/drawing/plate.ts';
import { drawRail } from '../../src/drawing/rail.ts';
import { svgText } from '../../src/drawing/svg-text.ts';
import { inventedResult } from './invented-result.ts';

const FOLDER = join(import.meta.dirname, '../drawn');

const PLATES: Record<string, Partial<PlateOptions>> = {
  'plate-light-full': { width: 1000, height: 620, frame: 'full' },
  'plate-dark-carriers': { width: 960, height: 540, style: 'dark', shading: 'carriers', vacuum: true },
  'plate-journal': { width: 520, height: 440, style: 'journal', frame: 'full', depth: 'true' },
  'plate-slide': { width: 1280, height: 720, style: 'slide', frame: 'full', shading: 'none' },
  'plate-phone-stale': { width: 390, height: 420, stale: true },
};

/** Kept drawings: to take a change over, look at both, delete the old file and run the tests again. */
describe('drawings are as they were kept:', () => {
  const result = inventedResult();
  for (const [name, options] of Object.entries(PLATES)) it(name, () => expectKept(name, svgText(drawPlate(result, options))));

  it('rail', () => {
    const { energy } = drawPlate(result, { width: 1000, height: 560 }).axes;
    expectKept('rail', svgText(drawRail(result, 40, { width: 200, height: 560, energy, style: 'light' })));
  });
});

function expectKept(name: string, svg: string): void {
  const file = join(FOLDER, `${name}.svg`);
  const now = rounded(svg);
  if (!existsSync(file)) {
    // A drawing that nobody has looked at proves nothing: it is written for the eye where there is one.
    if (process.env.CI) throw new Error(`no kept drawing ${name}.svg`);
    writeFileSync(file, now);
    return;
  }
  const kept = readFileSync(file, 'utf8');
  if (alike(now, kept)) return;
  const beside = join(tmpdir(), `halfmark-drawn-${name}.svg`);
  writeFileSync(beside, now);
  expect(now, `${name} has changed; the new one is in ${beside}`).toBe(kept);
}

/** Apart from the last digit of a coordinate, which the mathematics library of another machine may round the other way. Texts must be the same. */
function alike(now: string, kept: string): boolean {
  const shape = (svg: string): string => svg.replace(TAG, (tag) => tag.replace(NUMBER, '#'));
  const values = (svg: string): number[] => (svg.match(TAG) ?? []).flatMap((tag) => (tag.match(NUMBER) ?? []).map(Number));
  if (shape(now) !== shape(kept)) return false;
  const b = values(kept);
  return values(now).every((value, i) => Math.abs(value - b[i]) <= (Math.abs(value) < 1 ? 0.0011 : 0.1001));
}

const NUMBER = /-?\d+(\.\d+)?/g;
const TAG = /<[^>]*>/g;

/** Coordinates to a tenth of a px; shares below 1, such as a gradient's offsets, to a thousandth. */
function rounded(svg: string): string {
  const round = (text: string): string => {
    const parts = Math.abs(Number(text)) < 1 ? 1000 : 10;
    return String(Math.round(Number(text) * parts) / parts + 0);
  };
  return svg.replace(TAG, (tag) => tag.replace(/-?\d+\.\d+/g, round));
}
