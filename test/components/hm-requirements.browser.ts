import { expect } from 'chai';
import { NO_VERDICTS, type HmRequirements } from '../../components/hm-requirements/hm-requirements.ts';
import { firstLimit, fitting, marginShare, quantityGroups, targetsOf } from '../../components/hm-requirements/requirement-parts.ts';
import type { RequirementResult } from '../../src/result/types.ts';
import { REQUIREMENT_QUANTITIES } from '../../src/design/requirement-quantities.ts';
import type { Design } from '../../src/design/types.ts';
import { designFixture as fixture } from '../state/design-fixture.ts';
import { expectAccessible } from './accessible.ts';
import { button, heard } from './heard.ts';

/** The fixture with a flag that asks for something. */
const designFixture = (): Design => ({ ...fixture(), requirements: [fixture().requirements![0], { quantity: 'fullyDepleted', of: 'spacer', min: true }] });
const row = (change: Partial<RequirementResult> = {}): RequirementResult => ({
  quantity: 'contactResistivity', of: 'top', bound: 'max', unit: 'ohm cm^2', limit: 1e-6, over: 'temperature', worst: 4e-7, at: { temperature_K: 233, tolerances: [], words: '-40 degC, Ncap -10 %' },
  met: true, judged: true, margin: 2.5, margin_kind: 'ratio', margin_unit: '', corners_sufficed: true, unanswered: null, blocks: false, ...change,
});
const flag = row({ quantity: 'fullyDepleted', of: 'spacer', bound: 'min', limit: true, unit: '', worst: false, met: false, margin: -0.2, margin_kind: 'difference' });
let element: HmRequirements;
const text = () => element.shadowRoot!.textContent!.replace(/\s+/g, ' ');

/** The menu of this name in row `at`; the last row is the form of a new one. */
const menu = (label: string, at: number) => element.shadowRoot!.querySelectorAll<HTMLSelectElement>(`select[aria-label="${label}"]`)[at];
function choose(label: string, value: string, at = 0): void {
  menu(label, at).value = value;
  menu(label, at).dispatchEvent(new Event('change'));
}

describe('the requirements of a design', () => {
  beforeEach(async () => {
    element = document.createElement('hm-requirements');
    element.design = designFixture();
    element.verdicts = { status: 'complete', rows: [row(), flag], stale: false, progress: null, reason: null };
    document.body.append(element);
    await element.updateComplete;
  });
  afterEach(() => element.remove());

  it('are accessible, and where there are none', async () => {
    await expectAccessible(element);
    element.design = { ...designFixture(), requirements: [] };
    element.verdicts = NO_VERDICTS;
    await element.updateComplete;
    expect(text()).to.contain('None yet');
    await expectAccessible(element);
  });

  it('say for each limit whether it is met, the margin, and where the worst case is', () => {
    const [first, second] = [...element.shadowRoot!.querySelectorAll('li')].map((item) => item.textContent!.replace(/\s+/g, ' '));
    expect(first).to.contain('met, margin 2.5 times').and.to.contain('worst 4e-7 ohm cm^2 at -40 degC, Ncap -10 %');
    expect(second).to.contain('not met, missed by 0.2').and.to.contain('worst no at');
    expect(text()).to.contain('1 of 2 met');
  });

  it('can each be asked how their figures come about, while they are those of the design', async () => {
    const views = heard(element, 'hm-view');
    const figures = [...element.shadowRoot!.querySelectorAll<HTMLButtonElement>('li')][0].querySelectorAll<HTMLButtonElement>('button.how');
    expect([...figures].map(({ textContent }) => textContent!.replace(/\u00a0/g, ' '))).to.deep.equal(['margin 2.5 times', '1e-6 ohm cm^2', '4e-7 ohm cm^2', '-40 degC, Ncap -10 %']);
    for (const figure of figures) expect(figure.getBoundingClientRect().height).to.be.at.least(24);
    figures[0].click();
    expect((views[0].change.workings as { asked: unknown }).asked).to.deep.include({ table: 'requirement', column: 'margin', index: 0 });
    element.verdicts = { ...element.verdicts, stale: true };
    await element.updateComplete;
    expect(element.shadowRoot!.querySelector('button.how')).to.equal(null);
  });

  it('say that a contact blocks, in words, and count it as not met', async () => {
    element.verdicts = { ...element.verdicts, rows: [row({ met: false, blocks: true, worst: null, margin: 0 }), flag] };
    await element.updateComplete;
    expect(text()).to.contain('not met').and.to.contain('worst blocks; no finite resistivity at -40 degC');
    await expectAccessible(element);
  });

  it('are edited in place: limit, the other way about, temperatures, taken out', () => {
    const edits = heard(element, 'hm-edit');
    const box = element.shadowRoot!.querySelector('hm-field')!.shadowRoot!.querySelector('input')!;
    box.value = '2e-6';
    box.dispatchEvent(new KeyboardEvent('keydown', { key: 'Enter', bubbles: true }));
    choose('Limit is', 'min');
    choose('Temperatures', 'range');
    button(element, 'Take out').click();
    expect(edits.map(({ next }) => next.requirements![0])).to.deep.equal([
      { quantity: 'contactResistivity', of: 'top', max: '2e-6 ohm cm^2' },
      { quantity: 'contactResistivity', of: 'top', min: '1e-6 ohm cm^2' },
      { quantity: 'contactResistivity', of: 'top', max: '1e-6 ohm cm^2', over: 'temperatureRange' },
      { quantity: 'fullyDepleted', of: 'spacer', min: true },
    ]);
  });

  it('take another quantity, with a place and a limit that fit it', () => {
    const edits = heard(element, 'hm-edit');
    choose('Quantity', 'sheetResistance');
    choose('Quantity', 'leakage');
    choose('of', 'bottom');
    expect(edits.map(({ next }) => next.requirements![0])).to.deep.equal([
      { quantity: 'sheetResistance', of: 'cap', max: '120 ohm' },
      { quantity: 'leakage', of: 'top', max: '1e-6 A/cm^2' },
      { quantity: 'contactResistivity', of: 'bottom', max: '1e-6 ohm cm^2' },
    ]);
  });

  it('ask for a flag or forbid it', () => {
    const edits = heard(element, 'hm-edit');
    choose('Limit is', 'max', 1);
    expect(edits[0].next.requirements![1]).to.deep.equal({ quantity: 'fullyDepleted', of: 'spacer', max: false });
  });

  it('offer to size a variable where one is not met, and only there', () => {
    const asked = heard(element, 'hm-size');
    const offers = [...element.shadowRoot!.querySelectorAll<HTMLButtonElement>('.size')];
    expect(offers).to.have.length(1);
    offers[0].click();
    expect(asked).to.deep.equal([{ requirement: 1 }]);
  });

  it('are added for what the quantity can be asked of', async () => {
    choose('Quantity', 'peakField', 2);
    await element.updateComplete;
    const of = menu('of', 2);
    expect([...of.options].map((option) => option.text)).to.deep.equal(['cap / spacer', 'spacer / buffer']);
    choose('of', 'spacer', 2);
    const edits = heard(element, 'hm-edit');
    await element.updateComplete;
    button(element, 'Add').click();
    expect(edits[0].next.requirements!.at(-1)).to.deep.equal({ quantity: 'peakField', of: 'spacer', max: '3e5 V/cm', over: 'temperatureRange' });
  });

  it('begin over the temperature range of the design where it has one, and at its temperature once it has none', async () => {
    expect(menu('Temperatures', 2).value).to.equal('range');
    choose('Temperatures', 'one', 2);
    element.design = { ...designFixture(), title: 'another' };
    await element.updateComplete;
    expect(menu('Temperatures', 2).value).to.equal('one');
    choose('Temperatures', 'range', 2);
    element.design = { ...designFixture(), conditions: { temperature: '300 K' } };
    await element.updateComplete;
    expect(menu('Temperatures', 2).value).to.equal('one');
  });

  it('have room for a limit with its unit', () => {
    const box = element.shadowRoot!.querySelector('hm-field')!.shadowRoot!.querySelector('input')!;
    expect(box.value).to.equal('1e-6 ohm cm^2');
    expect(box.scrollWidth).to.be.at.most(box.clientWidth);
  });

  it('show progress with a way to stop, and why there is no verdict with a way to begin anew', async () => {
    const acts = heard(element, 'hm-act');
    element.verdicts = { status: 'pending', rows: [], stale: false, progress: { done: 3, of: 10 }, reason: null };
    await element.updateComplete;
    const bar = element.shadowRoot!.querySelector('progress')!;
    expect([bar.value, bar.max]).to.deep.equal([3, 10]);
    button(element, 'Stop').click();
    await expectAccessible(element);
    element.verdicts = { status: 'error', rows: [row(), flag], stale: true, progress: null, reason: 'Judging was stopped.' };
    await element.updateComplete;
    expect(text()).to.contain('Judging was stopped. Verdicts are of the stack before the last change.');
    // What belongs to an earlier stack offers nothing to do.
    expect(element.shadowRoot!.querySelector('.size')).to.equal(null);
    button(element, 'Judge again').click();
    expect(acts).to.deep.equal([{ act: 'judge-stop' }, { act: 'judge-again' }]);
    await expectAccessible(element);
  });

  it('name the corners without an answer', async () => {
    element.verdicts = { ...element.verdicts, rows: [row({ met: false, judged: false, unanswered: { points: 3, temperature_K: 233, words: '-40 degC', reason: 'too many Newton updates' } }), flag] };
    await element.updateComplete;
    expect(text()).to.contain('no answer at 3 corners, first at -40 degC: too many Newton updates');
    await expectAccessible(element);
  });

  it('put no verdict of another requirement beside one that has just been added', async () => {
    element.design = { ...designFixture(), requirements: [{ quantity: 'builtIn', of: 'cap', min: '1 V' }, ...designFixture().requirements!] };
    await element.updateComplete;
    expect(element.shadowRoot!.querySelector('li')!.textContent).not.to.contain('margin');
  });

  it('show what is wrong with a limit at its field, the rest beside the row', async () => {
    element.complaints = [{ path: 'requirements[0].max', message: "'1 V' is no contact resistivity" }, { path: 'requirements[1].of', message: 'there is nothing called so' }];
    await element.updateComplete;
    const field = element.shadowRoot!.querySelector('hm-field')!;
    await field.updateComplete;
    expect(field.shadowRoot!.textContent).to.contain('is no contact resistivity');
    expect(element.shadowRoot!.querySelectorAll('li')[1].textContent).to.contain('nothing called so');
  });

  it('keep a quantity and a place that are unknown on the page until the person changes them', async () => {
    element.design = { ...designFixture(), requirements: [{ quantity: 'colour', of: 'gone', max: '1' }] };
    element.verdicts = NO_VERDICTS;
    await element.updateComplete;
    expect(menu('Quantity', 0).selectedOptions[0].text).to.equal('colour (unknown)');
    expect(menu('of', 0).selectedOptions[0].text).to.equal('gone (not there)');
    await expectAccessible(element);
  });
});

describe('the parts of a requirement', () => {
  it('are asked of what the design has', () => {
    expect(targetsOf(designFixture(), 'contactResistivity').map(({ value }) => value)).to.deep.equal(['top', 'bottom']);
    expect(targetsOf(designFixture(), 'sheetResistance').map(({ value }) => value)).to.deep.equal(['cap', 'spacer', 'buffer']);
  });

  it('draw a factor of ten, or a difference as large as the limit, as half of the bar', () => {
    expect(marginShare(row({ margin: 10 }))).to.equal(1);
    expect(marginShare(row({ margin: 0.1 }))).to.be.closeTo(-1, 1e-12);
    expect(marginShare(row({ margin: 1 }))).to.equal(0);
    expect(marginShare(row({ margin: 1e9 }))).to.equal(1);
    expect(marginShare(row({ margin: 0.2, margin_kind: 'difference', limit: 0.4 }))).to.equal(0.5);
    expect(marginShare(row({ margin: null, met: true }))).to.equal(1);
    expect(marginShare(row({ margin: null, met: false }))).to.equal(null);
  });

  it('stand in the menu once each', () => {
    const names = quantityGroups().flatMap(({ quantities }) => quantities.map(({ name }) => name));
    expect(new Set(names)).to.deep.equal(new Set(Object.keys(REQUIREMENT_QUANTITIES)));
    expect(names).to.have.length(Object.keys(REQUIREMENT_QUANTITIES).length);
  });

  it('begin with a limit of the kind of the quantity', () => {
    expect(firstLimit('contactResistivity')).to.deep.equal({ max: '1e-6 ohm cm^2' });
    expect(firstLimit('carrierDensity')).to.deep.equal({ min: '5e17 cm^-3' });
    expect(firstLimit('degenerate')).to.deep.equal({ min: true });
  });

  it('keep a limit where the new quantity is of the same kind', () => {
    const requirement = { quantity: 'barrierN', of: 'top', max: '0.4 eV' };
    expect(fitting(designFixture(), requirement, 'barrierP')).to.deep.equal({});
    expect(fitting(designFixture(), requirement, 'ecMinusEf')).to.deep.equal({ of: 'cap' });
    expect(fitting({ ...designFixture(), layers: designFixture().layers.slice(0, 1) }, requirement, 'builtIn')).to.equal(null);
  });
});
