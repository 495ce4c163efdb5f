import { html, type TemplateResult } from 'lit';
import type { DepthAxis } from '../../src/drawing/depth-axis.ts';
import { layerEdges } from '../../src/drawing/depth-axis.ts';
import { decimalText } from '../../src/result/figure-text.ts';
import type { Result } from '../../src/result/types.ts';
import { depthText, readingAt, readingParts, type Reading } from './reading.ts';

/** Depths of the table between the ends of the part in view. */
const STEPS = 24;

/** Readings at even places of the axis, and on both sides of every interface, from the top down. */
export function tableReadings(result: Result, axis: DepthAxis): Reading[] {
  const [from, to] = axis.window;
  const edges = layerEdges(result);
  const inner = edges.slice(1, -1).filter((z) => z > from && z < to);
  const even = Array.from({ length: STEPS + 1 }, (_, i) => axis.depth(axis.range[0] + ((axis.range[1] - axis.range[0]) * i) / STEPS));
  const points: { z: number; layer?: number }[] = even.filter((z) => inner.every((edge) => Math.abs(axis.x(edge) - axis.x(z)) > 2)).map((z) => ({ z }));
  for (const z of inner) points.push({ z, layer: edges.indexOf(z) - 1 }, { z, layer: edges.indexOf(z) });
  return points.sort((a, b) => a.z - b.z || (a.layer ?? 0) - (b.layer ?? 0)).flatMap(({ z, layer }) => readingAt(result, z, layer) ?? []);
}

/** The diagram as words and figures. */
export function plateTable(result: Result, axis: DepthAxis, description: string): TemplateResult {
  const readings = tableReadings(result, axis);
  const parts = readings.map(readingParts);
  return html`<div class="data">
    <p>${description}</p>
    <div class="scroll" role="region" aria-label="band diagram as a table" tabindex="0">
      <table>
        <thead>
          <tr>
            <th scope="col">depth</th>
            <th scope="col">layer</th>
            ${(parts[0] ?? []).map((part) => html`<th scope="col" class="figure">${part.symbol}<span class="unit">${part.unit}</span></th>`)}
          </tr>
        </thead>
        <tbody>
          ${readings.map((r, i) => html`<tr>
            <th scope="row" title="${decimalText(r.z_nm, 3)} nm">${depthText(r.z_nm)}</th>
            <td>${result.layers[r.layer].name}</td>
            ${parts[i].map((part) => html`<td class="figure">${part.figure}</td>`)}
          </tr>`)}
        </tbody>
      </table>
    </div>
  </div>`;
}
