import { expect } from 'chai';
import '../../components/hm-requirements/hm-requirements.ts';
import type { HmRequirements } from '../../components/hm-requirements/hm-requirements.ts';
import { marginShare, targetsOf } from '../../components/hm-requirements/requirement-parts.ts';
import type { RequirementResult } from '../../src/result/types.ts';
import { designFixture } from '../state/design-fixture.ts';
import { expectAccessible } from './accessible.ts';
import { button, heard } from './heard.ts';

const row = (change: Partial<RequirementResult> = {}): RequirementResult => ({
  quantity: 'contactResistivity', of: 'top', bound: 'max', unit: 'ohm cm^2', limit: 1e-6, over: 'temperature', worst: 4e-7, at: { temperature_K: 233, tolerances: [], words: '-40 degC, Ncap -10 %' },
  met: true, judged: true, margin: 2.5, margin_kind: 'ratio', margin_unit: '', corners_sufficed: true, unanswered: null, ...change,
});
const flag = row({ quantity: 'fullyDepleted', of: 'spacer', limit: true, unit: '', worst: false, met: false, margin: -0.2, margin_kind: 'difference' });
let element: HmRequirements;
const text = () => element.shadowRoot!.textContent!.replace(/\s+/g, ' ');

describe('the requirements of a design', () => {
  beforeEach(async () => {
    element = document.createElement('hm-requirements');
    element.design = designFixture();
    element.verdicts = { status: 'complete', rows: [row(), flag], stale: false, progress: null, reason: null };
    document.body.append(element);
    await element.updateComplete;
  });
  afterEach(() => element.remove());

  it('are accessible, with the form of a new one too', async () => {
    element.shadowRoot!.querySelector('details')!.open = true;
    await expectAccessible(element);
  });

  it('say for each limit whether it is met, the margin, and where the worst case is', () => {
    const [first, second] = [...element.shadowRoot!.querySelectorAll('li')].map((item) => item.textContent!.replace(/\s+/g, ' '));
    expect(first).to.contain('contact resistivity of top').and.to.contain('met, margin 2.5 times').and.to.contain('worst 4e-7 ohm cm^2 at -40 degC, Ncap -10 %');
    expect(second).to.contain('not met').and.to.contain('worst no at');
    expect(text()).to.contain('1 of 2 met.');
  });

  it('take another limit, the other way about, over the range, and are taken out', () => {
    const edits = heard(element, 'hm-edit');
    const box = element.shadowRoot!.querySelector('hm-field')!.shadowRoot!.querySelector('input')!;
    box.value = '2e-6';
    box.dispatchEvent(new KeyboardEvent('keydown', { key: 'Enter', bubbles: true }));
    button(element, 'make it the least').click();
    element.shadowRoot!.querySelector<HTMLInputElement>('[type=checkbox]')!.click();
    button(element, 'Take out').click();
    expect(edits.map(({ next }) => next.requirements![0])).to.deep.equal([
      { quantity: 'contactResistivity', of: 'top', max: '2e-6 ohm cm^2' },
      { quantity: 'contactResistivity', of: 'top', min: '1e-6 ohm cm^2' },
      { quantity: 'contactResistivity', of: 'top', max: '1e-6 ohm cm^2', over: 'temperatureRange' },
      { quantity: 'fullyDepleted', of: 'spacer', max: true },
    ]);
  });

  it('are added for what the quantity can be asked of', async () => {
    const [quantity, of] = element.shadowRoot!.querySelectorAll<HTMLSelectElement>('details select');
    quantity.value = 'peakField';
    quantity.dispatchEvent(new Event('change'));
    await element.updateComplete;
    expect([...of.options].map((option) => option.text)).to.deep.equal(['cap / spacer', 'spacer / buffer']);
    of.value = 'spacer';
    of.dispatchEvent(new Event('change'));
    const edits = heard(element, 'hm-edit');
    button(element, 'Add').click();
    expect(edits[0].next.requirements!.at(-1)).to.deep.equal({ quantity: 'peakField', of: 'spacer', max: '1 V/cm', over: 'temperatureRange' });
  });

  it('show progress with a way to stop, and why there is no verdict', async () => {
    element.verdicts = { status: 'pending', rows: [], stale: false, progress: { done: 3, of: 10 }, reason: null };
    await element.updateComplete;
    const bar = element.shadowRoot!.querySelector('progress')!;
    expect([bar.value, bar.max]).to.deep.equal([3, 10]);
    let stopped = 0;
    element.addEventListener('requirements-stop', () => stopped++);
    button(element, 'Stop').click();
    expect(stopped).to.equal(1);
    await expectAccessible(element);
    element.verdicts = { status: 'error', rows: [row(), flag], stale: true, progress: null, reason: 'Judging was stopped.' };
    await element.updateComplete;
    expect(text()).to.contain('Judging was stopped. Verdicts are of the stack before the last change.');
    await expectAccessible(element);
  });

  it('put no verdict of another requirement beside one that has just been added', async () => {
    element.design = { ...designFixture(), requirements: [{ quantity: 'builtIn', of: 'cap', min: '1 V' }, ...designFixture().requirements!] };
    await element.updateComplete;
    expect(element.shadowRoot!.querySelector('li')!.textContent).not.to.contain('margin');
  });

  it('show what is wrong with them', async () => {
    element.complaints = [{ path: 'requirements[0].max', message: "'1 V' is no contact resistivity" }];
    await element.updateComplete;
    expect(element.shadowRoot!.querySelector('li')!.textContent).to.contain('is no contact resistivity');
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
});
