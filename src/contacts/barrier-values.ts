import { sources } from '../../presets/index.ts';
import { barrierHeights, pinningSlope } from '../../solver/barrier.ts';
import type { Boundary, Material } from '../../solver/index.ts';
import type { LocalBands } from '../../solver/bands.ts';
import { presetCatalogue } from '../design/catalogue.ts';
import type { ContactInput, MetalInput } from '../design/types.ts';

type BarrierInput = Extract<ContactInput, { kind: 'barrier' }>;
export type BarrierSource = Extract<Boundary, { kind: 'barrier' }>['source'];

/** One value that a barrier of a metal on a material could have, and the contact that a design writes to have it. */
export interface BarrierValue {
  /** unique among the values of one metal; the same for the same design */ key: string;
  basis: 'measured' | 'pinned' | 'ideal';
  /** whose barrier was measured; null for a value of a model */ carrier: 'n' | 'p' | null;
  /** at the design's temperature, without the image-force lowering */ barrier_n_eV: number;
  barrier_p_eV: number;
  /** S of a model; null for a measured value */ slope: number | null;
  /** key of the presets' works, or what the design says */ source: string | null;
  /** the work behind that key, in full; null where there is none */ work: string | null;
  checked: string | null;
  confidence: string | null;
  note: string | null;
  contact: BarrierInput;
}

/** What is asked of a surface to read a contact on it and to know its heights there. */
export interface BarrierSurface {
  material: Material;
  x: number;
  bands: LocalBands;
  /** the boundary that a contact comes to, or what is wrong with it */ boundary(contact: BarrierInput): Extract<Boundary, { kind: 'barrier' }> | string;
}

/**
 * All values known for a metal on a surface, side by side: every published measurement of the pair, for either carrier; pinning by the material's S and by the
 * one that the design states; and the work function less the affinity. A value without its constants (no work function, no neutrality level) is left out.
 *
 * @param stated  carrier, pinning and image force that every contact keeps unless the value itself says otherwise
 */
export function barrierValues(metal: MetalInput, stated: Pick<BarrierInput, 'carrier' | 'pinning' | 'imageForce'>, surface: BarrierSurface): BarrierValue[] {
  const { carrier, imageForce } = stated;
  const own: BarrierInput = { kind: 'barrier', metal: metal.id, ...(carrier === undefined ? {} : { carrier }), ...(imageForce === undefined ? {} : { imageForce }) };
  const values: BarrierValue[] = [];
  const add = (value: Omit<BarrierValue, 'barrier_n_eV' | 'barrier_p_eV' | 'work'>): void => {
    const boundary = surface.boundary(value.contact);
    if (typeof boundary === 'string') return;
    const heights = heightsOf(boundary.source, surface);
    if (heights === null || values.some(({ key }) => key === value.key)) return;
    values.push({ ...value, work: value.source !== null && Object.hasOwn(sources, value.source) ? sources[value.source] : null, barrier_n_eV: heights.barrierN, barrier_p_eV: heights.barrierP });
  };
  const rows = (metal.barriers ?? []).filter((row) => row.material === surface.material.id);
  // The one that a design gets by naming the metal alone.
  const usual = rows.find((row) => row.carrier === (carrier ?? 'n')) ?? rows[0];
  const preset = presetCatalogue.metals.get(metal.id)?.entry;
  const others = preset === undefined || preset === metal ? [] : (preset.barriers ?? []).filter((row) => row.material === surface.material.id);
  for (const row of [...rows, ...others]) {
    const text = sourceText(row.source);
    const contact: BarrierInput = row === usual ? { ...own, pinning: 'material' } : { ...own, barrier: row.height, carrier: row.carrier };
    add({ key: `measured ${row.carrier} ${row.height} ${text ?? ''}`.trim(), basis: 'measured', carrier: row.carrier, slope: null, source: text, checked: row.checked ?? null, confidence: row.confidence ?? null, note: row.note ?? null, contact });
  }
  const model = { carrier: null, source: sourceText(workFunctionSource(metal)), checked: workFunctionChecked(metal), confidence: null, note: null };
  const slopes: { slope: number; pinning: BarrierInput['pinning'] }[] = [];
  // Where something was measured, "material" means that: S is then written as a number.
  const slope = pinningSlope(surface.material, surface.x);
  if (slope !== 1) slopes.push({ slope, pinning: rows.length > 0 ? slope : 'material' });
  const wanted = surface.boundary({ ...own, pinning: stated.pinning });
  if (typeof wanted !== 'string' && wanted.source.from === 'workFunction' && typeof wanted.source.slope === 'number' && wanted.source.slope !== 1 && wanted.source.slope !== slope) slopes.push({ slope: wanted.source.slope, pinning: stated.pinning });
  for (const { slope: s, pinning } of slopes) add({ ...model, key: `pinned ${s}`, basis: 'pinned', slope: s, contact: { ...own, pinning } });
  add({ ...model, key: 'ideal', basis: 'ideal', slope: 1, contact: { ...own, pinning: 'none' } });
  return values;
}

/** Heights of a source on a surface, eV; null where the material lacks what pinning needs. */
export function heightsOf(source: BarrierSource, { material, x, bands }: Pick<BarrierSurface, 'material' | 'x' | 'bands'>): { barrierN: number; barrierP: number } | null {
  try {
    return barrierHeights(source, material, x, bands);
  } catch (error) {
    if (error instanceof RangeError) return null;
    throw error;
  }
}

/** The value that a contact of the design comes to, among those of its metal: same height, same kind. */
export function valueInForce(values: readonly BarrierValue[], source: BarrierSource, heights: { barrierN: number }): BarrierValue | null {
  const basis = source.from === 'workFunction' ? (source.slope === 1 ? ['ideal'] : ['pinned', 'ideal']) : ['measured'];
  const carrier = source.from === 'workFunction' ? null : source.carrier;
  return values.find((v) => basis.includes(v.basis) && v.carrier === carrier && Math.abs(v.barrier_n_eV - heights.barrierN) < 1e-9) ?? null;
}

function sourceText(source: unknown): string | null {
  return typeof source === 'string' && source !== '' ? source : null;
}

function workFunctionSource(metal: MetalInput): unknown {
  const row = metal.sources?.workFunction as { source?: unknown } | undefined;
  return row?.source ?? metal.source;
}

function workFunctionChecked(metal: MetalInput): string | null {
  const row = metal.sources?.workFunction as { checked?: unknown } | undefined;
  return typeof row?.checked === 'string' ? row.checked : null;
}
