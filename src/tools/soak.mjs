// `npm run soak`: an hour's work in a minute or two against the built page: edits, undos, designs opened, sweeps, files taken away, a few rounds of each. What is counted
// at the end of a round must not grow from the second to the last: memory after a collection, elements, listeners. `--edits N --undos N --starters N --sweeps N --exports N --rounds N`.
import { openBrowser } from './browser.mjs';
import { buildIfStale } from './build.mjs';
import { serve } from './serve.mjs';
import { soak } from './soak-work.mjs';

const asked = { edits: 500, undos: 50, starters: 20, sweeps: 20, exports: 10, rounds: 5 };
for (let i = 2; i < process.argv.length; i += 2) {
  const name = process.argv[i].replace(/^--/, '');
  const value = Number(process.argv[i + 1]);
  if (!(name in asked) || !Number.isInteger(value) || value < 1) {
    console.error(`${process.argv[i]} ${process.argv[i + 1] ?? ''}: ${Object.keys(asked).map((key) => `--${key} N`).join(', ')} are known`);
    process.exit(2);
  }
  asked[name] = value;
}

await buildIfStale();
const { url, close } = await serve(0);
const browser = await openBrowser();
try {
  const { rounds, problems, growth } = await soak(browser, url, asked);
  for (const [i, { heap_MB, elements, listeners, seconds }] of rounds.entries()) console.log(`round ${i + 1}: heap ${heap_MB.toFixed(1)} MB, ${elements} elements, ${listeners} listeners, ${seconds.toFixed(1)} s`);
  console.log(`growth a round from the second to the last: heap ${growth.heap_MB.toFixed(3)} MB, ${growth.elements.toFixed(1)} elements, ${growth.listeners.toFixed(1)} listeners`);
  for (const problem of problems) console.error(problem);
  process.exitCode = problems.length > 0 ? 1 : 0;
} finally {
  await browser.close();
  await close();
}
