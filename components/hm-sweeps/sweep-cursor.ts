import { svg, type SVGTemplateResult } from 'lit';
import type { ContourMap } from '../../src/drawing/contour-map.ts';
import type { SweepPlot } from '../../src/drawing/sweep-plot.ts';
import type { SweepPlan, SweepResult } from '../../src/sweep/sweep.ts';

type Picture = { plot: SweepPlot; map: null } | { plot: null; map: ContourMap };

const nearest = (share: number, count: number): number => Math.min(count - 1, Math.max(0, Math.round(share * (count - 1))));

/** The point nearest to a place of the picture: points lie evenly along their axes. */
export function cursorAt({ axes }: SweepPlan, { plot, map }: Picture, x: number, y: number): number {
  const area = plot ? plot.panels[0].area : map!.area;
  const column = nearest((x - area.left) / (area.right - area.left), axes[0].values.length);
  if (plot) return column;
  return nearest((area.bottom - y) / (area.bottom - area.top), axes[1].values.length) * axes[0].values.length + column;
}

/** The point that a key leads to, begun in the middle; null for a key that leads nowhere. */
export function cursorMoved({ axes }: SweepPlan, cursor: number | null, key: string, by: number): number | null {
  const columns = axes[0].values.length;
  const rows = axes[1]?.values.length ?? 1;
  const step = { ArrowLeft: [-by, 0], ArrowRight: [by, 0], ArrowUp: rows > 1 ? [0, by] : [by, 0], ArrowDown: rows > 1 ? [0, -by] : [-by, 0], Home: [-columns, 0], End: [columns, 0] }[key];
  if (step === undefined) return null;
  if (cursor === null && key !== 'Home' && key !== 'End') return Math.floor((rows - 1) / 2) * columns + Math.floor((columns - 1) / 2);
  const from = cursor ?? 0;
  const c = Math.min(columns - 1, Math.max(0, (from % columns) + step[0]));
  const r = Math.min(rows - 1, Math.max(0, Math.floor(from / columns) + step[1]));
  return r * columns + c;
}

/** The crosshair: an upright line with a ring on each curve; on a map two lines. */
export function cursorShapes(plan: SweepPlan, { figures }: SweepResult, { plot, map }: Picture, cursor: number): SVGTemplateResult {
  if (plot) {
    const x = plot.x(plan.axes[0].values[cursor]);
    const rings = plot.panels.flatMap(({ curves, y, area }) => curves.flatMap((i) => {
      const value = figures[i].values[cursor];
      const at = value === null ? NaN : y(value);
      return at >= area.top - 1 && at <= area.bottom + 1 ? [at] : [];
    }));
    const [top, bottom] = [plot.panels[0].area.top, plot.panels[plot.panels.length - 1].area.bottom];
    return svg`<g data-role="crosshair" stroke="currentColor" fill="none"><line x1=${x} x2=${x} y1=${top} y2=${bottom} stroke-width="1" opacity="0.7"></line>${rings.map((y) => svg`<circle cx=${x} cy=${y} r="4" stroke-width="1.6"></circle>`)}</g>`;
  }
  const columns = plan.axes[0].values.length;
  const { left, right, top, bottom } = map!.area;
  const x = left + ((right - left) * (cursor % columns)) / (columns - 1);
  const y = bottom - ((bottom - top) * Math.floor(cursor / columns)) / (plan.axes[1].values.length - 1);
  return svg`<g data-role="crosshair" stroke="currentColor" fill="none"><line x1=${x} x2=${x} y1=${top} y2=${bottom}></line><line x1=${left} x2=${right} y1=${y} y2=${y}></line><circle cx=${x} cy=${y} r="4" stroke-width="1.6"></circle></g>`;
}
