import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Design } from '../../src/design/types.ts';
import { tenLayers } from '../sheet/sheets.ts';
import { FIVE_LAYERS } from './five-layers.ts';
import type { BenchRow, Ratio } from './ratio.ts';

const VARIATIONS = 10_000;
/** 4 s where Math.exp takes 10 ns and two cores are free. */
const RUN_GOAL = 4e8;
/** 2 s, likewise. */
const SHEET_GOAL = 2e8;

/** A tolerance run and a review sheet as a person starts them, start and threads included. */
export function wholeRuns(ratio: Ratio): BenchRow[] {
  const folder = mkdtempSync(join(tmpdir(), 'halfmark-bench-'));
  const fileOf = (name: string, design: Design): string => {
    const file = join(folder, `${name}.json`);
    writeFileSync(file, JSON.stringify(design));
    return file;
  };
  const run = (...words: string[]): void => {
    const { status, stderr } = spawnSync(process.execPath, ['src/tools/halfmark.mjs', ...words], { encoding: 'utf8' });
    if (status !== 0) throw new Error(stderr);
  };
  try {
    const five = fileOf('five-layers', FIVE_LAYERS);
    const ten = fileOf('ten-layers', tenLayers());
    const vary = (count: number): void => run('vary', five, '--count', String(count), '--workers', '2');
    // Bundles the command line where that has not been done.
    vary(1);
    return [
      { name: `${VARIATIONS} variations of five layers on two workers, command line`, ...ratio(1, () => vary(VARIATIONS), 1, 0), goal: RUN_GOAL },
      { name: 'review sheet of ten layers as PDF, command line', ...ratio(1, () => run('sheet', ten, '-o', join(folder, 'sheet.pdf')), 3, 1), goal: SHEET_GOAL },
    ];
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}
