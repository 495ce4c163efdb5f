/**
 * Speed as multiples of Math.exp, measured in the same run and in turn with it, so that a slower machine does not matter.
 * Prints a table, then the same as one line of JSON.
 */
import { localCharge } from '../../solver/charge.ts';
import { neutralLevel } from '../../solver/fermi-level.ts';
import { fermiHalf, fermiHalfInto, inverseFermiHalf } from '../../solver/fermi-integral.ts';
import { isRefusal, solveStack, type Solution, type Stack } from '../../solver/index.ts';
import { barrier, doped, layer, stackOf } from '../solver/stack-fixtures.ts';
import { contactRows } from './contact-rows.ts';
import { longRows } from './long-runs.ts';
import type { BenchRow, Ratio } from './ratio.ts';
import { starterRows } from './starter-rows.ts';
import { wholeRuns } from './whole-run.ts';

const ARGUMENTS = Float64Array.from({ length: 4096 }, (_, i) => -30 + (80 * ((i * 2654435761) % 4096)) / 4096);
const VALUES = ARGUMENTS.map((eta) => fermiHalf(eta));
let sink = 0;
const WARMING = 6;
const NS_PER_MS = 1e6;

/** Medians over rounds of the time of one call: in multiples of Math.exp, which each round times too, and in ns. */
const ratio: Ratio = (calls, body, rounds = 21, warming = WARMING) => {
  const ratios: number[] = [];
  const times: number[] = [];
  // The first rounds would time the compiler.
  for (let r = 0; r < warming; r++) body();
  for (let r = 0; r < rounds; r++) {
    const start = performance.now();
    body();
    const middle = performance.now();
    for (let k = 0; k < 20; k++) for (let i = 0; i < ARGUMENTS.length; i++) sink += Math.exp(ARGUMENTS[i]);
    const end = performance.now();
    const each = (middle - start) / calls;
    times.push(each * NS_PER_MS);
    ratios.push(each / ((end - middle) / (20 * ARGUMENTS.length)));
  }
  const median = (values: number[]): number => values.sort((a, b) => a - b)[rounds >> 1];
  return { timesExp: median(ratios), ns: median(times) };
};

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

const rows: BenchRow[] = [
  { name: 'F_1/2', ...ratio(20 * ARGUMENTS.length, () => { for (let k = 0; k < 20; k++) for (let i = 0; i < ARGUMENTS.length; i++) sink += fermiHalf(ARGUMENTS[i]); }) },
  { name: 'F_1/2 and its derivative, one pass', ...ratio(20 * ARGUMENTS.length, () => { for (let k = 0; k < 20; k++) for (let i = 0; i < ARGUMENTS.length; i++) { fermiHalfInto(ARGUMENTS[i], pair); sink += pair[1]; } }) },
  { name: 'inverse of F_1/2', ...ratio(ARGUMENTS.length, () => { for (let i = 0; i < VALUES.length; i++) sink += inverseFermiHalf(VALUES[i]); }) },
  { name: 'Fermi level of a layer', ...ratio(400, () => { for (let k = 0; k < 100; k++) for (const c of points) sink += neutralLevel(c).ecMinusEf; }) },
  { name: 'five-layer stack, cold, 0.1 mV', ...ratio(10, () => { for (let k = 0; k < 10; k++) sink += solved(five).quality.meshNodes; }) },
  { name: 'the same to 1 uV', ...ratio(10, () => { for (let k = 0; k < 10; k++) sink += solved(five, undefined, 1e-6).quality.meshNodes; }) },
  { name: 'the same at 20 K', ...ratio(10, () => { for (let k = 0; k < 10; k++) sink += solved(cold).quality.meshNodes; }) },
  { name: '300 um wafer under a cap, cold, 0.1 mV', ...ratio(10, () => { for (let k = 0; k < 10; k++) sink += solved(thick).quality.meshNodes; }) },
  { name: '30 layers, cold, 0.1 mV', ...ratio(4, () => { for (let k = 0; k < 4; k++) sink += solved(thirty).quality.meshNodes; }) },
  { name: 'five-layer stack, warm, one doping moved', ...ratio(10, () => { for (let k = 0; k < 10; k++) sink += solved(nudged, first).quality.meshNodes; }) },
];
rows.push(...starterRows(ratio), ...contactRows(ratio), ...longRows(ratio), ...wholeRuns(ratio));
for (const row of rows) console.log(`${row.name.padEnd(60)} ${row.timesExp.toPrecision(3).padStart(10)} x Math.exp ${timeText(row.ns).padStart(9)}${row.goal === undefined ? '' : `  goal ${row.goal.toExponential(0)}`}`);
console.log(JSON.stringify({ rows, cold: first.quality, tight: tight.quality, wafer: solved(thick).quality, finite: Number.isFinite(sink) }));

function timeText(ns: number): string {
  return ns < 1e3 ? `${ns.toPrecision(3)} ns` : ns < 1e6 ? `${(ns / 1e3).toPrecision(3)} us` : ns < 1e9 ? `${(ns / 1e6).toPrecision(3)} ms` : `${(ns / 1e9).toPrecision(3)} s`;
}
