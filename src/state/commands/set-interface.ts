import { produce } from 'immer';
import type { Design, InterfaceInput } from '../../design/types.ts';
import { layerAt } from './parts.ts';

/**
 * Sets what is exceptional at the interface under layer number `above`; a key given as undefined is taken out, and a row that holds nothing goes.
 * @throws {RangeError} no layer below `above`
 */
export function setInterface(design: Design, above: number, change: Partial<Omit<InterfaceInput, 'above'>>): Design {
  layerAt(design, above + 1);
  const { name } = layerAt(design, above);
  return produce(design, (draft) => {
    const rows = (draft.interfaces ??= []);
    let row = rows.find((candidate) => candidate.above === name);
    if (row === undefined) rows.push((row = { above: name }));
    for (const key of ['sheetCharge', 'dEc', 'dEv'] as const) {
      if (!(key in change)) continue;
      if (change[key] === undefined) delete row[key];
      else row[key] = change[key];
    }
    const kept = rows.filter((candidate) => Object.keys(candidate).length > 1);
    if (kept.length > 0) draft.interfaces = kept;
    else delete draft.interfaces;
  });
}
