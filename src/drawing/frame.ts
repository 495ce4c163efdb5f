import type { Result } from '../result/types.ts';
import { depthAxis, type DepthAxis, type DepthMode } from './depth-axis.ts';
import { energyAxis, type EnergyAxis } from './energy-axis.ts';
import { textWidth } from './glyph-widths.ts';
import type { Style } from './styles.ts';

/** px */
export interface Area {
  left: number;
  right: number;
  top: number;
  bottom: number;
}

/** Everything a mark needs to place itself. */
export interface Frame {
  result: Result;
  style: Style;
  width: number;
  height: number;
  area: Area;
  /** px beside the area for a metal, 0 where there is none */ lanes: { top: number; bottom: number };
  depth: DepthAxis;
  energy: EnergyAxis;
  /** text sizes of this drawing, px */ text: number;
  small: number;
  /** height of the strip of layer names; 0 in a bare frame */ strip: number;
  /** ids made of this stay apart from those of other drawings on a page */ prefix: string;
  areaClip: string;
}

export interface FrameOptions {
  width: number;
  height: number;
  depth: DepthMode;
  window?: [number, number];
  energyWindow?: [number, number];
  energyDomain?: [number, number];
  vacuum: boolean;
  full: boolean;
  captionLines: number;
  /** a full frame keeps a line free above the area for the key of what is laid over */ keyed?: boolean;
  prefix: string;
}

/** Below this width texts and lanes shrink, px. */
const NARROW = 600;
/** Of the small letters. */
const KEY_LINE = 1.4;

export function plateFrame(result: Result, style: Style, options: FrameOptions): Frame {
  const { width, height } = options;
  const narrow = width < NARROW * (style.textSize / 12);
  const small = narrow ? style.smallSize - 1 : style.smallSize;
  const text = narrow ? style.textSize - 1 : style.textSize;
  // A barrier's figure has to fit in.
  const lane = textWidth('0.000 eV', small) + 10;
  const metal = (side: 'top' | 'bottom'): boolean => result.contacts.some((c) => c.side === side && c.kind === 'barrier');
  const lanes = { top: metal('top') ? lane : 0, bottom: metal('bottom') ? lane : 0 };
  const strip = options.full ? 5 * text : 0;
  const area = {
    left: 2.6 * text + 2.9 * small + lanes.top,
    right: width - 3 * text - lanes.bottom,
    top: options.full ? 3.2 * text + (options.keyed ? KEY_LINE * small : 0) : 1.2 * text,
    bottom: height - strip - 2.1 * small - 1.6 * text - (options.full ? options.captionLines * 1.4 * small + 0.6 * text : 0),
  };
  if (!(area.right - area.left >= 40 && area.bottom - area.top >= 40)) throw new RangeError(`no room for a plate: ${width} by ${height} px`);
  const depth = depthAxis(result, { mode: options.depth, range: [area.left, area.right], window: options.window, textSize: small });
  const energy = energyAxis(result, { range: [area.bottom, area.top], window: options.energyWindow, domain: options.energyDomain, vacuum: options.vacuum });
  return { result, style, width, height, area, lanes, depth, energy, text, small, strip, prefix: options.prefix, areaClip: `${options.prefix}-area` };
}

/** y of an energy, held within the area. */
export function heldY(frame: Frame, e_eV: number): number {
  return Math.min(Math.max(frame.energy.y(e_eV), frame.area.top), frame.area.bottom);
}
