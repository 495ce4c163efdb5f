import type { Result } from '../result/types.ts';

/** First and last node of each layer; [0, -1] where the profile has none. */
export function nodesOfLayers(result: Result): [number, number][] {
  const found: [number, number][] = result.layers.map(() => [0, -1]);
  const of = result.profile.layer;
  for (let i = 0; i < of.length; i++) {
    const range = found[of[i]];
    if (range[1] < range[0]) range[0] = i;
    range[1] = i;
  }
  return found;
}
