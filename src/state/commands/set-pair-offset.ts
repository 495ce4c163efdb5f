import { produce } from 'immer';
import { isPair } from '../../design/offset.ts';
import type { Design, OffsetInput } from '../../design/types.ts';
import { tidy } from './set-custom-value.ts';

/** The design's own band offset of a pair of materials, in the place of one that it had before. */
export function setPairOffset(design: Design, offset: OffsetInput): Design {
  return produce(design, (draft) => {
    const rows = ((draft.custom ??= {}).offsets ??= []);
    const at = rows.findIndex((row) => isPair(row, offset.first, offset.second));
    rows.splice(at < 0 ? rows.length : at, at < 0 ? 0 : 1, offset);
  });
}

/** @throws {RangeError} the design has no own offset of the pair */
export function removePairOffset(design: Design, first: string, second: string): Design {
  const at = (design.custom?.offsets ?? []).findIndex((row) => isPair(row, first, second));
  if (at < 0) throw new RangeError(`no own offset of ${first} and ${second}`);
  return produce(design, (draft) => {
    draft.custom!.offsets!.splice(at, 1);
    tidy(draft);
  });
}
