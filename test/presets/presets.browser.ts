import { expect } from 'chai';
import { dopants, materials, metals } from '../../presets/index.ts';

describe('the presets in a browser', () => {
  it('load as JSON modules, every list with its entries', () => {
    const ids = new Set(materials.map((material) => material.id));
    expect(ids.size).to.equal(materials.length);
    expect(ids.has('Si')).to.equal(true);
    expect(dopants.some((dopant) => dopant.host === 'Si')).to.equal(true);
    expect(metals.length).to.be.greaterThan(0);
  });
});
