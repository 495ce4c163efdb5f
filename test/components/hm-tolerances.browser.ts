import { expect } from 'chai';
import '../../components/hm-tolerances/hm-tolerances.ts';
import type { HmTolerances } from '../../components/hm-tolerances/hm-tolerances.ts';
import type { JobSpec } from '../../src/batch/spec.ts';
import type { Design } from '../../src/design/types.ts';
import { MOBILITY_NOTE } from '../../src/result/mobility-note.ts';
import { poolReplies } from '../../src/workers/pool-replies.ts';
import { WorkerPool, type PoolSide } from '../../src/workers/pool.ts';
import { startPool } from '../../src/workers/start-pool.ts';
import { toleranced } from '../tolerance/designs.ts';
import { expectAccessible } from './accessible.ts';
import { button, heard, until } from './heard.ts';
import { settled } from './sample.ts';

let element: HmTolerances;
let asked: JobSpec[] = [];
/** Workers that answer in this very thread, one chunk at each press of `release`, or at once. */
let held: (() => void)[] | null = null;
let faulty = false;
function pool(): WorkerPool {
  return new WorkerPool(() => {
    const reply = poolReplies();
    const side: PoolSide = {
      onmessage: null, onerror: null, terminate: () => {},
      postMessage: (message) => {
        if (message.kind === 'open') asked.push(message.spec);
        const answer = faulty && message.kind === 'run' ? { kind: 'fault' as const, job: message.job, chunk: message.chunk, message: 'broken' } : reply(message);
        if (answer === null) return;
        const tell = () => side.onmessage?.({ data: answer });
        if (held === null) setTimeout(tell);
        else held.push(tell);
      },
    };
    return side;
  }, 1);
}
async function release(count: number): Promise<void> {
  for (let i = 0; i < count; i++) {
    held!.shift()!();
    await new Promise((done) => setTimeout(done));
  }
}
const design = (change: (d: Design) => void = () => {}): Design => {
  const copy = structuredClone(toleranced);
  change(copy);
  return copy;
};
const text = () => element.shadowRoot!.textContent!.replace(/\s+/g, ' ');
async function put(change: Partial<HmTolerances> = {}): Promise<void> {
  asked = [];
  held = null;
  faulty = false;
  element = Object.assign(document.createElement('hm-tolerances'), { design: design(), pool, view: { count: '40', tolerances: 'stated' }, ...change });
  document.body.append(element);
  await settled(element);
}
async function run(): Promise<void> {
  button(element, 'Draw the variations').click();
  await until('the result', () => element.shadowRoot!.querySelector('.outcome') !== null, 20_000);
  await settled(element);
}

describe('the tolerance run', () => {
  afterEach(() => element.remove());

  it('leaves the fields beside a complaint where they are, free to be clicked', async () => {
    await put({ view: { count: '', tolerances: 'stated' } });
    element.style.cssText = 'display: block; width: 1400px';
    button(element, 'Draw the variations').click();
    await settled(element);
    const [count, seed] = element.shadowRoot!.querySelectorAll('hm-field');
    expect(count.complaint).to.contain('is no number');
    await count.updateComplete;
    const boxes = [count, seed].map((field) => field.shadowRoot!.querySelector('input')!.getBoundingClientRect());
    expect(boxes[1].top).to.be.closeTo(boxes[0].top, 1);
    expect(count.shadowRoot!.querySelector('.complaint')!.getBoundingClientRect().top).to.be.at.least(boxes[1].bottom - 1);
    expect(button(element, 'Draw the variations').getBoundingClientRect().bottom).to.be.closeTo(boxes[1].bottom, 3);
  });

  it('says below the yield that mobilities are those of 300 K, where a figure away from it rests on one', async () => {
    await put({ design: design((d) => { d.conditions.temperature = '320 K'; }), view: { count: '2', tolerances: 'stated', figures: [] } });
    await run();
    expect([...element.shadowRoot!.querySelectorAll('.found > .doc')].map((p) => p.textContent)).to.deep.equal([MOBILITY_NOTE]);
  });

  it('asks for as many variations as typed, with seed and distribution, and remembers them in the view', async () => {
    await put();
    const views = heard(element, 'hm-view');
    const [count] = element.shadowRoot!.querySelectorAll('hm-field');
    const box = count.shadowRoot!.querySelector('input')!;
    box.value = '33';
    box.dispatchEvent(new KeyboardEvent('keydown', { key: 'Enter', bubbles: true }));
    const [drawn] = element.shadowRoot!.querySelectorAll('select');
    drawn.value = 'uniform';
    drawn.dispatchEvent(new Event('change'));
    await settled(element);
    expect(views.at(-1)!.change).to.deep.equal({ tolerances: { count: '33', tolerances: 'stated', distribution: 'uniform' } });
    await expectAccessible(element);
    await run();
    expect(asked[0]).to.deep.include({ kind: 'variations', request: { count: 33, seed: 1, distribution: 'uniform', tolerances: 'stated' } });
    expect(text()).to.contain('33 variations, seed 1, uniform');
  });

  it('shows yield, histograms with limits and tornados of what is required, accessibly; the same seed gives the same', async () => {
    await put();
    await run();
    expect(text()).to.contain('Yield').and.to.contain('all of them');
    const roles = (role: string) => element.shadowRoot!.querySelectorAll(`[data-role="${role}"]`).length;
    expect(roles('histogram-bar')).to.be.greaterThan(4);
    expect(roles('histogram-limit') + roles('histogram-limit-far')).to.equal(2);
    expect(roles('tornado-high')).to.be.greaterThan(0);
    await expectAccessible(element);
    const first = element.shadowRoot!.querySelector('table')!.textContent;
    element.remove();
    await put();
    await run();
    expect(element.shadowRoot!.querySelector('table')!.textContent).to.equal(first);
  });

  it('can be asked how each yield and each spread comes about', async () => {
    await put();
    await run();
    const told = heard(element, 'hm-view');
    for (const details of element.shadowRoot!.querySelectorAll('details')) details.open = true;
    await settled(element);
    const figures = [...element.shadowRoot!.querySelectorAll<HTMLButtonElement>('tbody button.how')];
    for (const figure of figures) expect(figure.getBoundingClientRect().height).to.be.at.least(24);
    figures.forEach((figure) => figure.click());
    const columns = new Set(told.map(({ change }) => (change.workings as { asked: { column: string } }).asked.column));
    expect([...columns].sort()).to.deep.equal(['high', 'low', 'mean', 'median', 'sd', 'yield', 'yieldHigh', 'yieldLow']);
    await expectAccessible(element);
  });

  it('draws the figures that are chosen, and has them all in the table and the text', async () => {
    await put({ view: { count: '40', tolerances: 'stated', shown: ['layers.n.sheet_ohm'] } });
    await run();
    expect([...element.shadowRoot!.querySelectorAll('.found > h3')].map((h) => h.textContent)).to.deep.equal(['Yield', 'n: sheet resistance']);
    const views = heard(element, 'hm-view');
    const choice = [...element.shadowRoot!.querySelectorAll('fieldset label')].find((label) => label.textContent!.startsWith('n: electrons'))!;
    choice.querySelector('input')!.click();
    expect(views[0].change.tolerances).to.deep.include({ shown: ['layers.n.sheet_ohm', 'layers.n.n_cm3'] });
    await settled(element);
    expect(element.shadowRoot!.querySelectorAll('.found > h3')).to.have.length(3);
    expect(element.shadowRoot!.querySelector('pre')!.textContent).to.contain('moved most by');
    for (const details of element.shadowRoot!.querySelectorAll('details')) details.open = true;
    await expectAccessible(element);
  });

  it('can be stopped, and what is in stays as that of a stopped run', async () => {
    await put({ view: { count: '400', tolerances: 'stated' } });
    held = [];
    button(element, 'Draw the variations').click();
    await settled(element);
    await release(6);
    await settled(element);
    expect(element.shadowRoot!.querySelector('progress')!.value).to.equal(1 + 3 * 2 + 2 * 32);
    button(element, 'Stop').click();
    await until('the end', () => element.shadowRoot!.querySelector('progress') === null);
    expect(text()).to.contain('Stopped after 64 of 400 variations');
    expect(element.shadowRoot!.querySelectorAll('[data-role="histogram-bar"]').length).to.be.greaterThan(0);
    await expectAccessible(element);
  });

  it('says at the fields what is wrong with count and seed, and above all what is wrong with the design', async () => {
    await put({ view: { count: 'many', seed: '-1' } });
    button(element, 'Draw the variations').click();
    await settled(element);
    const complaints = [...element.shadowRoot!.querySelectorAll('hm-field')].map(({ complaint }) => complaint ?? '');
    expect(complaints[0]).to.contain('a whole number from 1');
    expect(complaints[1]).to.contain('a whole number from 0');
    await expectAccessible(element);
    element.view = { tolerances: 'stated' };
    element.design = design((d) => { for (const row of d.variables!) delete row.tolerance; });
    await settled(element);
    button(element, 'Draw the variations').click();
    await settled(element);
    expect(element.shadowRoot!.querySelector('[role=alert]')!.textContent).to.contain('nothing has a tolerance');
  });

  it('counts variations without an answer by their reasons, and marks what belongs to an earlier design', async () => {
    await put();
    await run();
    // This design has an answer everywhere: gaps are put into what was found.
    const { found } = (element as unknown as { job: { found: { result: { gaps: { index: number; reason: string }[] } } } }).job;
    found.result.gaps.push({ index: 7, reason: 'the gap closes' }, { index: 3, reason: 'the gap closes' }, { index: 4, reason: 'not settled' });
    element.design = design((d) => { d.layers[0].dopants![0].concentration = '3e17 cm^-3'; });
    await settled(element);
    expect(text()).to.contain('Without an answer: 3').and.to.contain('2: the gap closes (the first is variation 7)');
    expect(text()).to.contain('For the design before the last change');
    await expectAccessible(element);
    element.design = design();
    await settled(element);
    expect(text()).not.to.contain('before the last change');
  });

  it('tells a fault of the program as one', async () => {
    await put();
    faulty = true;
    button(element, 'Draw the variations').click();
    await until('the reason', () => text().includes('The program itself failed (broken)'));
    await expectAccessible(element);
  });

  it('is usable from 360 px, and runs over the page\'s own workers', async function () {
    this.timeout(60_000);
    await put({ pool: startPool, styleName: 'dark' });
    element.style.width = '344px';
    await settled(element);
    await run();
    expect(element.scrollWidth).to.be.at.most(345);
    for (const target of element.shadowRoot!.querySelectorAll('button, select, summary, fieldset label')) if (target.getBoundingClientRect().height > 0) expect(target.getBoundingClientRect().height).to.be.at.least(24);
  });

  it('lists what it will draw, takes another tolerance and distribution of one input, and any figure', async () => {
    await put({ view: { count: '20', tolerances: 'all' } });
    const root = element.shadowRoot!;
    const field = (label: string) => root.querySelector<HTMLElement>(`hm-field[label="Tolerance of ${label}"]`)!;
    const accept = async (label: string, value: string): Promise<void> => {
      field(label).dispatchEvent(new CustomEvent('field-accept', { detail: value }));
      await settled(element);
    };
    expect(text()).to.contain('What is drawn: 6 inputs');
    expect(text()).to.contain('950 nm to 1.05 um');
    await accept('p thickness', '20 nm');
    const how = root.querySelector<HTMLSelectElement>('select[aria-label="How p thickness is drawn"]')!;
    how.value = 'uniform';
    how.dispatchEvent(new Event('change'));
    await settled(element);
    expect(text()).to.contain('1 changed for this run').and.to.contain('980 nm to 1.02 um');
    // A variable's tolerance goes into the design.
    const edits = heard(element, 'hm-edit');
    await accept('tcore', '3 nm');
    expect((edits[0] as { next: Design }).next.variables![0].tolerance).to.equal('3 nm');
    const menu = root.querySelector<HTMLSelectElement>('select.add')!;
    menu.value = 'layers.n.debye_nm';
    menu.dispatchEvent(new Event('change'));
    await settled(element);
    expect(root.querySelector('[aria-label="Figures added"]')!.textContent).to.contain('n: Debye length');
    await expectAccessible(element);
    await run();
    const { request } = asked[0] as Extract<JobSpec, { kind: 'variations' }>;
    expect(request.inputs).to.deep.equal({ 'p thickness': { tolerance: '20 nm', distribution: 'uniform' } });
    expect(request.figures).to.include('layers.n.debye_nm').and.to.include('layers.n.sheet_ohm');
    expect(text()).to.contain('n: Debye length');
  });

  it('refuses a tolerance that leaves nothing in its own row, and asks no worker', async () => {
    await put({ view: { count: '20', tolerances: 'all' } });
    const root = element.shadowRoot!;
    const complaint = (label: string) => (root.querySelector(`hm-field[label="Tolerance of ${label}"]`) as unknown as { complaint: string | null }).complaint;
    const accept = async (label: string, value: string): Promise<void> => {
      root.querySelector(`hm-field[label="Tolerance of ${label}"]`)!.dispatchEvent(new CustomEvent('field-accept', { detail: value }));
      await settled(element);
    };
    const edits = heard(element, 'hm-edit');
    await accept('tcore', '150 %');
    expect(edits).to.deep.equal([]);
    expect(complaint('tcore')).to.contain('stays below 100 %');
    await accept('p thickness', '150 %');
    expect(complaint('p thickness')).to.contain('stays below 100 %');
    expect(root.querySelector('details')!.open).to.equal(true);
    button(element, 'Draw the variations').click();
    await settled(element);
    expect(asked).to.deep.equal([]);
    expect(root.querySelector('[role="alert"]')!.textContent).to.contain('p thickness');
    button(element, 'back to 5 %').click();
    await settled(element);
    expect(complaint('p thickness')).to.equal(null);
  });
});
