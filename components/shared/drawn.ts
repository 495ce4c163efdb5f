import { nothing, svg, type SVGTemplateResult } from 'lit';
import { SCRIPT_SIZE } from '../../src/drawing/glyph-widths.ts';
import { px, type Drawing, type Shape, type TextRun } from '../../src/drawing/shapes.ts';

/**
 * A drawing's shapes as a live SVG: the same attributes as the file has, so that screen and file cannot disagree. Goes inside an <svg> of the drawing's size.
 */
export function drawn(d: Drawing): SVGTemplateResult {
  return svg`
    <defs>
      ${d.gradients.map((g) => svg`<linearGradient id=${g.id} gradientUnits="userSpaceOnUse" x1=${px(g.x1)} y1=${px(g.y1)} x2=${px(g.x2)} y2=${px(g.y2)}>${g.stops.map((s) => svg`<stop offset=${s.offset} stop-color=${s.color}></stop>`)}</linearGradient>`)}
      ${d.clips.map((c) => svg`<clipPath id=${c.id}><rect x=${px(c.x)} y=${px(c.y)} width=${px(c.w)} height=${px(c.h)}></rect></clipPath>`)}
    </defs>
    <rect width=${px(d.width)} height=${px(d.height)} fill=${d.background}></rect>
    <g font-family=${d.font}>${d.shapes.map(shape)}</g>
  `;
}

function shape(s: Shape): SVGTemplateResult {
  const fill = s.fill ?? (s.kind === 'path' || s.kind === 'line' ? 'none' : nothing);
  const clip = s.clip === undefined ? nothing : `url(#${s.clip})`;
  const width = s.width === undefined ? nothing : px(s.width);
  const title = s.title === undefined ? nothing : svg`<title>${s.title}</title>`;
  const [id, stroke, dash, opacity, cap, join] = [s.id ?? nothing, s.stroke ?? nothing, s.dash ?? nothing, s.opacity ?? nothing, s.cap ?? nothing, s.join ?? nothing];
  switch (s.kind) {
    case 'path':
      return svg`<path id=${id} data-role=${s.role} d=${s.d} fill=${fill} stroke=${stroke} stroke-width=${width} stroke-dasharray=${dash} opacity=${opacity} clip-path=${clip} stroke-linecap=${cap} stroke-linejoin=${join}>${title}</path>`;
    case 'line':
      return svg`<line id=${id} data-role=${s.role} x1=${px(s.x1)} y1=${px(s.y1)} x2=${px(s.x2)} y2=${px(s.y2)} stroke=${stroke} stroke-width=${width} stroke-dasharray=${dash} opacity=${opacity} clip-path=${clip} stroke-linecap=${cap}>${title}</line>`;
    case 'rect':
      return svg`<rect id=${id} data-role=${s.role} x=${px(s.x)} y=${px(s.y)} width=${px(s.w)} height=${px(s.h)} fill=${fill} stroke=${stroke} stroke-width=${width} stroke-dasharray=${dash} opacity=${opacity} clip-path=${clip}>${title}</rect>`;
    case 'text':
      return svg`<text id=${id} data-role=${s.role} x=${px(s.x)} y=${px(s.y)} font-size=${px(s.size)} text-anchor=${s.anchor} font-weight=${s.weight ?? nothing} transform=${s.rotate === undefined ? nothing : `rotate(${px(s.rotate)} ${px(s.x)} ${px(s.y)})`} fill=${fill} stroke=${stroke} stroke-width=${width} opacity=${opacity} clip-path=${clip}>${title}${runs(s.runs, s.size)}</text>`;
  }
}

/** Scripts by `dy`, taken back by the next run, as in the file. */
function runs(list: readonly TextRun[], size: number): SVGTemplateResult[] {
  let offset = 0;
  return list.map((run) => {
    const wanted = run.script === 'sub' ? 0.22 * size : run.script === 'super' ? -0.36 * size : 0;
    const dy = px(wanted - offset);
    offset = wanted;
    return svg`<tspan dy=${dy === 0 ? nothing : dy} font-size=${run.script ? px(size * SCRIPT_SIZE) : nothing} font-style=${run.italic ? 'italic' : nothing}>${run.text}</tspan>`;
  });
}
