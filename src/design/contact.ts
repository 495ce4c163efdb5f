import { isAlloy, type Boundary, type Material } from '../../solver/index.ts';
import { didYouMean, quoted } from '../quantity/wording.ts';
import type { Asker } from './ask.ts';
import type { Catalogue } from './catalogue.ts';
import type { ContactInput, Pure } from './types.ts';

/** One end of the stack, on the material that it touches. */
export function readContact(input: ContactInput, side: 'top' | 'bottom', material: Material | null, layerName: string, catalogue: Catalogue, ask: Asker): Boundary | null {
  const insulator = material !== null && !isAlloy(material) && material.insulator;
  if (input.kind === 'neutral') {
    if (insulator) ask.wrong(`${side}.kind`, `is "neutral", but ${quoted(layerName)} is an insulator, where nothing fixes a neutral level; make it a barrier, a pinned surface or open`);
    return { kind: 'neutral' };
  }
  if (input.kind === 'open') return { kind: 'open', sheetCharge: ask.maybe(input.sheetCharge, 'sheetDensity', `${side}.sheetCharge`, sheetBounds) ?? 0 };
  if (input.kind === 'pinned') return { kind: 'pinned', level: ask.quantity(input.level, 'energy', `${side}.level`, heightBounds) };
  const source = barrierSource(input, side, material, catalogue, ask);
  return source && { kind: 'barrier', source, metal: input.metal ?? null, imageForce: input.imageForce ?? true };
}

export const sheetBounds = { of: 'a sheet charge', least: [-1e16, '-1e16 cm^-2'] as [number, string], most: [1e16, '1e16 cm^-2'] as [number, string] };
const heightBounds = { of: 'a height', least: [-10, '-10 eV'] as [number, string], most: [20, '20 eV'] as [number, string] };

/** A height given outright wins; then, unless a pinning is asked for, a measured barrier of the pair; then the work function with the slope S. */
function barrierSource(input: Extract<ContactInput, { kind: 'barrier' }>, side: 'top' | 'bottom', material: Material | null, catalogue: Catalogue, ask: Asker): Extract<Boundary, { kind: 'barrier' }>['source'] | null {
  const carrier = input.carrier ?? 'n';
  const metal = input.metal === undefined ? undefined : catalogue.metals.get(input.metal);
  if (input.metal !== undefined && !metal && input.barrier === undefined) {
    ask.wrong(`${side}.metal`, `there is no metal ${quoted(input.metal)}${didYouMean(input.metal, [...catalogue.metals.keys()])}; presets and this design's custom.metals are known, or give "barrier" outright`);
    return null;
  }
  if (input.barrier !== undefined) return { from: 'given', carrier, height: ask.quantity(input.barrier, 'energy', `${side}.barrier`, heightBounds) };
  if (!metal) {
    ask.wrong(side, 'is a barrier without a metal; name one ("metal": "Ti") or give the height ("barrier": "0.6 eV")');
    return null;
  }
  const slope = readPinning(input.pinning, side, ask);
  const { entry, path } = metal;
  if (slope === 'material') {
    const rows = (entry.barriers ?? []).map((b, i) => ({ b, at: `${path}.barriers[${i}].height` })).filter(({ b }) => b.material === material?.id);
    const row = rows.find(({ b }) => b.carrier === carrier) ?? rows[0];
    if (row) return { from: 'measured', carrier: row.b.carrier, height: ask.quantity(row.b.height, 'energy', row.at, heightBounds) };
  }
  if (entry.workFunction === undefined) {
    ask.wrong(`${side}.metal`, `${quoted(entry.id)} has no work function and no measured barrier on ${material?.id ?? 'this material'}; give "barrier" outright`);
    return null;
  }
  const needsLevel = typeof slope === 'number' ? slope !== 1 : pinningSlope(material) !== 1;
  if (needsLevel && material && !hasNeutralityLevel(material)) {
    ask.wrong(`${side}.${input.pinning === undefined ? 'metal' : 'pinning'}`, `${material.id} has no charge neutrality level to pin to; set "pinning": "none", or give "barrier" outright`);
    return null;
  }
  return { from: 'workFunction', workFunction: ask.quantity(entry.workFunction, 'energy', `${path}.workFunction`, { positive: true }), slope };
}

function readPinning(pinning: Pure | undefined, side: 'top' | 'bottom', ask: Asker): number | 'material' {
  if (pinning === undefined || pinning === 'material') return 'material';
  if (pinning === 'none') return 1;
  if (pinning === 'full') return 0;
  if (typeof pinning === 'string' && /^[A-Za-z]+$/.test(pinning) && !ask.scope.names.includes(pinning)) {
    return ask.wrong(`${side}.pinning`, `is ${quoted(pinning)}; "material", "none", "full" or a number from 0 to 1 would do${didYouMean(pinning, ['material', 'none', 'full'])}`);
  }
  return ask.quantity(pinning, 'number', `${side}.pinning`, { least: [0, '0'], most: [1, '1'] });
}

function pinningSlope(material: Material | null): number {
  if (!material) return 1;
  if (!isAlloy(material)) return material.pinningSlope ?? 1;
  return material.pinningSlope ?? (material.first.pinningSlope !== undefined && material.second.pinningSlope !== undefined ? Math.min(material.first.pinningSlope, material.second.pinningSlope) : 1);
}

function hasNeutralityLevel(material: Material): boolean {
  if (material.neutralityLevel !== undefined) return true;
  return isAlloy(material) && material.first.neutralityLevel !== undefined && material.second.neutralityLevel !== undefined;
}
