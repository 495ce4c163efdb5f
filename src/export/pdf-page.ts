import { SCRIPT_SIZE } from '../drawing/glyph-widths.ts';
import type { Drawing, Gradient, Part, Shape, TextShape } from '../drawing/shapes.ts';
import { pdfNumber as n } from './pdf-objects.ts';
import { printable } from './printable.ts';
import type { PdfStructure } from './pdf-structure.ts';
import type { PdfTypeface } from './pdf-typeface.ts';

/** pt per px: a drawing's px is 1/96 inch. */
export const PT_PER_PX = 0.75;
/** Slope of the italic, which the faces embedded do not have: that of their own oblique cuts, 11 degrees. */
const SLANT = Math.tan((11 * Math.PI) / 180);

/** The two weights of a document. */
export interface Faces {
  normal: PdfTypeface;
  bold: PdfTypeface;
}

/** What a page's marks need besides its marks. */
export interface PdfPage {
  content: string;
  /** "/Shading << ... >> /ExtGState << ... >>" */ resources: string;
}

/**
 * The marks of one drawing as a page's content (ISO 32000-1:2008, 8 and 9). One matrix turns px with y down into pt with y up; all figures stay those of the drawing.
 *
 * @param of  the structure that the page's parts belong to, and the page's number in it
 * @throws {RangeError} path data other than absolute M, L, C, Z; a paint that names no gradient of the drawing
 */
export function pageOf(drawing: Drawing, faces: Faces, of: { structure: PdfStructure; page: number }): PdfPage {
  const opacities = new Map<string, string>();
  const used = new Map<string, Gradient>();
  let last: Part | undefined;
  const marks = drawing.shapes.map((shape, i) => {
    const turn = shape.part === last ? '' : `EMC\n${of.structure.begin(shape.part, of.page)}`;
    last = shape.part;
    let before = `${turn}q\n`;
    const clip = shape.clip === undefined ? undefined : drawing.clips.find((c) => c.id === shape.clip);
    if (clip) before += `${n(clip.x)} ${n(clip.y)} ${n(clip.w)} ${n(clip.h)} re W n\n`;
    if (shape.opacity !== undefined && shape.opacity < 1) {
      const value = n(shape.opacity);
      if (!opacities.has(value)) opacities.set(value, `O${opacities.size + 1}`);
      before += `/${opacities.get(value)} gs\n`;
    }
    return `${before}${shape.kind === 'text' ? textMarks(shape, faces, goesOn(shape, drawing.shapes[i + 1])) : outlineMarks(shape, drawing, used)}Q\n`;
  });
  const ground = `${colour(drawing.background, 'rg')}0 0 ${n(drawing.width)} ${n(drawing.height)} re f\n`;
  const shadings = [...used].map(([name, gradient]) => `/${name} ${axial(gradient)}`).join(' ');
  const states = [...opacities].map(([value, name]) => `/${name} << /ca ${value} /CA ${value} >>`).join(' ');
  return {
    content: `${n(PT_PER_PX)} 0 0 ${n(-PT_PER_PX)} 0 ${n(drawing.height * PT_PER_PX)} cm\n/Artifact BMC\n${ground}${marks.join('')}EMC\n`,
    resources: `${shadings === '' ? '' : `/Shading << ${shadings} >> `}${states === '' ? '' : `/ExtGState << ${states} >>`}`,
  };
}

function outlineMarks(shape: Exclude<Shape, TextShape>, drawing: Drawing, used: Map<string, Gradient>): string {
  const outline = outlineOf(shape);
  if (outline === '') return '';
  const fill = shape.kind === 'line' ? 'none' : (shape.fill ?? (shape.kind === 'rect' ? '#000000' : 'none'));
  const stroke = shape.stroke ?? 'none';
  let out = '';
  const reference = /^url\(#(.+)\)$/.exec(fill);
  if (reference) {
    const gradient = drawing.gradients.find((g) => g.id === reference[1]);
    if (!gradient) throw new RangeError(`the drawing has no gradient ${reference[1]}`);
    const name = [...used].find(([, g]) => g === gradient)?.[0] ?? `S${used.size + 1}`;
    used.set(name, gradient);
    out += `q\n${outline}W n\n/${name} sh\nQ\n`;
  } else if (fill !== 'none') out += `${colour(fill, 'rg')}${outline}f\n`;
  if (stroke !== 'none') {
    const dash = shape.dash === undefined ? '' : `[${shape.dash.trim().split(/[\s,]+/).map((d) => n(Number(d))).join(' ')}] 0 d\n`;
    out += `${colour(stroke, 'RG')}${n(shape.width ?? 1)} w\n${shape.cap === 'round' ? '1 J\n' : ''}${shape.join === 'round' ? '1 j\n' : ''}${dash}${outline}S\n`;
  }
  return out;
}

function outlineOf(shape: Exclude<Shape, TextShape>): string {
  switch (shape.kind) {
    case 'line': return `${n(shape.x1)} ${n(shape.y1)} m ${n(shape.x2)} ${n(shape.y2)} l\n`;
    case 'rect': return `${n(shape.x)} ${n(shape.y)} ${n(shape.w)} ${n(shape.h)} re\n`;
    case 'path': return pathMarks(shape.d);
  }
}

const LETTERS: Record<string, { takes: number; operator: string }> = { M: { takes: 2, operator: 'm' }, L: { takes: 2, operator: 'l' }, C: { takes: 6, operator: 'c' }, Z: { takes: 0, operator: 'h' } };

function pathMarks(d: string): string {
  let out = '';
  for (const [, letter, rest] of d.matchAll(/([A-Za-z])([^A-Za-z]*(?:[eE][-+]?\d+[^A-Za-z]*)*)/g)) {
    const known = LETTERS[letter];
    const numbers = (rest.match(/[-+]?(?:\d+\.?\d*|\.\d+)(?:[eE][-+]?\d+)?/g) ?? []).map(Number);
    if (!known || (known.takes === 0 ? numbers.length > 0 : numbers.length === 0 || numbers.length % known.takes !== 0)) throw new RangeError(`path data that is not written here: ${letter}${rest.slice(0, 40)}`);
    if (known.takes === 0) out += 'h\n';
    for (let i = 0; i < numbers.length; i += known.takes) {
      // Pairs behind a first one of M go on as lines.
      const operator = letter === 'M' && i > 0 ? 'l' : known.operator;
      out += `${numbers.slice(i, i + known.takes).map((v) => n(v)).join(' ')} ${operator}\n`;
    }
  }
  return out;
}

function goesOn({ part }: Shape, next: Shape | undefined): boolean {
  return part !== undefined && part.as !== 'figure' && next?.kind === 'text' && next.part === part;
}

/** Each run is placed by itself, so that scripts stand off the line; an upright matrix undoes the page's turned one. */
function textMarks(shape: TextShape, faces: Faces, goesOn: boolean): string {
  const face = shape.weight === 'bold' ? faces.bold : faces.normal;
  const name = shape.weight === 'bold' ? 'F2' : 'F1';
  const runs = shape.runs
    .map((run) => ({ text: printable(run.text), size: run.script ? shape.size * SCRIPT_SIZE : shape.size, rise: run.script === 'sub' ? 0.22 * shape.size : run.script === 'super' ? -0.36 * shape.size : 0, italic: run.italic === true }))
    .filter((run) => run.text !== '');
  const total = runs.reduce((sum, run) => sum + face.width(run.text) * run.size, 0);
  let along = shape.anchor === 'middle' ? -total / 2 : shape.anchor === 'end' ? -total : 0;
  const fill = shape.fill ?? '#000000';
  if (fill === 'none' || runs.length === 0) return '';
  const angle = ((shape.rotate ?? 0) * Math.PI) / 180;
  const [cos, sin] = [Math.cos(angle), Math.sin(angle)];
  let out = `BT\n${colour(fill, 'rg')}`;
  for (const run of runs) {
    const x = shape.x + cos * along - sin * run.rise;
    const y = shape.y + sin * along + cos * run.rise;
    const slant = run.italic ? SLANT : 0;
    // Columns of the matrix: along the line, and up from it (leaning where italic).
    out += `/${name} ${n(run.size)} Tf\n${n(cos, 6)} ${n(sin, 6)} ${n(slant * cos + sin, 6)} ${n(slant * sin - cos, 6)} ${n(x)} ${n(y)} Tm\n${face.coded(run.text)} Tj\n`;
    along += face.width(run.text) * run.size;
  }
  // Lines of one thing are read on without running together.
  if (goesOn) out += `${face.coded(' ')} Tj\n`;
  return `${out}ET\n`;
}

function colour(text: string, operator: 'rg' | 'RG'): string {
  return `${channels(text)} ${operator}\n`;
}

function channels(text: string): string {
  const found = /^#([0-9a-f]{2})([0-9a-f]{2})([0-9a-f]{2})$/i.exec(text);
  if (!found) throw new RangeError(`no colour for a PDF: ${text}`);
  return found.slice(1).map((part) => n(Number.parseInt(part, 16) / 255, 4)).join(' ');
}

/** Stops become straight pieces between them; two at one place are a jump, which lies between two pieces. */
function axial(g: Gradient): string {
  const stops = g.stops.length > 0 ? g.stops : [{ offset: 0, color: '#000000' }];
  const pieces: { from: number; to: number; a: string; b: string }[] = [];
  const first = stops[0];
  const last = stops[stops.length - 1];
  const ends = [{ ...first, offset: Math.min(0, first.offset) }, ...stops, { ...last, offset: Math.max(1, last.offset) }];
  for (let i = 1; i < ends.length; i++) if (ends[i].offset > ends[i - 1].offset) pieces.push({ from: ends[i - 1].offset, to: ends[i].offset, a: ends[i - 1].color, b: ends[i].color });
  const functions = pieces.map(({ a, b }) => `<< /FunctionType 2 /Domain [0 1] /C0 [${channels(a)}] /C1 [${channels(b)}] /N 1 >>`);
  const bounds = pieces.slice(1).map((p) => n(p.from, 6));
  const whole = `<< /FunctionType 3 /Domain [0 1] /Functions [${functions.join(' ')}] /Bounds [${bounds.join(' ')}] /Encode [${pieces.map(() => '0 1').join(' ')}] >>`;
  return `<< /ShadingType 2 /ColorSpace /DeviceRGB /Coords [${[g.x1, g.y1, g.x2, g.y2].map((v) => n(v)).join(' ')}] /Extend [true true] /Function ${whole} >>`;
}
