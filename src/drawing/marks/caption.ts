import type { Frame } from '../frame.ts';
import { fitted, textWidth } from '../glyph-widths.ts';
import type { Shape } from '../shapes.ts';
import { isNumbered } from './strip.ts';

/** The title above an exported plate. */
export function heading(frame: Frame): Shape[] {
  const { style, text, width, result } = frame;
  const size = 1.25 * text;
  const left = 1.2 * text;
  if (result.title === '') return [];
  return [{ kind: 'text', role: 'heading', x: left, y: 1.9 * text, size, anchor: 'start', weight: 'bold', runs: [{ text: fitted(result.title, size * 1.1, width - 2 * left) }], fill: style.ink }];
}

/** What the reader must know to read the plate: conditions, shading, axis, numbered layers. */
export function captionSentences(frame: Frame, shading: 'occupancy' | 'carriers' | 'none'): string[] {
  const { result, depth } = frame;
  const sentences = [`${Number(result.conditions.temperature_K.toPrecision(4))} K, ${result.conditions.bias_V === 0 ? 'equilibrium' : `${result.conditions.bias_V} V`}.`];
  if (shading === 'occupancy') sentences.push('Tint of the bands: share of states filled, f(E).');
  if (shading === 'carriers') sentences.push('Tint of the bands: carriers per volume and energy; contours at 1/2, 1/10, 1/100, ... of the densest spot.');
  if (depth.mode === 'even') sentences.push('Depth is even-handed: each layer has room by the bending it holds.');
  const numbered = result.layers.flatMap((layer, i) => (isNumbered(frame, i) && isVisible(frame, i) ? [`${i + 1} ${layer.name}`] : []));
  if (numbered.length > 0) sentences.push(`Layers: ${numbered.join(', ')}.`);
  sentences.push('Estimates of an ideal one-dimensional structure, to be confirmed by measurement.');
  return sentences;
}

function isVisible(frame: Frame, i: number): boolean {
  return frame.depth.edges[i + 1] > frame.area.left + 6 && frame.depth.edges[i] < frame.area.right - 6;
}

/** Sentences as lines of a width, broken at spaces; a word wider than the line is cut. */
export function wrapped(sentences: string[], size: number, room: number): string[] {
  const lines: string[] = [];
  for (const word of sentences.join(' ').split(/\s+/)) {
    const last = lines[lines.length - 1];
    if (last !== undefined && textWidth(`${last} ${word}`, size) <= room) lines[lines.length - 1] = `${last} ${word}`;
    else lines.push(fitted(word, size, room));
  }
  return lines;
}

/** The lines at the foot of the plate. */
export function caption(frame: Frame, lines: string[]): Shape[] {
  const { style, small, text, height } = frame;
  const from = height - 0.6 * text - (lines.length - 1) * 1.4 * small;
  return lines.map((line, i) => ({ kind: 'text', role: 'caption', x: 1.2 * text, y: from + i * 1.4 * small, size: small, anchor: 'start', runs: [{ text: line }], fill: style.faint }));
}

/** Says that the picture is of an earlier input. */
export function staleNotice(frame: Frame): Shape[] {
  const { style, text, area } = frame;
  const words = 'earlier result: not of the present input';
  const w = textWidth(words, text) + 16;
  const x = (area.left + area.right) / 2;
  return [
    { kind: 'rect', role: 'stale-ground', x: x - w / 2, y: area.top + 4, w, h: 1.9 * text, fill: style.ground, stroke: style.trouble, width: 1 },
    { kind: 'text', role: 'stale-notice', x, y: area.top + 4 + 1.32 * text, size: text, anchor: 'middle', runs: [{ text: words }], fill: style.trouble },
  ];
}
