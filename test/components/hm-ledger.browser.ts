import { sendKeys, setViewport } from '@web/test-runner-commands';
import { expect } from 'chai';
import '../../components/hm-ledger/hm-ledger.ts';
import type { HmLedger } from '../../components/hm-ledger/hm-ledger.ts';
import { expectAccessible } from './accessible.ts';
import { heard, mounted, sample, settled } from './sample.ts';

const { result } = sample('pn-diode');

async function ledger(properties: Partial<HmLedger> = {}): Promise<HmLedger> {
  return mounted<HmLedger>('hm-ledger', { result, ...properties });
}
const section = (l: HmLedger, i = 0): HTMLElement => l.renderRoot.querySelectorAll<HTMLElement>('section')[i];
const names = (l: HmLedger, i = 0): string[] => [...section(l, i).querySelectorAll('tbody th')].map((th) => th.textContent!.trim());
const heading = (l: HmLedger, text: string, i = 0): HTMLButtonElement => [...section(l, i).querySelectorAll<HTMLButtonElement>('thead button')].find((b) => b.textContent!.trim().startsWith(text))!;
const sortOf = (b: HTMLElement): string => b.closest('th')!.getAttribute('aria-sort')!;

describe('hm-ledger', () => {
  before(() => setViewport({ width: 1200, height: 900 }));

  it('gives a row a layer, a row a junction, a row a contact, and how good the answer is', async () => {
    const l = await ledger();
    expect(names(l, 0)).to.deep.equal(['anode', 'drift', 'substrate']);
    expect(names(l, 1)).to.deep.equal(['anode / drift', 'drift / substrate']);
    expect(names(l, 2)).to.deep.equal(['top', 'bottom']);
    expect(l.renderRoot.querySelector('.quality')!.textContent).to.match(/^Accepted: mesh error [\d.]+ mV on \d+ nodes/);
  });

  it('marks a row that rests on own values by a sign with words, and says what it means', async () => {
    const l = await ledger({ own: { layers: new Map([['drift', 'Si']]), junctions: new Map(), contacts: new Map() } });
    expect(names(l)[1].replace(/\s+/g, ' ')).to.equal('drift † (own values of Si)');
    expect(names(l)[0]).to.equal('anode');
    expect(l.renderRoot.textContent).to.contain('† with values of this design');
    await expectAccessible(l);
  });

  it('sorts by a heading, the other way at a second press, and gives the order of the stack back at a third', async () => {
    const l = await ledger();
    const views = heard(l, 'hm-view');
    const byN = heading(l, 'n');
    byN.click();
    await settled(l);
    const densities = result.layers.map((layer) => layer.n_cm3);
    const expected = [0, 1, 2].sort((a, b) => densities[b] - densities[a]).map((i) => result.layers[i].name);
    expect(names(l)).to.deep.equal(expected);
    expect(sortOf(byN)).to.equal('descending');
    byN.click();
    await settled(l);
    expect(names(l)).to.deep.equal([...expected].reverse());
    expect(sortOf(byN)).to.equal('ascending');
    byN.click();
    await settled(l);
    expect(names(l)).to.deep.equal(['anode', 'drift', 'substrate']);
    expect(sortOf(byN)).to.equal('none');
    expect(views.length).to.equal(3);
  });

  it('takes columns out and puts others in', async () => {
    const l = await ledger();
    const views = heard(l, 'hm-view');
    const [columns] = section(l).querySelectorAll<HTMLButtonElement>('.bar button');
    columns.click();
    await settled(l);
    const box = (text: string): HTMLInputElement => [...section(l).querySelectorAll('fieldset label')].find((label) => label.textContent!.trim() === text)!.querySelector('input')!;
    box('Gap').click();
    await settled(l);
    box('Mobility').click();
    await settled(l);
    expect(heading(l, 'Gap')).to.not.equal(undefined);
    expect(heading(l, 'Mobility')).to.equal(undefined);
    expect(views.at(-1)!.detail.change.ledger.columns.layers).to.include('gap').and.not.include('mobility');
  });

  it('copies the table as it stands, units in the heading row', async () => {
    const l = await ledger({ view: { columns: { layers: ['ecMinusEf', 'n'] } } });
    const said = heard(l, 'hm-say');
    let copied = '';
    const clipboard = navigator.clipboard;
    Object.defineProperty(navigator, 'clipboard', { configurable: true, value: { writeText: async (text: string) => void (copied = text) } });
    section(l).querySelectorAll<HTMLButtonElement>('.bar button')[1].click();
    await settled(l);
    Object.defineProperty(navigator, 'clipboard', { configurable: true, value: clipboard });
    const [head, first] = copied.split('\n').map((line) => line.split('\t'));
    expect(head).to.deep.equal(['layer', 'Ec − EF (eV)', 'n (cm⁻³)']);
    expect(first[0]).to.equal('anode');
    expect(Number(first[1])).to.be.closeTo(result.layers[0].ec_minus_ef_eV, 1e-6);
    expect(said[0].detail.text).to.equal('Layers copied as a table.');
  });

  it('says so when the browser does not allow copying', async () => {
    const l = await ledger();
    const said = heard(l, 'hm-say');
    const clipboard = navigator.clipboard;
    Object.defineProperty(navigator, 'clipboard', { configurable: true, value: { writeText: () => Promise.reject(new Error('no')) } });
    section(l).querySelectorAll<HTMLButtonElement>('.bar button')[1].click();
    await settled(l);
    Object.defineProperty(navigator, 'clipboard', { configurable: true, value: clipboard });
    expect(said[0].detail.urgent).to.equal(true);
  });

  it('tells of the row that is chosen and marks the one that it is told', async () => {
    const l = await ledger({ chosen: { kind: 'interface', index: 1 } });
    const chosen = heard(l, 'hm-choose');
    expect(section(l, 1).querySelectorAll('tr.chosen').length).to.equal(1);
    section(l, 2).querySelector<HTMLButtonElement>('tbody th button')!.click();
    expect(chosen[0].detail).to.deep.equal({ kind: 'contact', index: 0 });
  });

  it('lets every figure be asked for its workings, from the keyboard too', async () => {
    const l = await ledger({ workings: true });
    const views = heard(l, 'hm-view');
    const cells = section(l).querySelectorAll<HTMLElement>('td');
    expect([...cells].filter((c) => c.tabIndex === 0).length, 'one stop of Tab for the table').to.equal(1);
    cells[0].focus();
    await sendKeys({ press: 'ArrowRight' });
    await sendKeys({ press: 'ArrowDown' });
    await sendKeys({ press: 'Enter' });
    expect(views.at(-1)!.detail.change.workings).to.deep.equal({ table: 'layers', index: 1, column: 'ecMinusEf' });
    cells[0].click();
    expect(views.at(-1)!.detail.change.workings).to.deep.equal({ table: 'layers', index: 0, column: 'regime' });
  });

  it('dims and marks figures of an earlier stack', async () => {
    const l = await ledger({ stale: true });
    expect(l.renderRoot.textContent).to.include('Figures of the stack before the last change.');
  });

  it('says what will stand there while there is no result', async () => {
    const l = await ledger({ result: null });
    expect(l.renderRoot.textContent).to.include('No figures yet');
  });

  it('scrolls within its own region on a narrow page', async () => {
    await setViewport({ width: 360, height: 800 });
    const l = await ledger();
    expect(document.documentElement.scrollWidth).to.be.at.most(360);
    const scroll = section(l).querySelector('.scroll')!;
    expect(scroll.scrollWidth).to.be.greaterThan(scroll.clientWidth);
    await setViewport({ width: 1200, height: 900 });
  });

  it('passes the accessibility rules, with and without workings', async () => {
    const l = await ledger({ chosen: { kind: 'layer', index: 0 } });
    section(l).querySelector<HTMLButtonElement>('.bar button')!.click();
    await settled(l);
    await expectAccessible(l);
    await expectAccessible(await ledger({ workings: true }));
    await expectAccessible(await ledger({ stale: true }));
  });
});
