import { powerOfTen, thicknessText } from '../shared/typed-text.ts';

/** A drag of a layer's lower edge: the scale is the one under the pointer when it began, so that a picture that follows cannot run away from the hand. */
export interface EdgeDrag {
  layer: number;
  startX: number;
  /** nm */ startThickness: number;
  /** nm/px */ scale: number;
  /** as typed before the drag */ text: string;
  /** edits of this drag undo as one */ join: string;
}

let drags = 0;

export function startEdgeDrag(layer: number, x: number, width_px: number, thickness_nm: number, text: string): EdgeDrag {
  return { layer, startX: x, startThickness: thickness_nm, scale: thickness_nm / Math.max(width_px, 1), text, join: `thickness ${layer} ${++drags}` };
}

/** The thickness at x, as text: in steps of about a px that are powers of ten, ten times finer when asked. */
export function draggedThickness(drag: EdgeDrag, x: number, fine: boolean): string {
  const step = powerOfTen(Math.max(2 * drag.scale, drag.startThickness / 1000)) / (fine ? 10 : 1);
  const moved = drag.startThickness + (x - drag.startX) * drag.scale * (fine ? 0.1 : 1);
  return thicknessText(Math.max(moved, step), drag.text, step);
}

/** The thickness by a share thicker or thinner, to three digits. */
export function scaledThickness(thickness_nm: number, share: number, text: string): string {
  const wished = thickness_nm * (1 + share);
  return thicknessText(wished, text, powerOfTen(wished) / 100);
}
