import { expect } from 'chai';
import { html } from 'lit';
import '../../components/hm-desk/hm-desk.ts';
import { JobController } from '../../components/hm-desk/job-controller.ts';
import { DESK_PANELS, type DeskPanel } from '../../components/hm-desk/desk-panels.ts';
import type { HmDesk } from '../../components/hm-desk/hm-desk.ts';
import { tell } from '../../components/shared/events.ts';
import type { RequirementResult } from '../../src/result/types.ts';
import type { JobOutcome, RunJob } from '../../src/workers/job-client.ts';
import { designFixture } from '../state/design-fixture.ts';
import { expectAccessible } from './accessible.ts';
import { heard, until } from './heard.ts';

const idle: RunJob = () => ({ outcome: new Promise(() => {}), cancel: () => {} });
/** Ledger, requirements and sizing: further panels have tests of their own. */
const PANELS = DESK_PANELS.filter(({ id }) => ['ledger', 'requirements', 'sizing'].includes(id));
let element: HmDesk;
const tabs = () => [...element.shadowRoot!.querySelectorAll<HTMLButtonElement>('[role=tab]')];
const shown = () => [...element.shadowRoot!.querySelectorAll<HTMLElement>('[role=tabpanel]')].filter((panel) => !panel.hidden).map(({ id }) => id);
const press = (on: HTMLElement, key: string) => on.dispatchEvent(new KeyboardEvent('keydown', { key, bubbles: true, cancelable: true }));

async function put(change: Partial<HmDesk> = {}): Promise<void> {
  element = Object.assign(document.createElement('hm-desk'), { design: designFixture(), run: idle, panels: PANELS, ...change });
  document.body.append(element);
  await element.updateComplete;
}

describe('the desk', () => {
  afterEach(() => element.remove());

  it('opens the ledger first, and is accessible on every tab', async () => {
    await put();
    expect(tabs().map((tab) => tab.textContent!.trim())).to.deep.equal(['Ledger', 'Requirements', 'Sizing']);
    for (const [i, name] of ['hm-ledger', 'hm-requirements', 'hm-sizing'].entries()) {
      tabs()[i].click();
      // The first time the test server has many files to give.
      await until(name, () => element.shadowRoot!.querySelector(name) !== null, 8000);
      expect(shown()).to.deep.equal([`panel-${['ledger', 'requirements', 'sizing'][i]}`]);
      expect(tabs().map((tab) => tab.getAttribute('aria-selected'))).to.deep.equal([0, 1, 2].map((k) => String(k === i)));
      await expectAccessible(element, ['hm-ledger', 'hm-requirements', 'hm-sizing']);
    }
    for (const tab of tabs()) expect(tab.getBoundingClientRect().height).to.be.at.least(24);
  }).timeout(30_000);

  it('fetches a panel when its tab is first opened, and keeps it', async () => {
    let fetched = 0;
    const panel = (id: string): DeskPanel => ({ id, title: id, load: async () => void fetched++, draw: () => html`<input aria-label=${id} />` });
    await put({ panels: [panel('one'), panel('two')] });
    await until('the first', () => fetched === 1);
    tabs()[1].click();
    await until('the second', () => element.shadowRoot!.querySelector('#panel-two input') !== null);
    element.shadowRoot!.querySelector<HTMLInputElement>('#panel-two input')!.value = 'typed';
    tabs()[0].click();
    await element.updateComplete;
    tabs()[1].click();
    await element.updateComplete;
    expect(element.shadowRoot!.querySelector<HTMLInputElement>('#panel-two input')!.value).to.equal('typed');
    expect(fetched).to.equal(2);
  });

  it('is walked by arrows, Home and End, with one tab in the order of the keyboard', async () => {
    await put();
    tabs()[0].focus();
    for (const [key, at] of [['ArrowRight', 1], ['ArrowRight', 2], ['ArrowRight', 0], ['ArrowLeft', 2], ['Home', 0], ['End', 2]] as const) {
      press(element.shadowRoot!.activeElement as HTMLElement, key);
      await until(`${key} to ${at}`, () => element.shadowRoot!.activeElement === tabs()[at]);
      expect(tabs().map((tab) => tab.tabIndex)).to.deep.equal([0, 1, 2].map((k) => (k === at ? 0 : -1)));
    }
  });

  it('tells the project which tab is open, and opens what the project remembers', async () => {
    await put({ view: { desk: { open: 'requirements' } } });
    expect(shown()).to.deep.equal(['panel-requirements']);
    const views = heard(element, 'hm-view');
    tabs()[2].click();
    expect(views).to.deep.equal([{ change: { desk: { open: 'sizing' } } }]);
    element.remove();
    await put({ view: { desk: { open: 'of another version' } } });
    expect(shown()).to.deep.equal(['panel-ledger']);
  });

  it('says beside the tab how many requirements are not met, in words and with a sign', async () => {
    const row = (met: boolean): RequirementResult => ({ quantity: 'barrierN', of: 'top', bound: 'max', unit: 'eV', limit: 1, over: 'temperature', worst: 1, at: null, met, judged: true, margin: 0, margin_kind: 'difference', margin_unit: 'eV', corners_sufficed: true, unanswered: null, blocks: false });
    await put({ verdicts: { status: 'complete', rows: [row(true), row(false)], stale: false, progress: null, reason: null } });
    expect(tabs()[1].textContent!.replace(/\s+/g, ' ').trim()).to.equal('Requirements 1 not met');
    expect(getComputedStyle(tabs()[1].querySelector('.remark')!, '::before').content).to.contain('▲');
    element.verdicts = { ...element.verdicts, stale: true };
    await element.updateComplete;
    expect(tabs()[1].textContent!.trim()).to.equal('Requirements');
    await expectAccessible(element, ['hm-ledger']);
  });

  it('goes to the sizing with the requirement that is asked about, and takes the focus there', async () => {
    await put({ view: { desk: { open: 'requirements' } } });
    await until('the requirements', () => element.shadowRoot!.querySelector('hm-requirements') !== null);
    tell(element.shadowRoot!.querySelector('hm-requirements')!, 'hm-size', { requirement: 1 });
    await until('the sizing', () => element.shadowRoot!.querySelector('hm-sizing')?.wish?.requirement === 1);
    expect(shown()).to.deep.equal(['panel-sizing']);
    expect(element.shadowRoot!.activeElement).to.equal(tabs()[2]);
    // Another requirement in its place is not the one that was asked about.
    element.design = { ...designFixture(), requirements: [...designFixture().requirements!].reverse() };
    await until('no wish', () => element.shadowRoot!.querySelector('hm-sizing')!.wish === null);
  });

  it('says when a panel cannot be fetched, and tries again', async () => {
    let fails = true;
    const panel: DeskPanel = { id: 'one', title: 'one', load: async () => { if (fails) throw new Error('gone'); }, draw: () => html`<p>there</p>` };
    await put({ panels: [panel] });
    await until('the alert', () => element.shadowRoot!.querySelector('[role=alert]') !== null);
    await expectAccessible(element);
    fails = false;
    element.shadowRoot!.querySelector<HTMLButtonElement>('[role=alert] button')!.click();
    await until('the panel', () => element.shadowRoot!.textContent!.includes('there'));
  });
});

describe('a job of a panel', () => {
  const design = designFixture();
  const host = { addController: () => {}, removeController: () => {}, requestUpdate: () => {}, updateComplete: Promise.resolve(true) };
  /** Jobs that end when the test says so. */
  function rig() {
    const jobs: { end(outcome: JobOutcome<never>): void; told(done: number): void; cancelled: boolean }[] = [];
    const run = ((_: string, __: unknown, told: (progress: unknown) => void) => {
      let settle!: (outcome: JobOutcome<never>) => void;
      const outcome = new Promise<JobOutcome<never>>((resolve) => (settle = resolve));
      const job = { end: settle, told: (done: number) => told({ done, of: 9, seen: [] }), cancelled: false };
      jobs.push(job);
      return { outcome, cancel: () => { job.cancelled = true; settle({ kind: 'dropped' }); } };
    }) as unknown as RunJob;
    return { jobs, run, job: new JobController(host, 'judge') };
  }
  const judged = (evaluations: number) => ({ kind: 'done', value: { kind: 'judged', requirements: [], evaluations } }) as unknown as JobOutcome<never>;

  it('goes through its states, with progress and the value at the end', async () => {
    const { jobs, run, job } = rig();
    expect(job.status).to.equal('initial');
    const done = job.start(run, { design });
    expect(job.status).to.equal('pending');
    jobs[0].told(4);
    expect(job.progress).to.deep.equal({ done: 4, of: 9 });
    jobs[0].end(judged(9));
    await done;
    expect([job.status, job.progress, job.value!.input]).to.deep.equal(['complete', null, { design }]);
  });

  it('drops what comes late from the one before, and keeps the last value when stopped', async () => {
    const { jobs, run, job } = rig();
    const first = job.start(run, { design });
    const second = job.start(run, { design });
    expect(jobs[0].cancelled).to.equal(true);
    jobs[0].told(8);
    expect(job.progress).to.deep.equal({ done: 0, of: 1 });
    jobs[1].end(judged(2));
    await Promise.all([first, second]);
    const kept = job.value;
    const third = job.start(run, { design });
    job.stop();
    await third;
    expect([job.status, job.reason, job.value]).to.deep.equal(['error', 'Stopped.', kept]);
  });

  it('says that the program failed where it did', async () => {
    const { jobs, run, job } = rig();
    const done = job.start(run, { design });
    jobs[0].end({ kind: 'fault', message: 'bad' });
    await done;
    expect([job.status, job.reason]).to.deep.equal(['error', 'The program itself failed (bad).']);
  });
});
