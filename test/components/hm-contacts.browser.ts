import { sendKeys, setViewport } from '@web/test-runner-commands';
import { expect } from 'chai';
import '../../components/hm-contacts/hm-contacts.ts';
import type { HmContacts } from '../../components/hm-contacts/hm-contacts.ts';
import type { HmMetals } from '../../components/hm-metals/hm-metals.ts';
import { closeUps } from '../../src/contacts/close-up.ts';
import { rankMetals, type MetalRow, type RankAnswer } from '../../src/contacts/rank-metals.ts';
import type { Design } from '../../src/design/types.ts';
import type { JobOutcome, RunJob } from '../../src/workers/job-client.ts';
import type { JobInput, JobKind, JobProgress } from '../../src/workers/job-messages.ts';
import { expectAccessible } from './accessible.ts';
import { button, heard, until } from './heard.ts';
import { mounted, sample, settled, solved } from './sample.ts';

const { design, result } = sample('pn-diode');
const metals: MetalRow[] = [];

/** The real engine on a few metals: what is tested here is the page. */
function ranked({ design: asked, options }: JobInput<'metals'>): RankAnswer {
  if (options.rerun !== undefined) return last(rankMetals(asked, options));
  if (metals.length === 0) for (const metal of ['Al', 'PtSi', 'Er', 'NiGe']) {
    const answer = last(rankMetals(asked, { ...options, rerun: { metal, key: '' } }));
    if (answer.kind === 'ranked') metals.push(...answer.rows);
  }
  const answer = last(rankMetals(asked, { ...options, rerun: { metal: 'Al', key: '' } }));
  return answer.kind === 'ranked' ? { ...answer, rows: [...metals].sort((a, b) => (a.worst_ohm_cm2 ?? Infinity) - (b.worst_ohm_cm2 ?? Infinity)) } : answer;
}
function last(steps: Generator<unknown, RankAnswer>): RankAnswer {
  for (;;) {
    const step = steps.next();
    if (step.done) return step.value;
  }
}

interface Asked {
  kind: JobKind;
  input: JobInput<JobKind>;
  told(progress: JobProgress): void;
  end(outcome: JobOutcome<never>): void;
  cancelled: boolean;
}
let asked: Asked[] = [];
const run = ((kind: JobKind, input: JobInput<JobKind>, told: (progress: JobProgress) => void) => {
  let end!: (outcome: JobOutcome<never>) => void;
  const outcome = new Promise<JobOutcome<never>>((resolve) => (end = resolve));
  const job: Asked = { kind, input, told, end, cancelled: false };
  asked.push(job);
  return { outcome, cancel: () => { job.cancelled = true; end({ kind: 'dropped' }); } };
}) as unknown as RunJob;
const answer = (job: Asked): void => {
  const value = job.kind === 'closeUp' ? closeUps((job.input as JobInput<'closeUp'>).design, (job.input as JobInput<'closeUp'>).options) : ranked(job.input as JobInput<'metals'>);
  job.end({ kind: 'done', value } as unknown as JobOutcome<never>);
};
const jobs = (kind: JobKind): Asked[] => asked.filter((job) => job.kind === kind);

let element: HmContacts;
const shown = (): string => element.shadowRoot!.textContent!.replace(/\s+/g, ' ');
const list = (): HmMetals => element.shadowRoot!.querySelector('hm-metals')!;
const words = (): string => list().shadowRoot!.textContent!.replace(/\s+/g, ' ');
const names = (): string[] => [...list().shadowRoot!.querySelectorAll('tbody th[scope="row"]')].map((th) => th.firstChild!.nextSibling!.textContent!.trim());

async function put(change: Partial<HmContacts> = {}): Promise<void> {
  asked = [];
  element = await mounted<HmContacts>('hm-contacts', { design, result, run, ...change });
}
async function seen(change: Partial<HmContacts> = {}): Promise<void> {
  await put(change);
  await until('the close-up is asked for', () => jobs('closeUp').length > 0);
  answer(jobs('closeUp')[0]);
  await until('the close-up', () => element.shadowRoot!.querySelector('.picture, .state') !== null && !shown().includes('Looking at'));
  await settled(element);
}
async function withMetals(): Promise<void> {
  await seen();
  button(list(), 'Rank the metals').click();
  await until('the ranking is asked for', () => jobs('metals').length > 0);
  answer(jobs('metals')[0]);
  await until('the rows', () => names().length === 4);
}

describe('hm-contacts', () => {
  before(() => setViewport({ width: 1200, height: 1000 }));

  it('draws each metal contact from near, with its figures in words', async () => {
    await seen();
    const picture = element.shadowRoot!.querySelector('.picture')!;
    expect(picture.getAttribute('aria-label')).to.include('Barrier of electrons');
    expect(picture.querySelectorAll('[data-role="closeup-product"]').length).to.equal(1);
    const figures = new Map([...element.shadowRoot!.querySelectorAll('dt')].map((dt) => [dt.textContent, dt.nextElementSibling!.textContent!]));
    expect(figures.get('Transport')).to.match(/^thermionic-field emission E00\/kT 2\.\d$/);
    expect(figures.get('E00')).to.match(/^[\d.]+ meV$/);
    expect(figures.get('Contact resistivity')).to.match(/^8\.\d+e−6 Ω cm² WKB; quadrature good to better than 0\.001 %$/);
  });

  it('asks of each figure how it comes about; one stop of Tab, the arrows from there', async () => {
    await seen();
    const told = heard(element, 'hm-view');
    const figures = [...element.shadowRoot!.querySelectorAll<HTMLButtonElement>('dl button.how')];
    expect(figures.length).to.equal(element.shadowRoot!.querySelectorAll('dt').length);
    expect(figures.map(({ tabIndex }) => tabIndex).filter((stop) => stop === 0)).to.have.length(1);
    for (const figure of figures) expect(Math.min(figure.getBoundingClientRect().height, figure.getBoundingClientRect().width)).to.be.at.least(24);
    figures[0].focus();
    await sendKeys({ press: 'ArrowDown' });
    expect(element.shadowRoot!.activeElement).to.equal(figures[1]);
    expect([figures[0].tabIndex, figures[1].tabIndex]).to.deep.equal([-1, 0]);
    await sendKeys({ press: 'Enter' });
    expect(told.at(-1)!.change.workings).to.deep.include({ text: figures[1].textContent, value: closeUps(design).kind === 'seen' ? (closeUps(design) as Extract<ReturnType<typeof closeUps>, { kind: 'seen' }>).contacts[0].barrier_p_eV : null });
  });

  it('has resistivity, worst case and the choice of a metal in view first where the panel is narrow', async () => {
    await setViewport({ width: 390, height: 844 });
    try {
      await withMetals();
      await until('the narrow order', () => list().shadowRoot!.querySelectorAll('thead th')[1]?.textContent!.includes('resistivity'));
      const frame = list().shadowRoot!.querySelector('.scroll')!.getBoundingClientRect();
      const heads = [...list().shadowRoot!.querySelectorAll<HTMLElement>('thead th')];
      expect(heads[1].textContent).to.contain('Contact resistivity');
      expect(heads[2].textContent).to.contain('Worst');
      expect(heads[2].getBoundingClientRect().right).to.be.at.most(frame.right + 0.5);
      const row = list().shadowRoot!.querySelector('tbody tr')!;
      expect(row.querySelector('td')!.textContent).to.match(/e−?\d/);
      const choice = [...row.querySelectorAll('button')].find((candidate) => candidate.textContent!.startsWith('Choose'))!;
      expect(choice.getBoundingClientRect().right).to.be.at.most(frame.right + 0.5);
      // On one line.
      expect(choice.getBoundingClientRect().height).to.be.within(24, 36);
      // It stays there while the rest is scrolled to.
      list().shadowRoot!.querySelector('.scroll')!.scrollLeft = 1e4;
      expect(choice.getBoundingClientRect().left).to.be.within(frame.left, frame.right - 24);
      expect(list().shadowRoot!.textContent).to.contain('the table scrolls sideways');
      await expectAccessible(list());
    } finally {
      await setViewport({ width: 1200, height: 1000 });
    }
    await until('the wide order', () => list().shadowRoot!.querySelectorAll('thead th')[1].textContent!.includes('φB'));
    expect(list().shadowRoot!.textContent).to.not.contain('scrolls sideways');
  });

  it('asks the same of the ranked metals, row by row', async () => {
    await withMetals();
    const told = heard(element, 'hm-view');
    const rows = [...list().shadowRoot!.querySelectorAll<HTMLElement>('tbody tr')].map((row) => [...row.querySelectorAll<HTMLButtonElement>('button.how')]);
    expect(rows[0].length).to.equal(6);
    rows[0][0].focus();
    await sendKeys({ press: 'ArrowDown' });
    expect(list().shadowRoot!.activeElement).to.equal(rows[1][0]);
    await sendKeys({ press: 'End' });
    expect(list().shadowRoot!.activeElement).to.equal(rows[1].at(-1));
    await sendKeys({ press: 'Space' });
    const { asked: question } = told.at(-1)!.change.workings as { asked: { table: string; column: string } };
    expect([question.table, question.column]).to.deep.equal(['metal', 'e00OverKt']);
  });

  it('says so where neither end has a metal', async () => {
    const { design: bare, result: figures } = sample('cryogenic');
    await seen({ design: bare, result: figures });
    expect(shown()).to.include('Neither end has a metal');
  });

  it('draws two contacts, each with marks of its own', async () => {
    const both: Design = { ...design, bottom: { kind: 'barrier', metal: 'Ti', carrier: 'n' } };
    await seen({ design: both, result: solved(both) });
    const pictures = [...element.shadowRoot!.querySelectorAll('.picture')];
    expect(pictures.length).to.equal(2);
    const ids = pictures.flatMap((picture) => [...picture.querySelectorAll('[id]')].map(({ id }) => id));
    expect(new Set(ids).size).to.equal(ids.length);
  });

  it('marks what belongs to an earlier design and looks again once the figures are in', async () => {
    await seen();
    const next = { ...design, layers: design.layers.map((layer, i) => (i === 0 ? { ...layer, thickness: '123 nm' } : layer)) };
    Object.assign(element, { design: next, stale: true });
    await settled(element);
    expect(shown()).to.include('Of the design before the last change.');
    expect(jobs('closeUp').length).to.equal(1);
    Object.assign(element, { result: solved(next), stale: false });
    await until('the next look', () => jobs('closeUp').length === 2);
    expect((jobs('closeUp')[1].input as JobInput<'closeUp'>).design).to.equal(next);
    answer(jobs('closeUp')[1]);
    await until('the mark is gone', () => !shown().includes('before the last change'));
  });

  it('works the three transmissions out when asked, not before', async () => {
    await seen();
    expect(jobs('closeUp').length).to.equal(1);
    button(element, 'Compare WKB').click();
    await settled(element);
    const job = jobs('closeUp')[1];
    expect((job.input as JobInput<'closeUp'>).options).to.deep.equal({ compare: true });
    answer(job);
    await until('the comparison', () => element.shadowRoot!.querySelector('table[aria-label="Transmissions compared"]') !== null);
    const cells = [...element.shadowRoot!.querySelectorAll('table[aria-label="Transmissions compared"] td')].map((td) => td.textContent!);
    expect(cells.length).to.equal(3);
    expect(cells[0]).to.not.equal(cells[2]);
  });

  it('tells of metals as they come, and can be stopped with what is there', async () => {
    await seen();
    button(list(), 'Rank the metals').click();
    await until('the ranking is asked for', () => jobs('metals').length > 0);
    const job = jobs('metals')[0];
    ranked(job.input as JobInput<'metals'>);
    job.told({ done: 3, of: 60, seen: metals.slice(0, 2) } as unknown as JobProgress);
    await until('rows', () => names().length === 2);
    expect(words()).to.include('2 of 59 metals');
    button(list(), 'Stop').click();
    await until('it says so', () => words().includes('Stopped.'));
    expect(job.cancelled).to.equal(true);
    expect(names().length).to.equal(2);
  });

  it('ranks by the worst case, those without a figure last with the reason', async () => {
    await withMetals();
    expect(names()).to.deep.equal(['PtSi', 'Al', 'Er', 'NiGe']);
    expect(words()).to.include('no work function and no measured barrier on Si');
    expect(words()).to.include('on the stack');
  });

  it('sorts by a heading and says so', async () => {
    await withMetals();
    const views = heard(list(), 'hm-view');
    button(list(), 'φBp').click();
    await settled(list());
    button(list(), 'φBp').click();
    await settled(list());
    expect(names().slice(0, 3)).to.deep.equal(['Er', 'Al', 'PtSi']);
    expect(list().shadowRoot!.querySelectorAll('[aria-sort="descending"]').length).to.equal(1);
    expect(views.at(-1)!.change.metals).to.deep.include({ order: { by: 'barrier', descending: true } });
  });

  it('shows all values of a barrier and runs with another', async () => {
    await withMetals();
    button(list(), '4 values of Al').click();
    await settled(list());
    const values = [...list().shadowRoot!.querySelectorAll('.rivals li')].map((li) => li.textContent!.replace(/\s+/g, ' '));
    expect(values.length).to.equal(4);
    expect(values.filter((text) => text.includes('in use')).length).to.equal(1);
    expect(values.join()).to.include('ideal, S = 1').and.include('pinned, S = ').and.include('measured for electrons').and.include('measured for holes');
    const before = words();
    list().shadowRoot!.querySelectorAll<HTMLButtonElement>('.rivals button:not(.how)')[2].click();
    await until('it is run again', () => jobs('metals').length === 2);
    expect((jobs('metals')[1].input as JobInput<'metals'>).options.rerun!.metal).to.equal('Al');
    answer(jobs('metals')[1]);
    await until('other figures', () => words() !== before && list().shadowRoot!.querySelectorAll('.rivals button:disabled').length === 0);
    const edits = heard(element, 'hm-edit');
    button(list(), 'Choose Al').click();
    expect(edits[0].next.top).to.deep.include({ kind: 'barrier', metal: 'Al', pinning: 'none' });
  });

  it('puts a metal on the stack, keeping what the contact states', async () => {
    await withMetals();
    const edits = heard(element, 'hm-edit');
    button(list(), 'Choose PtSi').click();
    expect(edits).to.have.length(1);
    expect(edits[0].next.top).to.deep.equal({ ...design.top, metal: 'PtSi' });
    expect(edits[0].label).to.equal('PtSi as the top contact');
    element.design = edits[0].next;
    await settled(element);
    expect(words(), 'another metal leaves the ranking as it is').to.not.include('before the last change');
    element.design = { ...design, layers: design.layers.slice(1) };
    await settled(element);
    expect(words()).to.include('Ranked for the design before the last change');
    expect(button(list(), 'Choose PtSi').disabled).to.equal(true);
  });

  it('can be done from the keyboard', async () => {
    await withMetals();
    const edits = heard(element, 'hm-edit');
    button(list(), 'Choose PtSi').focus();
    await sendKeys({ press: 'Enter' });
    expect(edits).to.have.length(1);
    button(list(), '4 values of PtSi').focus();
    await sendKeys({ press: 'Space' });
    await settled(list());
    expect(list().shadowRoot!.querySelector('.rivals')).to.not.equal(null);
  });

  it('stays within a narrow page', async () => {
    await setViewport({ width: 360, height: 800 });
    await withMetals();
    expect(document.documentElement.scrollWidth).to.be.at.most(360);
    await setViewport({ width: 1200, height: 1000 });
  });

  it('passes the accessibility rules', async () => {
    await withMetals();
    button(list(), '4 values of Al').click();
    button(element, 'Compare WKB').click();
    await settled(element);
    answer(jobs('closeUp')[1]);
    await until('the comparison', () => element.shadowRoot!.querySelector('table[aria-label="Transmissions compared"]') !== null);
    for (const details of element.shadowRoot!.querySelectorAll('details')) details.open = true;
    await settled(element);
    await expectAccessible(element);
  });
});
