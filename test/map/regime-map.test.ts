import { describe, expect, it } from 'vitest';
import { layerFigures, type Layer } from '../../solver/index.ts';
import { starters } from '../../src/design/starters/index.ts';
import { toStack } from '../../src/design/stack.ts';
import { planMap, mapJob } from '../../src/map/map-job.ts';
import { DEGENERACIES, leadingDopant, mapAxes, regimeMap, REGIMES } from '../../src/map/regime-map.ts';
import { ASSUMPTIONS, doped, layer } from '../solver/stack-fixtures.ts';

/** The layer with all its dopants times a factor. */
function scaled(of: Layer, factor: number): Layer {
  return { ...of, dopants: of.dopants.map((d) => ({ ...d, activation: d.activation * factor })) };
}

describe('the regime map of a layer', () => {
  it('agrees at every tried point with the figures of a layer so doped', () => {
    const axes = mapAxes(10, 12);
    let compared = 0;
    const seen = new Set<string>();
    for (const { design } of starters) {
      const reading = toStack(design);
      if (!reading.ok) throw new Error(design.title);
      const { layers, assumptions } = reading.stack;
      for (const own of layers.filter((l) => leadingDopant(l)).slice(0, 2)) {
        const map = regimeMap(own, assumptions, axes)!;
        const N = leadingDopant(own)!.concentration;
        axes.temperature.forEach((T, r) => axes.doping.forEach((doping, c) => {
          const i = r * axes.doping.length + c;
          let figures;
          try {
            figures = layerFigures(scaled(own, doping / N), T, assumptions, false);
          } catch {
            expect(map.regime[i]).toBe(255);
            return;
          }
          compared++;
          seen.add(figures.regime);
          expect(Math.abs(map.ecMinusEf[i] - figures.ecMinusEf), `${own.name} ${T} K ${doping}`).toBeLessThan(1e-11);
          expect(REGIMES[map.regime[i]], `${own.name} ${T} K ${doping}`).toBe(figures.regime);
          // The closed form against the solver's own root, both of Boltzmann statistics.
          expect(Math.abs(map.boltzmannError[i] - 1000 * (figures.boltzmann.ecMinusEf - figures.ecMinusEf)), `${own.name} ${T} K ${doping}`).toBeLessThan(1e-6);
        }));
      }
    }
    expect(compared).toBeGreaterThan(1000);
    expect([...seen].sort()).toEqual(['degenerate', 'extrinsic', 'freeze-out', 'intrinsic']);
  });

  it('tells degenerate, transitional and nondegenerate by the band edge and 3kT from it', () => {
    const map = regimeMap(layer('n', 100, [doped('donor', 1e17)]), ASSUMPTIONS, mapAxes(40, 20))!;
    map.bandDistance.forEach((distance, i) => expect(DEGENERACIES[map.degeneracy[i]]).toBe(distance < 0 ? 'degenerate' : distance < 3 ? 'transitional' : 'nondegenerate'));
    expect(new Set(map.degeneracy).size).toBe(3);
  });

  it('puts the Mott density of any of the dopants on the axis of the leading one', () => {
    const own = layer('n', 100, [{ ...doped('donor', 1e17), mottDensity: 3e18 }, { ...doped('acceptor', 1e16), mottDensity: 2e17 }]);
    // The acceptor is a tenth of the donor: it reaches 2e17 where the donor stands at 2e18.
    expect(regimeMap(own, ASSUMPTIONS, mapAxes(2, 2))!.mottDoping).toBeCloseTo(2e18, -6);
    expect(regimeMap(layer('n', 100, [doped('donor', 1e17)]), ASSUMPTIONS, mapAxes(2, 2))!.mottDoping).toBeNull();
  });

  it('is there for no undoped layer and no insulator, and says so', () => {
    const design = structuredClone(starters[0].design);
    design.layers[0].dopants = [];
    const reading = planMap(design, { layer: 0 });
    expect(!reading.ok && reading.complaints[0]).toMatchObject({ path: 'layers[0]', message: expect.stringMatching(/no dopants to scale/) });
    expect(regimeMap(layer('i', 10, []), ASSUMPTIONS)).toBeNull();
  });

  it('marks the layers of its material with the operating range', () => {
    const { design } = starters.find((s) => s.design.title.startsWith('Nickel'))!;
    const reading = planMap(design, { layer: 0, columns: 3, rows: 2 });
    if (!reading.ok) throw new Error(JSON.stringify(reading.complaints));
    const { marks } = reading.plan;
    expect(marks.map((m) => [m.name, m.doping, m.same])).toEqual([['drift', 8e15, true], ['buffer', 1e18, true], ['substrate', 5e18, true]]);
    expect(marks[0].range![0]).toBeCloseTo(233.15, 9);
    expect(mapJob(reading.plan).run(0)!.regime).toHaveLength(6);
  });
});
