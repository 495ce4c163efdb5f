import type { Stack } from '../../solver/index.ts';
import type { Job } from '../batch/job.ts';
import type { Complaint } from '../design/complaint.ts';
import { toStack } from '../design/stack.ts';
import type { Design } from '../design/types.ts';
import { quoted } from '../quantity/wording.ts';
import { mapMarks, type MapMark } from './marks.ts';
import { leadingDopant, mapAxes, regimeMap, type RegimeMap } from './regime-map.ts';

export interface MapRequest {
  /** index of the layer */ layer: number;
  /** 200 by 200 by default */ columns?: number;
  rows?: number;
  /** cm^-3 */ doping?: readonly [number, number];
  /** K */ temperature?: readonly [number, number];
  set?: Readonly<Record<string, string>>;
}

export interface MapPlan {
  stack: Stack;
  request: MapRequest;
  marks: MapMark[];
}

/** Reads what a map needs and says why there can be none: an insulator, an undoped layer, or what is wrong with the design. */
export function planMap(design: Design, request: MapRequest): { ok: true; plan: MapPlan } | { ok: false; complaints: Complaint[] } {
  const reading = toStack(design, request.set ?? {});
  if (!reading.ok) return reading;
  const { stack, temperatureRange } = reading;
  const layer = stack.layers[request.layer];
  const no = (message: string): { ok: false; complaints: Complaint[] } => ({ ok: false, complaints: [{ path: `layers[${request.layer}]`, message }] });
  if (!layer) return no(`is not there; the stack has ${stack.layers.length} layers`);
  if (!leadingDopant(layer)) return no(`${quoted(layer.name)} has no dopants to scale; dope it, if only a little, to see its map`);
  return { ok: true, plan: { stack, request, marks: mapMarks(stack, request.layer, temperatureRange) } };
}

/** One chunk: a map takes a tenth of a second. */
export function mapJob({ stack, request }: MapPlan): Job<RegimeMap | null> {
  const { columns, rows, doping, temperature } = request;
  return { chunks: 1, size: () => 1, run: () => regimeMap(stack.layers[request.layer], stack.assumptions, mapAxes(columns, rows, doping, temperature)) };
}
