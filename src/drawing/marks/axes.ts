import type { Frame } from '../frame.ts';
import { textWidth } from '../glyph-widths.ts';
import type { Shape, TextRun } from '../shapes.ts';

/** Both axes with their ticks and titles. The energy axis stands left of the metal, the depth axis under the strip. */
export function axes(frame: Frame): Shape[] {
  return [...energyAxisMarks(frame), ...depthAxisMarks(frame)];
}

function energyAxisMarks(frame: Frame): Shape[] {
  const { area, energy, style, small, text } = frame;
  const x = area.left - frame.lanes.top;
  const line = { role: 'energy-axis', stroke: style.faint, width: style.thinWidth } as const;
  const shapes: Shape[] = [{ kind: 'line', ...line, x1: x, x2: x, y1: area.top, y2: area.bottom }];
  for (const tick of energy.ticks) {
    shapes.push({ kind: 'line', ...line, x1: x - 5, x2: x, y1: tick.y, y2: tick.y });
    shapes.push({ kind: 'text', role: 'energy-tick', x: x - 8, y: tick.y + 0.36 * small, size: small, anchor: 'end', runs: [{ text: tick.label }], fill: style.ink });
  }
  const room = area.bottom - area.top;
  const title = textWidth(energy.title, text) <= room ? energy.title : 'energy (eV)';
  shapes.push({ kind: 'text', role: 'energy-title', x: 1.2 * text, y: (area.top + area.bottom) / 2, size: text, anchor: 'middle', rotate: -90, runs: [{ text: title }], fill: style.ink });
  return shapes;
}

function depthAxisMarks(frame: Frame): Shape[] {
  const { area, depth, style, small, text, width } = frame;
  const y = area.bottom + frame.strip;
  const line = { role: 'depth-axis', stroke: style.faint, width: style.thinWidth } as const;
  const shapes: Shape[] = [{ kind: 'line', ...line, x1: area.left, x2: area.right, y1: y, y2: y }];
  for (const x of depth.marks) shapes.push({ kind: 'line', ...line, x1: x, x2: x, y1: y, y2: y + 3 });
  for (const tick of depth.ticks) {
    shapes.push({ kind: 'line', ...line, x1: tick.x, x2: tick.x, y1: y, y2: y + 5 });
    const half = textWidth(tick.label, small) / 2;
    const x = Math.min(Math.max(tick.x, half + 2), width - half - 2);
    shapes.push({ kind: 'text', role: 'depth-tick', x, y: y + 6 + small, size: small, anchor: 'middle', runs: [{ text: tick.label }], fill: style.ink });
  }
  shapes.push({ kind: 'text', role: 'depth-title', x: (area.left + area.right) / 2, y: y + 2.1 * small + 1.1 * text, size: text, anchor: 'middle', runs: [{ text: depth.title }], fill: style.ink });
  return shapes;
}

/** E_C, E_F, E_V at the right end of their curves, pushed apart where they would touch. */
export function endLabels(frame: Frame, vacuum: boolean): Shape[] {
  const { area, energy, style, text, result } = frame;
  const { ec_eV, ev_eV, ef_eV, vacuum_eV, z_nm } = result.profile;
  // Of the last node in the window.
  let node = z_nm.length - 1;
  while (node > 0 && z_nm[node - 1] >= frame.depth.window[1]) node--;
  if (node < 0) return [];
  const symbol = (letter: string, sub: string): TextRun[] => [{ text: letter, italic: true }, { text: sub, script: 'sub' }];
  const wanted = [
    { role: 'label-vacuum', runs: symbol('E', 'vac'), fill: style.ink, e: vacuum ? vacuum_eV[node] : Number.NaN },
    { role: 'label-conduction', runs: symbol('E', 'C'), fill: style.conduction, e: ec_eV[node] },
    { role: 'label-fermi', runs: symbol('E', 'F'), fill: style.ink, e: ef_eV[node] },
    { role: 'label-valence', runs: symbol('E', 'V'), fill: style.valence, e: ev_eV[node] },
  ]
    .filter(({ e }) => e >= energy.domain[0] && e <= energy.domain[1])
    .map((label) => ({ ...label, y: energy.y(label.e) }))
    .sort((a, b) => a.y - b.y);
  const least = 1.25 * text;
  for (let i = 1; i < wanted.length; i++) wanted[i].y = Math.max(wanted[i].y, wanted[i - 1].y + least);
  for (let i = wanted.length - 1; i >= 0; i--) {
    wanted[i].y = Math.min(wanted[i].y, area.bottom - (wanted.length - 1 - i) * least);
  }
  const x = area.right + frame.lanes.bottom + 6;
  return wanted.map(({ role, runs, fill, y }) => ({ kind: 'text', role, x, y: y + 0.34 * text, size: text, anchor: 'start', runs, fill, weight: 'bold' }));
}
