import { expect } from 'vitest';
import { ACCEPTANCE } from '../../solver/quality.ts';
import { isRefusal, type Refusal, type Solution } from '../../solver/solution.ts';
import { faultsOf } from './soundness.ts';

/** What any accepted solution must satisfy, however it came about. Throws the reason of a refusal. */
export function expectSound(answer: Solution | Refusal, accuracy: number = ACCEPTANCE.meshError): Solution {
  if (isRefusal(answer)) throw new Error(`refused: ${answer.reason}`);
  expect(faultsOf(answer, accuracy)).toEqual([]);
  return answer;
}
