import { mkdirSync, writeFileSync } from 'node:fs';
import { Coverage } from './coverage.ts';
import { randomDesign, randomFrom, SENSIBLE } from './random-design.ts';
import { compareDesign, tryDesign } from './trial.ts';

/**
 * `npm run fuzz -- --count N --seed S`: random sensible designs, of the presets and with entries of their own; prints what they held, the share accepted and what
 * was refused or wrong, each with a file that reproduces it. With --accuracy each is solved again a thousand times more accurately, and the two are held
 * against each other. Exit code 1 when an answer is wrong or fewer than 99.9 % are accepted, or within what they state.
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
const accuracy = process.argv.includes('--accuracy');
const count = option('count', 1000);
const seed = option('seed', 1);
const folder = 'node_modules/.cache/fuzz';
const coverage = new Coverage();
const times: number[] = [];
const looks: number[] = [];
const nodes: number[] = [];
/** distance over what was stated */ const ratios: number[] = [];
const tally = { accepted: 0, refused: 0, wrong: 0, 'not sensible': 0, box: 0, 'farther than stated': 0 };

function keep(kind: string, i: number, design: unknown, why: string): void {
  mkdirSync(folder, { recursive: true });
  const file = `${folder}/${kind}-${seed}-${i}.json`;
  writeFileSync(file, JSON.stringify(design, null, 2));
  console.log(`${kind}  ${file}  ${why}`);
}

for (let i = 0; i < count; i++) {
  // Each design has a seed of its own, so that one can be made again without the others.
  const design = randomDesign(randomFrom(seed * 1e6 + i), SENSIBLE);
  coverage.add(design);
  const started = performance.now();
  const outcome = accuracy ? compareDesign(design) : tryDesign(design);
  times.push(performance.now() - started);
  if (outcome.kind === 'compared') {
    tally.accepted++;
    ratios.push(outcome.distance / outcome.stated);
    if (outcome.distance > outcome.stated) {
      tally['farther than stated']++;
      keep('farther', i, design, `${outcome.distance.toExponential(2)} V apart in layer ${outcome.layer}, ${outcome.stated.toExponential(2)} V stated`);
    }
    continue;
  }
  tally[outcome.kind]++;
  if (outcome.kind === 'accepted') {
    looks.push(outcome.looks);
    nodes.push(outcome.nodes);
    if (outcome.method === 'box') tally.box++;
  } else if (outcome.kind === 'refused') {
    looks.push(outcome.looks);
    keep('refused', i, design, outcome.reason);
  } else if (outcome.kind === 'wrong') keep('wrong', i, design, outcome.faults.slice(0, 3).join('; '));
}

const spread = (list: number[], digits = 0): string => {
  const sorted = [...list].sort((a, b) => a - b);
  const at = (share: number): string => (sorted[Math.min(sorted.length - 1, Math.floor(sorted.length * share))] ?? NaN).toFixed(digits);
  return `median ${at(0.5)}, 95 % within ${at(0.95)}, most ${at(1)}`;
};
const asked = count - tally['not sensible'];
const share = asked > 0 ? tally.accepted / asked : 1;
console.log(coverage.lines().join('\n'));
if (coverage.missing().length > 0) console.log(`never drawn: ${coverage.missing().join(', ')}`);
console.log(`seed ${seed}: ${tally.accepted} of ${asked} accepted (${(100 * share).toFixed(3)} %), ${tally.refused} refused, ${tally.wrong} wrong, ${tally['not sensible']} whose gap closes left out`);
if (accuracy) console.log(`distance from the tighter solution over what is stated: ${spread(ratios, 3)}; ${tally['farther than stated']} beyond it`);
else console.log(`mesh nodes: ${spread(nodes)}; looks at nodes: ${spread(looks)}; ${tally.box} by the box scheme`);
console.log(`time, ms: ${spread(times, 1)}`);
const within = ratios.length > 0 ? 1 - tally['farther than stated'] / ratios.length : 1;
process.exitCode = tally.wrong > 0 || share < 0.999 || within < 0.999 ? 1 : 0;
