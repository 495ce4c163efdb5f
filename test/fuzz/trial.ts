import { toStack } from '../../src/design/stack.ts';
import type { Design } from '../../src/design/types.ts';
import { isRefusal, solveStack, type Solution, type Stack } from '../../solver/index.ts';
import { mostLooks } from '../../solver/poisson-work.ts';
import { faultsOf } from '../solver/soundness.ts';
import { largestDistance } from './between-nodes.ts';

export type Outcome =
  | { kind: 'accepted'; nodes: number; looks: number; method: Solution['quality']['method'] }
  | { kind: 'refused'; reason: string; looks: number }
  | { kind: 'wrong'; faults: string[] }
  | { kind: 'not sensible'; reason: string };

/** Accepted error of the solution that another is held against, V: a thousandth of the default. */
const TIGHT = 1e-7;
/** What the tighter solution's own last digits may differ by, V. */
const ROUNDING = 1e-11;

/** Solves one design and checks an accepted answer by sums of its own. A gap that closes under narrowing or a mixed crystal is no sensible design. */
export function tryDesign(design: Design): Outcome {
  return attempt(design, (stack) => {
    const answer = solveStack(stack);
    if (isRefusal(answer)) return { kind: 'refused', reason: answer.reason, looks: answer.quality?.looks ?? 0 };
    const { looks, meshNodes, method } = answer.quality;
    const faults = faultsOf(answer);
    // Bounded work, whatever the design.
    if (!(looks <= mostLooks(stack.layers.length))) faults.push(`${looks} looks, more than ${mostLooks(stack.layers.length)}`);
    return faults.length > 0 ? { kind: 'wrong', faults } : { kind: 'accepted', nodes: meshNodes, looks, method };
  });
}

export type Comparison = { kind: 'compared'; /** V */ distance: number; stated: number; layer: number } | Exclude<Outcome, { kind: 'accepted' }>;

/** Solves one design twice, the second time a thousand times more accurately, and says how far the two lie apart, between nodes as well as on them. */
export function compareDesign(design: Design): Comparison {
  return attempt<Comparison>(design, (stack) => {
    const usual = solveStack(stack, { contacts: false });
    const tight = solveStack(stack, { contacts: false, accuracy: TIGHT });
    for (const answer of [usual, tight]) if (isRefusal(answer)) return { kind: 'refused', reason: answer.reason, looks: answer.quality?.looks ?? 0 };
    const [a, b] = [usual as Solution, tight as Solution];
    const onNodes = largestDistance(b.profiles, a.profiles);
    const between = largestDistance(a.profiles, b.profiles);
    const worst = onNodes.distance > between.distance ? onNodes : between;
    return { kind: 'compared', distance: worst.distance, stated: a.quality.meshError + b.quality.meshError + ROUNDING, layer: worst.layer };
  });
}

function attempt<T>(design: Design, work: (stack: Stack) => T): T | Extract<Outcome, { kind: 'wrong' | 'not sensible' }> {
  const reading = toStack(design);
  if (!reading.ok) return { kind: 'wrong', faults: reading.complaints.map((c) => `${c.path}: ${c.message}`) };
  try {
    return work(reading.stack);
  } catch (error) {
    if (error instanceof RangeError && /^the gap of .* is not positive/.test(error.message)) return { kind: 'not sensible', reason: error.message };
    return { kind: 'wrong', faults: [error instanceof Error ? (error.stack ?? error.message) : String(error)] };
  }
}
