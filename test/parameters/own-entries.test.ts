import { describe, expect, it } from 'vitest';
import type { Custom, Design } from '../../src/design/types.ts';
import { ownOfContact, ownOfLayer, ownRows } from '../../src/parameters/own-entries.ts';
import { layerLines } from '../../components/hm-strip/column-text.ts';
import { designFixture } from '../state/design-fixture.ts';

/** Only ids count here. */
const custom = { materials: [{ id: 'GaAs' }], dopants: [{ id: 'C', host: 'GaAs' }, { id: 'Si', host: 'AlGaAs' }], metals: [{ id: 'Ti' }], offsets: [{ first: 'AlGaAs', second: 'GaAs', source: 'measured' }] } as unknown as Custom;

describe('what of a design is its own', () => {
  it('is told of each row that rests on it, and of no other', () => {
    const design: Design = { ...designFixture(), custom };
    const rows = ownRows(design);
    expect([...rows.layers]).toEqual([['cap', 'GaAs'], ['buffer', 'GaAs, C in GaAs']]);
    expect([...rows.junctions]).toEqual([['cap / spacer', 'offset of GaAs and AlGaAs'], ['spacer / buffer', 'offset of AlGaAs and GaAs']]);
    expect([...rows.contacts]).toEqual([['top', 'Ti']]);
  });

  it('is nothing in a design of published values alone', () => {
    const rows = ownRows(designFixture());
    expect([rows.layers.size, rows.junctions.size, rows.contacts.size]).toEqual([0, 0, 0]);
  });

  it('does not count a metal whose barrier is given outright', () => {
    expect(ownOfContact(custom, { kind: 'barrier', barrier: '0.7 eV', carrier: 'n' })).toBe(false);
    expect(ownOfContact(custom, { kind: 'barrier', metal: 'Ti' })).toBe(true);
  });

  it('has a sign behind the material and behind the dopant in the column of its layer', () => {
    const { layers } = designFixture();
    expect(layerLines(layers[2], 2, undefined, ownOfLayer(custom, layers[2]))).toEqual(['3 buffer', 'GaAs †', '1 um', 'C 1e15 cm⁻³ †']);
    expect(layerLines(layers[2], 2)).toEqual(['3 buffer', 'GaAs', '1 um', 'C 1e15 cm⁻³']);
  });

  it('is found for a layer by any name', () => {
    const design: Design = { ...designFixture(), custom };
    design.layers[0] = { ...design.layers[0], name: '__proto__' };
    expect(ownRows(design).layers.get('__proto__')).toBe('GaAs');
    expect(ownRows(design).layers.get('constructor')).toBe(undefined);
  });
});
