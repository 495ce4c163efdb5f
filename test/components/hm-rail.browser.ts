import { setViewport } from '@web/test-runner-commands';
import { expect } from 'chai';
import { drawPlate } from '../../src/drawing/plate.ts';
import '../../components/hm-rail/hm-rail.ts';
import type { HmRail } from '../../components/hm-rail/hm-rail.ts';
import { expectAccessible } from './accessible.ts';
import { mounted, sample, settled } from './sample.ts';

const { result } = sample('pn-diode');
const { energy } = drawPlate(result, { width: 900, height: 450 }).axes;

async function rail(properties: Partial<HmRail> = {}): Promise<HmRail> {
  return mounted<HmRail>('hm-rail', { result, energy, height: 450, depth_nm: 150, ...properties });
}
const description = (r: HmRail): string => r.renderRoot.querySelector('#words')!.textContent!;

describe('hm-rail', () => {
  before(() => setViewport({ width: 240, height: 700 }));

  it('draws the occupancy on the energy axis of the plate', async () => {
    const r = await rail();
    const fermi = r.renderRoot.querySelector('[data-role="rail-fermi-level"]')!;
    expect(Number(fermi.getAttribute('y1'))).to.be.closeTo(energy.y(0), 0.01);
    expect(r.renderRoot.querySelector('[data-role="rail-occupancy"]')).to.not.equal(null);
    expect(r.renderRoot.querySelector('svg')!.getAttribute('height')).to.equal('450');
  });

  it('says in words what it shows at the depth that is read', async () => {
    const r = await rail();
    expect(description(r)).to.match(/^At 150 nm in anode: Ec .* electrons and .* holes/);
    r.depth_nm = 3000;
    await settled(r);
    expect(description(r)).to.match(/^At 3 µm in drift/);
  });

  it('has the picture as a table too, with the half at the Fermi level', async () => {
    const r = await rail();
    expect(r.renderRoot.querySelector('table')).to.equal(null);
    r.renderRoot.querySelector('summary')!.click();
    await new Promise((done) => setTimeout(done, 50));
    await settled(r);
    const rows = [...r.renderRoot.querySelectorAll('tbody tr')].map((row) => [...row.children].map((cell) => cell.textContent));
    expect(rows.find(([e]) => e === '0.000')![1]).to.equal('0.500');
    expect(rows.length).to.be.greaterThan(15);
    await expectAccessible(r);
  });

  it('keeps the last depth while nothing is read', async () => {
    const r = await rail();
    r.depth_nm = null;
    await settled(r);
    expect(description(r)).to.match(/^At 150 nm in anode/);
  });

  it('shows the middle of the stack before anything was read', async () => {
    const r = await rail({ depth_nm: null });
    expect(description(r)).to.match(/^At 3\.65 µm in/);
  });

  it('dims a picture of an earlier stack', async () => {
    const r = await rail({ stale: true });
    expect(Number(getComputedStyle(r.renderRoot.querySelector('svg')!).opacity)).to.be.lessThan(0.6);
  });

  it('says what will stand there while there is no result', async () => {
    const r = await rail({ result: null });
    expect(r.renderRoot.textContent).to.include('Occupancy at a depth stands here');
  });

  it('passes the accessibility rules and has no style attribute', async () => {
    const r = await rail();
    await expectAccessible(r);
    expect(r.renderRoot.querySelectorAll('[style]').length).to.equal(0);
  });
});
