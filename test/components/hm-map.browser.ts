import { expect } from 'chai';
import '../../components/hm-map/hm-map.ts';
import type { HmMap } from '../../components/hm-map/hm-map.ts';
import { mapCsv } from '../../components/hm-map/map-table.ts';
import type { Pool } from '../../components/hm-sweeps/batch-controller.ts';
import { runHere } from '../../src/batch/job.ts';
import { openJob } from '../../src/batch/spec.ts';
import { starters } from '../../src/design/starters/index.ts';
import type { Design } from '../../src/design/types.ts';
import { mapJob, planMap } from '../../src/map/map-job.ts';
import { expectAccessible } from './accessible.ts';
import { heard, until } from './heard.ts';
import { settled } from './sample.ts';

const design = (id = 'pn-diode'): Design => structuredClone(starters.find((s) => s.id === id)!.design);
const pool = { run: (spec: Parameters<typeof openJob>[0], _job: unknown, options: object) => runHere(openJob(spec), options), close: () => {} } as unknown as Pool;

let element: HmMap;
const shadow = () => element.shadowRoot!;
const text = () => shadow().textContent!.replace(/\s+/g, ' ');
const surface = () => shadow().querySelector<HTMLElement>('.surface')!;
async function press(key: string): Promise<void> {
  surface().dispatchEvent(new KeyboardEvent('keydown', { key, bubbles: true, cancelable: true }));
  await element.updateComplete;
}
async function put(change: Partial<HmMap> = {}): Promise<void> {
  element = Object.assign(document.createElement('hm-map'), { design: design(), pool, ...change });
  document.body.append(element);
  await settled(element);
}
const there = () => until('the map', () => shadow().querySelector('[data-role="map-class"]') !== null, 8000).then(() => settled(element));

describe('the regime map', function () {
  this.timeout(20_000);
  afterEach(() => element.remove());

  it('is made without being asked, with areas, key, marks of the layers and a table; all of it accessible', async () => {
    await put();
    await there();
    expect([...shadow().querySelectorAll('[data-role="map-class-word"]')].map(({ textContent }) => textContent!.trim())).to.include.members(['extrinsic', 'intrinsic']);
    expect(shadow().querySelectorAll('[data-role="map-layer"]').length).to.be.at.least(1);
    expect(text()).to.contain('Mott density').and.to.contain('EF inside its band');
    shadow().querySelector('details')!.open = true;
    await expectAccessible(element);
  });

  it('is read by arrow keys, from the layer itself on, and by the pointer', async () => {
    await put();
    await there();
    await press('ArrowUp');
    const first = surface().getAttribute('aria-valuetext')!;
    expect(first).to.match(/extrinsic|freeze-out|intrinsic/).and.to.contain('the textbook is off by');
    await press('ArrowUp');
    expect(surface().getAttribute('aria-valuetext')).not.to.equal(first);
    expect(shadow().querySelectorAll('[data-role=crosshair] line')).to.have.length(2);
    await press('PageUp');
    expect(text()).to.contain('1000 K');
    const box = surface().getBoundingClientRect();
    surface().dispatchEvent(new PointerEvent('pointermove', { bubbles: true, clientX: box.left + box.width / 2, clientY: box.top + box.height - 42 }));
    await element.updateComplete;
    expect(surface().getAttribute('aria-valuetext')).to.contain('freeze-out');
    await press('Escape');
    expect(shadow().querySelector('[data-role=crosshair]')).to.equal(null);
  });

  it('follows the design and the chosen layer', async () => {
    await put();
    await there();
    const other = design();
    const name = other.layers[1].name;
    element.design = other;
    element.chosen = { kind: 'layer', index: 1 };
    await until('the other layer', () => shadow().querySelector('[data-role="map-title"]')?.textContent?.includes(name) === true, 8000);
    const views = heard(element, 'hm-view');
    const menu = shadow().querySelector('select')!;
    menu.value = other.layers[0].name;
    menu.dispatchEvent(new Event('change'));
    expect(views[0].change).to.deep.equal({ map: { layer: other.layers[0].name } });
    await until('the first layer', () => shadow().querySelector('[data-role="map-title"]')!.textContent!.includes(`${other.layers[0].name},`), 8000);
  });

  it('says in words why a layer has no map', async () => {
    const bare = design();
    for (const layer of bare.layers) delete layer.dopants;
    await put({ design: bare });
    expect(shadow().querySelector('[role=alert]')!.textContent).to.contain('has no dopants to scale');
    expect(shadow().querySelector('[data-role="map-class"]')).to.equal(null);
    await expectAccessible(element);
  });

  it('leaves the lines of the textbook’s error out on a wish', async () => {
    await put({ view: { noErrors: true } });
    await there();
    expect(shadow().querySelectorAll('[data-role="map-error"]')).to.have.length(0);
    shadow().querySelector<HTMLInputElement>('input[type=checkbox]')!.click();
    await settled(element);
    expect(shadow().querySelectorAll('[data-role="map-error"]').length).to.be.greaterThan(0);
  });

  it('is written as a table with a line for each point', async () => {
    const planned = planMap(design(), { layer: 0, columns: 6, rows: 5 });
    if (!planned.ok) throw new Error('refused');
    const lines = mapCsv((await mapJob(planned.plan).run(0))!).split('\r\n');
    expect(lines).to.have.length(32);
    expect(lines[0].split(',')).to.have.length(10);
    expect(lines[1]).to.match(/^1000000000000,4,freeze-out,/);
    await put();
  });

  it('is usable from 360 px', async () => {
    await put();
    element.style.width = '344px';
    await settled(element);
    await there();
    expect(element.scrollWidth).to.be.at.most(345);
    for (const target of shadow().querySelectorAll('button, select, summary')) expect(target.getBoundingClientRect().height).to.be.at.least(24);
  });
});
