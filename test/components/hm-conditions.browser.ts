import { expect } from 'chai';
import '../../components/hm-conditions/hm-conditions.ts';
import type { HmConditions } from '../../components/hm-conditions/hm-conditions.ts';
import { designFixture } from '../state/design-fixture.ts';
import { expectAccessible } from './accessible.ts';
import { button, heard } from './heard.ts';

let element: HmConditions;
const field = (label: string) => [...element.shadowRoot!.querySelectorAll('hm-field')].find((candidate) => candidate.label === label)!;
/** Types into a field and presses Enter. */
function type(label: string, text: string): void {
  const box = field(label).shadowRoot!.querySelector('input')!;
  box.value = text;
  box.dispatchEvent(new KeyboardEvent('keydown', { key: 'Enter', bubbles: true, composed: true }));
}

describe('the head of the page', () => {
  beforeEach(async () => {
    element = document.createElement('hm-conditions');
    element.project = 'cell';
    element.design = designFixture();
    document.body.append(element);
    await element.updateComplete;
  });
  afterEach(() => element.remove());

  it('is accessible, with its menu open too', async () => {
    await expectAccessible(element);
    button(element, 'View').click();
    await element.updateComplete;
    await expectAccessible(element);
  });

  it('tells of a temperature as typed, and gives a bare number its unit', () => {
    const edits = heard(element, 'hm-edit');
    type('Temperature', '77 K');
    type('Temperature', '4');
    expect(edits.map(({ next }) => next.conditions.temperature)).to.deep.equal(['77 K', '4 K']);
    expect(edits[0].label).to.equal('temperature');
  });

  it('sets one end of the range at a time, and an empty end takes the range out', () => {
    const edits = heard(element, 'hm-edit');
    type('Range, from', '0 degC');
    type('to', '');
    expect(edits[0].next.conditions.temperatureRange).to.deep.equal(['0 degC', '125 degC']);
    expect(edits[1].next.conditions).not.to.have.property('temperatureRange');
  });

  it('keeps its places, however long the words about saving are', async () => {
    const place = (): number => field('Temperature').getBoundingClientRect().left;
    const before = place();
    element.saving = { kind: 'conflict', other: null };
    await element.updateComplete;
    expect(place()).to.equal(before);
  });

  it('says that only equilibrium is solved, and lets a bias be taken back', async () => {
    expect(element.shadowRoot!.textContent).to.contain('only equilibrium is solved');
    element.design = { ...designFixture(), conditions: { temperature: '300 K', bias: '1 V' } };
    element.complaints = [{ path: 'conditions.bias', message: 'only 0 V is solved' }];
    await element.updateComplete;
    await field('Bias').updateComplete;
    expect(field('Bias').shadowRoot!.textContent).to.contain('only 0 V is solved');
    const edits = heard(element, 'hm-edit');
    type('Bias', '0 V');
    expect(edits[0].next.conditions.bias).to.equal('0 V');
  });

  it('offers undo only when there is something to take back, and says what', async () => {
    expect(button(element, 'Undo').disabled).to.equal(true);
    element.undoLabel = 'thickness of cap';
    await element.updateComplete;
    expect(button(element, 'Undo').title).to.equal('undo: thickness of cap');
    const acts = heard(element, 'hm-act');
    for (const words of ['Undo', 'Projects', 'Starters', 'Open file', 'Take away', 'About']) button(element, words).click();
    expect(acts.map(({ act }) => act)).to.deep.equal(['undo', 'projects', 'starters', 'open-file', 'leave', 'about']);
  });

  it('says in words how it stands with saving', async () => {
    element.saving = { kind: 'saving' };
    await element.updateComplete;
    expect(element.shadowRoot!.querySelector('.saving')!.textContent).to.equal('Saving');
  });

  it('tells of another name, never of an empty one, and of light or dark', async () => {
    const names = heard(element, 'hm-rename');
    type('Project', 'solar cell');
    type('Project', '');
    expect(names).to.deep.equal([{ name: 'solar cell' }]);
    await field('Project').updateComplete;
    expect(field('Project').value).to.equal('cell');
    const views = heard(element, 'hm-view');
    const dark = element.shadowRoot!.querySelectorAll<HTMLInputElement>('[type=radio]')[2];
    dark.click();
    expect(views).to.deep.equal([{ change: { theme: 'dark' } }]);
  });
});
