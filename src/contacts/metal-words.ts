import { figureText } from '../result/figure-text.ts';
import type { BarrierValue } from './barrier-values.ts';
import type { MetalRow, Ranking } from './rank-metals.ts';

const REGIMES = { thermionic: 'thermionic', 'thermionic-field': 'thermionic-field', field: 'field' } as const;

/** "measured for electrons, Sze1981", "pinned, S = 0.27", "ideal, S = 1" */
export function valueWords({ basis, carrier, slope, source, checked }: BarrierValue): string {
  if (basis !== 'measured') return basis === 'ideal' ? 'ideal, S = 1' : `pinned, S = ${figureText(slope, 2)}`;
  const where = [source, checked === 'memory' ? 'from memory' : checked === 'page' ? 'seen in print' : checked === 'computed' ? 'computed' : null].filter((part) => part !== null).join(', ');
  return `measured for ${carrier === 'n' ? 'electrons' : 'holes'}${where === '' ? '' : `, ${where}`}`;
}

/** Where a value stands, in full: the work, how sure its figure is, and what is to be known of it. Of a model, where the work function stands. */
export function originWords({ basis, work, source, checked, confidence, note }: BarrierValue): string {
  const from = work ?? source;
  return [from === null ? null : `${basis === 'measured' ? '' : 'work function: '}${from}`, basis !== 'measured' && checked === 'memory' ? 'from memory' : null, confidence === null ? null : `${confidence} confidence`, note].filter((part) => part !== null).join('; ');
}

/** The value in use of a row; null without one. */
export function valueOf(row: MetalRow): BarrierValue | null {
  return row.values.find(({ key }) => key === row.value) ?? null;
}

/** The barrier of the surface's majority, eV. */
export function majorityBarrier(row: Pick<MetalRow, 'barrier_n_eV' | 'barrier_p_eV'>, majority: Ranking['majority']): number | null {
  return majority === 'n' ? row.barrier_n_eV : row.barrier_p_eV;
}

export function regimeOf({ transport }: MetalRow): string {
  return transport === null ? '–' : REGIMES[transport];
}

/** "1.2e-7 ... 3e-7", least first. */
export function bandWords({ band_ohm_cm2 }: MetalRow): string {
  return band_ohm_cm2 === null ? '–' : `${figureText(band_ohm_cm2[0], 2)} … ${figureText(band_ohm_cm2[1], 2)}`;
}

/** What is ranked, in a sentence. */
export function rankingSentence({ side, layer, material, majority, rows, tolerances, temperatures, limit_ohm_cm2 }: Ranking): string {
  const known = rows.filter(({ worst_ohm_cm2, blocks }) => worst_ohm_cm2 !== null || blocks !== null).length;
  const blocking = rows.filter(({ blocks }) => blocks !== null).length;
  const met = limit_ohm_cm2 === null ? '' : ` ${rows.filter(({ worst_ohm_cm2 }) => worst_ohm_cm2 !== null && worst_ohm_cm2 <= limit_ohm_cm2).length} of them stay within the limit of ${figureText(limit_ohm_cm2, 2)} ohm cm².`;
  return `${known} of ${rows.length} metals on ${layer} (${majority}-type ${material}, ${side}), by their worst contact resistivity over ${temperatures} and ${tolerances.length === 0 ? 'no tolerance' : `within ${tolerances.map((text) => `±${text.replace(/^(.*) (\S+ \S+)$/, '$2 of $1')}`).join(', ')}`}.${met}${blocking === 0 ? '' : ` ${blocking} ${blocking === 1 ? 'blocks' : 'block'} in the worst case.`}`;
}
