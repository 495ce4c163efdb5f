import { expect } from 'chai';
import '../../components/hm-messages/hm-messages.ts';
import { placeWords, targetOf } from '../../components/hm-messages/place-words.ts';
import type { HmMessages } from '../../components/hm-messages/hm-messages.ts';
import type { Result } from '../../src/result/types.ts';
import type { Findings } from '../../src/state/session.ts';
import type { ProjectRecord } from '../../src/storage/record.ts';
import { storageFailure } from '../../src/storage/failure.ts';
import { expectAccessible } from './accessible.ts';
import { button, heard, until } from './heard.ts';

const result = { warnings: ['dilute model above its range'] } as Result;
const nothing: Findings = { status: 'complete', result: null, stale: false, complaints: [], refusal: null };
let element: HmMessages;
const text = () => element.shadowRoot!.textContent!.replace(/\s+/g, ' ');

describe('the messages of the page', () => {
  beforeEach(async () => {
    element = document.createElement('hm-messages');
    element.layers = ['cap', 'buffer'];
    document.body.append(element);
    await element.updateComplete;
  });
  afterEach(() => element.remove());

  it('say nothing when there is nothing to say', () => {
    expect(text().trim()).to.equal('');
  });

  it('name each complaint with its place and lead there', async () => {
    element.findings = { ...nothing, status: 'error', result, stale: true, complaints: [{ path: 'layers[1].thickness', message: "'200 mn' is no length; did you mean nm?" }, { path: 'conditions.temperature', message: 'too cold' }] };
    await element.updateComplete;
    expect(text()).to.contain('2 things to mend').and.to.contain("buffer, thickness: '200 mn' is no length; did you mean nm?").and.to.contain('temperature: too cold').and.to.contain('last design that was solved');
    const chosen = heard(element, 'hm-choose');
    button(element, 'Go there').click();
    expect(chosen).to.deep.equal([{ kind: 'layer', index: 1 }]);
    await expectAccessible(element);
  });

  it('give the reason of a refusal and offer to try again', async () => {
    element.findings = { ...nothing, status: 'error', refusal: 'the mesh error stayed above 0.1 mV' };
    await element.updateComplete;
    expect(text()).to.contain('No accepted answer').and.to.contain('mesh error stayed').and.not.to.contain('last design');
    const acts = heard(element, 'hm-act');
    button(element, 'Try again').click();
    expect(acts).to.deep.equal([{ act: 'again' }]);
  });

  it('show the cautions of a result', async () => {
    element.findings = { ...nothing, result };
    await element.updateComplete;
    expect(text()).to.contain('One caution with this result').and.to.contain('dilute model above its range');
  });

  it('offer both ways out when another tab saved the project, and one when it deleted it', async () => {
    const acts = heard(element, 'hm-act');
    element.saving = { kind: 'conflict', other: {} as ProjectRecord };
    await element.updateComplete;
    button(element, 'Keep mine as a copy').click();
    button(element, 'Take the other').click();
    expect(acts.map(({ act }) => act)).to.deep.equal(['keep-mine', 'take-other']);
    await expectAccessible(element);
    element.saving = { kind: 'conflict', other: null };
    await element.updateComplete;
    expect(() => button(element, 'Take the other')).to.throw();
    expect(text()).to.contain('deleted in another tab');
  });

  it('say what becomes of the work when it cannot be saved', async () => {
    element.saving = { kind: 'failed', failure: storageFailure(new DOMException('x', 'QuotaExceededError')) };
    await element.updateComplete;
    expect(text()).to.contain('Not saved').and.to.contain('save it as a file');
  });

  it('offer to stop a solve only when it takes long', async () => {
    element.findings = { ...nothing, status: 'pending' };
    await element.updateComplete;
    expect(element.shadowRoot!.querySelector('progress')).to.equal(null);
    await until('a bar of progress', () => element.shadowRoot!.querySelector('progress') !== null);
    const acts = heard(element, 'hm-act');
    button(element, 'Stop').click();
    expect(acts).to.deep.equal([{ act: 'cancel' }]);
    await expectAccessible(element);
    element.findings = nothing;
    await element.updateComplete;
    await element.updateComplete;
    expect(element.shadowRoot!.querySelector('progress')).to.equal(null);
  });

  it('put remarks into a region that is spoken, and show a text of a stranger as text', async () => {
    element.remark = { text: '<img src=x onerror=alert(1)> opened' };
    await element.updateComplete;
    expect(element.shadowRoot!.querySelector('.polite')!.textContent).to.equal('<img src=x onerror=alert(1)> opened');
    element.remark = { text: 'no', urgent: true };
    await element.updateComplete;
    expect(element.shadowRoot!.querySelector('[role=alert]')!.textContent).to.equal('no');
  });
});

describe('the place of a complaint', () => {
  it('is said in the words of the page, or as it is', () => {
    expect(placeWords('layers[0].dopants[1].concentration', ['cap'])).to.equal('cap, dopant 2, concentration:');
    expect(placeWords('layers[4].thickness', ['cap'])).to.equal('layer 5, thickness:');
    expect(placeWords('top.metal', [])).to.equal('top contact, metal:');
    expect(placeWords('custom.materials[0].gap', [])).to.equal('custom.materials[0].gap:');
    expect(placeWords('', [])).to.equal('');
  });

  it('leads to a layer or a contact that is there', () => {
    expect(targetOf('layers[0].x', ['cap'])).to.deep.equal({ kind: 'layer', index: 0 });
    expect(targetOf('layers[1].x', ['cap'])).to.equal(null);
    expect(targetOf('bottom.level', [])).to.deep.equal({ kind: 'contact', index: 1 });
    expect(targetOf('topping', [])).to.equal(null);
    expect(targetOf('variables[0].value', [])).to.equal(null);
  });
});
