import { starters } from '../../src/design/starters/index.ts';
import { toStack } from '../../src/design/stack.ts';
import { isRefusal, solveStack, type Solution, type Stack } from '../../solver/index.ts';
import type { BenchRow, Ratio, Taken } from './ratio.ts';

function solved(stack: Stack, warmStart?: Solution): Solution {
  // Contact resistivities have times of their own.
  const answer = solveStack(stack, { contacts: false, ...(warmStart ? { warmStart: warmStart.profiles } : {}) });
  if (isRefusal(answer)) throw new Error(answer.reason);
  return answer;
}

/** The same stack with its first doping up by 3 %. */
function nudged(stack: Stack): Stack {
  const l = stack.layers.findIndex((layer) => layer.dopants.length > 0);
  return {
    ...stack,
    layers: stack.layers.map((layer, i) => (i !== l ? layer : { ...layer, dopants: layer.dopants.map((d, row) => (row === 0 ? { ...d, activation: Math.min(1, d.activation * 0.97) } : d)) })),
  };
}

/** The nine starters, each cold and after a small change: medians and the slowest. Goals: medians of 2e5 cold, 5e4 warm. */
export function starterRows(ratio: Ratio): BenchRow[] {
  const cold: Taken[] = [];
  const warm: Taken[] = [];
  for (const { id, design } of starters) {
    const reading = toStack(design);
    if (!reading.ok) throw new Error(`${id}: ${JSON.stringify(reading.complaints)}`);
    const first = solved(reading.stack);
    const moved = nudged(reading.stack);
    cold.push(ratio(3, () => { for (let k = 0; k < 3; k++) solved(reading.stack); }, 7));
    warm.push(ratio(3, () => { for (let k = 0; k < 3; k++) solved(moved, first); }, 7));
  }
  const sorted = (list: Taken[]): Taken[] => [...list].sort((a, b) => a.timesExp - b.timesExp);
  const [c, w] = [sorted(cold), sorted(warm)];
  const middle = c.length >> 1;
  return [
    { name: 'nine starters, cold, 0.1 mV: median', ...c[middle], goal: 2e5 },
    { name: 'the slowest of them', ...c[c.length - 1] },
    { name: 'nine starters, warm: median', ...w[middle], goal: 5e4 },
    { name: 'the slowest of them', ...w[w.length - 1] },
  ];
}
