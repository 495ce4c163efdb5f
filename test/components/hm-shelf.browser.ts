import { expect } from 'chai';
import { setViewport } from '@web/test-runner-commands';
import '../../components/hm-parameters/hm-parameters.ts';
import type { HmField } from '../../components/hm-field/hm-field.ts';
import type { HmParameters } from '../../components/hm-parameters/hm-parameters.ts';
import type { ShelfWish } from '../../components/shared/events.ts';
import type { Design } from '../../src/design/types.ts';
import { keyOfItem, shelfKey, type ShelfItem } from '../../src/storage/shelf.ts';
import { designFixture } from '../state/design-fixture.ts';
import { expectAccessible } from './accessible.ts';
import { until } from './heard.ts';

let element: HmParameters;
/** what the page keeps */
let kept: ShelfItem[];
const root = () => element.shadowRoot!;
const shelf = () => root().querySelector('hm-shelf')!.shadowRoot!;
const entry = (text: string) => [...root().querySelectorAll('details')].find((d) => d.querySelector('summary strong')!.textContent === text)!;
const button = (within: ParentNode, words: string) => [...within.querySelectorAll('button')].find((b) => b.textContent!.trim().startsWith(words))!;
async function fill(within: ParentNode, label: string, text: string): Promise<void> {
  const field = [...within.querySelectorAll<HmField>('hm-field')].find((f) => f.label.startsWith(label))!;
  await field.updateComplete;
  const box = field.shadowRoot!.querySelector('input')!;
  box.focus();
  box.value = text;
  box.blur();
}
async function choose(within: ParentNode, label: string, value: string): Promise<void> {
  const menu = [...within.querySelectorAll('label')].find((l) => l.textContent!.trim().startsWith(label))!.querySelector('select')!;
  menu.value = value;
  menu.dispatchEvent(new Event('change'));
  await element.updateComplete;
}
async function spread(text: string): Promise<HTMLDetailsElement> {
  entry(text).open = true;
  await until(`values of ${text}`, () => entry(text).querySelector('.values') !== null);
  return entry(text);
}
async function put(design: Design): Promise<void> {
  element = Object.assign(document.createElement('hm-parameters'), { design });
  element.addEventListener('hm-edit', (e) => (element.design = (e as CustomEvent<{ next: Design }>).detail.next));
  element.addEventListener('hm-shelf', (e) => {
    const wish = (e as CustomEvent<ShelfWish>).detail;
    if (wish.act === 'put') for (const item of wish.entries) kept = [...kept.filter(({ key }) => key !== shelfKey(keyOfItem(item))), { ...item, key: shelfKey(keyOfItem(item)), kept: 1 }];
    if (wish.act === 'drop') kept = kept.filter(({ key }) => key !== wish.key);
    wish.answer(kept);
  });
  document.body.append(element);
  await element.updateComplete;
}

describe('own entries on the panel of parameters', () => {
  beforeEach(() => (kept = []));
  afterEach(() => element.remove());

  it('keep an own offset of a pair on the shelf, for a design that has another or none', async () => {
    const own = { first: 'AlGaAs', second: 'GaAs', deltaEv: { constant: '0.2 eV' }, source: 'measured here' };
    await put({ ...designFixture(), custom: { offsets: [own] } });
    const offsets = () => root().querySelector('hm-offsets')!.shadowRoot!;
    button(offsets(), 'Put on your shelf').click();
    await until('the shelf', () => shelf().querySelector('li') !== null);
    expect(shelf().querySelector('li')!.textContent!.replace(/\s+/g, ' ')).to.contain('AlGaAs to GaAs').and.to.contain('band offset').and.to.contain('in this design');
    expect(kept.map(({ key, list }) => [key, list])).to.deep.equal([['offsets AlGaAs and GaAs', 'offsets']]);
    await expectAccessible(element);
    element.design = { ...designFixture(), custom: { offsets: [{ ...own, first: 'GaAs', second: 'AlGaAs', source: 'another' }] } };
    await until('the other design', () => shelf().textContent!.includes("Take in place of the design's own"));
    button(shelf(), 'Take in place').click();
    expect(element.design!.custom!.offsets).to.deep.equal([own]);
    element.design = designFixture();
    await until('the plain design', () => shelf().textContent!.includes('Take into this design'));
    button(shelf(), 'Take into this design').click();
    expect(element.design!.custom).to.deep.equal({ offsets: [own] });
  });

  it('are written by a formula, refused with the temperature where it fails, and told what it comes to', async () => {
    await put({ ...designFixture(), requirements: [] });
    await choose(await spread('GaAs'), 'Write by a formula', 'gap.formula');
    await until('the form', () => root().querySelector('hm-value-form') !== null);
    const form = root().querySelector('hm-value-form')!;
    await fill(form.shadowRoot!, 'New', '1.5 eV - 5e-3 eV/K * T');
    await fill(form.shadowRoot!, 'Where', '');
    button(form.shadowRoot!, 'Use this value').click();
    await form.updateComplete;
    const complaints = () => [...form.shadowRoot!.querySelectorAll<HmField>('hm-field')].map(({ complaint }) => complaint ?? '');
    expect(complaints()[0]).to.match(/at 300 K/);
    expect(complaints()[1]).to.match(/^is empty; say where/);
    expect(element.design!.custom).to.equal(undefined);
    await fill(form.shadowRoot!, 'New', '1.519 eV - 5.4e-4 eV/K * T^2/(T + 204 K)');
    await form.updateComplete;
    expect(form.shadowRoot!.textContent).to.match(/It comes to: .*300 K: 1\.42/);
    await fill(form.shadowRoot!, 'Where', 'here');
    button(form.shadowRoot!, 'Use this value').click();
    await element.updateComplete;
    expect(element.design!.custom!.materials![0].gap).to.deep.equal({ formula: '1.519 eV - 5.4e-4 eV/K * T^2/(T + 204 K)' });
    expect(entry('GaAs').textContent).to.contain('1 own value');
    await expectAccessible(element);
  });

  it('come from a rival published value in one act, with the preset beside it and a way back', async () => {
    await put({ ...designFixture(), requirements: [] });
    const values = await spread('GaAs');
    const rival = [...values.querySelectorAll('.rival')].find((r) => r.textContent!.includes('0.063'))!;
    button(rival, 'Use it').click();
    await element.updateComplete;
    expect(element.design!.custom!.materials![0].electronMass).to.equal('0.063');
    const back = [...entry('GaAs').querySelectorAll('.rival')].find((r) => r.textContent!.includes('The preset has'))!;
    expect(back.textContent).to.contain('0.067').and.to.contain('Vurgaftman');
    button(back, 'Back to it').click();
    await element.updateComplete;
    expect(element.design!.custom).to.equal(undefined);
  });

  it('go to the shelf, are taken off and put back, and are taken into another design', async () => {
    await put({ ...designFixture(), requirements: [] });
    expect(shelf().textContent).to.contain('Nothing yet');
    const values = await spread('GaAs');
    button([...values.querySelectorAll('.rival')].find((r) => r.textContent!.includes('0.063'))!, 'Use it').click();
    await element.updateComplete;
    button(entry('GaAs'), 'Put on your shelf').click();
    await until('the shelf', () => shelf().querySelector('li') !== null);
    expect(shelf().querySelector('li')!.textContent).to.contain('in this design');
    button(shelf(), 'Take off the shelf').click();
    await until('the way back', () => shelf().querySelector('.back') !== null);
    expect(kept).to.deep.equal([]);
    expect(shelf().activeElement).to.equal(shelf().querySelector('.back'));
    button(shelf(), 'Put it back').click();
    await until('it again', () => shelf().querySelector('li') !== null);
    await expectAccessible(element);
    // Another design, which has none of it.
    element.design = { ...designFixture(), requirements: [] };
    await element.updateComplete;
    await until('the button', () => button(shelf(), 'Take into this design') !== undefined);
    button(shelf(), 'Take into this design').click();
    await element.updateComplete;
    expect(element.design!.custom!.materials![0]).to.deep.equal(kept[0].entry);
  });

  it('are a measured barrier and an offset of a pair, each with its source', async () => {
    const polar: Design = { ...designFixture(), crystal: undefined, interfaces: [], requirements: [], variables: [], top: { kind: 'barrier', metal: 'Ti' }, layers: [{ name: 'a', material: 'AlN', thickness: '20 nm' }, { name: 'b', material: 'GaN', thickness: '200 nm' }] };
    await put(JSON.parse(JSON.stringify(polar)) as Design);
    const form = (await spread('Ti')).querySelector('hm-barrier-form')!;
    form.shadowRoot!.querySelector('details')!.open = true;
    await fill(form.shadowRoot!, 'Height', '0.9');
    button(form.shadowRoot!, 'Use this barrier').click();
    await form.updateComplete;
    expect([...form.shadowRoot!.querySelectorAll<HmField>('hm-field')].map(({ complaint }) => complaint !== null)).to.deep.equal([true, true]);
    await fill(form.shadowRoot!, 'Height', '0.9 eV');
    await fill(form.shadowRoot!, 'Where', 'IV here');
    button(form.shadowRoot!, 'Use this barrier').click();
    await element.updateComplete;
    expect(element.design!.custom!.metals![0].barriers!.find(({ material }) => material === 'AlN')).to.deep.equal({ material: 'AlN', carrier: 'n', height: '0.9 eV', source: 'IV here' });
    const offsets = root().querySelector('hm-offsets')!;
    button(offsets.shadowRoot!, 'Change').click();
    await until('its form', () => offsets.shadowRoot!.querySelector('.form') !== null);
    await fill(offsets.shadowRoot!, 'AlN less GaN', '-0.9 eV');
    button(offsets.shadowRoot!, 'Use this offset').click();
    await offsets.updateComplete;
    expect(element.design!.custom!.offsets).to.equal(undefined);
    await fill(offsets.shadowRoot!, 'Where', 'XPS here');
    button(offsets.shadowRoot!, 'Use this offset').click();
    await element.updateComplete;
    expect(element.design!.custom!.offsets).to.deep.equal([{ first: 'GaN', second: 'AlN', deltaEv: { constant: '-0.9 eV' }, source: 'XPS here' }]);
    await expectAccessible(element);
    await setViewport({ width: 390, height: 844 });
    await element.updateComplete;
    expect(element.scrollWidth).to.be.at.most(390);
    await setViewport({ width: 800, height: 600 });
  });
});
