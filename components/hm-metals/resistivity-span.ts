import { html, nothing, svg, type TemplateResult } from 'lit';
import type { MetalRow, Ranking } from '../../src/contacts/rank-metals.ts';

const WIDTH = 132;
const HEIGHT = 18;
const EDGE = 4;

/** Decades that all rows of a ranking share. */
export interface SpanScale {
  x(rho: number): number;
}

/** From the best of all bands to the worst of all worst cases, and the limit. */
export function spanScale(rows: readonly MetalRow[], limit: number | null): SpanScale | null {
  const values = rows.flatMap(({ band_ohm_cm2, worst_ohm_cm2 }) => [...(band_ohm_cm2 ?? []), ...(worst_ohm_cm2 === null ? [] : [worst_ohm_cm2])]);
  if (values.length === 0) return null;
  if (limit !== null) values.push(limit);
  const logs = values.map(Math.log10);
  const [low, high] = [Math.min(...logs), Math.max(...logs)];
  const perDecade = (WIDTH - 2 * EDGE) / Math.max(high - low, 0.3);
  return { x: (rho) => EDGE + (Math.log10(rho) - low) * perDecade };
}

/** The band at the design's temperature as a bar, the nominal figure as a stroke, the worst case as a line's end: on decades that all rows share. */
export function resistivitySpan({ rho_c_ohm_cm2, band_ohm_cm2, worst_ohm_cm2 }: MetalRow, scale: SpanScale, limit: Ranking['limit_ohm_cm2']): TemplateResult | typeof nothing {
  if (rho_c_ohm_cm2 === null) return nothing;
  const middle = HEIGHT / 2;
  const nominal = scale.x(rho_c_ohm_cm2);
  const worst = worst_ohm_cm2 === null ? null : scale.x(worst_ohm_cm2);
  // The figures stand in the cells beside it.
  return html`<svg class="span" width=${WIDTH} height=${HEIGHT} viewBox="0 0 ${WIDTH} ${HEIGHT}" aria-hidden="true">
    <line class="axis" x1="0" x2=${WIDTH} y1=${middle} y2=${middle}></line>
    ${band_ohm_cm2 === null ? nothing : svg`<rect class="band" x=${scale.x(band_ohm_cm2[0])} y=${middle - 5} width=${Math.max(1, scale.x(band_ohm_cm2[1]) - scale.x(band_ohm_cm2[0]))} height="10"></rect>`}
    ${worst === null ? nothing : svg`<path class="to-worst" d=${`M${nominal},${middle}L${worst},${middle}M${worst},${middle - 4}L${worst},${middle + 4}`} fill="none"></path>`}
    <line class="nominal" x1=${nominal} x2=${nominal} y1=${middle - 5} y2=${middle + 5}></line>
    ${limit === null ? nothing : svg`<line class="limit" x1=${scale.x(limit)} x2=${scale.x(limit)} y1="0" y2=${HEIGHT}></line>`}
  </svg>`;
}
