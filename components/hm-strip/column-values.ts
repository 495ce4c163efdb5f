import { html, type TemplateResult } from 'lit';
import type { Complaint } from '../../src/design/complaint.ts';
import type { Design, LayerInput } from '../../src/design/types.ts';
import type { LayerResult } from '../../src/result/types.ts';
import { complaintsWithin } from '../shared/complaint-at.ts';
import type { DopantChoice } from '../shared/menus.ts';
import { ownOfLayer } from '../../src/parameters/own-entries.ts';
import { layerLines } from './column-text.ts';

/**
 * What stands in a column or on a card. Each value says by `data-value` what a press on it edits.
 *
 * @param solved  for what an expression comes to; undefined while the result is of another stack
 */
export function columnValues(design: Design, i: number, solved: LayerResult | undefined, complaints: readonly Complaint[]): TemplateResult {
  const layer = design.layers[i];
  const wrong = (path: string): string => (complaintsWithin(complaints, `layers[${i}].${path}`).length > 0 ? 'wrong' : '');
  const dopants = layer.dopants ?? [];
  const [, material, thickness, ...doping] = layerLines(layer, i, solved, ownOfLayer(design.custom, layer));
  return html`<span class="name"><span class="number">${i + 1}</span> ${layer.name}</span>
    <span class="value ${wrong('material')} ${wrong('x')}" data-value="material">${material}</span>
    <span class="value ${wrong('thickness')}" data-value="thickness">${thickness}</span>
    ${doping.map((text, r) => html`<span class="value ${wrong(`dopants[${r}]`)}" data-value=${dopants.length === 0 ? 'add' : `doping ${r}`}>${text}</span>`)}`;
}

/** How a column's doping is drawn: by the type as solved, else by its first dopant. */
export function dopingKind(layer: LayerInput, solved: LayerResult | undefined, choices: readonly DopantChoice[]): 'donor' | 'acceptor' | 'undoped' {
  const [first] = layer.dopants ?? [];
  if (!first) return 'undoped';
  if (solved && solved.type !== 'i') return solved.type === 'n' ? 'donor' : 'acceptor';
  return first.kind ?? choices.find((d) => d.host === layer.material && d.id === first.dopant)?.kind ?? 'undoped';
}
