import { html, nothing, type TemplateResult } from 'lit';
import type { Complaint } from '../../src/design/complaint.ts';
import type { Design } from '../../src/design/types.ts';
import { complaintsWithin } from '../shared/complaint-at.ts';
import { spread } from './strip-geometry.ts';

/** Buttons of a lane stand this far apart, px: room for a finger. */
const GAP = 26;

/** A button that would stand farther than this from its boundary would be taken for another's: it is left out, px. */
const FARTHEST = 5;

/** Boundaries in view with the px of their buttons; null where there is no room for all. Everything that a lane offers can be had from the form too. */
function placed(edges: readonly (number | null)[], width: number, wanted: (i: number) => boolean): { i: number; x: number }[] | null {
  const shown = edges.flatMap((x, i) => (x !== null && wanted(i) ? [{ x, i }] : []));
  const places = spread(shown.map((e) => e.x), GAP, GAP / 2, width - GAP / 2);
  return places && shown.map(({ i, x }, k) => ({ i, x: places[k], off: Math.abs(places[k] - x) })).filter(({ off }) => off <= FARTHEST);
}

/** A "+" over every boundary. */
export function insertLane(design: Design, edges: readonly (number | null)[], width: number, onInsert: (at: number) => void): TemplateResult | typeof nothing {
  const { layers } = design;
  const where = (i: number): string => (i === 0 ? `on top of ${layers[0].name}` : i === layers.length ? `under ${layers[i - 1].name}` : `between ${layers[i - 1].name} and ${layers[i].name}`);
  const buttons = placed(edges, width, () => true);
  if (!buttons) return nothing;
  return html`<div class="lane">
    ${buttons.map(({ i, x }) => html`<button type="button" tabindex="-1" data-left=${x} title="put a layer in ${where(i)}" aria-label="put a layer in ${where(i)}" @click=${() => onInsert(i)}>+</button>`)}
  </div>`;
}

/** A mark under every interface: filled where the design says something of its own about it. */
export function interfaceLane(design: Design, edges: readonly (number | null)[], width: number, chosen: number | null, complaints: readonly Complaint[], onChoice: (above: number) => void): TemplateResult | typeof nothing {
  const { layers, interfaces = [] } = design;
  const buttons = placed(edges, width, (i) => i > 0 && i < layers.length);
  if (!buttons || buttons.length === 0) return nothing;
  return html`<div class="lane">
    ${buttons.map(({ i, x }) => {
      const row = interfaces.findIndex((r) => r.above === layers[i - 1].name);
      const wrong = row >= 0 && complaintsWithin(complaints, `interfaces[${row}]`).length > 0;
      const words = `interface ${layers[i - 1].name} / ${layers[i].name}${row >= 0 ? ', with values of its own' : ''}${wrong ? ', which has to be mended' : ''}`;
      const looks = `${row >= 0 ? 'own' : ''} ${chosen === i - 1 ? 'chosen' : ''} ${wrong ? 'wrong' : ''}`;
      return html`<button type="button" tabindex="-1" class=${looks} data-left=${x} title=${words} aria-label=${words} @click=${() => onChoice(i - 1)}>${wrong ? '▲' : row >= 0 ? '◆' : '◇'}</button>`;
    })}
  </div>`;
}
