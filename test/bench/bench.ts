/**
 * Speed as multiples of Math.exp, measured in the same run and in turn with it, so that a slower machine does not matter.
 * Prints a table, then the same as one line of JSON.
 */
import { localCharge } from '../../solver/charge.ts';
import { neutralLevel } from '../../solver/fermi-level.ts';
import { fermiHalf, fermiHalfInto, inverseFermiHalf } from '../../solver/fermi-integral.ts';
import { isRefusal, solveStack, type Solution, type Stack } from '../../solver/index.ts';
import { barrier, doped, layer, stackOf } from '../solver/stack-fixtures.ts';
import { longRows } from './long-runs.ts';
import { starterRows } from './starter-rows.ts';

const ARGUMENTS = Float64Array.from({ length: 4096 }, (_, i) => -30 + (80 * ((i * 2654435761) % 4096)) / 4096);
const VALUES = ARGUMENTS.map((eta) => fermiHalf(eta));
let sink = 0;
const WARMING = 6;

/** Median over rounds of the time of one call, ns; each round also times Math.exp, and the ratio is taken round by round. */
function ratio(calls: number, body: () => void, rounds = 21): number {
  const ratios: number[] = [];
  // The first rounds would time the compiler.
  for (let r = 0; r < WARMING; r++) body();
  for (let r = 0; r < rounds; r++) {
    const start = performance.now();
    body();
    const middle = performance.now();
    for (let k = 0; k < 20; k++) for (let i = 0; i < ARGUMENTS.length; i++) sink += Math.exp(ARGUMENTS[i]);
    const end = performance.now();
    ratios.push((middle - start) / calls / ((end - middle) / (20 * ARGUMENTS.length)));
  }
  return ratios.sort((a, b) => a - b)[rounds >> 1];
}

const five: Stack = stackOf(
  [
    layer('cap', 40, [doped('donor', 1e19)]), layer('spacer', 20, [doped('donor', 1e16)]), layer('base', 200, [doped('acceptor', 3e17)]),
    layer('drift', 500, [doped('donor', 1e16)]), layer('contact', 300, [doped('donor', 1e18)]),
  ],
  { top: barrier(0.6) },
);
function solved(stack: Stack, warmStart?: Solution, accuracy?: number): Solution {
  const answer = solveStack(stack, { warmStart: warmStart?.profiles, accuracy });
  if (isRefusal(answer)) throw new Error(answer.reason);
  return answer;
}
const first = solved(five);
const nudged: Stack = { ...five, layers: five.layers.map((l, i) => (i === 2 ? layer('base', 200, [doped('acceptor', 3.1e17)]) : l)) };
const tight = solved(five, undefined, 1e-6);
const thick: Stack = stackOf([layer('cap', 20, [doped('donor', 1e19)]), layer('wafer', 3e5, [doped('acceptor', 1e15)])], { top: barrier(0.6) });
const cold: Stack = { ...five, temperature: 20 };
const thirty: Stack = stackOf(Array.from({ length: 30 }, (_, i) => layer(`l${i}`, 20 + 10 * (i % 5), [doped(i % 2 === 0 ? 'donor' : 'acceptor', 1e17 * 1.3 ** (i % 7))])));
const pair = new Float64Array(2);
const points = [4, 77, 300, 600].map((T) => localCharge(five.layers[2], 0, T, five.assumptions));

const rows = [
  { name: 'F_1/2', timesExp: ratio(20 * ARGUMENTS.length, () => { for (let k = 0; k < 20; k++) for (let i = 0; i < ARGUMENTS.length; i++) sink += fermiHalf(ARGUMENTS[i]); }) },
  { name: 'F_1/2 and its derivative, one pass', timesExp: ratio(20 * ARGUMENTS.length, () => { for (let k = 0; k < 20; k++) for (let i = 0; i < ARGUMENTS.length; i++) { fermiHalfInto(ARGUMENTS[i], pair); sink += pair[1]; } }) },
  { name: 'inverse of F_1/2', timesExp: ratio(ARGUMENTS.length, () => { for (let i = 0; i < VALUES.length; i++) sink += inverseFermiHalf(VALUES[i]); }) },
  { name: 'Fermi level of a layer', timesExp: ratio(400, () => { for (let k = 0; k < 100; k++) for (const c of points) sink += neutralLevel(c).ecMinusEf; }) },
  { name: 'five-layer stack, cold, 0.1 mV', timesExp: ratio(10, () => { for (let k = 0; k < 10; k++) sink += solved(five).quality.meshNodes; }) },
  { name: 'the same to 1 uV', timesExp: ratio(10, () => { for (let k = 0; k < 10; k++) sink += solved(five, undefined, 1e-6).quality.meshNodes; }) },
  { name: 'the same at 20 K', timesExp: ratio(10, () => { for (let k = 0; k < 10; k++) sink += solved(cold).quality.meshNodes; }) },
  { name: '300 um wafer under a cap, cold, 0.1 mV', timesExp: ratio(10, () => { for (let k = 0; k < 10; k++) sink += solved(thick).quality.meshNodes; }) },
  { name: '30 layers, cold, 0.1 mV', timesExp: ratio(4, () => { for (let k = 0; k < 4; k++) sink += solved(thirty).quality.meshNodes; }) },
  { name: 'five-layer stack, warm, one doping moved', timesExp: ratio(10, () => { for (let k = 0; k < 10; k++) sink += solved(nudged, first).quality.meshNodes; }) },
];
rows.push(...starterRows(ratio), ...longRows(ratio));
for (const row of rows) console.log(`${row.name.padEnd(44)} ${row.timesExp.toPrecision(3).padStart(10)} x Math.exp`);
console.log(JSON.stringify({ rows, cold: first.quality, tight: tight.quality, wafer: solved(thick).quality, finite: Number.isFinite(sink) }));
