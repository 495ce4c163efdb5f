import type { Profile } from '../../solver/index.ts';
import { toStack } from '../design/stack.ts';
import { readVariables } from '../design/variables.ts';
import { isZero } from '../design/tolerance.ts';
import type { Design } from '../design/types.ts';
import { DEFAULT_TOLERANCES } from '../requirements/uncertainties.ts';
import { governedBy } from '../requirements/governed.ts';

/** How far a value may lie off, as shares of it to either side; null where nothing is stated; "unknown" where it was not worked out. */
export type Spread = { below: number; above: number; origin: 'stated' | 'default' | 'unknown' } | null;

/** Of each layer its thickness and composition, and of each of its dopants the concentration. */
export interface LayerSpreads {
  thickness: Spread;
  /** null too where nothing but the design's text fixes it: a composition has no usual tolerance */ x: Spread;
  dopants: Spread[];
}

/** Layers times variables beyond which the tolerances are not worked out: each variable takes the reading of the whole design twice. */
const MOST_READINGS = 20_000;

/**
 * Tolerances of the layers as they follow from those of the design's variables: each variable is moved to both its ends alone, and what its value does is added up, so that an
 * expression over several carries all of them. A value without one has, where requirements were judged, the usual one that the judgement took.
 *
 * @param assumed  whether the usual tolerances were in force
 */
export function layerSpreads(design: Design, set: Readonly<Record<string, string>>, assumed: boolean): LayerSpreads[] {
  const { temperature: _, ...overrides } = set;
  const { tolerances } = readVariables(design.variables ?? [], overrides);
  const moving = [...tolerances].flatMap(([name, tolerance]) => (isZero(tolerance) ? [] : [name]));
  const nominal = figuresOf(design, set, {});
  const tooMany = moving.length * design.layers.length > MOST_READINGS;
  const ends = (tooMany ? [] : moving).flatMap((name) => {
    const [low, high] = [figuresOf(design, set, { [name]: -1 }), figuresOf(design, set, { [name]: 1 })];
    return low && high ? [[low, high]] : [];
  });
  const governed = governedBy(design, set);
  const spread = (pick: (figures: Figures) => number, isGoverned: boolean, usual: number | null): Spread => {
    if (!nominal) return null;
    const value = pick(nominal);
    if (!(value > 0)) return null;
    let [below, above] = [0, 0];
    for (const pair of ends) {
      const shares = pair.map((figures) => pick(figures) / value - 1);
      below += Math.max(0, -Math.min(...shares));
      above += Math.max(0, ...shares);
    }
    if (isGoverned) return { below, above, origin: tooMany ? 'unknown' : 'stated' };
    return assumed && usual !== null ? { below: usual, above: usual, origin: 'default' } : null;
  };
  return design.layers.map((layer, l) => ({
    thickness: spread((f) => f[l].thickness, governed(layer.thickness), DEFAULT_TOLERANCES.thickness),
    x: spread((f) => f[l].x, governed(layer.x), null),
    dopants: (layer.dopants ?? []).map((row, d) => {
      const implanted = typeof row.concentration === 'object' && 'peak' in row.concentration;
      return spread((f) => f[l].dopants[d], governed(row.concentration), implanted ? DEFAULT_TOLERANCES.implantedDose : DEFAULT_TOLERANCES.epitaxialDoping);
    }),
  }));
}

type Figures = { thickness: number; x: number; dopants: number[] }[];

function figuresOf(design: Design, set: Readonly<Record<string, string>>, moves: Readonly<Record<string, number>>): Figures | null {
  const reading = toStack(design, set, moves);
  if (!reading.ok) return null;
  return reading.stack.layers.map((layer) => ({ thickness: layer.thickness, x: largest(layer.x), dopants: layer.dopants.map((dopant) => largest(dopant.concentration)) }));
}

/** The figure by which a profile is known: its largest value. */
export function largest(profile: Profile): number {
  switch (profile.kind) {
    case 'constant': return profile.value;
    case 'implant': return profile.peak;
    case 'points': return Math.max(...profile.value);
    default: return Math.max(profile.from, profile.to);
  }
}

/** "± 10 %", "−5 % +12 %"; a usual one, which nobody stated, says so. */
export function spreadText(spread: Spread): string {
  if (!spread) return 'not stated';
  if (spread.origin === 'unknown') return 'as its variables';
  const percent = (share: number): string => String(Number((100 * share).toPrecision(2)));
  const { below, above, origin } = spread;
  if (below === 0 && above === 0) return 'exact';
  const text = Math.abs(below - above) <= 0.02 * Math.max(below, above) ? `± ${percent((below + above) / 2)} %` : `−${percent(below)} % +${percent(above)} %`;
  return origin === 'default' ? `${text}, usual` : text;
}
