import { bisectLeft } from 'd3-array';
import type { Result } from '../result/types.ts';
import type { Points } from './curve.ts';
import type { DepthAxis } from './depth-axis.ts';
import { nodesOfLayers } from './layer-nodes.ts';

/** The nodes of one layer that lie in the window, one more on each side where there is one. */
export interface LayerSpan {
  layer: number;
  first: number;
  last: number;
  /** px of the nodes first..last */ x: number[];
}

/** Layers that the window shows, with their nodes' px. */
export function visibleSpans(result: Result, depth: DepthAxis): LayerSpan[] {
  const z = result.profile.z_nm;
  const spans: LayerSpan[] = [];
  nodesOfLayers(result).forEach(([first, last], layer) => {
    if (last < first || z[last] < depth.window[0] || z[first] > depth.window[1]) return;
    const from = Math.max(first, bisectLeft(z, depth.window[0], first, last + 1) - 1);
    const to = Math.min(last, bisectLeft(z, depth.window[1], first, last + 1));
    const x: number[] = [];
    for (let i = from; i <= to; i++) x.push(depth.x(z[i]));
    spans.push({ layer, first: from, last: to, x });
  });
  return spans;
}

/** One quantity over one span: its curve in px. */
export function traceOf(span: LayerSpan, values: number[], y: (value: number) => number): Points {
  const ys: number[] = [];
  for (let i = span.first; i <= span.last; i++) ys.push(y(values[i]));
  return { x: span.x, y: ys };
}

/** Value of a quantity at a depth, straight between nodes; at an interface that of the layer above it. NaN outside the stack. */
export function valueAt(result: Result, values: number[], z_nm: number): number {
  const z = result.profile.z_nm;
  const n = z.length;
  if (n === 0 || !(z_nm >= z[0] && z_nm <= z[n - 1])) return Number.NaN;
  const i = Math.max(1, bisectLeft(z, z_nm));
  const width = z[i] - z[i - 1];
  return width > 0 ? values[i - 1] + ((z_nm - z[i - 1]) / width) * (values[i] - values[i - 1]) : values[i - 1];
}
