import { produce } from 'immer';
import type { Design } from '../../design/types.ts';

export function setTitle(design: Design, title: string): Design {
  return produce(design, (draft) => {
    draft.title = title;
  });
}
