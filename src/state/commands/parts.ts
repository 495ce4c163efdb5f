import type { Design, DopantRow, LayerInput } from '../../design/types.ts';

/**
 * Parts of a design by their place, for the commands. A place that is not there is an error of the caller, never of the person: it throws.
 * @throws {RangeError} no such layer, row, variable or interface
 */
export function layerAt(design: Design, layer: number): LayerInput {
  return partAt(design.layers, layer, 'layer');
}

export function dopantAt(design: Design, layer: number, row: number): DopantRow {
  return partAt(layerAt(design, layer).dopants ?? [], row, 'dopant row');
}

export function partAt<T>(list: readonly T[], index: number, what: string): T {
  if (!Number.isInteger(index) || index < 0 || index >= list.length) throw new RangeError(`no ${what} ${index} of ${list.length}`);
  return list[index];
}

/** Which end of the stack. */
export type Side = 'top' | 'bottom';
