import { expect } from 'chai';
import { setViewport } from '@web/test-runner-commands';
import '../../components/hm-parameters/hm-parameters.ts';
import type { HmField } from '../../components/hm-field/hm-field.ts';
import type { HmParameters } from '../../components/hm-parameters/hm-parameters.ts';
import type { HmValueForm } from '../../components/hm-parameters/hm-value-form.ts';
import type { Design } from '../../src/design/types.ts';
import { designFixture } from '../state/design-fixture.ts';
import { expectAccessible } from './accessible.ts';
import { heard, until } from './heard.ts';

let element: HmParameters;
const root = () => element.shadowRoot!;
const entry = (text: string) => [...root().querySelectorAll('details')].find((d) => d.querySelector('summary strong')!.textContent === text)!;
const row = (within: Element, words: string) => [...within.querySelectorAll<HTMLElement>('.values > li')].find((li) => li.firstElementChild!.textContent === words)!;
const press = (within: Element, words: string) => [...within.querySelectorAll('button')].find((b) => b.textContent!.trim().startsWith(words))!.click();

async function put(design: Design = designFixture()): Promise<void> {
  element = Object.assign(document.createElement('hm-parameters'), { design });
  // The page hands the next design back.
  element.addEventListener('hm-edit', (e) => (element.design = (e as CustomEvent<{ next: Design }>).detail.next));
  document.body.append(element);
  await element.updateComplete;
}

async function spread(text: string): Promise<HTMLDetailsElement> {
  entry(text).open = true;
  await until(`values of ${text}`, () => entry(text).querySelector('.values') !== null);
  return entry(text);
}

async function change(text: string, words: string, value: string, source: string): Promise<HmValueForm> {
  press(row(await spread(text), words), 'Change');
  await until('the form', () => root().querySelector('hm-value-form') !== null);
  const form = root().querySelector('hm-value-form')!;
  await form.updateComplete;
  for (const [id, typed] of [['#value', value], ['#source', source]]) {
    const field = form.shadowRoot!.querySelector<HmField>(id)!;
    await field.updateComplete;
    const box = field.shadowRoot!.querySelector('input')!;
    box.focus();
    box.value = typed;
    box.blur();
  }
  press(form.shadowRoot as unknown as Element, 'Use this value');
  await form.updateComplete;
  return form;
}

describe('the panel of parameters', () => {
  afterEach(() => element.remove());

  it('shows what the design uses, value by value, with source and check, and is accessible wide and narrow', async () => {
    await put();
    expect([...root().querySelectorAll('summary strong')].map((s) => s.textContent)).to.deep.equal(['GaAs', 'AlGaAs', 'AlAs', 'GaAs:Si', 'GaAs:C', 'Ti']);
    const gap = row(await spread('GaAs'), 'gap at 0 K');
    expect(gap.querySelector('.figure')!.textContent).to.equal('1.519 eV');
    expect(gap.querySelector('.work')!.textContent).to.match(/J\. Appl\. Phys|Vurgaftman/);
    expect(gap.querySelector('.checked')!.textContent).to.match(/seen in print|from memory|derived/);
    await spread('Ti');
    await expectAccessible(element);
    await setViewport({ width: 390, height: 800 });
    await element.updateComplete;
    expect(document.documentElement.scrollWidth).to.be.at.most(390);
    for (const button of root().querySelectorAll('button')) expect(button.getBoundingClientRect().height).to.be.at.least(24);
    await setViewport({ width: 1200, height: 800 });
  });

  it('changes a value in the design, marks and lists it, and puts it back', async () => {
    await put();
    const edits = heard(element, 'hm-edit');
    await change('GaAs', 'gap at 0 K', '1.6', 'photoluminescence, lot 7');
    await until('the edit', () => edits.length === 1);
    expect(edits[0].label).to.equal('gap at 0 K of GaAs');
    expect(edits[0].next.custom!.materials![0].gap).to.deep.include({ zeroK: '1.6 eV' });
    await element.updateComplete;
    expect(root().querySelector('.own')!.textContent).to.contain('GaAs: gap at 0 K 1.6 eV instead of 1.519 eV');
    expect(row(entry('GaAs'), 'gap at 0 K').querySelector('.work')!.textContent).to.contain('photoluminescence, lot 7');
    expect(entry('GaAs').querySelector('.mark')!.textContent).to.equal('1 own value');
    await expectAccessible(element);
    press(row(entry('GaAs'), 'gap at 0 K'), 'Reset');
    expect(edits[1].next).to.deep.equal(designFixture());
    await element.updateComplete;
    expect(root().querySelector('.own')).to.equal(null);
  });

  it('complains at the field, of the value and of a missing source, and changes nothing', async () => {
    await put();
    const edits = heard(element, 'hm-edit');
    const form = await change('GaAs', 'gap at 0 K', '20 nm', '');
    await until('complaints', () => form.shadowRoot!.querySelector<HmField>('#value')!.complaint !== null);
    expect(form.shadowRoot!.querySelector<HmField>('#value')!.complaint).to.contain('is a length, not an energy');
    expect(form.shadowRoot!.querySelector<HmField>('#source')!.complaint).to.contain('is empty');
    await expectAccessible(element);
    expect(edits).to.deep.equal([]);
    press(form.shadowRoot as unknown as Element, 'Leave it');
    await until('the form gone', () => root().querySelector('hm-value-form') === null);
    await until('the focus back', () => (root().activeElement as HTMLElement | null)?.dataset.path === 'gap.zeroK');
  });

  it('copies an entry under a name, and takes it out again only while nothing uses it', async () => {
    await put();
    const edits = heard(element, 'hm-edit');
    const said = heard(element, 'hm-say');
    press(await spread('Ti'), 'Copy');
    expect(edits[0].next.custom!.metals!.map(({ id }) => id)).to.deep.equal(['Ti-2']);
    element.design = { ...edits[0].next, top: { kind: 'barrier', metal: 'Ti-2' } };
    await element.updateComplete;
    press(await spread('Ti-2'), 'Take out');
    expect(said.at(-1)).to.deep.equal({ text: 'Ti-2 stays: the top contact uses it.', urgent: true });
    expect(edits).to.have.length(1);
    element.design = edits[0].next;
    await element.updateComplete;
    press(await spread('Ti-2'), 'Take out');
    expect(edits[1].next).to.deep.equal(designFixture());
  });

  it('shows any other preset on request', async () => {
    await put();
    const menu = [...root().querySelectorAll('select')].at(-1)!;
    menu.value = [...menu.options].find((option) => option.textContent === 'InP')!.value;
    menu.dispatchEvent(new Event('change'));
    await element.updateComplete;
    expect((await spread('InP')).querySelectorAll('.values > li').length).to.be.greaterThan(8);
    expect(row(entry('InP'), 'permittivity')).not.to.equal(undefined);
  });
});
