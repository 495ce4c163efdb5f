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

/** "-40 degC, Ncap -20 %, barrier +50 meV" */
export function cornerWords(point: Point, uncertainties: readonly Uncertainty[], writeTemperature: (T: number) => string): string {
  return [writeTemperature(point.temperature), ...point.counts.flatMap((count, i) => (count === 0 ? [] : [`${uncertainties[i].label} ${uncertainties[i].words(count)}`]))].join(', ');
}
