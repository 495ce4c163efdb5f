import { html, nothing, svg, type TemplateResult } from 'lit';
import { spread, type Span } from './strip-geometry.ts';

/** Most and least room of a card, px. */
const CARD = 150;
const NARROWEST = 60;

/**
 * Layers too narrow for their text, written under the strip with a line to their column; where even that has no room, a sentence.
 *
 * @param slim     which layers
 * @param content  what a column of that layer would hold
 */
export function cards(spans: readonly Span[], slimLayers: ReadonlySet<number>, width: number, chosen: number | null, content: (layer: number) => TemplateResult, onClick: (event: MouseEvent) => void): TemplateResult | typeof nothing {
  const slim = spans.flatMap((s, i) => (slimLayers.has(i) ? [{ x: (s.left + s.right) / 2, i }] : []));
  if (slim.length === 0) return nothing;
  const size = Math.min(CARD, Math.floor(width / slim.length));
  const places = size < NARROWEST ? null : spread(slim.map((s) => s.x), size, size / 2, width - size / 2);
  if (!places) return html`<p class="hint">${slim.length} columns are too narrow for their text: choose one to read it below, or look at a part of the depth.</p>`;
  const left = (k: number): number => places[k] - size / 2;
  return html`<svg class="leaders" aria-hidden="true" height="14">
      ${slim.map((s, k) => svg`<polyline points="${s.x},0 ${s.x},3 ${left(k) + 0.5},11 ${left(k) + 0.5},14" fill="none" stroke="currentColor" stroke-width="0.8" opacity="0.6"></polyline>`)}
    </svg>
    <div class="cards" aria-hidden="true" @click=${onClick}>
      ${slim.map((s, k) => html`<div class="card ${chosen === s.i ? 'chosen' : ''}" data-layer=${s.i} data-width=${size} data-shift=${left(k) - (k === 0 ? 0 : left(k - 1) + size)}>${content(s.i)}</div>`)}
    </div>`;
}
