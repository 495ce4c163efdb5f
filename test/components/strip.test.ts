import { describe, expect, it } from 'vitest';
import fc from 'fast-check';
import { carriedDopants } from '../../components/hm-layer-form/carried-dopants.ts';
import { worth, contactText, fitsColumn, layerLines } from '../../components/hm-strip/column-text.ts';
import { raisedPowers } from '../../src/quantity/printed-units.ts';
import { draggedThickness, scaledThickness, startEdgeDrag } from '../../components/hm-strip/edge-drag.ts';
import { copied, inserted, removed } from '../../components/hm-strip/strip-acts.ts';
import { landing, spread, stripGeometry } from '../../components/hm-strip/strip-geometry.ts';
import { meaningOf } from '../../components/hm-strip/strip-keys.ts';
import { complaintAt, complaintsWithin } from '../../components/shared/complaint-at.ts';
import { leadingText, pointsFrom, pointsText, reshaped, shapeOf, shortText } from '../../components/shared/graded.ts';
import { completed } from '../../components/shared/typed-text.ts';
import { starters } from '../../src/design/starters/index.ts';
import type { ContactResult, LayerResult } from '../../src/result/types.ts';

const { design } = starters.find((s) => s.id === 'modulation-doped')!;

describe('places that keep a distance', () => {
  it('stay where they are wished if there is room', () => {
    expect(spread([10, 50, 100], 20, 0, 200)).toEqual([10, 50, 100]);
  });

  it('share a displacement evenly', () => {
    expect(spread([100, 100], 20, 0, 200)).toEqual([90, 110]);
  });

  it('are null where there is no room for all', () => {
    expect(spread([1, 2, 3], 60, 0, 100)).toBe(null);
  });

  it('keep distance, order and bounds for any wishes', () => {
    fc.assert(
      fc.property(fc.array(fc.double({ min: -50, max: 1050, noNaN: true }), { minLength: 1, maxLength: 30 }), (wished) => {
        const places = spread([...wished].sort((a, b) => a - b), 30, 0, 1000)!;
        places.forEach((x, i) => {
          expect(x).toBeGreaterThanOrEqual(-1e-9);
          expect(x).toBeLessThanOrEqual(1000 + 1e-9);
          if (i > 0) expect(x - places[i - 1]).toBeGreaterThanOrEqual(30 - 1e-9);
        });
      }),
    );
  });
});

describe('the geometry of the strip', () => {
  const axis = { mode: 'true', range: [100, 900], window: [0, 1], x: (z: number) => z, depth: (x: number) => x, edges: [-50, 300, 700, 1200], ticks: [], title: '' } as never;

  it('cuts columns at the part in view and has no edge outside of it', () => {
    const g = stripGeometry(axis, 3, 1000);
    expect(g.layers).toEqual([{ left: 100, right: 300 }, { left: 300, right: 700 }, { left: 700, right: 900 }]);
    expect(g.edges).toEqual([null, 300, 700, null]);
  });

  it('deals the room out evenly while the axis is of another number of layers', () => {
    expect(stripGeometry(axis, 4, 1000).layers.map((s) => s.right - s.left)).toEqual([200, 200, 200, 200]);
    expect(stripGeometry(null, 2, 500).layers.length).toBe(2);
  });

  it('lets a column land where more than half of each neighbour is passed', () => {
    const spans = [{ left: 0, right: 100 }, { left: 100, right: 200 }, { left: 200, right: 300 }];
    expect([10, 140, 160, 260].map((x) => landing(x, spans, 0))).toEqual([0, 0, 1, 2]);
    expect([10, 140, 260].map((x) => landing(x, spans, 2))).toEqual([0, 1, 2]);
  });
});

describe('an edge that is dragged', () => {
  it('moves by the scale under the hand, in steps of about a px, ten times finer when asked', () => {
    const drag = startEdgeDrag(1, 500, 100, 250, '250 nm');
    expect(draggedThickness(drag, 520, false)).toBe('300 nm');
    expect(draggedThickness(drag, 520, true)).toBe('255 nm');
    expect(draggedThickness(drag, 0, false)).toBe('1 nm');
  });

  it('has another key for each drag, so that two drags are two steps of undo', () => {
    expect(startEdgeDrag(0, 0, 1, 1, '').join).not.toBe(startEdgeDrag(0, 0, 1, 1, '').join);
  });

  it('is rounded to three digits when a key moves it', () => {
    expect(scaledThickness(500, 0.05, '500 nm')).toBe('525 nm');
    expect(scaledThickness(3.3, -0.05, '3.3 nm')).toBe('3.14 nm');
  });
});

describe('texts of a column', () => {
  it('show powers as they are read', () => {
    expect(raisedPowers('5e17 cm^-3')).toBe('5e17 cm⁻³');
  });

  it('say what an expression comes to, and nothing for a plain value', () => {
    expect(worth('2*Ncap', 2e18, 'cm⁻³')).toBe(' = 2e18 cm⁻³');
    expect(worth('xAl', 0.25, '')).toBe(' = 0.25');
    for (const plain of ['80 nm', '1e17 cm^-3', '0.3', 0.3, { from: '0', to: '1', shape: 'linear' }]) expect(worth(plain, 1, 'nm')).toBe('');
    expect(worth('tcap', null, 'nm')).toBe('');
  });

  it('say of a doping with an active share how much of it is active', () => {
    const solved = { ionised: [{ concentration_cm3: 1.8e20 }, { concentration_cm3: 2e19 }, { concentration_cm3: 4e19 }] } as LayerResult;
    const layer = { name: 'pocket', material: 'Si', thickness: '10 nm', dopants: [{ dopant: 'P', concentration: 'Nsd', activation: 'aSd' }, { dopant: 'B', concentration: '2*Nwell' }, { dopant: 'As', concentration: '5e19 cm^-3', activation: 0.8 }] };
    expect(layerLines(layer, 0, solved).slice(3)).toEqual(['P Nsd = 1.8e20 cm⁻³ active', 'B 2*Nwell = 2e19 cm⁻³', 'As 5e19 cm⁻³']);
    expect(layerLines(layer, 0).slice(3), 'nothing is solved yet').toEqual(['P Nsd', 'B 2*Nwell', 'As 5e19 cm⁻³']);
  });

  it('give a metal its barrier for the carriers of the layer beside it', () => {
    const solved = { kind: 'barrier', metal: 'Ni', barrier_n_eV: 2.938, barrier_p_eV: 0.5 } as ContactResult;
    expect(contactText({ kind: 'barrier', metal: 'Ni' }, solved, 'p')).toEqual(['Ni', 'φBp 0.50\u00a0eV']);
    expect(contactText({ kind: 'barrier', metal: 'Ni' }, solved, 'n')).toEqual(['Ni', 'φBn 2.94\u00a0eV']);
    expect(contactText({ kind: 'barrier', metal: 'Ti' }, solved, 'n'), 'the result is of another metal').toEqual(['Ti']);
    expect(contactText({ kind: 'barrier', metal: 'Ni', barrier: '0.6 eV' }, solved, 'n')).toEqual(['Ni', 'barrier 0.6\u00a0eV']);
    expect(contactText({ kind: 'barrier', barrier: '0.6 eV' }, solved, 'n')).toEqual(['barrier', '0.6 eV']);
    expect(contactText({ kind: 'open', sheetCharge: '1e12 cm^-2' }, undefined)).toEqual(['open', '1e12 cm⁻²']);
  });

  it('fit only where no word is cut and the lines are few', () => {
    expect(fitsColumn(['1 cap', 'GaAs', '80 nm', 'Si 1e18 cm⁻³'], 150)).toBe(true);
    expect(fitsColumn(['1 cap', 'GaAs', '80 nm', 'Si 1e18 cm⁻³'], 30)).toBe(false);
    expect(fitsColumn(['1 wonderfullylongname'], 80)).toBe(false);
  });
});

describe('keys of the strip', () => {
  const key = (name: string, chosen: Parameters<typeof meaningOf>[2], altKey = false) => meaningOf({ key: name, altKey }, design, chosen);

  it('walk over the contacts and stop at the ends', () => {
    expect(key('ArrowLeft', { kind: 'layer', index: 0 })).toMatchObject({ choice: { kind: 'contact', index: 0 } });
    expect(key('ArrowRight', { kind: 'layer', index: 3 })).toMatchObject({ choice: { kind: 'contact', index: 1 } });
    expect(key('ArrowRight', { kind: 'contact', index: 1 })).toMatchObject({ choice: { kind: 'contact', index: 1 } });
    expect(key('ArrowRight', { kind: 'interface', index: 0 })).toMatchObject({ choice: { kind: 'layer', index: 1 } });
  });

  it('reach the interface under a layer, but none under the last', () => {
    expect(key('ArrowDown', { kind: 'layer', index: 1 })).toMatchObject({ choice: { kind: 'interface', index: 1 } });
    expect(key('ArrowDown', { kind: 'layer', index: 3 })).toEqual({ kind: 'nothing' });
    expect(key('ArrowUp', { kind: 'interface', index: 1 })).toMatchObject({ choice: { kind: 'layer', index: 1 } });
  });

  it('move no layer beyond an end and no contact at all', () => {
    expect(key('ArrowLeft', { kind: 'layer', index: 0 }, true)).toEqual({ kind: 'nothing' });
    expect(key('ArrowLeft', { kind: 'contact', index: 1 }, true)).toEqual({ kind: 'nothing' });
    expect(key('ArrowRight', { kind: 'layer', index: 0 }, true)).toMatchObject({ kind: 'act', act: { chosen: 1 } });
  });

  it('leave other keys to the page', () => {
    for (const name of ['a', 'F5', 'Tab', 'z']) expect(key(name, { kind: 'layer', index: 0 })).toBe(null);
  });
});

describe('acts on the stack', () => {
  it('put in an undoped layer of the material above, uniform where that one is graded', () => {
    const graded = { ...design, layers: [{ ...design.layers[1], x: { from: '0', to: '0.3', shape: 'linear' as const } }, ...design.layers.slice(1)] };
    expect(inserted(graded, 1).next.layers[1]).toEqual({ name: 'new', material: 'AlGaAs', x: '0.3', thickness: '50 nm', dopants: [] });
    expect(inserted(design, 0).next.layers[0].material).toBe('GaAs');
  });

  it('copy a layer under itself by a name of its own', () => {
    const { next, chosen } = copied(design, 1);
    expect(next.layers.map((l) => l.name)).toEqual(['cap', 'supply', 'supply 2', 'spacer', 'channel']);
    expect(chosen).toBe(2);
  });

  it('choose the layer that takes the place of one taken out, and keep the last', () => {
    expect(removed(design, 3)!.chosen).toBe(2);
    expect(removed({ ...design, layers: design.layers.slice(0, 1) }, 0)).toBe(null);
  });
});

describe('dopants of a layer that gets another material', () => {
  const choices = [
    { id: 'Si', name: '', host: 'GaAs', kind: 'donor' as const }, { id: 'Si-acceptor', name: '', host: 'GaAs', kind: 'acceptor' as const },
    { id: 'P', name: '', host: 'Si', kind: 'donor' as const }, { id: 'B', name: '', host: 'Si', kind: 'acceptor' as const }, { id: 'Si', name: '', host: 'GaN', kind: 'donor' as const },
  ];
  const row = (dopant: string) => ({ dopant, concentration: '1e17 cm^-3', activation: 0.5 });

  it('stay where the new host knows them', () => {
    expect(carriedDopants([row('Si')], 'GaAs', 'GaN', choices)).toEqual({ dopants: [row('Si')], changes: [] });
  });

  it('become the first of their kind where it does not, with all else kept, and that is said', () => {
    expect(carriedDopants([row('Si-acceptor')], 'GaAs', 'Si', choices)).toEqual({ dopants: [{ ...row('B') }], changes: ['Si-acceptor became B'] });
  });

  it('stay to be complained of where the host has none of the kind, or where the dopant was unknown before', () => {
    expect(carriedDopants([row('Si-acceptor')], 'GaAs', 'GaN', choices).dopants).toEqual([row('Si-acceptor')]);
    expect(carriedDopants([row('Xx')], 'GaAs', 'Si', choices).changes).toEqual([]);
  });

  it('given outright are left alone', () => {
    const outright = { kind: 'donor' as const, depth: '45 meV', concentration: '1e17 cm^-3' };
    expect(carriedDopants([outright], 'GaAs', 'Si', choices).dopants).toEqual([outright]);
  });
});

describe('values through the depth', () => {
  it('keep their ends when the shape changes, there and back', () => {
    const graded = reshaped('1e18 cm^-3', 'linear', '50 nm');
    expect(graded).toEqual({ from: '1e18 cm^-3', to: '1e18 cm^-3', shape: 'linear' });
    expect(reshaped({ from: '0', to: '0.3', shape: 'linear' }, 'points', '20 nm')).toEqual({ points: [['0 nm', '0'], ['20 nm', '0.3']] });
    expect(reshaped(reshaped('5e17 cm^-3', 'implanted', '100 nm'), 'constant', '100 nm')).toBe('5e17 cm^-3');
    for (const shape of ['constant', 'linear', 'gaussian', 'erfc', 'implanted', 'points'] as const) expect(shapeOf(reshaped('1', shape, '1 nm'))).toBe(shape);
  });

  it('are read from pasted lines, bare numbers with their units, and written back alike', () => {
    const points = pointsFrom('0\t1e20\n 15 nm ; 3e19 cm^-3\n\n40, 1e18', completed, 'cm^-3');
    expect(points).toEqual([['0 nm', '1e20 cm^-3'], ['15 nm', '3e19 cm^-3'], ['40 nm', '1e18 cm^-3']]);
    expect(pointsFrom(pointsText(points), completed, 'cm^-3')).toEqual(points);
  });

  it('have a short text', () => {
    expect(shortText({ from: '0', to: '0.3', shape: 'linear' })).toBe('0 → 0.3');
    expect(leadingText({ points: [] })).toBe('');
  });
});

describe('complaints', () => {
  const complaints = [{ path: 'layers[1].thickness', message: 'a' }, { path: 'layers[1].dopants[0].concentration.from', message: 'b' }, { path: 'layers[11].thickness', message: 'c' }];

  it('are found at their place and within a place, not at a longer number', () => {
    expect(complaintAt(complaints, 'layers[1].thickness')).toBe('a');
    expect(complaintAt(complaints, 'layers[1]')).toBe(null);
    expect(complaintsWithin(complaints, 'layers[1]')).toEqual(['a', 'b']);
    expect(complaintsWithin(complaints, 'layers[1]', ['layers[1].dopants'])).toEqual(['a']);
  });
});

describe('a column full of words', () => {
  it('counts the lines as they break between words, the bold name wider', () => {
    // 7 lines of words in 60 px, none too wide for it.
    expect(fitsColumn(['4 well 3', 'GaAs', '7 nm', 'Si 1e17 cm⁻³'], 66)).toBe(false);
    expect(fitsColumn(['4 well', 'GaAs', '7 nm', 'undoped'], 75)).toBe(true);
  });
});
