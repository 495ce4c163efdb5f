import { resetMouse, sendKeys, sendMouse, setViewport } from '@web/test-runner-commands';
import { expect } from 'chai';
import '../../components/hm-plate/hm-plate.ts';
import type { HmPlate, PlateAxes } from '../../components/hm-plate/hm-plate.ts';
import { expectAccessible } from './accessible.ts';
import { heard, mounted, pressed, sample, settled } from './sample.ts';

const { result } = sample();

async function plate(properties: Partial<HmPlate> = {}): Promise<HmPlate> {
  return mounted<HmPlate>('hm-plate', { result, ...properties });
}

const surface = (p: HmPlate): HTMLElement => p.renderRoot.querySelector<HTMLElement>('.surface')!;
const words = (p: HmPlate): string => surface(p).getAttribute('aria-valuetext')!;
const button = (p: HmPlate, text: string): HTMLButtonElement => [...p.renderRoot.querySelectorAll('button')].find((b) => b.textContent!.trim() === text || b.getAttribute('aria-label') === text)!;

/** A place of the picture in the window, from px of the drawing. */
function at(p: HmPlate, x: number, y: number): [number, number] {
  const box = surface(p).getBoundingClientRect();
  return [Math.round(box.left + x), Math.round(box.top + y)];
}

describe('hm-plate', () => {
  before(() => setViewport({ width: 1100, height: 800 }));
  afterEach(() => resetMouse());

  it('draws the band edges and the Fermi level', async () => {
    const p = await plate();
    const roles = [...p.renderRoot.querySelectorAll('[data-role]')].map((e) => e.getAttribute('data-role'));
    expect(roles).to.include.members(['conduction-edge', 'valence-edge', 'fermi-level']);
  });

  it('names its own result at the head of the key of those laid over it', async () => {
    const names = (p: HmPlate): string[] => [...p.renderRoot.querySelectorAll('[data-role="variant-name"]')].map((e) => e.textContent!.trim());
    expect(names(await plate({ ownName: 'cold', variants: [{ name: 'base', result: result! }] }))).to.deep.equal(['cold', 'base']);
    expect(names(await plate({ ownName: 'cold' }))).to.deep.equal([]);
  });

  it('has no style attribute, which a strict content security policy would refuse', async () => {
    const p = await plate({ view: { vacuum: true } });
    expect(p.renderRoot.querySelectorAll('[style]').length).to.equal(0);
  });

  it('passes the accessibility rules, with its panels open and when empty', async () => {
    const p = await plate();
    button(p, 'dimensions…').click();
    button(p, 'data table').click();
    await settled(p);
    await expectAccessible(p);
    await expectAccessible(await plate({ result: null }));
  });

  it('says its axes, once for each change of them', async () => {
    const p = await plate({ result: null });
    const drawn = heard(p, 'plate-drawn') as CustomEvent<PlateAxes>[];
    p.result = result;
    await settled(p);
    expect(drawn.length).to.equal(1);
    expect(drawn[0].detail.depth.edges.length).to.equal(result.layers.length + 1);
    p.depth_nm = 20;
    await settled(p);
    expect(drawn.length, 'the reading cursor moves no axis').to.equal(1);
    p.view = { depth: 'true' };
    await settled(p);
    expect(drawn.length).to.equal(2);
    expect(drawn[1].detail.depth.mode).to.equal('true');
  });

  it('reads the figures under the pointer and forgets them when it leaves', async () => {
    const p = await plate();
    const depths = heard(p, 'hm-depth');
    const { depth, area } = p.axes!;
    const x = depth.x(20);
    await sendMouse({ type: 'move', position: at(p, x, area.top + 50) });
    await settled(p);
    expect(depths.at(-1)!.detail.depth_nm).to.be.closeTo(20, 0.5);
    expect(words(p)).to.match(/in supply|supply; Ec − EF 0\.\d+ eV/);
    expect(p.renderRoot.querySelector('.reading')!.textContent).to.include('kV/cm');
    await sendMouse({ type: 'move', position: [2, 790] });
    await settled(p);
    expect(depths.at(-1)!.detail.depth_nm).to.equal(null);
  });

  it('moves the reading cursor by the arrow keys', async () => {
    const p = await plate();
    const depths = heard(p, 'hm-depth');
    surface(p).focus();
    await sendKeys({ press: 'Home' });
    expect(depths.at(-1)!.detail.depth_nm).to.be.closeTo(0, 1e-9);
    await sendKeys({ press: 'ArrowRight' });
    await sendKeys({ press: 'ArrowRight' });
    const near = depths.at(-1)!.detail.depth_nm;
    expect(near).to.be.greaterThan(0);
    await pressed('Shift+ArrowRight');
    expect(depths.at(-1)!.detail.depth_nm).to.be.greaterThan(4 * near);
    await sendKeys({ press: 'End' });
    expect(depths.at(-1)!.detail.depth_nm).to.be.closeTo(548, 1e-6);
    await sendKeys({ press: 'Escape' });
    expect(depths.at(-1)!.detail.depth_nm).to.equal(null);
  });

  it('looks nearer about the cursor, pans, and back at the whole, by keys', async () => {
    const p = await plate();
    const views = heard(p, 'hm-view');
    p.depth_nm = 45;
    surface(p).focus();
    await sendKeys({ press: '+' });
    await settled(p);
    const [from, to] = views.at(-1)!.detail.change.window;
    expect(from).to.be.lessThan(45);
    expect(to).to.be.greaterThan(45);
    expect(to - from).to.be.lessThan(500);
    await pressed('Alt+ArrowRight');
    await settled(p);
    expect(views.at(-1)!.detail.change.window[0]).to.be.greaterThan(from);
    await sendKeys({ press: '0' });
    await settled(p);
    expect(views.at(-1)!.detail.change).to.have.property('window', undefined);
    expect(p.axes!.depth.window).to.deep.equal([0, 548]);
  });

  it('looks nearer about the layer that is chosen, where nothing is being read', async () => {
    const p = await plate({ chosen: { kind: 'layer', index: 1 } });
    const views = heard(p, 'hm-view');
    surface(p).focus();
    await sendKeys({ press: '+' });
    await settled(p);
    await sendKeys({ press: '+' });
    await settled(p);
    const [from, to] = views.at(-1)!.detail.change.window;
    const { depth, area } = p.axes!;
    expect([from < 5, to > 40], 'the layer from 5 to 40 nm is in view').to.deep.equal([true, true]);
    expect(Math.abs(depth.x(22.5) - (area.left + area.right) / 2)).to.be.lessThan(area.right - area.left);
  });

  it('looks nearer by the wheel over the depth axis and leaves the wheel over the picture to the page', async () => {
    const p = await plate();
    const views = heard(p, 'hm-view');
    const { area } = p.axes!;
    const wheel = (x: number, y: number, ctrlKey = false): boolean => {
      const [clientX, clientY] = at(p, x, y);
      return surface(p).dispatchEvent(new WheelEvent('wheel', { deltaY: -200, clientX, clientY, ctrlKey, bubbles: true, cancelable: true }));
    };
    expect(wheel(area.left + 200, area.top + 50), 'the page scrolls').to.equal(true);
    expect(views.length).to.equal(0);
    expect(wheel(area.left + 200, area.bottom + 10)).to.equal(false);
    expect(views.at(-1)!.detail.change.window).to.have.length(2);
    expect(wheel(area.left - 30, area.top + 50)).to.equal(false);
    expect(views.at(-1)!.detail.change.energyWindow).to.have.length(2);
    expect(wheel(area.left + 200, area.top + 50, true)).to.equal(false);
  });

  it('pans by a drag once it looks at a part, and shows all again on a double press', async () => {
    const p = await plate({ view: { depth: 'true', window: [100, 200] } });
    const views = heard(p, 'hm-view');
    const { area } = p.axes!;
    const [x, y] = at(p, area.left + 300, area.top + 8);
    await sendMouse({ type: 'move', position: [x, y] });
    await sendMouse({ type: 'down' });
    await sendMouse({ type: 'move', position: [x - 60, y] });
    await sendMouse({ type: 'move', position: [x - 120, y] });
    await sendMouse({ type: 'up' });
    expect(views.length, 'one change for one drag').to.equal(1);
    expect(views[0].detail.change.window[0]).to.be.closeTo(100 + (100 * 120) / (area.right - area.left), 1.5);
    await sendMouse({ type: 'click', position: [x, y] });
    surface(p).dispatchEvent(new MouseEvent('dblclick', { bubbles: true, clientX: x, clientY: y }));
    expect(views.at(-1)!.detail.change).to.have.property('window', undefined);
  });

  it('lets a dimension figure be dragged, put away, and put back', async () => {
    const p = await plate();
    const views = heard(p, 'hm-view');
    button(p, 'dimensions…').click();
    await settled(p);
    const lines = (): Element[] => [...p.renderRoot.querySelectorAll('.dimensions li')];
    const shown = lines().length;
    expect(shown).to.be.greaterThan(2);
    const figure = [...p.renderRoot.querySelectorAll('svg text')].find((t) => /0\.259 eV/.test(t.textContent!))!;
    const box = figure.getBoundingClientRect();
    const [x, y] = [Math.round(box.left + box.width / 2), Math.round(box.top + box.height / 2)];
    await sendMouse({ type: 'move', position: [x, y] });
    await sendMouse({ type: 'down' });
    await sendMouse({ type: 'move', position: [x + 15, y + 10] });
    await sendMouse({ type: 'move', position: [x + 30, y + 20] });
    await sendMouse({ type: 'up' });
    await settled(p);
    expect(views.length).to.equal(1);
    const [id, offset] = Object.entries(views[0].detail.change.moved)[0];
    expect(id).to.match(/^dec:/);
    expect(offset).to.deep.equal([30, 20]);
    const moved = [...p.renderRoot.querySelectorAll('svg text')].find((t) => /0\.259 eV/.test(t.textContent!))!.getBoundingClientRect();
    expect(moved.left - box.left).to.be.closeTo(30, 1);
    lines()[0].querySelector('input')!.click();
    await settled(p);
    expect(views.at(-1)!.detail.change.hidden).to.have.length(1);
    button(p, 'Put all back').click();
    await settled(p);
    expect(views.at(-1)!.detail.change).to.deep.equal({ hidden: [], moved: {} });
    expect(lines().length).to.equal(shown);
  });

  it('marks a picture of an earlier stack, and says why', async () => {
    const p = await plate({ stale: true, notice: 'The spacer has no thickness.' });
    expect(p.renderRoot.textContent).to.include('The spacer has no thickness. The picture is of the stack before that.');
    expect(p.renderRoot.querySelector('[role="status"]')).to.not.equal(null);
    expect(p.renderRoot.querySelector('[data-role="conduction-edge"]')!.getAttribute('opacity')).to.not.equal(null);
  });

  it('says what will stand there while there is no result', async () => {
    const p = await plate({ result: null });
    expect(p.renderRoot.textContent).to.include('No band diagram yet');
    expect(p.axes).to.equal(null);
  });

  it('gives the diagram as sentences and as a table with both sides of each interface', async () => {
    const p = await plate();
    button(p, 'data table').click();
    await settled(p);
    const rows = [...p.renderRoot.querySelectorAll('tbody tr')].map((r) => [...r.children].map((c) => c.textContent!.trim()));
    expect(rows.filter(([z]) => z === '48.00 nm').map(([, layer]) => layer)).to.deep.equal(['spacer', 'channel']);
    expect(p.renderRoot.querySelector('.data p')!.textContent).to.match(/^Band diagram of/);
  });

  it('leaves out what a saved view holds of another version', async () => {
    const p = await plate({ view: { depth: 'sideways', window: ['a', 3], hidden: 7, moved: { 'gap:0': [1, 'x'] } } as never });
    expect(p.axes!.depth.mode).to.equal('even');
    expect(p.axes!.depth.window).to.deep.equal([0, 548]);
  });

  it('fits a narrow page', async () => {
    await setViewport({ width: 360, height: 800 });
    const p = await plate();
    expect(document.documentElement.scrollWidth).to.be.at.most(360);
    expect(p.axes!.width).to.be.at.most(360);
    for (const b of p.renderRoot.querySelectorAll('button')) {
      expect(b.offsetHeight, b.textContent!).to.be.at.least(24);
      expect(b.offsetWidth, b.textContent!).to.be.at.least(24);
    }
    await setViewport({ width: 1100, height: 800 });
  });
});
