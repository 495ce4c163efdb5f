import assert from 'node:assert/strict';
import { soak } from '../../src/tools/soak-work.mjs';
import { scenario } from './harness.ts';

scenario('A short soak of edits, undos, opened designs, sweeps and exports leaves no error behind and memory flat', async ({ page, url }) => {
  const { problems, rounds } = await soak(page.browser(), url, { edits: 45, undos: 9, starters: 9, sweeps: 6, exports: 15, rounds: 3 });
  assert.deepEqual(problems, []);
  assert.equal(rounds.length, 3);
});
