import type { Result } from '../result/types.ts';
import type { DepthAxis, DepthMode } from './depth-axis.ts';
import { describe } from './describe.ts';
import { dimensionsOf } from './dimensions.ts';
import { energyAxis, type EnergyAxis } from './energy-axis.ts';
import { plateFrame, type Frame, type FrameOptions } from './frame.ts';
import { axes, endLabels } from './marks/axes.ts';
import { bandEdges, fermiLevel, interfaces, vacuumLevel } from './marks/band-edges.ts';
import { caption, captionSentences, heading, staleNotice, wrapped } from './marks/caption.ts';
import { carrierShading } from './marks/carriers.ts';
import { dimensionLine } from './marks/dimension-lines.ts';
import { dopantLevels } from './marks/dopant-levels.ts';
import { metals } from './marks/metals.ts';
import { occupancyShading } from './marks/occupancy.ts';
import { strip } from './marks/strip.ts';
import { variantEdges, type Variant } from './marks/variants.ts';
import { placeDimensions, type Box, type Obstacles } from './place-dimensions.ts';
import type { Drawing, Gradient, Shape } from './shapes.ts';
import { styleOf, type StyleName } from './styles.ts';
import { traceOf, visibleSpans, type LayerSpan } from './traces.ts';

export interface PlateOptions {
  /** px */ width: number;
  height: number;
  depth: DepthMode;
  /** zoom, nm */ window?: [number, number];
  /** zoom, eV */ energyWindow?: [number, number];
  /** eV, where several plates share one energy axis; `energyWindow` wins */ energyDomain?: [number, number];
  shading: 'occupancy' | 'carriers' | 'none';
  style: StyleName;
  vacuum: boolean;
  levels: boolean;
  /** ids of dimension lines put away */ hidden?: string[];
  /** dragged dimension lines: offset in px from where they would stand */ moved?: Record<string, [number, number]>;
  /** other results to compare with: their band edges on the same axes, thin and dashed, the energy axis wide enough for all */ variants?: Variant[];
  /** name of the plate's own result, at the head of the key of the variants */ base?: string;
  /** the result is of an earlier input */ stale?: boolean;
  /** full: with strip of layer names, title and caption, for export. bare: the page draws the strip itself */ frame?: 'bare' | 'full';
  /** sentences that the caption of a full frame begins with */ remarks?: readonly string[];
  /** of the ids in this drawing; give each of several drawings on a page its own */ prefix?: string;
}

export interface PlateDimension {
  id: string;
  /** "qVbi" */ label: string;
  /** "0.853 eV" */ value: string;
  /** what it measures, in words */ meaning: string;
  /** middle of the figure, px; of no use while not drawn */ x: number;
  y: number;
  /** the figure's box, for a handle to drag it by; null while not drawn */ box: Box | null;
  hidden: boolean;
  /** wanted, but there is no room for it */ crowded: boolean;
}

export interface Plate extends Drawing {
  axes: { depth: DepthAxis; energy: EnergyAxis; area: { left: number; right: number; top: number; bottom: number } };
  dimensions: PlateDimension[];
}

const PLATE_DEFAULTS = {
  width: 960, height: 540, depth: 'even', shading: 'occupancy', style: 'light', vacuum: false, levels: true, frame: 'bare', prefix: 'plate',
} as const satisfies Partial<PlateOptions>;

/** Opacity of everything that belongs to an earlier input. */
const STALE = 0.4;

/**
 * The band diagram of one result: bands, Fermi level, shading, dopant levels, metals, dimension lines, axes.
 *
 * @throws {RangeError} unknown style or depth mode; an empty window; less room than a plate needs
 */
export function drawPlate(result: Result, options: Partial<PlateOptions>): Plate {
  const given = Object.fromEntries(Object.entries(options).filter(([, value]) => value !== undefined)) as Partial<PlateOptions>;
  const o = { ...PLATE_DEFAULTS, ...given };
  const style = styleOf(o.style);
  const full = o.frame === 'full';
  const frameOf = (captionLines: number): Frame => {
    const asked: FrameOptions = { ...o, full, captionLines, keyed: (o.variants ?? []).length > 0, energyDomain: o.energyDomain ?? sharedDomain(result, o.variants ?? [], o.vacuum) };
    return plateFrame(result, style, asked);
  };
  let frame = frameOf(1);
  let lines: string[] = [];
  if (full) {
    // The caption's length decides the height left for the plate; its words depend on widths alone.
    lines = wrapped([...(o.remarks ?? []), ...captionSentences(frame, o.shading)], frame.small, o.width - 2.4 * frame.text);
    frame = frameOf(lines.length);
  }
  const spans = visibleSpans(result, frame.depth);
  const shading = shadingOf(frame, spans, o.shading);
  const metalShapes = metals(frame);
  const variantShapes = variantEdges(frame, o.variants ?? [], o.base);
  const taken = [...metalShapes, ...variantShapes].flatMap((s) => (s.kind === 'rect' ? [s] : []));
  const { shapes: dimensionShapes, dimensions } = dimensionMarks(frame, spans, taken, o.hidden ?? [], o.moved ?? {});
  const inked: Shape[] = [
    ...shading.shapes,
    ...interfaces(frame),
    ...metalShapes,
    ...(o.levels ? dopantLevels(frame, spans) : []),
    ...(o.vacuum ? vacuumLevel(frame, spans) : []),
    ...fermiLevel(frame, spans),
    ...variantShapes,
    ...bandEdges(frame, spans),
    ...dimensionShapes,
    ...endLabels(frame, o.vacuum),
  ];
  const { area } = frame;
  return {
    width: o.width, height: o.height, background: style.ground, font: style.font,
    shapes: [
      ...(o.stale ? inked.map((shape) => ({ ...shape, opacity: STALE * (shape.opacity ?? 1) })) : inked),
      ...strip(frame), ...axes(frame), ...(full ? [...heading(frame), ...caption(frame, lines)] : []), ...(o.stale ? staleNotice(frame) : []),
    ],
    gradients: shading.gradients,
    clips: [{ id: frame.areaClip, x: area.left, y: area.top, w: area.right - area.left, h: area.bottom - area.top }],
    title: result.title === '' ? 'Band diagram' : `Band diagram: ${result.title}`,
    description: describe(result),
    axes: { depth: frame.depth, energy: frame.energy, area },
    dimensions,
  };
}

/** Boxes of the upright steps of an edge between layers. */
function stepsOf(frame: Frame, spans: LayerSpan[], values: number[]): Box[] {
  return spans.slice(1).map((span, i) => {
    const [a, b] = [frame.energy.y(values[spans[i].last]), frame.energy.y(values[span.first])];
    return { x: span.x[0] - 1, y: Math.min(a, b), w: 2, h: Math.abs(a - b) };
  });
}

/** Energies that hold the plate's own bands and those of its variants; undefined without variants. */
function sharedDomain(result: Result, variants: Variant[], vacuum: boolean): [number, number] | undefined {
  if (variants.length === 0) return undefined;
  const domains = [result, ...variants.map((v) => v.result)].map((r) => energyAxis(r, { range: [1, 0], vacuum }).domain);
  return [Math.min(...domains.map(([low]) => low)), Math.max(...domains.map(([, high]) => high))];
}

function shadingOf(frame: Frame, spans: LayerSpan[], kind: PlateOptions['shading']): { shapes: Shape[]; gradients: Gradient[] } {
  switch (kind) {
    case 'occupancy': return occupancyShading(frame, spans);
    case 'carriers': return { shapes: carrierShading(frame, spans), gradients: [] };
    case 'none': return { shapes: [], gradients: [] };
    default: throw new RangeError(`unknown shading: ${String(kind)}`);
  }
}

/** @param taken  boxes of other texts */
function dimensionMarks(frame: Frame, spans: LayerSpan[], taken: Box[], hidden: string[], moved: Record<string, [number, number]>): { shapes: Shape[]; dimensions: PlateDimension[] } {
  const { profile } = frame.result;
  const all = dimensionsOf(frame);
  const shown = all.filter((d) => !hidden.includes(d.id));
  const obstacles: Obstacles = {
    curves: spans.flatMap((span) => [profile.ec_eV, profile.ev_eV].map((values) => traceOf(span, values, frame.energy.y))),
    dashes: spans.map((span) => traceOf(span, profile.ef_eV, frame.energy.y)),
    boxes: taken,
    steps: [profile.ec_eV, profile.ev_eV].flatMap((values) => stepsOf(frame, spans, values)),
    uprights: frame.depth.edges,
  };
  const placed = placeDimensions(frame, shown, obstacles, moved);
  const dimensions = all.map((d): PlateDimension => {
    const at = placed[shown.indexOf(d)] ?? null;
    const { box } = at ?? { box: null };
    return {
      id: d.id, label: d.label, value: d.value, meaning: d.meaning, x: box ? box.x + box.w / 2 : d.places[0], y: box ? box.y + box.h / 2 : frame.energy.y((d.low + d.high) / 2), box,
      hidden: hidden.includes(d.id), crowded: !hidden.includes(d.id) && at === null,
    };
  });
  return { shapes: placed.flatMap((at) => (at ? dimensionLine(frame, at) : [])), dimensions };
}
