import type { Regime } from '../result/types.ts';
import { textWidth, fitted } from './glyph-widths.ts';
import { hatched } from './area-hatch.ts';
import { alongAxis, footAxis, type PlotArea, type PlotAxis } from './plot-frame.ts';
import { regimeTint } from './regime-look.ts';
import type { Drawing, Shape } from './shapes.ts';
import { styleOf, type Style, type StyleName } from './styles.ts';

export interface FilmPicture {
  /** K, rising [frames] */ temperatures: readonly number[];
  scale: 'linear' | 'log';
  /** a row each: name, and its regime at each frame; null where there is none (yet) */ layers: readonly { name: string; regimes: readonly (Regime | null)[] }[];
  gaps: readonly { index: number; reason: string }[];
}

export interface FilmStrip extends Drawing {
  area: PlotArea;
  x(temperature: number): number;
}

const ROW = 26;

/** The regime of each layer over the temperature: a row a layer, each stretch tinted, a degenerate one hatched, with its word where there is room. */
export function drawFilmStrip({ temperatures, scale, layers, gaps }: FilmPicture, options: { width: number; style?: StyleName; prefix?: string }): FilmStrip {
  const style = styleOf(options.style ?? 'light');
  const { width, prefix = 'film' } = options;
  const small = style.smallSize;
  const last = temperatures.length - 1;
  const axis: PlotAxis = { words: 'temperature', unit: 'K', scale, from: temperatures[0], to: temperatures[last] };
  if (!(axis.to > axis.from)) throw new RangeError('a film needs two temperatures or more');
  const names = Math.min(0.26 * width, Math.max(...layers.map(({ name }) => textWidth(name, small))) + 10);
  const area = { left: names + 4, right: width - 1.2 * small, top: 4, bottom: 4 + layers.length * ROW };
  const x = alongAxis(axis, area.left, area.right);
  const edge = (i: number): number => (i <= 0 ? area.left : i > last ? area.right : (x(temperatures[i - 1]) + x(temperatures[i])) / 2);
  const shapes = layers.flatMap(({ name, regimes }, row): Shape[] => {
    const y = area.top + row * ROW;
    const out: Shape[] = [{ kind: 'text', role: 'film-layer', title: name, x: area.left - 6, y: y + ROW / 2 + 0.36 * small, size: small, anchor: 'end', runs: [{ text: fitted(name, small, names - 6) }], fill: style.ink }];
    for (let i = 0; i <= last; i++) {
      const regime = regimes[i];
      const from = i;
      while (i < last && regimes[i + 1] === regime) i++;
      if (regime) out.push(...stretch(regime, `${name}: ${regime} from ${figure(temperatures[from])} to ${figure(temperatures[i])} K`, edge(from), edge(i + 1), y, style));
    }
    return out;
  });
  for (const { index, reason } of gaps) shapes.push({ kind: 'rect', role: 'film-gap', title: `no answer at ${figure(temperatures[index])} K: ${reason}`, x: edge(index), y: area.bottom - 6, w: edge(index + 1) - edge(index), h: 6, fill: style.trouble });
  return {
    width, height: Math.ceil(area.bottom + 3.6 * small), background: style.ground, font: style.font, gradients: [], clips: [{ id: `${prefix}-area`, x: area.left, y: area.top, w: area.right - area.left, h: area.bottom - area.top }], area, x,
    shapes: [...shapes, ...footAxis(axis, area, style, 'film')],
    title: 'Regimes over the temperature',
    description: layers.map(({ name, regimes }) => `${name}: ${stretches(temperatures, regimes).join(', ') || 'nothing yet'}`).join('. '),
  };
}

function stretch(regime: Regime, title: string, from: number, to: number, y: number, style: Style): Shape[] {
  const box = { x: from, y: y + 1, w: Math.max(to - from, 1), h: ROW - 2 };
  const shapes: Shape[] = [{ kind: 'rect', role: 'film-stretch', title, ...box, fill: regimeTint(regime, style), stroke: style.ink, width: 0.8 }];
  if (regime === 'degenerate') shapes.push({ kind: 'path', role: 'film-hatch', d: hatched({ left: box.x, right: box.x + box.w, top: box.y, bottom: box.y + box.h }, 6, 1, () => true), stroke: style.faint, width: 0.8 });
  const size = style.smallSize;
  const word = textWidth(regime, size);
  if (word + 8 > box.w) return shapes;
  if (regime === 'degenerate') shapes.push({ kind: 'rect', role: 'film-word-ground', x: from + box.w / 2 - word / 2 - 3, y: y + 4, w: word + 6, h: ROW - 8, fill: style.ground });
  shapes.push({ kind: 'text', role: 'film-word', x: from + box.w / 2, y: y + ROW / 2 + 0.36 * size, size, anchor: 'middle', runs: [{ text: regime }], fill: style.ink });
  return shapes;
}

const figure = (v: number): number => Number(v.toPrecision(4));

/** "freeze-out from 20 to 80 K" for each stretch of one regime. */
function stretches(temperatures: readonly number[], regimes: readonly (Regime | null)[]): string[] {
  const out: string[] = [];
  for (let i = 0; i < regimes.length; i++) {
    const from = i;
    while (i + 1 < regimes.length && regimes[i + 1] === regimes[from]) i++;
    if (regimes[from] !== null) out.push(`${regimes[from]} from ${figure(temperatures[from])} to ${figure(temperatures[i])} K`);
  }
  return out;
}
