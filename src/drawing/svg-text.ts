import { SCRIPT_SIZE } from './glyph-widths.ts';
import { px, type Drawing, type Paint, type Shape, type TextRun, type TextShape } from './shapes.ts';

/**
 * The drawing as a stand-alone SVG file: presentation attributes only (no style sheets, variables, filters or outside references), text as text.
 * Well-formed whatever the names in it: characters that XML 1.0 forbids are left out, the rest is escaped.
 */
export function svgText(d: Drawing): string {
  const [w, h] = [px(d.width), px(d.height)];
  const lines = [
    `<svg xmlns="http://www.w3.org/2000/svg" width="${w}" height="${h}" viewBox="0 0 ${w} ${h}" role="img" text-rendering="geometricPrecision" font-family="${escaped(d.font)}">`,
    `<title>${escaped(d.title)}</title>`,
    `<desc>${escaped(d.description)}</desc>`,
  ];
  if (d.gradients.length + d.clips.length > 0) lines.push('<defs>', ...d.gradients.map(gradient), ...d.clips.map(clip), '</defs>');
  lines.push(`<rect width="${w}" height="${h}" fill="${escaped(d.background)}"/>`, ...d.shapes.map(element), '</svg>', '');
  return lines.join('\n');
}

function gradient(g: Drawing['gradients'][number]): string {
  const stops = g.stops.map((s) => `<stop offset="${Math.round(s.offset * 1e6) / 1e6}" stop-color="${escaped(s.color)}"/>`).join('');
  return `<linearGradient id="${escaped(g.id)}" gradientUnits="userSpaceOnUse" x1="${px(g.x1)}" y1="${px(g.y1)}" x2="${px(g.x2)}" y2="${px(g.y2)}">${stops}</linearGradient>`;
}

function clip(c: Drawing['clips'][number]): string {
  return `<clipPath id="${escaped(c.id)}"><rect x="${px(c.x)}" y="${px(c.y)}" width="${px(c.w)}" height="${px(c.h)}"/></clipPath>`;
}

function element(s: Shape): string {
  const title = s.title === undefined ? '' : `<title>${escaped(s.title)}</title>`;
  const closed = (name: string, attributes: string): string => (title ? `<${name}${attributes}${paint(s)}>${title}</${name}>` : `<${name}${attributes}${paint(s)}/>`);
  switch (s.kind) {
    case 'path': return closed('path', ` d="${escaped(s.d)}"`);
    case 'line': return closed('line', ` x1="${px(s.x1)}" y1="${px(s.y1)}" x2="${px(s.x2)}" y2="${px(s.y2)}"`);
    case 'rect': return closed('rect', ` x="${px(s.x)}" y="${px(s.y)}" width="${px(s.w)}" height="${px(s.h)}"`);
    case 'text': return `<text x="${px(s.x)}" y="${px(s.y)}"${textAttributes(s)}${paint(s)}>${title}${tspans(s.runs, s.size)}</text>`;
  }
}

function textAttributes(s: TextShape): string {
  const rotate = s.rotate === undefined ? '' : ` transform="rotate(${px(s.rotate)} ${px(s.x)} ${px(s.y)})"`;
  return ` font-size="${px(s.size)}" text-anchor="${s.anchor}"${s.weight === 'bold' ? ' font-weight="bold"' : ''}${rotate}`;
}

/** Scripts by `dy`, since `baseline-shift` is not known everywhere; the shift is taken back by the next run. */
function tspans(runs: TextRun[], size: number): string {
  let offset = 0;
  return runs
    .map((run) => {
      const wanted = run.script === 'sub' ? 0.22 * size : run.script === 'super' ? -0.36 * size : 0;
      const dy = px(wanted - offset);
      offset = wanted;
      if (dy === 0 && !run.script && !run.italic) return escaped(run.text);
      const attributes = [dy === 0 ? '' : ` dy="${dy}"`, run.script ? ` font-size="${px(size * SCRIPT_SIZE)}"` : '', run.italic ? ' font-style="italic"' : ''];
      return `<tspan${attributes.join('')}>${escaped(run.text)}</tspan>`;
    })
    .join('');
}

function paint(s: Paint & { kind: Shape['kind'] }): string {
  const fill = s.fill ?? (s.kind === 'path' || s.kind === 'line' ? 'none' : undefined);
  const pairs: [string, string | number | undefined][] = [
    ['id', s.id], ['data-role', s.role], ['fill', fill], ['stroke', s.stroke], ['stroke-width', s.width === undefined ? undefined : px(s.width)], ['stroke-dasharray', s.dash],
    ['opacity', s.opacity], ['clip-path', s.clip === undefined ? undefined : `url(#${s.clip})`], ['stroke-linecap', s.cap], ['stroke-linejoin', s.join],
  ];
  return pairs.map(([name, value]) => (value === undefined ? '' : ` ${name}="${escaped(String(value))}"`)).join('');
}

/**
 * Text for XML. Left out: all that is no Char of XML 1.0 (production 2: controls, lone surrogates, U+FFFE, U+FFFF), the C1 controls, and the
 * characters that turn the direction of what follows, by which a name could rewrite the label beside it.
 */
export function escaped(text: string): string {
  let out = '';
  for (const glyph of text) {
    const code = glyph.codePointAt(0)!;
    if (glyph === '\t' || glyph === '\n' || glyph === '\r') out += ' ';
    else if (code < 0x20 || (code >= 0x7f && code < 0xa0) || (code >= 0xd800 && code < 0xe000) || code === 0xfffe || code === 0xffff) continue;
    else if ((code >= 0x202a && code <= 0x202e) || (code >= 0x2066 && code <= 0x2069)) continue;
    else out += ESCAPES[glyph] ?? glyph;
  }
  return out;
}

const ESCAPES: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' };
