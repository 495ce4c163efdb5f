import { describe, expect, it } from 'vitest';
import type { Custom, Design } from '../../src/design/types.ts';
import { asCustom, withCompanions } from '../../src/parameters/companions.ts';
import { takeEntries } from '../../src/state/commands/index.ts';
import { designFixture } from '../state/design-fixture.ts';

const custom: Custom = {
  materials: [{ id: 'A', source: 's', gap: '1 eV' }, { id: 'B', source: 's' }, { id: 'AB', source: 's', alloy: { first: 'A', second: 'B' } }],
  dopants: [{ id: 'D', host: 'A', kind: 'donor', depth: '5 meV', source: 's' }, { id: 'D', host: 'C', kind: 'donor', depth: '6 meV', source: 's' }],
  metals: [{ id: 'M', source: 's' }],
};

describe('an own entry on its way to another design', () => {
  it('brings what it cannot do without, and nothing else', () => {
    const names = (key: Parameters<typeof withCompanions>[1]): string[] => withCompanions(custom, key).map(({ list, entry }) => `${list} ${entry.id}`);
    expect(names({ list: 'materials', id: 'AB' })).toEqual(['dopants D', 'materials A', 'materials B', 'materials AB']);
    expect(names({ list: 'metals', id: 'M' })).toEqual(['metals M']);
    expect(names({ list: 'dopants', id: 'D', host: 'C' })).toEqual(['dopants D']);
    expect(names({ list: 'metals', id: 'N' })).toEqual([]);
    // An alloy of itself comes once and not for ever.
    expect(withCompanions({ materials: [{ id: 'X', source: 's', alloy: { first: 'X', second: 'Y' } }, { id: 'Y', source: 's', alloy: { first: 'X', second: 'X' } }] }, { list: 'materials', id: 'X' })).toHaveLength(2);
  });

  it('takes the place of an own one of its name, and leaves the others', () => {
    const design: Design = { ...designFixture(), custom: { materials: [{ id: 'A', source: 's', gap: '2 eV' }, { id: 'Z', source: 's' }] } };
    const next = takeEntries(design, withCompanions(asCustom(withCompanions(custom, { list: 'materials', id: 'A' })), { list: 'materials', id: 'A' }));
    expect(next.custom).toEqual({ materials: [custom.materials![0], { id: 'Z', source: 's' }], dopants: [custom.dopants![0]] });
    expect(design.custom!.materials![0].gap).toBe('2 eV');
  });
});
