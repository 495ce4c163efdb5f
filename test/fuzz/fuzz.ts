import { mkdirSync, writeFileSync } from 'node:fs';
import { randomDesign, randomFrom, SENSIBLE } from './random-design.ts';
import { tryDesign } from './trial.ts';

/**
 * `npm run fuzz -- --count N --seed S`: random sensible designs of the presets; prints the share accepted and what was refused or wrong, each with a file
 * that reproduces it. Exit code 1 when an answer is wrong or fewer than 99.9 % are accepted.
 */
const option = (name: string, fallback: number): number => {
  const at = process.argv.indexOf(`--${name}`);
  const value = at < 0 ? fallback : Number(process.argv[at + 1]);
  if (!Number.isInteger(value) || value < 0) {
    console.error(`--${name} takes a whole number`);
    process.exit(2);
  }
  return value;
};
const count = option('count', 1000);
const seed = option('seed', 1);
const folder = 'node_modules/.cache/fuzz';
const times: number[] = [];
const tally = { accepted: 0, refused: 0, wrong: 0, 'not sensible': 0 };
for (let i = 0; i < count; i++) {
  // Each design has a seed of its own, so that one can be made again without the others.
  const design = randomDesign(randomFrom(seed * 1e6 + i), SENSIBLE);
  const started = performance.now();
  const outcome = tryDesign(design);
  times.push(performance.now() - started);
  tally[outcome.kind]++;
  if (outcome.kind === 'refused' || outcome.kind === 'wrong') {
    mkdirSync(folder, { recursive: true });
    const file = `${folder}/${outcome.kind}-${seed}-${i}.json`;
    writeFileSync(file, JSON.stringify(design, null, 2));
    console.log(`${outcome.kind}  ${file}  ${outcome.kind === 'refused' ? outcome.reason : outcome.faults.slice(0, 3).join('; ')}`);
  }
}
times.sort((a, b) => a - b);
const asked = count - tally['not sensible'];
const share = asked > 0 ? tally.accepted / asked : 1;
console.log(`seed ${seed}: ${tally.accepted} of ${asked} accepted (${(100 * share).toFixed(3)} %), ${tally.refused} refused, ${tally.wrong} wrong, ${tally['not sensible']} without a gap left out`);
console.log(`time with the check: median ${times[count >> 1]?.toFixed(1)} ms, 95 % within ${times[Math.floor(count * 0.95)]?.toFixed(1)} ms, longest ${times[count - 1]?.toFixed(1)} ms`);
process.exitCode = tally.wrong > 0 || share < 0.999 ? 1 : 0;
