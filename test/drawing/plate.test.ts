import { describe, expect, it } from 'vitest';
import { BOLTZMANN } from '../../solver/constants.ts';
import { drawPlate, type Plate, type PlateOptions } from '../../src/drawing/plate.ts';
import { plainText, type PathShape, type RectShape, type Shape, type TextShape } from '../../src/drawing/shapes.ts';
import { runsWidth } from '../../src/drawing/glyph-widths.ts';
import { valueAt } from '../../src/drawing/traces.ts';
import type { Result } from '../../src/result/types.ts';
import { inventedResult } from './invented-result.ts';
import { distanceTo, pathPoints } from './path-points.ts';
import { STACKS } from './results.ts';

const solvedStacks: [string, Result][] = [['invented', inventedResult()], ...Object.entries(STACKS).map(([name, make]): [string, Result] => [name, make()])];
const of = (plate: Plate, role: string): Shape[] => plate.shapes.filter((s) => s.role === role);
const path = (plate: Plate, role: string): PathShape => {
  const found = of(plate, role);
  if (found.length !== 1 || found[0].kind !== 'path') throw new Error(`${found.length} shapes of ${role}`);
  return found[0];
};
const texts = (plate: Plate, role: string): string[] => of(plate, role).map((s) => plainText((s as TextShape).runs));
/** The picture's error in y: thinning 0.15, rounding 0.01, and the straight line between nodes against a smooth one. */
const ERROR = 0.2;

describe('the plate', () => {
  for (const [name, result] of solvedStacks) {
    it(`draws Ec, Ev and EF where the result has them: ${name}`, () => {
      for (const depth of ['true', 'even'] as const) {
        const plate = drawPlate(result, { width: 1100, height: 560, depth });
        const { depth: x, energy } = plate.axes;
        for (const [role, values] of [['conduction-edge', result.profile.ec_eV], ['valence-edge', result.profile.ev_eV], ['fermi-level', result.profile.ef_eV]] as const) {
          const points = pathPoints(path(plate, role).d);
          result.profile.z_nm.forEach((z, i) => expect(distanceTo(points, x.x(z), energy.y(values[i])), `${role} at ${z} nm, ${depth}`).toBeLessThan(ERROR));
        }
      }
    });

    it(`steps upright at interfaces: ${name}`, () => {
      const plate = drawPlate(result, { width: 1100, height: 560 });
      const points = pathPoints(path(plate, 'conduction-edge').d);
      expect(points.filter(({ command }) => command === 'M')).toHaveLength(1);
      points.slice(1).forEach((p, i) => expect(p.x).toBeGreaterThanOrEqual(points[i].x - 0.011));
      for (let i = 1; i < result.profile.z_nm.length; i++) {
        if (result.profile.layer[i] === result.profile.layer[i - 1]) continue;
        const step = Math.abs(plate.axes.energy.y(result.profile.ec_eV[i]) - plate.axes.energy.y(result.profile.ec_eV[i - 1]));
        if (step < 1) continue;
        const x = plate.axes.depth.x(result.profile.z_nm[i]);
        const at = points.filter((p) => Math.abs(p.x - x) < 0.02).map((p) => p.y);
        expect(Math.max(...at) - Math.min(...at)).toBeCloseTo(step, 0);
      }
    });

    it(`lets no two figures of dimension lines lie on each other or leave the plate: ${name}`, () => {
      for (const [width, height] of [[1440, 600], [390, 420]]) {
        const plate = drawPlate(result, { width, height });
        const boxes = plate.dimensions.flatMap(({ box }) => (box ? [box] : []));
        boxes.forEach((a, i) => {
          expect(a.x >= 0 && a.x + a.w <= width && a.y >= plate.axes.area.top && a.y + a.h <= plate.axes.area.bottom).toBe(true);
          for (const b of boxes.slice(i + 1)) expect(a.x < b.x + b.w && b.x < a.x + a.w && a.y < b.y + b.h && b.y < a.y + a.h).toBe(false);
        });
      }
    });
  }

  it('tints by f(E): half at the Fermi level, 1/(1 + e) a kT above, whatever the temperature', () => {
    for (const T of [4, 77, 300, 1000]) {
      const result = inventedResult();
      result.conditions.temperature_K = T;
      const plate = drawPlate(result, { style: 'journal', height: 800 });
      const [g] = plate.gradients;
      const gray = (energy: number): number => {
        const share = (plate.axes.energy.y(energy) - g.y1) / (g.y2 - g.y1);
        const i = g.stops.findIndex((s) => s.offset >= share);
        const [a, b] = [g.stops[Math.max(i - 1, 0)], g.stops[i]];
        const at = (s: { color: string }): number => Number.parseInt(s.color.slice(1, 3), 16);
        return at(a) + ((share - a.offset) / (b.offset - a.offset || 1)) * (at(b) - at(a));
      };
      // Black at full tint 0.24 on white; a colour step is 1/61 of it, and px are rounded to 0.01.
      const filled = (u: number): number => (255 - gray(u * BOLTZMANN * T)) / (0.24 * 255);
      for (const [u, f] of [[0, 0.5], [1, 1 / (1 + Math.E)], [-1, 1 - 1 / (1 + Math.E)], [4, 1 / (1 + Math.exp(4))]]) expect(Math.abs(filled(u) - f), `${T} K, ${u} kT`).toBeLessThan(0.03);
    }
  });

  it('keeps a sharp edge of occupancy where kT is less than a px can show', () => {
    const result = inventedResult();
    result.conditions.temperature_K = 1;
    const [g] = drawPlate(result, { energyDomain: [-30, 30] }).gradients;
    expect(g.y2 - g.y1).toBeGreaterThan(0.05);
    expect(g.y2 - g.y1).toBeLessThan(0.2);
  });

  it('leaves the gap as paper: the shaded regions end at Ec and at Ev', () => {
    const result = inventedResult();
    const plate = drawPlate(result, {});
    const { area, depth, energy } = plate.axes;
    for (const [role, values, end] of [['occupancy-conduction', result.profile.ec_eV, area.top], ['occupancy-valence', result.profile.ev_eV, area.bottom]] as const) {
      const points = pathPoints(path(plate, role).d);
      for (const p of points) {
        if (Math.abs(p.y - end) < 0.011) continue;
        // An interface has two values; the point must be one of those near its depth.
        const near = result.profile.z_nm.flatMap((z, i) => (Math.abs(depth.x(z) - p.x) < 0.02 ? [Math.abs(energy.y(values[i]) - p.y)] : []));
        expect(Math.min(...near)).toBeLessThan(ERROR);
      }
      expect(path(plate, role).fill).toBe(`url(#${plate.gradients[0].id})`);
    }
  });

  it('says on the axes what they show', () => {
    const plate = drawPlate(inventedResult(), { width: 1000, height: 600 });
    expect(texts(plate, 'energy-title')).toEqual(['electron energy (eV), zero at the Fermi level']);
    expect(texts(plate, 'depth-title')).toEqual(['depth (nm), even-handed']);
    expect(texts(drawPlate(inventedResult(), { depth: 'true' }), 'depth-title')).toEqual(['depth (µm)']);
    expect(['label-conduction', 'label-fermi', 'label-valence'].map((role) => texts(plate, role)[0])).toEqual(['EC', 'EF', 'EV']);
  });

  it('measures barriers and offsets as the result gives them', () => {
    const dimensions = drawPlate(inventedResult(), { width: 1200, height: 640 }).dimensions;
    const value = (id: string): string | undefined => dimensions.find((d) => d.id === id)?.value;
    expect(value('barrier-n:top')).toBe('0.700 eV');
    expect(value('barrier-p:top')).toBe('0.400 eV');
    expect(value('dec:0')).toBe('0.250 eV');
    expect(value('dev:1')).toBe('0.150 eV');
    expect(value('gap:0')).toBe('1.100 eV');
  });

  it('draws the built-in potential as long as it is', () => {
    const result = STACKS.diode();
    const plate = drawPlate(result, { width: 1000, height: 600 });
    const [dimension] = plate.dimensions.filter((d) => d.id === 'builtin:0');
    expect(dimension.value).toBe(`${Math.abs(result.junctions[0].builtin_V!).toFixed(3)} eV`);
    const line = plate.shapes.find((s) => s.id === 'plate-builtin-0') as PathShape;
    const ys = pathPoints(line.d).map((p) => plate.axes.energy.energy(p.y));
    expect(Math.max(...ys) - Math.min(...ys)).toBeCloseTo(Math.abs(result.junctions[0].builtin_V!), 3);
    // Its ends lie on the flat parts of Ec on either side.
    expect(Math.max(...ys)).toBeCloseTo(result.profile.ec_eV[0], 2);
    expect(Math.min(...ys)).toBeCloseTo(result.profile.ec_eV[result.profile.ec_eV.length - 1], 2);
  });

  it('draws no built-in potential where a layer never reaches its neutral level', () => {
    expect(STACKS.channel().junctions.some((j) => j.builtin_V !== null)).toBe(true);
    expect(drawPlate(STACKS.channel(), {}).dimensions.filter((d) => d.id.startsWith('builtin'))).toEqual([]);
  });

  it('puts dimension lines away and brings them back', () => {
    const away = drawPlate(inventedResult(), { hidden: ['dec:0', 'no such line'] });
    const entry = away.dimensions.find((d) => d.id === 'dec:0')!;
    expect([entry.hidden, entry.crowded, entry.box]).toEqual([true, false, null]);
    expect(away.shapes.some((s) => s.id === 'plate-dec-0')).toBe(false);
    const back = drawPlate(inventedResult(), { hidden: [] });
    expect(back.dimensions.find((d) => d.id === 'dec:0')!.hidden).toBe(false);
    expect(back.shapes.some((s) => s.id === 'plate-dec-0')).toBe(true);
  });

  it('puts a dragged figure where it was dragged to', () => {
    const found = drawPlate(inventedResult(), {}).dimensions.find((d) => d.id === 'dec:0')!;
    const moved = drawPlate(inventedResult(), { moved: { 'dec:0': [25, -40] } }).dimensions.find((d) => d.id === 'dec:0')!;
    expect([moved.x - found.x, moved.y - found.y].map((v) => Math.round(v * 1e6) / 1e6)).toEqual([25, -40]);
  });

  it('hatches a metal up to its Fermi level, below it and nowhere else', () => {
    const plate = drawPlate(inventedResult(), {});
    const points = pathPoints(path(plate, 'metal-hatch').d);
    expect(points.length).toBeGreaterThan(20);
    for (const p of points) {
      expect(p.x).toBeLessThanOrEqual(plate.axes.area.left + 0.01);
      expect(p.y).toBeGreaterThanOrEqual(plate.axes.energy.y(0) - 0.01);
      expect(p.y).toBeLessThanOrEqual(plate.axes.area.bottom + 0.01);
    }
    expect(texts(plate, 'metal-name')).toEqual(['M']);
    expect(drawPlate(STACKS.two(), {}).shapes.filter((s) => s.role === 'metal-hatch')).toHaveLength(2);
    expect(of(drawPlate(STACKS.diode(), {}), 'metal-hatch')).toEqual([]);
  });

  it('sets dopant levels at their depth from their own band, filled by their occupancy', () => {
    const result = inventedResult();
    const plate = drawPlate(result, { style: 'journal' });
    const ticks = of(plate, 'donor-level') as RectShape[];
    expect(ticks.length).toBeGreaterThan(3);
    const gray = (s: RectShape): number => Number.parseInt(s.fill!.slice(1, 3), 16);
    for (const t of ticks) {
      const z = plate.axes.depth.depth(t.x + t.w / 2);
      expect(plate.axes.energy.energy(t.y + t.h / 2)).toBeCloseTo(valueAt(result, result.profile.ec_eV, z) - 0.045, 6);
    }
    // Empty at the depleted surface; a tenth filled where the layer is neutral.
    expect(gray(ticks[0])).toBe(255);
    expect(gray(ticks[ticks.length - 1])).toBe(Math.round(255 * 0.9));
    expect(of(drawPlate(result, { levels: false }), 'donor-level')).toEqual([]);
  });

  it('shows the vacuum level only on request', () => {
    expect(of(drawPlate(inventedResult(), {}), 'vacuum-level')).toEqual([]);
    expect(of(drawPlate(inventedResult(), { vacuum: true }), 'vacuum-level')).toHaveLength(1);
  });

  it('marks an earlier result as such and dims it', () => {
    const plate = drawPlate(inventedResult(), { stale: true });
    expect(texts(plate, 'stale-notice')[0]).toContain('earlier result');
    expect(path(plate, 'conduction-edge').opacity).toBeLessThan(0.5);
    expect(of(drawPlate(inventedResult(), {}), 'stale-notice')).toEqual([]);
  });

  it('zooms in depth and in energy, and draws no more than the window needs', () => {
    const plate = drawPlate(inventedResult(), { window: [90, 130], energyWindow: [0, 0.5], depth: 'true' });
    expect(plate.axes.depth.depth(plate.axes.area.left)).toBeCloseTo(90, 6);
    expect(plate.axes.energy.energy(plate.axes.area.top)).toBeCloseTo(0.5, 9);
    const points = pathPoints(path(plate, 'conduction-edge').d);
    expect(points.length).toBeLessThan(40);
    expect(path(plate, 'conduction-edge').clip).toBe(plate.clips[0].id);
  });

  it('writes title, layer names and caption into a full frame and leaves them out of a bare one', () => {
    const full = drawPlate(inventedResult(), { frame: 'full', width: 1000, height: 640 });
    expect(texts(full, 'heading')).toEqual(['Invented stack']);
    expect(texts(full, 'layer-name')).toEqual(['n cap', 'barrier', 'p base']);
    expect(texts(full, 'layer-figure')).toContain('n 1018 cm−3');
    expect(texts(full, 'caption').join(' ')).toContain('to be confirmed by measurement');
    const bare = drawPlate(inventedResult(), {});
    for (const role of ['heading', 'layer-name', 'caption']) expect(of(bare, role)).toEqual([]);
  });

  it('numbers a layer whose name has no room and says in the caption which it is', () => {
    const plate = drawPlate(inventedResult(), { frame: 'full', depth: 'true', width: 1000, height: 640 });
    expect(texts(plate, 'layer-name')).toContain('2');
    expect(texts(plate, 'caption').join(' ')).toContain('2 barrier');
  });

  it('keeps every text within the drawing, wide and narrow', () => {
    const long = inventedResult(['a layer with quite a long name', 'another one of that kind', 'p'], 'A title that goes on and on for much longer than any sheet of paper is wide, and then some more of it');
    for (const [result, width, height] of [[long, 1440, 700], [long, 390, 520], [inventedResult(), 360, 400]] as const) {
      for (const frame of ['full', 'bare'] as const) {
        for (const s of drawPlate(result, { width, height, frame, vacuum: true }).shapes) {
          if (s.kind !== 'text') continue;
          const half = s.rotate === undefined ? runsWidth(s.runs, s.size) : 0;
          const left = s.anchor === 'start' ? s.x : s.anchor === 'end' ? s.x - half : s.x - half / 2;
          expect(left >= 0 && left + half <= width && s.y >= 0 && s.y <= height, `${s.role}: ${plainText(s.runs)} at ${left}..${left + half} of ${width}`).toBe(true);
        }
      }
    }
  });

  it('carries in black and white by weight and dash what it carries by colour elsewhere', () => {
    const plate = drawPlate(inventedResult(), { style: 'journal', vacuum: true });
    const code = (role: string): string => `${path(plate, role).width} ${path(plate, role).dash}`;
    const codes = ['conduction-edge', 'valence-edge', 'fermi-level', 'vacuum-level'].map(code);
    expect(new Set(codes).size).toBe(4);
    for (const s of plate.shapes) for (const color of [s.fill, s.stroke]) if (color?.startsWith('#')) expect(new Set([color.slice(1, 3), color.slice(3, 5), color.slice(5, 7)]).size).toBe(1);
  });

  it('refuses words and sizes that it does not know', () => {
    const draw = (options: object): (() => Plate) => () => drawPlate(inventedResult(), options as Partial<PlateOptions>);
    expect(draw({ style: 'jurnal' })).toThrow('unknown style: jurnal');
    expect(draw({ style: 'toString' })).toThrow('unknown style');
    expect(draw({ shading: 'all' })).toThrow('unknown shading: all');
    expect(draw({ width: 60 })).toThrow('no room for a plate');
    expect(draw({ height: Number.NaN })).toThrow('no room for a plate');
  });

  it('lays other results over the plate, on one energy axis wide enough for all', () => {
    const other = inventedResult(undefined, 'other');
    other.profile.ec_eV = other.profile.ec_eV.map((e) => e + 2);
    other.profile.ev_eV = other.profile.ev_eV.map((e) => e + 2);
    const plate = drawPlate(inventedResult(), { variants: [{ name: 'thin <cap>', result: other }], width: 1000, height: 600 });
    expect(plate.axes.energy.domain[1]).toBeGreaterThan(Math.max(...other.profile.ec_eV));
    const points = pathPoints(path(plate, 'variant-conduction-edge').d);
    other.profile.z_nm.forEach((z, i) => expect(distanceTo(points, plate.axes.depth.x(z), plate.axes.energy.y(other.profile.ec_eV[i]))).toBeLessThan(ERROR));
    expect(texts(plate, 'variant-name')).toEqual(['thin <cap>']);
    expect(path(plate, 'variant-conduction-edge').dash).toBeTruthy();
    expect(of(drawPlate(inventedResult(), {}), 'variant-name')).toEqual([]);
  });

  it('puts no metal beside the inside of a stack zoomed into', () => {
    expect(of(drawPlate(inventedResult(), { window: [50, 200] }), 'metal-hatch')).toEqual([]);
    expect(of(drawPlate(inventedResult(), { window: [0, 20] }), 'metal-hatch')).toHaveLength(1);
  });

  it('draws what is left where a profile has a hole', () => {
    const result = inventedResult();
    result.profile.ec_eV[10] = Number.NaN;
    const plate = drawPlate(result, { depth: 'true' });
    expect(pathPoints(path(plate, 'conduction-edge').d).filter(({ command }) => command === 'M').length).toBe(2);
    for (const s of plate.shapes) expect(JSON.stringify(s)).not.toContain('NaN');
  });
});
