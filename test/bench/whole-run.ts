import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { FIVE_LAYERS } from './five-layers.ts';
import type { BenchRow, Ratio } from './ratio.ts';

const VARIATIONS = 10_000;
/** 4 s where Math.exp takes 10 ns and two cores are free. */
const GOAL = 4e8;

/** The tolerance run as a person starts it, its start and its two threads included. */
export function wholeRun(ratio: Ratio): BenchRow {
  const folder = mkdtempSync(join(tmpdir(), 'halfmark-bench-'));
  const file = join(folder, 'five-layers.json');
  try {
    writeFileSync(file, JSON.stringify(FIVE_LAYERS));
    const run = (count: number): void => {
      const { status, stderr } = spawnSync(process.execPath, ['src/tools/halfmark.mjs', 'vary', file, '--count', String(count), '--workers', '2'], { encoding: 'utf8' });
      if (status !== 0) throw new Error(stderr);
    };
    // Bundles the command line where that has not been done.
    run(1);
    return { name: `${VARIATIONS} variations of five layers on two workers, command line`, ...ratio(1, () => run(VARIATIONS), 1, 0), goal: GOAL };
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}
