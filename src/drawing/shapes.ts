/**
 * What a drawing is made of: a flat list of shapes with presentation attributes only, so that the page, the file and the command line show the
 * same. Lengths are px of the drawing; y runs down. Later shapes lie on top of earlier ones.
 */

/** A piece of a text: a subscript or superscript is set smaller and off the line. */
export interface TextRun {
  text: string;
  script?: 'sub' | 'super';
  italic?: boolean;
}

/** Paint and meaning shared by all kinds. A colour is "#RRGGBB", "none", or "url(#id)" of a gradient of this drawing. */
export interface Paint {
  /** what it stands for, e.g. "conduction-edge"; many shapes may share one */ role: string;
  /** unique within the drawing */ id?: string;
  /** for readers who cannot see; shapes without one are decoration */ title?: string;
  /** default: "none" for a path or line */ fill?: string;
  stroke?: string;
  /** stroke width, px */ width?: number;
  /** stroke dash, e.g. "14 6" */ dash?: string;
  opacity?: number;
  /** id of a clip of this drawing */ clip?: string;
  cap?: 'butt' | 'round';
  join?: 'miter' | 'round';
  /** what it belongs to for those who hear the page; shapes that share one object are one thing, those without are ornament */ part?: Part;
}

/** A thing on a page, as a program that reads documents aloud tells it. */
export type Part =
  | { as: 'title' | 'heading' | 'paragraph' }
  | { as: 'figure'; /** what it shows, in words */ alt: string }
  | { as: 'cell'; /** cells that share one object are one table */ table: PartTable; row: number; column: number };

export interface PartTable {
  columns: number;
  /** rows of headings */ heads: number;
}

export interface PathShape extends Paint {
  kind: 'path';
  /** path data, absolute commands M L C Z only */ d: string;
}
export interface LineShape extends Paint {
  kind: 'line';
  x1: number;
  y1: number;
  x2: number;
  y2: number;
}
export interface RectShape extends Paint {
  kind: 'rect';
  x: number;
  y: number;
  /** of the box; the stroke's width is `width` of the paint elsewhere, so boxes name theirs apart */ w: number;
  h: number;
}
export interface TextShape extends Paint {
  kind: 'text';
  x: number;
  /** baseline */ y: number;
  /** font size, px */ size: number;
  anchor: 'start' | 'middle' | 'end';
  runs: TextRun[];
  weight?: 'normal' | 'bold';
  /** degrees, clockwise about (x, y) */ rotate?: number;
}

export type Shape = PathShape | LineShape | RectShape | TextShape;

/** Colours along a straight line in the drawing's own px. Stops are opaque colours, offsets 0..1 rising. */
export interface Gradient {
  id: string;
  x1: number;
  y1: number;
  x2: number;
  y2: number;
  stops: { offset: number; color: string }[];
}

/** A rectangle outside of which nothing shows. */
export interface Clip {
  id: string;
  x: number;
  y: number;
  w: number;
  h: number;
}

export interface Drawing {
  width: number;
  height: number;
  background: string;
  /** font-family for all texts */ font: string;
  shapes: Shape[];
  gradients: Gradient[];
  clips: Clip[];
  title: string;
  description: string;
}

/** The words of a text without its scripts. */
export function plainText(runs: TextRun[]): string {
  return runs.map((run) => run.text).join('');
}

/** Two decimals of a px are below what any screen or printer shows; "-0" becomes "0". */
export function px(value: number): number {
  return Math.round(value * 100) / 100 + 0;
}
