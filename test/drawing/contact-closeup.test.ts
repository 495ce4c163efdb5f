import { describe, expect, it } from 'vitest';
import { closeUps, type CloseUp } from '../../src/contacts/close-up.ts';
import { starters } from '../../src/design/starters/index.ts';
import type { Design } from '../../src/design/types.ts';
import { closeUpFigures, closeUpTable, describeCloseUp } from '../../src/drawing/contact-closeup-words.ts';
import { drawCloseUp } from '../../src/drawing/contact-closeup.ts';
import { plainText, type Drawing, type LineShape, type PathShape, type RectShape, type Shape, type TextShape } from '../../src/drawing/shapes.ts';
import { styleOf, type StyleName } from '../../src/drawing/styles.ts';
import { svgText } from '../../src/drawing/svg-text.ts';
import { pathPoints } from './path-points.ts';
import { wellFormed } from './well-formed.ts';

function contact(id: string, change: (design: Design) => void = () => {}): CloseUp {
  const design = structuredClone(starters.find((s) => s.id === id)!.design);
  change(design);
  const answer = closeUps(design);
  if (answer.kind !== 'seen') throw new Error(JSON.stringify(answer));
  return answer.contacts[0];
}
const CONTACTS = { holes: contact('pn-diode'), electrons: contact('schottky'), pool: contact('graded-cap'), layered: contact('modulation-doped'), outside: contact('p-gan-contact') };
const draw = (c: CloseUp, style: StyleName = 'light', width = 760, height = 380): Drawing => drawCloseUp(c, { width, height, style });
const of = <S extends Shape>(d: Drawing, role: string): S[] => d.shapes.filter((s) => s.role === role) as S[];
const words = (d: Drawing, role: string): string[] => of<TextShape>(d, role).map(({ runs }) => plainText(runs));
/** px of an energy, read back from the ticks of the picture. */
function scale(d: Drawing): (e: number) => number {
  const ticks = of<TextShape>(d, 'energy-tick');
  const value = (t: TextShape): number => Number(plainText(t.runs).replace('−', '-'));
  const [a, b] = [ticks[0], ticks[ticks.length - 1]];
  return (e) => a.y + ((e - value(a)) / (value(b) - value(a))) * (b.y - a.y) - 0.36 * 11;
}

describe('the close-up of a contact', () => {
  it('puts the bands, the transmission and the current on one energy axis', () => {
    for (const c of [CONTACTS.holes, CONTACTS.electrons, CONTACTS.pool]) {
      const d = draw(c);
      const y = scale(d);
      const curve = (c.majority === 'n' ? c.electrons : c.holes)!;
      const sign = c.majority === 'n' ? -1 : 1;
      expect(of<LineShape>(d, 'fermi-level')[0].y1).toBeCloseTo(y(0), 1);
      const band = of<RectShape>(d, 'closeup-current')[0];
      const [high, low] = [Math.max(curve.from_eV!, curve.to_eV!), Math.min(curve.from_eV!, curve.to_eV!)];
      expect(band.y).toBeCloseTo(y(high), 1);
      expect(band.y + band.h).toBeCloseTo(y(low), 1);
      const area = pathPoints(of<PathShape>(d, 'closeup-product')[0].d);
      const peak = area.reduce((best, p) => (p.x > best.x ? p : best));
      expect(peak.y).toBeCloseTo(y(curve.peak_eV!), 0);
      // The band that is crossed runs out at its highest point for the carriers, which the current must pass or tunnel below.
      const way = pathPoints(of<PathShape>(d, 'closeup-way')[0].d);
      const top = sign < 0 ? Math.min(...way.map((p) => p.y)) : Math.max(...way.map((p) => p.y));
      expect(top).toBeCloseTo(y(curve.top_eV), 0);
    }
  });

  it('draws T on decades from the left to 1 at the right', () => {
    const d = draw(CONTACTS.holes);
    const ticks = of<TextShape>(d, 'transmission-tick');
    expect(plainText(ticks[0].runs)).toBe('1');
    const curve = CONTACTS.holes.holes!;
    const decade = (ticks[0].x - ticks[ticks.length - 1].x) / -Number(plainText(ticks[ticks.length - 1].runs).slice(2).replace('−', '-'));
    const y = scale(d);
    for (const p of pathPoints(of<PathShape>(d, 'closeup-transmission')[0].d)) {
      const i = curve.energy_eV.findIndex((e) => Math.abs(y(e) - p.y) < 0.02);
      if (i < 0 || p.x <= ticks[ticks.length - 1].x - decade * 0.9) continue;
      expect(p.x).toBeCloseTo(ticks[0].x + decade * Math.log10(curve.transmission[i]), 0);
    }
  });

  it('gives the barrier of the carrier that makes up the current, and what the image force takes', () => {
    expect(words(draw(CONTACTS.holes), 'dimension-figure')).toEqual(['φBp 0.580 eV']);
    expect(words(draw(CONTACTS.electrons), 'dimension-figure')).toEqual(['φBn 1.620 eV']);
    const [taken] = words(draw(CONTACTS.electrons), 'lowering-figure');
    // Close to the closed form in a lightly doped layer.
    expect(Number(/[\d.]+/.exec(taken)![0])).toBeCloseTo(CONTACTS.electrons.lowering_eV as number, 2);
  });

  it('leaves out what the image force does where it is off', () => {
    const d = draw(contact('schottky', (design) => { design.top = { kind: 'barrier', metal: 'Ni', imageForce: false }; }));
    expect(of(d, 'closeup-way')).toEqual([]);
    expect(of(d, 'lowering-figure')).toEqual([]);
    expect(of<PathShape>(d, 'conduction-edge')[0].dash).toBe(undefined);
  });

  it('draws interfaces on the way', () => {
    expect(of(draw(CONTACTS.layered), 'interface').length).toBeGreaterThanOrEqual(2);
    expect(of(draw(CONTACTS.holes), 'interface')).toEqual([]);
  });

  it('says in figures and in a sentence what the picture shows', () => {
    const figures = Object.fromEntries(closeUpFigures(CONTACTS.holes).map(({ name, text }) => [name, text]));
    expect(figures['Contact resistivity']).toMatch(/^8\.\d+e−6 Ω cm²$/);
    expect(figures.Transport).toBe('thermionic-field emission');
    expect(figures['Passes at']).toMatch(/^holes mostly 0\.\d+ eV below EF; 80 % of the current between −0\.\d+ and −0\.\d+ eV; all of it by tunnelling$/);
    expect(closeUpFigures(CONTACTS.pool).find(({ name }) => name === 'Passes at')!.text).toMatch(/\d+ % over the top, the rest by tunnelling$/);
    expect(describeCloseUp(CONTACTS.electrons)).toContain('Barrier of electrons 1.620 eV');
    expect(draw(CONTACTS.electrons).description).toBe(describeCloseUp(CONTACTS.electrons));
  });

  it('has its data as a table with the peak in it', () => {
    const rows = closeUpTable(CONTACTS.holes);
    expect(rows.filter(({ peak }) => peak)).toHaveLength(1);
    expect(rows.find(({ peak }) => peak)!.product).toBe(Math.max(...CONTACTS.holes.holes!.product));
    for (const { transmission, occupancy, product } of rows) expect(product).toBeCloseTo(transmission * occupancy, 12);
  });

  it('is a drawing where nothing passes, and says so', () => {
    const blocked: CloseUp = { ...CONTACTS.electrons, electrons: null, holes: null, rho_c_ohm_cm2: null };
    const d = draw(blocked);
    expect(words(d, 'closeup-nothing')).toEqual(['no way through']);
    expect(closeUpTable(blocked)).toEqual([]);
    expect(d.description).toContain('No contact resistivity');
  });

  it('keeps every text and every mark within the drawing, in all sizes and styles', () => {
    for (const c of Object.values(CONTACTS)) {
      for (const [style, width, height] of [['light', 760, 380], ['dark', 330, 300], ['journal', 520, 340], ['slide', 1100, 560]] as const) {
        const d = draw(c, style, width, height);
        expect(wellFormed(svgText(d)).length).toBeGreaterThan(20);
        for (const s of d.shapes) {
          if (s.kind === 'text') expect(s.x >= 0 && s.x <= width && s.y > 0 && s.y <= height, `${style} ${s.role} ${s.x}, ${s.y}`).toBe(true);
          if (s.kind === 'path') expect(s.d, s.role).not.toMatch(/NaN|Infinity/);
        }
      }
    }
  });

  it('tells lines apart without colour in the journal style', () => {
    const d = draw(CONTACTS.holes, 'journal');
    const lines = ['conduction-edge', 'closeup-way', 'closeup-transmission', 'fermi-level'].flatMap((role) => of<PathShape>(d, role)).map(({ width, dash }) => `${width} ${dash}`);
    expect(new Set(lines).size).toBe(4);
    const grey = /^#([0-9A-F]{2})\1\1$/;
    for (const { fill, stroke } of d.shapes) for (const colour of [fill, stroke]) if (colour !== undefined && colour !== 'none') expect(colour).toMatch(grey);
    expect(d.background).toBe(styleOf('journal').ground);
  });

  it('refuses a size without room', () => {
    expect(() => draw(CONTACTS.holes, 'light', 120, 100)).toThrow(/no room/);
  });
});
