import type { Graded, Implanted, Text } from '../../src/design/types.ts';
import type { Dice } from './dice.ts';

/** Most points of a measured table. */
const MOST_POINTS = 40;

/** Concentration through a layer, of every shape that the document knows. @param thickness  nm */
export function randomConcentration(dice: Dice, thickness: number, range: readonly [number, number]): Graded<Text> | Implanted {
  const doping = (): Text => `${dice.logBetween(...range).toExponential(3)} cm^-3`;
  const kind = dice.random();
  if (kind < 0.75) return doping();
  if (kind < 0.84) return { from: doping(), to: doping(), shape: dice.pick(['linear', 'gaussian', 'erfc'] as const) };
  if (kind < 0.9) {
    // Peaks may lie outside of the layer: a tail alone.
    const implant: Implanted = { peak: doping(), depth: `${(thickness * dice.between(-0.1, 1.1)).toPrecision(6)} nm`, straggle: `${(thickness * dice.between(0.05, 0.3)).toPrecision(6)} nm`, shape: 'gaussian' };
    if (dice.chance(0.4)) implant.background = doping();
    return implant;
  }
  if (kind < 0.94) return { points: [['0 nm', doping()], [`${(thickness / 2).toPrecision(6)} nm`, doping()], [`${thickness.toPrecision(6)} nm`, doping()]] };
  return { points: measured(dice, thickness, range).map(([z, n]) => [`${z} nm`, `${n} cm^-3`]) };
}

/** Composition through a layer: mostly even, else a ramp, a bend or a table. @param thickness  nm */
export function randomComposition(dice: Dice, thickness: number): Graded<string> {
  const x = (): string => dice.between(0, 1).toFixed(3);
  const kind = dice.random();
  // The ends of an alloy's range are compositions like any other.
  if (kind < 0.1) return dice.pick(['0', '1']);
  if (kind < 0.8) return x();
  if (kind < 0.9) return { from: x(), to: x(), shape: 'linear' };
  if (kind < 0.95) return { from: dice.between(0.01, 1).toFixed(3), to: dice.between(0.01, 1).toFixed(3), shape: dice.pick(['gaussian', 'erfc'] as const) };
  return { points: [['0 nm', x()], [`${(thickness * dice.between(0.1, 0.9)).toPrecision(6)} nm`, x()], [`${thickness.toPrecision(6)} nm`, x()]] };
}

/**
 * As a depth profile is measured: many points, a smooth course over decades with noise on it, the first and the last perhaps short of the layer's
 * ends or beyond the lower one.
 */
function measured(dice: Dice, thickness: number, [low, high]: readonly [number, number]): [string, string][] {
  const count = 4 + dice.whole(MOST_POINTS - 3);
  const [from, to, bend] = [dice.logBetween(low, high), dice.logBetween(low, high), dice.between(-2, 2)];
  const begin = thickness * (dice.chance(0.3) ? dice.between(0, 0.1) : 0);
  const end = thickness * (dice.chance(0.3) ? dice.between(0.8, 1.2) : 1);
  const noise = dice.between(0, 0.15);
  return Array.from({ length: count }, (_, i) => {
    const u = i / (count - 1);
    const log = Math.log10(from) + (Math.log10(to) - Math.log10(from)) * u + 4 * bend * u * (1 - u) + noise * dice.between(-1, 1);
    return [(begin + (end - begin) * u).toPrecision(7), Math.min(high, Math.max(low, 10 ** log)).toExponential(3)];
  });
}
