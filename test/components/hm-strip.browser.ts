import { resetMouse, sendKeys, sendMouse, setViewport } from '@web/test-runner-commands';
import { expect } from 'chai';
import { drawPlate } from '../../src/drawing/plate.ts';
import type { Design } from '../../src/design/types.ts';
import '../../components/hm-strip/hm-strip.ts';
import type { HmStrip } from '../../components/hm-strip/hm-strip.ts';
import { expectAccessible } from './accessible.ts';
import { heard, menus, middle, mounted, pressed, sample, settled } from './sample.ts';

const { design, result } = sample();
const axis = drawPlate(result, { width: 1000, height: 500 }).axes.depth;

/** The strip, and what it tells: like the page, edits and choices come back as properties. */
async function strip(properties: Partial<HmStrip> = {}) {
  const s = await mounted<HmStrip>('hm-strip', { design, result, axis, ...menus(), ...properties });
  const edits = heard(s, 'hm-edit');
  const said = heard(s, 'hm-say');
  const choices = heard(s, 'hm-choose');
  s.addEventListener('hm-edit', (event) => (s.design = (event as CustomEvent<{ next: Design }>).detail.next));
  s.addEventListener('hm-choose', (event) => (s.chosen = (event as CustomEvent).detail));
  return { s, edits, said, choices };
}

const column = (s: HmStrip, i: number): HTMLElement => s.renderRoot.querySelector<HTMLElement>(`.column[data-layer="${i}"]`)!;
const value = (s: HmStrip, i: number, what: string): HTMLElement => s.renderRoot.querySelector<HTMLElement>(`[data-layer="${i}"] [data-value="${what}"]`)!;
const focused = (s: HmStrip): Element | null => (s.renderRoot as ShadowRoot).activeElement;
const names = (s: HmStrip): string[] => s.design!.layers.map((l) => l.name);

/** The element that has the focus, through all shadow roots. */
function innermost(): Element | null {
  let at = document.activeElement;
  while (at?.shadowRoot?.activeElement) at = at.shadowRoot.activeElement;
  return at;
}

async function type(text: string): Promise<void> {
  await sendKeys({ type: text });
}

/** All fields of the chosen one's form, through the shadow roots, by their label. */
function field(s: HmStrip, label: string): { input: HTMLInputElement; complaint: string | null } {
  const found: HTMLElement[] = [];
  const walk = (root: ParentNode): void => {
    for (const element of root.querySelectorAll<HTMLElement>('*')) {
      if (element.localName === 'hm-field' && (element as HTMLElement & { label: string }).label === label) found.push(element);
      if (element.shadowRoot) walk(element.shadowRoot);
    }
  };
  walk(s.renderRoot.querySelector('.editor')!);
  const root = found[0].shadowRoot!;
  return { input: root.querySelector('#box')!, complaint: root.querySelector('.complaint')?.textContent ?? null };
}

describe('hm-strip', () => {
  before(() => setViewport({ width: 1000, height: 900 }));
  afterEach(() => resetMouse());

  it('puts each layer under its place on the depth axis', async () => {
    const { s } = await strip();
    const left = s.getBoundingClientRect().left;
    axis.edges.slice(0, -1).forEach((x, i) => {
      const box = column(s, i).getBoundingClientRect();
      expect(box.left - left).to.be.closeTo(x, 1);
      expect(box.right - left).to.be.closeTo(axis.edges[i + 1], 1);
    });
  });

  it('writes material, thickness and doping in, and what an expression comes to', async () => {
    const { s } = await strip();
    expect(column(s, 1).textContent).to.match(/supply\s+AlGaAs, x = 0\.3\s+35 nm\s+Si Nsupply = 1\.5e18 cm⁻³/);
    expect(column(s, 0).textContent).to.include('undoped');
  });

  it('marks what rests on own values by a sign, in words for readers too, and says below what it means', async () => {
    const own = { ...design, custom: { materials: [{ id: 'AlGaAs' }] } } as unknown as Design;
    const { s } = await strip({ design: own });
    expect(column(s, 1).textContent).to.match(/AlGaAs, x = 0\.3 †/).and.to.contain('own values of AlGaAs');
    expect(column(s, 0).textContent).not.to.contain('†');
    expect(s.renderRoot.textContent).to.contain('† with values of this design');
    await expectAccessible(s);
  });

  it('writes layers that are too narrow under the strip, with a line to their column', async () => {
    const narrow = { ...axis, edges: [125, 125.5, 150, 158, 800] };
    const { s } = await strip({ axis: narrow });
    const cards = [...s.renderRoot.querySelectorAll('.card')];
    expect(cards.map((c) => c.querySelector('.name')!.textContent!.trim())).to.deep.equal(['2 supply', '3 spacer']);
    const boxes = cards.map((c) => c.getBoundingClientRect());
    expect(boxes[1].left).to.be.at.least(boxes[0].right - 0.5);
    expect(s.renderRoot.querySelectorAll('.leaders polyline').length).to.equal(2);
  });

  it('chooses by the arrows, contacts included, and keeps one stop of Tab', async () => {
    const { s, choices } = await strip();
    column(s, 0).focus();
    await sendKeys({ press: 'ArrowRight' });
    await settled(s);
    expect(choices.at(-1)!.detail).to.deep.equal({ kind: 'layer', index: 1 });
    expect(focused(s) === column(s, 1), 'the focus is on the column').to.equal(true);
    await sendKeys({ press: 'Home' });
    await settled(s);
    expect(choices.at(-1)!.detail).to.deep.equal({ kind: 'contact', index: 0 });
    await sendKeys({ press: 'ArrowLeft' });
    expect(choices.at(-1)!.detail).to.deep.equal({ kind: 'contact', index: 0 });
    await sendKeys({ press: 'End' });
    await settled(s);
    expect(choices.at(-1)!.detail).to.deep.equal({ kind: 'contact', index: 1 });
    expect(s.renderRoot.querySelectorAll('.column[tabindex="0"]').length).to.equal(1);
  });

  it('edits a thickness by Enter, and Escape leads back to the column with the text as it was', async () => {
    const { s, edits } = await strip({ chosen: { kind: 'layer', index: 1 } });
    column(s, 1).focus();
    await sendKeys({ press: 'Enter' });
    await settled(s);
    expect((innermost() as HTMLInputElement).value).to.equal('35 nm');
    await type('99');
    await sendKeys({ press: 'Escape' });
    await settled(s);
    expect(focused(s) === column(s, 1), 'the focus is on the column').to.equal(true);
    expect(edits.length).to.equal(0);
    await sendKeys({ press: 'Enter' });
    await settled(s);
    await type('0.04um');
    await sendKeys({ press: 'Enter' });
    await settled(s);
    expect(edits.at(-1)!.detail.next.layers[1].thickness).to.equal('0.04um');
    expect(edits.at(-1)!.detail.label).to.equal('thickness of supply');
  });

  it('takes a bare number for a doping with its unit, typed over the value in the column', async () => {
    const { s, edits } = await strip();
    await sendMouse({ type: 'click', position: middle(value(s, 3, 'doping 0')) });
    await settled(s);
    expect((innermost() as HTMLInputElement).value).to.equal('1e14 cm^-3');
    await type('3e15');
    await sendKeys({ press: 'Enter' });
    await settled(s);
    expect(edits.length).to.equal(1);
    expect(edits[0].detail.next.layers[3].dopants[0].concentration).to.equal('3e15 cm^-3');
    expect(s.renderRoot.querySelectorAll('.inplace').length).to.equal(0);
    expect(focused(s) === column(s, 3), 'the focus is on the column').to.equal(true);
  });

  it('gives a bare thickness the unit that stood there, and takes expressions as they are', async () => {
    const { s, edits } = await strip({ design: { ...design, layers: design.layers.map((l, i) => (i === 3 ? { ...l, thickness: '0.5 um' } : l)) } });
    await sendMouse({ type: 'click', position: middle(value(s, 3, 'thickness')) });
    await settled(s);
    await type('0.7');
    await sendKeys({ press: 'Enter' });
    await settled(s);
    expect(edits.at(-1)!.detail.next.layers[3].thickness).to.equal('0.7 um');
    await sendMouse({ type: 'click', position: middle(value(s, 1, 'doping 0')) });
    await settled(s);
    await type('2*Nsupply');
    await sendKeys({ press: 'Enter' });
    expect(edits.at(-1)!.detail.next.layers[1].dopants[0].concentration).to.equal('2*Nsupply');
  });

  it('restores the value typed over when Escape is pressed', async () => {
    const { s, edits } = await strip();
    await sendMouse({ type: 'click', position: middle(value(s, 1, 'thickness')) });
    await settled(s);
    await type('12');
    await sendKeys({ press: 'Escape' });
    await settled(s);
    expect(edits.length).to.equal(0);
    expect(s.renderRoot.querySelectorAll('.inplace').length).to.equal(0);
  });

  it('keeps a bad text, with the complaint at its field and a mark in its column', async () => {
    const bad = { ...design, layers: design.layers.map((l, i) => (i === 1 ? { ...l, thickness: '35 mn' } : l)) };
    const { s } = await strip({ design: bad, chosen: { kind: 'layer', index: 1 }, complaints: [{ path: 'layers[1].thickness', message: "'35 mn' is no length; did you mean nm?" }] });
    const { input, complaint } = field(s, 'thickness');
    expect(input.value).to.equal('35 mn');
    expect(input.getAttribute('aria-invalid')).to.equal('true');
    expect(complaint).to.include('did you mean nm?');
    expect(value(s, 1, 'thickness').className).to.include('wrong');
    expect(column(s, 1).textContent, 'said to those who cannot see the mark').to.include('did you mean nm?');
    await expectAccessible(s);
  });

  it('shows a complaint about a doping at that field', async () => {
    const { s } = await strip({ chosen: { kind: 'layer', index: 3 }, complaints: [{ path: 'layers[3].dopants[0].concentration', message: 'no concentration' }] });
    expect(field(s, 'concentration').complaint).to.include('no concentration');
  });

  it('changes a thickness by dragging the edge: live, in its unit, as one step of undo', async () => {
    const { s, edits, said } = await strip();
    const edge = s.renderRoot.querySelectorAll<HTMLElement>('.edge')[1];
    const [x, y] = middle(edge);
    const width = axis.edges[2] - axis.edges[1];
    await sendMouse({ type: 'move', position: [x, y] });
    await sendMouse({ type: 'down' });
    await sendMouse({ type: 'move', position: [x + 20, y] });
    await sendMouse({ type: 'move', position: [x + 40, y] });
    await sendMouse({ type: 'up' });
    await settled(s);
    expect(edits.length).to.be.at.least(2);
    expect(new Set(edits.map((e) => e.detail.join)).size).to.equal(1);
    expect(edits[0].detail.join).to.be.a('string');
    const text = edits.at(-1)!.detail.next.layers[1].thickness;
    expect(text).to.match(/^\d+(\.\d+)? nm$/);
    expect(Number.parseFloat(text)).to.be.closeTo(35 * (1 + 40 / width), 0.2);
    expect(said.at(-1)!.detail.text).to.equal(`supply: ${text}, was 35 nm.`);
  });

  it('puts an expression back when a drag is cancelled by Escape', async () => {
    const expressed = { ...design, layers: design.layers.map((l, i) => (i === 1 ? { ...l, thickness: '7*5 nm' } : l)) };
    const { s, edits } = await strip({ design: expressed });
    const [x, y] = middle(s.renderRoot.querySelectorAll('.edge')[1]);
    await sendMouse({ type: 'move', position: [x, y] });
    await sendMouse({ type: 'down' });
    await sendMouse({ type: 'move', position: [x + 30, y] });
    await settled(s);
    expect(edits.at(-1)!.detail.next.layers[1].thickness).to.match(/ nm$/).and.not.equal('7*5 nm');
    await sendKeys({ press: 'Escape' });
    await settled(s);
    expect(edits.at(-1)!.detail.next.layers[1].thickness).to.equal('7*5 nm');
    await sendMouse({ type: 'up' });
  });

  it('makes a layer thinner and thicker by the brackets', async () => {
    const { s, edits } = await strip({ chosen: { kind: 'layer', index: 3 } });
    column(s, 3).focus();
    await sendKeys({ press: ']' });
    await settled(s);
    expect(edits.at(-1)!.detail.next.layers[3].thickness).to.equal('525 nm');
    await sendKeys({ press: '[' });
    await settled(s);
    expect(edits.at(-1)!.detail.next.layers[3].thickness).to.equal('499 nm');
    expect(edits[0].detail.join).to.equal(edits[1].detail.join);
  });

  it('moves a layer by dragging its column and by Alt and arrows', async () => {
    const { s, edits, said } = await strip();
    const [x, y] = middle(column(s, 0).querySelector('.name')!);
    const [target] = middle(column(s, 2));
    await sendMouse({ type: 'move', position: [x, y] });
    await sendMouse({ type: 'down' });
    await sendMouse({ type: 'move', position: [x + 30, y] });
    await sendMouse({ type: 'move', position: [target + 20, y] });
    await settled(s);
    expect(s.renderRoot.querySelectorAll('.landing').length).to.equal(1);
    await sendMouse({ type: 'up' });
    await settled(s);
    expect(names(s)).to.deep.equal(['supply', 'spacer', 'cap', 'channel']);
    expect(edits.length).to.equal(1);
    expect(said.at(-1)!.detail.text).to.equal('Layer cap is now number 3 of 4.');
    await pressed('Alt+ArrowLeft');
    await settled(s);
    expect(names(s)).to.deep.equal(['supply', 'cap', 'spacer', 'channel']);
    expect(focused(s) === column(s, 1), 'the focus is on the column').to.equal(true);
  });

  it('puts layers in by the plus between columns and by keys, and takes them out', async () => {
    const { s, said } = await strip({ chosen: { kind: 'layer', index: 0 } });
    const plus = [...s.renderRoot.querySelectorAll<HTMLButtonElement>('.lane button')].find((b) => b.title === 'put a layer in between supply and spacer')!;
    plus.click();
    await settled(s);
    expect(names(s)).to.deep.equal(['cap', 'supply', 'new', 'spacer', 'channel']);
    expect(s.design!.layers[2]).to.deep.equal({ name: 'new', material: 'AlGaAs', x: '0.3', thickness: '50 nm', dopants: [] });
    expect(focused(s) === column(s, 2), 'the focus is on the column').to.equal(true);
    await sendKeys({ press: 'Insert' });
    await settled(s);
    expect(names(s)).to.deep.equal(['cap', 'supply', 'new', 'new 2', 'spacer', 'channel']);
    await sendKeys({ press: 'Delete' });
    await settled(s);
    expect(names(s)).to.deep.equal(['cap', 'supply', 'new', 'spacer', 'channel']);
    expect(said.at(-1)!.detail.text).to.equal('Layer new 2 taken out.');
  });

  it('keeps the last layer and says why', async () => {
    const { s, edits, said } = await strip({ design: { ...design, layers: [design.layers[3]], interfaces: undefined }, chosen: { kind: 'layer', index: 0 } });
    column(s, 0).focus();
    await sendKeys({ press: 'Delete' });
    expect(edits.length).to.equal(0);
    expect(said.at(-1)!.detail.text).to.include('at least one');
  });

  it('offers the dopants of the host alone, and adds and removes rows', async () => {
    const { s, edits } = await strip({ chosen: { kind: 'layer', index: 0 } });
    const form = s.renderRoot.querySelector('hm-layer-form')!;
    form.renderRoot.querySelector<HTMLButtonElement>('#add-dopant')!.click();
    await settled(s);
    await form.updateComplete;
    const rows = edits.at(-1)!.detail.next.layers[0].dopants;
    expect(rows.length).to.equal(1);
    const offered = [...form.renderRoot.querySelectorAll<HTMLOptionElement>('#dopant-0 option')].map((o) => o.value).filter((v) => !v.startsWith(':'));
    expect(offered).to.include('Si').and.to.deep.equal(menus().dopants.filter((d) => d.host === 'GaAs').map((d) => d.id));
    [...form.renderRoot.querySelectorAll<HTMLButtonElement>('.press')].at(-1)!.click();
    await settled(s);
    expect(edits.at(-1)!.detail.next.layers[0].dopants).to.deep.equal([]);
  });

  it('offers the ionisation models that the dopant has parameters for, and names the usual one', async () => {
    const { s } = await strip({ chosen: { kind: 'layer', index: 1 } });
    const form = s.renderRoot.querySelector('hm-layer-form')!;
    const texts = () => [...form.renderRoot.querySelectorAll<HTMLOptionElement>('#model-0 option')].map((o) => o.text);
    expect(texts()).to.deep.equal(['usual: dilute (isolated level)', 'dilute (isolated level)', 'complete ionisation']);
    form.design = { ...form.design, layers: form.design.layers.map((l, i) => (i === 1 ? { ...l, material: 'Si', x: undefined, dopants: [{ dopant: 'P', concentration: '1e18 cm^-3' }] } : l)) };
    await form.updateComplete;
    expect(texts()).to.deep.equal(['usual: merging with the band', 'merging with the band', 'dilute (isolated level)', 'screened level', 'complete ionisation']);
  });

  it('says which dopant was exchanged when a new material does not know the old one', async () => {
    const { s, edits, said } = await strip({ chosen: { kind: 'layer', index: 3 } });
    const select = s.renderRoot.querySelector('hm-layer-form')!.renderRoot.querySelector<HTMLSelectElement>('#material')!;
    select.value = 'Si';
    select.dispatchEvent(new Event('change'));
    await settled(s);
    const layer = edits.at(-1)!.detail.next.layers[3];
    expect(layer.material).to.equal('Si');
    const taken = menus().dopants.find((d) => d.host === 'Si' && d.id === layer.dopants[0].dopant)!;
    expect(taken.kind).to.equal('acceptor');
    expect(said.at(-1)!.detail.text).to.equal(`channel is Si now; C became ${taken.id}, since Si knows no such dopant. Undo brings back GaAs with its dopant.`);
  });

  it('takes what arrows and letters pass in a menu only by Enter or by leaving it, and Escape gives it up', async () => {
    const { s, edits } = await strip({ chosen: { kind: 'layer', index: 3 } });
    const menu = (): HTMLSelectElement => s.renderRoot.querySelector('hm-layer-form')!.renderRoot.querySelector<HTMLSelectElement>('#material')!;
    const before = menu().value;
    menu().focus();
    await sendKeys({ press: 'ArrowDown' });
    await sendKeys({ press: 'ArrowDown' });
    expect(menu().value).not.to.equal(before);
    expect(menu().hasAttribute('data-waits')).to.equal(true);
    await sendKeys({ press: 'Escape' });
    expect(menu().value).to.equal(before);
    expect(edits).to.have.length(0);
    await type('Si');
    const passed = menu().value;
    expect(passed).not.to.equal(before);
    expect(edits).to.have.length(0);
    await sendKeys({ press: 'Enter' });
    await settled(s);
    expect(edits.map(({ detail }) => detail.next.layers[3].material)).to.deep.equal([passed]);
    await sendKeys({ press: 'ArrowDown' });
    const next = menu().value;
    menu().blur();
    await settled(s);
    expect(edits.map(({ detail }) => detail.next.layers[3].material)).to.deep.equal([passed, next]);
  });

  it('edits an interface: a sheet charge waits for its unit, an emptied field takes the row out', async () => {
    const { s, edits } = await strip({ chosen: { kind: 'layer', index: 1 } });
    column(s, 1).focus();
    await sendKeys({ press: 'ArrowDown' });
    await sendKeys({ press: 'Enter' });
    await settled(s);
    await settled(s);
    expect(innermost()!.id).to.equal('box');
    await type('-0.23');
    await sendKeys({ press: 'Enter' });
    await settled(s);
    expect(edits.at(-1)!.detail.next.interfaces).to.deep.equal([{ above: 'supply', sheetCharge: '-0.23' }]);
    expect([...s.renderRoot.querySelectorAll('.lane button')].filter((b) => b.textContent === '◆').length).to.equal(1);
    const { input } = field(s, 'sheet charge (cm⁻² or C/m²)');
    input.focus();
    input.value = '';
    await sendKeys({ press: 'Enter' });
    await settled(s);
    expect(edits.at(-1)!.detail.next.interfaces).to.equal(undefined);
  });

  it('edits the contacts: kind, metal, a barrier given outright', async () => {
    const { s, edits } = await strip({ chosen: { kind: 'contact', index: 1 } });
    const form = s.renderRoot.querySelector('hm-contact-form')!;
    const choose = async (id: string, choice: string): Promise<void> => {
      const menu = form.renderRoot.querySelector<HTMLSelectElement>(`#${id}`)!;
      menu.value = choice;
      menu.dispatchEvent(new Event('change'));
      await settled(s);
      await form.updateComplete;
    };
    await choose('kind', 'barrier');
    await choose('metal', 'Ti');
    expect(edits.at(-1)!.detail.next.bottom).to.deep.equal({ kind: 'barrier', imageForce: true, metal: 'Ti' });
    await choose('pinning', 'none');
    expect(edits.at(-1)!.detail.next.bottom.pinning).to.equal('none');
    await choose('metal', '');
    expect(edits.at(-1)!.detail.next.bottom).to.deep.equal({ kind: 'barrier', imageForce: true, barrier: '0.7 eV', carrier: 'n' });
    await choose('kind', 'pinned');
    expect(edits.at(-1)!.detail.next.bottom).to.deep.equal({ kind: 'pinned', level: '0.7 eV' });
  });

  it('holds the name of a metal together with a barrier that was typed', async () => {
    const { s, edits } = await strip({ chosen: { kind: 'contact', index: 1 } });
    const form = s.renderRoot.querySelector('hm-contact-form')!;
    const choose = async (id: string, choice: string): Promise<void> => {
      const menu = form.renderRoot.querySelector<HTMLSelectElement>(`#${id}`)!;
      menu.value = choice;
      menu.dispatchEvent(new Event('change'));
      await settled(s);
      await form.updateComplete;
    };
    const now = () => edits.at(-1)!.detail.next.bottom;
    await choose('kind', 'barrier');
    await choose('metal', 'Ti');
    await choose('from', 'given');
    expect(now()).to.deep.equal({ kind: 'barrier', imageForce: true, metal: 'Ti', barrier: '0.7 eV', carrier: 'n' });
    expect(form.renderRoot.querySelector<HTMLSelectElement>('#metal')!.value).to.equal('Ti');
    const { input } = field(s, 'barrier height');
    input.focus();
    input.value = '0.61';
    await sendKeys({ press: 'Enter' });
    await settled(s);
    expect(now()).to.deep.equal({ kind: 'barrier', imageForce: true, metal: 'Ti', barrier: '0.61 eV', carrier: 'n' });
    expect(s.renderRoot.querySelector('.contact.bottom')!.textContent).to.contain('Ti').and.to.contain('barrier 0.61\u00a0eV');
    // Another metal comes with its own barrier; what was typed can be taken up again.
    await choose('metal', 'Ni');
    expect(now()).to.deep.equal({ kind: 'barrier', imageForce: true, metal: 'Ni' });
    await choose('from', 'given');
    expect(now()).to.deep.equal({ kind: 'barrier', imageForce: true, metal: 'Ni', barrier: '0.61 eV', carrier: 'n' });
    await choose('metal', '');
    expect(now()).to.deep.equal({ kind: 'barrier', imageForce: true, barrier: '0.61 eV', carrier: 'n' });
    expect(form.renderRoot.querySelector('#from')).to.equal(null);
  });

  it('grades a composition and implants a doping', async () => {
    const { s, edits } = await strip({ chosen: { kind: 'layer', index: 1 } });
    const form = s.renderRoot.querySelector('hm-layer-form')!;
    const [x, doping] = form.renderRoot.querySelectorAll('hm-profile-form');
    const shape = (of: Element, choice: string): void => {
      const menu = of.shadowRoot!.querySelector<HTMLSelectElement>('#shape')!;
      menu.value = choice;
      menu.dispatchEvent(new Event('change'));
    };
    shape(x, 'linear');
    await settled(s);
    expect(edits.at(-1)!.detail.next.layers[1].x).to.deep.equal({ from: '0.3', to: '0.3', shape: 'linear' });
    shape(doping, 'implanted');
    await settled(s);
    expect(edits.at(-1)!.detail.next.layers[1].dopants[0].concentration).to.deep.equal({ peak: 'Nsupply', depth: '0 nm', straggle: '(35 nm)/4', shape: 'gaussian' });
  });

  it('leaves a name that looks like markup as text', async () => {
    const { s } = await strip({ design: { ...design, layers: design.layers.map((l, i) => (i === 1 ? { ...l, name: '<img src=x onerror=alert(1)>' } : l)) } });
    expect(s.renderRoot.querySelectorAll('img').length).to.equal(0);
    expect(column(s, 1).textContent).to.include('<img');
  });

  it('passes the accessibility rules whatever is chosen, and has no style attribute in its templates', async () => {
    for (const chosen of [null, { kind: 'layer', index: 1 }, { kind: 'interface', index: 0 }, { kind: 'contact', index: 0 }] as const) {
      const { s } = await strip({ chosen });
      await expectAccessible(s);
    }
  });

  it('fits a narrow page, its buttons large enough for a finger', async () => {
    await setViewport({ width: 360, height: 900 });
    const narrow = drawPlate(result, { width: 344, height: 300 }).axes.depth;
    const { s } = await strip({ axis: narrow, chosen: { kind: 'layer', index: 1 } });
    expect(document.documentElement.scrollWidth).to.be.at.most(360);
    for (const b of s.renderRoot.querySelectorAll('button')) {
      expect(b.offsetHeight, b.textContent!).to.be.at.least(24);
      expect(b.offsetWidth, b.textContent!).to.be.at.least(24);
    }
    await setViewport({ width: 1000, height: 900 });
  });
});
