import { html, nothing, type TemplateResult } from 'lit';
import type { PlateDimension } from '../../src/drawing/plate.ts';
import type { PlateView } from './plate-view.ts';

export interface ToolsInput {
  view: PlateView;
  dimensions: readonly PlateDimension[];
  /** the panels that are open */ open: { dimensions: boolean; table: boolean };
  zoomedIn: boolean;
  change(change: Partial<PlateView>): void;
  zoom(factor: number): void;
  whole(): void;
  toggle(panel: 'dimensions' | 'table'): void;
}

function pressed(text: string, on: boolean, act: () => void, title = ''): TemplateResult {
  return html`<button type="button" aria-pressed=${on} title=${title || nothing} @click=${act}>${text}</button>`;
}

/** What can be chosen about the plate. */
export function tools(t: ToolsInput): TemplateResult {
  const { view } = t;
  const even = (view.depth ?? 'even') === 'even';
  const leftOut = t.dimensions.filter(({ crowded, hidden }) => crowded && !hidden).length;
  const shading = view.shading ?? 'occupancy';
  return html`<div class="tools">
    <div role="group" aria-label="depth axis" class="set">
      <span class="of" aria-hidden="true">Depth</span>
      ${pressed('even-handed', even, () => t.change({ depth: 'even', window: undefined }), 'each layer gets room in proportion to the bending that it holds')}
      ${pressed('true', !even, () => t.change({ depth: 'true', window: undefined }), 'every nanometre gets the same room')}
    </div>
    <div role="group" aria-label="shading" class="set">
      <span class="of" aria-hidden="true">Shading</span>
      ${pressed('occupancy', shading === 'occupancy', () => t.change({ shading: 'occupancy' }), 'f(E): how full the states are')}
      ${pressed('carriers', shading === 'carriers', () => t.change({ shading: 'carriers' }), 'f(E) times the density of states: where the carriers are')}
      ${pressed('none', shading === 'none', () => t.change({ shading: 'none' }))}
    </div>
    <div role="group" aria-label="levels shown" class="set">
      <span class="of" aria-hidden="true">Show</span>
      ${pressed('dopant levels', view.levels !== false, () => t.change({ levels: view.levels === false }))}
      ${pressed('vacuum level', view.vacuum === true, () => t.change({ vacuum: view.vacuum !== true, energyWindow: undefined }))}
      <button type="button" aria-expanded=${t.open.dimensions} @click=${() => t.toggle('dimensions')}>dimensions…${leftOut === 0 ? nothing : html` <span class="left-out" title="no room for them here: zoom in, or drag others away">${leftOut} left out</span>`}</button>
      <button type="button" aria-expanded=${t.open.table} @click=${() => t.toggle('table')}>data table</button>
    </div>
    <div role="group" aria-label="zoom" class="set">
      <span class="of" aria-hidden="true">Zoom</span>
      <button type="button" aria-label="farther" title="farther (key −)" ?disabled=${!t.zoomedIn} @click=${() => t.zoom(1 / 1.6)}>−</button>
      <button type="button" aria-label="nearer" title="nearer (key +)" @click=${() => t.zoom(1.6)}>+</button>
      <button type="button" title="the whole stack (key 0)" ?disabled=${!t.zoomedIn} @click=${t.whole}>all</button>
    </div>
  </div>`;
}

/** px that a press of an arrow moves a dimension line by */
const STEP = 8;

/** The dimension lines as a list: shown or put away, moved or put back, without a pointer. */
export function dimensionPanel(t: ToolsInput): TemplateResult {
  const hidden = t.view.hidden ?? [];
  const moved = t.view.moved ?? {};
  const without = (id: string): Record<string, [number, number]> => Object.fromEntries(Object.entries(moved).filter(([key]) => key !== id));
  const shift = (id: string, dx: number, dy: number): void => t.change({ moved: { ...moved, [id]: [(moved[id]?.[0] ?? 0) + dx, (moved[id]?.[1] ?? 0) + dy] } });
  return html`<fieldset class="dimensions">
    <legend>Dimension lines: drag a figure on the plate, or move it from here</legend>
    ${t.dimensions.length === 0 ? html`<p class="none">none in this part of the picture</p>` : nothing}
    <ul>
      ${t.dimensions.map((d) => html`<li>
        <label><input type="checkbox" .checked=${!d.hidden} @change=${() => t.change({ hidden: d.hidden ? hidden.filter((id) => id !== d.id) : [...hidden, d.id] })} />${d.label} ${d.value}</label>
        <span class="meaning">${d.meaning}${d.crowded ? '; no room for it here' : ''}</span>
        ${d.hidden || d.crowded ? nothing : html`<span class="moves" role="group" aria-label="move ${d.label}, ${d.meaning}">
          ${([['←', 'left', -1, 0], ['→', 'right', 1, 0], ['↑', 'up', 0, -1], ['↓', 'down', 0, 1]] as const).map(([sign, word, dx, dy]) => html`<button type="button" class="plain" aria-label=${word} @click=${() => shift(d.id, STEP * dx, STEP * dy)}>${sign}</button>`)}
          ${moved[d.id] ? html`<button type="button" @click=${() => t.change({ moved: without(d.id) })}>put back</button>` : nothing}
        </span>`}
      </li>`)}
    </ul>
    <button type="button" ?disabled=${hidden.length === 0 && Object.keys(moved).length === 0} @click=${() => t.change({ hidden: [], moved: {} })}>Put all back</button>
  </fieldset>`;
}
