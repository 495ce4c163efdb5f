import type { Profile } from '../../solver/index.ts';
import type { KindName } from '../quantity/kinds.ts';
import type { Asker, Bounds } from './ask.ts';
import type { Graded, Implanted, Pure } from './types.ts';

/** A value through the depth of a layer, as typed, in the solver's unit of its kind. */
export function readProfile(input: Graded<Pure> | Implanted, kind: KindName, path: string, ask: Asker, bounds: Bounds): Profile {
  if (typeof input !== 'object') return { kind: 'constant', value: ask.quantity(input, kind, path, bounds) };
  if ('points' in input) return readPoints(input.points, kind, path, ask, bounds);
  if ('peak' in input) {
    return {
      kind: 'implant',
      peak: ask.quantity(input.peak, kind, `${path}.peak`, bounds),
      depth: ask.quantity(input.depth, 'length', `${path}.depth`),
      straggle: ask.quantity(input.straggle, 'length', `${path}.straggle`, { positive: true }),
      background: ask.maybe(input.background, kind, `${path}.background`, bounds) ?? 0,
    };
  }
  const from = ask.quantity(input.from, kind, `${path}.from`, bounds);
  const to = ask.quantity(input.to, kind, `${path}.to`, bounds);
  // Neither shape reaches zero in a finite depth.
  if (input.shape !== 'linear' && (from <= 0 || to <= 0)) ask.wrong(`${path}.${from <= 0 ? 'from' : 'to'}`, `is zero, which ${input.shape === 'erfc' ? 'an erfc' : 'a gaussian'} profile never reaches; give a small positive value`);
  return { kind: input.shape, from, to };
}

/** Concentrations go straight in the logarithm from point to point, as measured profiles are drawn; compositions go straight. */
function readPoints(points: [string, Pure][], kind: KindName, path: string, ask: Asker, bounds: Bounds): Profile {
  const z = points.map(([depth], i) => ask.quantity(depth, 'length', `${path}.points[${i}][0]`, { least: [0, '0 nm'] }));
  const value = points.map(([, v], i) => ask.quantity(v, kind, `${path}.points[${i}][1]`, bounds));
  for (let i = 1; i < z.length; i++) if (z[i] <= z[i - 1]) ask.wrong(`${path}.points[${i}][0]`, 'is not deeper than the point before it; depths must grow from the top of the layer');
  return { kind: 'points', z, value, scale: kind === 'density' ? 'log' : 'linear' };
}
