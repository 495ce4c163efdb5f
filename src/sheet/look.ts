import { styleOf, type Style, type StyleName } from '../drawing/styles.ts';

export type SheetStyle = 'screen' | 'slide' | 'journal';
export type Paper = 'A4' | 'letter';

export const SHEET_STYLES: readonly SheetStyle[] = ['screen', 'slide', 'journal'];
export const PAPERS: readonly Paper[] = ['A4', 'letter'];

const PX_PER_MM = 96 / 25.4;
const PX_PER_INCH = 96;

/** Landscape, px. */
const PAPER_SIZES: Record<Paper, [width: number, height: number]> = { A4: [297 * PX_PER_MM, 210 * PX_PER_MM], letter: [11 * PX_PER_INCH, 8.5 * PX_PER_INCH] };

/** Everything that makes one style of sheet look unlike another; px. */
export interface SheetLook {
  style: Style;
  /** of the plate on it */ plate: StyleName;
  width: number;
  height: number;
  /** from the edge of the paper to the frame */ margin: number;
  /** from the frame to what stands in it */ inset: number;
  /** of the room on the first page for the plate: at least this, at most that */ plateShare: [number, number];
  /** of table cells and sentences */ text: number;
  /** of what stands back: headings of columns, notes */ small: number;
  /** of a section's heading */ head: number;
  /** line distance over text size */ leading: number;
  /** of the title block, which is the same in every style so that its hashes fit */ block: { label: number; value: number };
  font: string;
}

const SIZES: Record<SheetStyle, { plate: StyleName; plateShare: [number, number]; text: number; small: number; head: number }> = {
  screen: { plate: 'light', plateShare: [0.5, 0.8], text: 10, small: 8.5, head: 12.5 },
  // Large letters leave no room beside the plate.
  slide: { plate: 'slide', plateShare: [1, 1], text: 14, small: 12, head: 18 },
  journal: { plate: 'journal', plateShare: [0.5, 0.8], text: 10, small: 8.5, head: 12.5 },
};

/** @throws {RangeError} unknown style or paper */
export function sheetLook(name: SheetStyle, paper: Paper): SheetLook {
  const sizes = Object.hasOwn(SIZES, name) ? SIZES[name] : undefined;
  const size = Object.hasOwn(PAPER_SIZES, paper) ? PAPER_SIZES[paper] : undefined;
  if (!sizes) throw new RangeError(`unknown style of a sheet: ${String(name)}`);
  if (!size) throw new RangeError(`unknown paper: ${String(paper)}`);
  const style = styleOf(sizes.plate);
  return {
    style, ...sizes, width: size[0], height: size[1], margin: 30, inset: 14, leading: 1.35, block: { label: 7.5, value: 11 },
    // The face of the PDF first, so that a sheet as SVG breaks its lines in the same places wherever that face is there.
    font: "'DejaVu Sans', Verdana, 'Segoe UI', 'Helvetica Neue', Arial, sans-serif",
  };
}
