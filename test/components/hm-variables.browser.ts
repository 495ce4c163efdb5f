import { expect } from 'chai';
import '../../components/hm-assumptions/hm-assumptions.ts';
import '../../components/hm-variables/hm-variables.ts';
import type { HmVariables } from '../../components/hm-variables/hm-variables.ts';
import { designFixture } from '../state/design-fixture.ts';
import { expectAccessible } from './accessible.ts';
import { button, heard } from './heard.ts';

let element: HmVariables;
const field = (label: string) => [...element.shadowRoot!.querySelectorAll('hm-field')].find((candidate) => candidate.label === label)!;
function type(label: string, text: string): void {
  const box = field(label).shadowRoot!.querySelector('input')!;
  box.value = text;
  box.dispatchEvent(new KeyboardEvent('keydown', { key: 'Enter', bubbles: true }));
}

describe('the variables of a design', () => {
  beforeEach(async () => {
    element = document.createElement('hm-variables');
    const design = designFixture();
    element.design = { ...design, variables: [{ ...design.variables![0], range: ['1e18 cm^-3', '1e20 cm^-3'], note: 'cap doping' }] };
    document.body.append(element);
    await element.updateComplete;
  });
  afterEach(() => element.remove());

  it('are accessible, with details open and closed, and where there are none', async () => {
    await expectAccessible(element);
    element.shadowRoot!.querySelector('details')!.open = true;
    await expectAccessible(element);
    element.design = { ...designFixture(), variables: undefined };
    await element.updateComplete;
    await expectAccessible(element);
  });

  it('take another value, tolerance and range, and an empty tolerance takes it out', () => {
    const edits = heard(element, 'hm-edit');
    type('Value of Ncap', '3e19');
    type('Tolerance', '');
    type('to', '1e21 cm^-3');
    expect(edits.map(({ next }) => next.variables![0])).to.deep.equal([
      { name: 'Ncap', value: '3e19 cm^-3', tolerance: '10 %', range: ['1e18 cm^-3', '1e20 cm^-3'], note: 'cap doping' },
      { name: 'Ncap', value: '1e19 cm^-3', range: ['1e18 cm^-3', '1e20 cm^-3'], note: 'cap doping' },
      { name: 'Ncap', value: '1e19 cm^-3', tolerance: '10 %', range: ['1e18 cm^-3', '1e21 cm^-3'], note: 'cap doping' },
    ]);
  });

  it('keep both ends of a range beside each other, however narrow the column', async () => {
    element.shadowRoot!.querySelector('details')!.open = true;
    for (const width of [240, 280, 340, 420]) {
      element.style.width = `${width}px`;
      await element.updateComplete;
      const [from, to] = ['Range, from', 'to'].map((label) => field(label).getBoundingClientRect());
      expect(to.top, `${width} px`).to.equal(from.top);
      expect(to.right, `${width} px`).to.be.at.most(element.getBoundingClientRect().right + 1);
    }
    element.style.width = '';
  });

  it('are renamed in every expression that uses them', () => {
    const edits = heard(element, 'hm-edit');
    type('Name', 'Nc');
    expect(edits[0].next.layers[0].dopants![0].concentration).to.equal('2*Nc');
  });

  it('are pulled by a slider, each pull one step of undo', () => {
    const edits = heard(element, 'hm-edit');
    const slider = element.shadowRoot!.querySelector<HTMLInputElement>('[type=range]')!;
    expect(slider.value).to.equal('300');
    const pull = (to: string) => {
      slider.value = to;
      slider.dispatchEvent(new Event('input'));
    };
    pull('450');
    pull('600');
    slider.dispatchEvent(new Event('change'));
    pull('0');
    expect(edits.map(({ next }) => next.variables![0].value)).to.deep.equal(['3.16e19 cm^-3', '1e20 cm^-3', '1e18 cm^-3']);
    expect(edits[0].join).to.equal(edits[1].join);
    expect(edits[2].join).not.to.equal(edits[0].join);
  });

  it('are added under a free name and taken out', async () => {
    const edits = heard(element, 'hm-edit');
    button(element, 'Add a variable').click();
    element.design = edits[0].next;
    await element.updateComplete;
    button(element, 'Add a variable').click();
    button(element, 'Take out').click();
    expect(edits[1].next.variables!.map(({ name }) => name)).to.deep.equal(['Ncap', 'v', 'v2']);
    expect(edits[2].next.variables!.map(({ name }) => name)).to.deep.equal(['v']);
  });

  it('put the cursor into the name of one that was added', async () => {
    const edits = heard(element, 'hm-edit');
    button(element, 'Add a variable').click();
    element.design = edits[0].next;
    await element.updateComplete;
    const name = [...element.shadowRoot!.querySelectorAll('hm-field')].filter(({ label }) => label === 'Name').at(-1)!;
    await name.updateComplete;
    const box = name.shadowRoot!.querySelector('input')!;
    expect(name.shadowRoot!.activeElement).to.equal(box);
    expect([box.value, box.selectionStart, box.selectionEnd]).to.deep.equal(['v', 0, 1]);
  });

  it('show what is wrong without moving what stands beside it', async () => {
    const name = field('Name').getBoundingClientRect();
    const before = field('Value of Ncap').getBoundingClientRect();
    element.complaints = [{ path: 'variables[0].name', message: 'this is a name that no expression could ever use, since it holds a space and a sign' }];
    await element.updateComplete;
    await field('Name').updateComplete;
    expect(field('Value of Ncap').getBoundingClientRect().left).to.equal(before.left);
    expect(field('Value of Ncap').shadowRoot!.querySelector('input')!.getBoundingClientRect().width).to.be.greaterThan(100);
    expect(field('Name').getBoundingClientRect().width).to.equal(name.width);
  });

  it('show what is wrong where it is wrong', async () => {
    element.complaints = [{ path: 'variables[0].value', message: 'is no density' }];
    await element.updateComplete;
    await field('Value of Ncap').updateComplete;
    expect(field('Value of Ncap').shadowRoot!.textContent).to.contain('is no density');
  });
});

describe('the assumptions of a design', () => {
  it('are accessible, show what is in force, and tell of another choice', async () => {
    const assumptions = document.createElement('hm-assumptions');
    assumptions.design = { ...designFixture(), assumptions: { narrowing: true } };
    document.body.append(assumptions);
    try {
      await assumptions.updateComplete;
      await expectAccessible(assumptions);
      expect(assumptions.shadowRoot!.querySelector('summary')!.textContent).to.contain('Fermi–Dirac; published offsets; gap narrowing');
      assumptions.shadowRoot!.querySelector('details')!.open = true;
      await expectAccessible(assumptions);
      const [narrowing, parabolic] = assumptions.shadowRoot!.querySelectorAll<HTMLInputElement>('[type=checkbox]');
      expect([narrowing.checked, parabolic.checked]).to.deep.equal([true, false]);
      const edits = heard(assumptions, 'hm-edit');
      const [statistics] = assumptions.shadowRoot!.querySelectorAll('select');
      expect(statistics.value).to.equal('fermi-dirac');
      statistics.value = 'boltzmann';
      statistics.dispatchEvent(new Event('change'));
      narrowing.click();
      expect(edits.map(({ next }) => next.assumptions)).to.deep.equal([{ narrowing: true, statistics: 'boltzmann' }, { narrowing: false }]);
    } finally {
      assumptions.remove();
    }
  });
});
