import { normalise } from '../quantity/normalise.ts';
import type { Design } from '../design/types.ts';
import { temperatureText } from './amount-text.ts';
import type { Point } from './point.ts';
import type { Uncertainty } from './uncertainties.ts';

/** Temperatures in the unit that the design writes its range in, or its temperature where there is no range. */
export function temperatureWriter({ conditions }: Design): (T: number) => string {
  const texts = conditions.temperatureRange ?? [conditions.temperature];
  const celsius = texts.every((text) => /\d\s*(?:deg)?C\s*$/.test(normalise(text)));
  return (T) => temperatureText(T, celsius);
}

/** Uncertainties that are named of one corner. */
const MOST_NAMED = 6;

/**
 * "-40 degC, Ncap -20 %, barrier +50 meV"
 *
 * @param effects  how far the score moves with each uncertainty: those that move nothing are left out, of many the strongest are named
 */
export function cornerWords(point: Point, uncertainties: readonly Uncertainty[], writeTemperature: (T: number) => string, effects?: readonly number[]): string {
  const moved = [...point.counts.keys()].filter((i) => point.counts[i] !== 0 && (effects === undefined || effects[i] > 0));
  const strongest = effects === undefined ? moved : [...moved].sort((a, b) => effects[b] - effects[a]);
  const named = strongest.slice(0, MOST_NAMED).sort((a, b) => a - b);
  const more = moved.length - named.length;
  return [writeTemperature(point.temperature), ...named.map((i) => `${uncertainties[i].label} ${uncertainties[i].words(point.counts[i])}`), ...(more > 0 ? [`and ${more} more`] : [])].join(', ');
}
