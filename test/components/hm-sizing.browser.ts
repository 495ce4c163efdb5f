import { expect } from 'chai';
import '../../components/hm-sizing/hm-sizing.ts';
import type { HmSizing } from '../../components/hm-sizing/hm-sizing.ts';
import { judge, type Judgement } from '../../src/requirements/judge.ts';
import { size, sizeSteps, type LookedAt, type SearchedRange } from '../../src/requirements/size.ts';
import type { Design } from '../../src/design/types.ts';
import type { JobOutcome, RunJob } from '../../src/workers/job-client.ts';
import type { JobInput, JobProgress } from '../../src/workers/job-messages.ts';
import { contactDesign } from '../requirements/designs.ts';
import { expectAccessible } from './accessible.ts';
import { button, heard, until } from './heard.ts';
import { settled } from './sample.ts';

/** A window: the sheet resistance asks for a thick cap, the depleted share of the base for nothing. */
const design = (change: (d: Design) => void = () => {}): Design =>
  contactDesign((d) => {
    d.requirements = [
      { quantity: 'sheetResistance', of: 'cap', max: '250 ohm' },
      { quantity: 'carrierDensity', of: 'cap', min: '1e19 cm^-3' },
    ];
    change(d);
  });
/** Fewer values and no samples: what is tested here is the page. */
const quick = (input: JobInput<'size'>) => size(input.design, { ...input.options, tolerances: 'none', samples: 0, points: 9 });

let element: HmSizing;
let asked: JobInput<'size'>[] = [];
let tellProgress: (progress: JobProgress<'size'>) => void;
let end: (outcome: JobOutcome<never>) => void;
let cancelled = 0;
/** Designs that were to be judged with all tolerances. */
let judged: Design[] = [];
let tellVerdict: (outcome: JobOutcome<Judgement>) => void;
const run = ((kind: 'size' | 'judge', input: JobInput<'size'>, told: (progress: JobProgress<'size'>) => void) => {
  if (kind === 'judge') {
    judged.push(input.design);
    return { outcome: new Promise<JobOutcome<Judgement>>((resolve) => (tellVerdict = resolve)), cancel: () => tellVerdict({ kind: 'dropped' }) };
  }
  asked.push(input);
  tellProgress = told;
  let settle!: (outcome: JobOutcome<never>) => void;
  const outcome = new Promise<JobOutcome<never>>((resolve) => (settle = resolve));
  end = settle;
  return { outcome, cancel: () => { cancelled++; settle({ kind: 'dropped' }); } };
}) as unknown as RunJob;

const text = () => element.shadowRoot!.textContent!.replace(/\s+/g, ' ');
const menu = () => element.shadowRoot!.querySelector('select')!;
function choose(key: string): void {
  menu().value = key;
  menu().dispatchEvent(new Event('change'));
}
const field = (label: string) => [...element.shadowRoot!.querySelectorAll('hm-field')].find((candidate) => candidate.label === label)!;
function type(label: string, value: string): void {
  const box = field(label).shadowRoot!.querySelector('input')!;
  box.value = value;
  box.dispatchEvent(new KeyboardEvent('keydown', { key: 'Enter', bubbles: true }));
}
async function answered(): Promise<void> {
  end({ kind: 'done', value: quick(asked.at(-1)!) } as unknown as JobOutcome<never>);
  await until('the answer', () => element.shadowRoot!.querySelector('.outcome') !== null);
  await settled(element);
}

async function put(change: Partial<HmSizing> = {}): Promise<void> {
  asked = [];
  judged = [];
  cancelled = 0;
  element = Object.assign(document.createElement('hm-sizing'), { design: design(), run, ...change });
  document.body.append(element);
  await settled(element);
}

describe('sizing', () => {
  afterEach(() => element.remove());

  it('begins with a variable that has a range, its range, and says what it takes; all of it accessible', async () => {
    await put();
    expect(menu().value).to.equal('v Ncap');
    expect([field('from').value, field('to').value]).to.deep.equal(['1e18 cm^-3', '5e20 cm^-3']);
    expect(text()).to.contain('worst case');
    await expectAccessible(element);
  });

  it('asks for a requirement where there is none, and for something to size where nothing is', async () => {
    await put({ design: design((d) => { d.requirements = []; }) });
    expect(text()).to.contain('give it a requirement first');
    await expectAccessible(element);
  });

  it('shows what has been looked at while it runs, with progress and a way to stop', async () => {
    await put({ view: { variable: 'tcap' } });
    button(element, 'Find the values').click();
    expect(asked[0].options).to.deep.equal({ variable: 'tcap', from: '20 nm', to: '200 nm' });
    const seen: (LookedAt | SearchedRange)[] = [];
    for (const step of sizeSteps(asked[0].design, { ...asked[0].options, tolerances: 'none', samples: 0, points: 9 })) if (step.seen) seen.push(step.seen);
    tellProgress({ done: 7, of: 40, seen: seen.slice(0, 6) });
    await element.updateComplete;
    expect(element.shadowRoot!.querySelector('progress')!.value).to.equal(7);
    expect(element.shadowRoot!.querySelectorAll('[data-role="margin-curve"]')).to.have.length(2);
    expect(element.shadowRoot!.querySelectorAll('[data-role="margin-interval"]')).to.have.length(0);
    await expectAccessible(element);
    button(element, 'Stop').click();
    await until('the end', () => text().includes('Stopped.'));
    expect(cancelled).to.equal(1);
  });

  it('says the interval, what ends it, and draws it', async () => {
    await put({ view: { variable: 'tcap' } });
    button(element, 'Find the values').click();
    await answered();
    expect(text()).to.match(/Everything is met with tcap from [\d.]+ nm to 200 nm/);
    expect(text()).to.match(/Below [\d.]+ nm it fails on requirement 1/).and.to.contain('200 nm is the end of the range searched');
    const [interval] = element.shadowRoot!.querySelectorAll<SVGRectElement>('[data-role="margin-interval"]');
    expect(interval.width.baseVal.value).to.be.greaterThan(50);
    expect(element.shadowRoot!.querySelectorAll('ol li')).to.have.length(2);
    element.shadowRoot!.querySelector('details')!.open = true;
    await expectAccessible(element);
  });

  it('can be asked how each end, the best value and its margins come about', async () => {
    await put({ view: { variable: 'tcap' } });
    button(element, 'Find the values').click();
    await answered();
    const views = heard(element, 'hm-view');
    const figures = [...element.shadowRoot!.querySelectorAll<HTMLButtonElement>('button.how')];
    for (const figure of figures) expect(figure.getBoundingClientRect().height, figure.textContent!).to.be.at.least(24);
    figures.forEach((figure) => figure.click());
    const asked = views.map(({ change }) => (change.workings as { asked: { table: string; column: string } }).asked).map(({ table, column }) => `${table} ${column}`);
    expect(asked.slice(0, 3)).to.deep.equal(['sizing from', 'sizing to', 'sizing best']);
    expect(asked.filter((words) => words === 'requirement margin')).to.have.length(2);
    expect(asked.filter((words) => words === 'requirement limit')).to.have.length(2);
  });

  it('lets the person choose which tolerances count, and asks anew for what was found with others', async () => {
    await put({ view: { variable: 'tcap' } });
    const views = heard(element, 'hm-view');
    const [, , within] = element.shadowRoot!.querySelectorAll('select');
    within.value = 'stated';
    within.dispatchEvent(new Event('change'));
    await settled(element);
    expect(views.at(-1)!.change).to.deep.equal({ sizing: { variable: 'tcap', tolerances: 'stated' } });
    button(element, 'Find the values').click();
    expect(asked.at(-1)!.options.tolerances).to.equal('stated');
    await answered();
    expect(text()).to.not.contain('before the last change');
    within.value = '';
    within.dispatchEvent(new Event('change'));
    await settled(element);
    expect(text()).to.contain('Found within other tolerances: find the values again');
  });

  it('judges a value that was sized within fewer tolerances with all of them, and says where it is not met', async () => {
    await put({ design: design((d) => { d.requirements = [{ quantity: 'sheetResistance', of: 'cap', max: '250 ohm' }, { quantity: 'carrierDensity', of: 'cap', min: '4.9e19 cm^-3' }]; }), view: { variable: 'tcap', tolerances: 'none' } });
    button(element, 'Find the values').click();
    await answered();
    expect(text()).to.contain('Everything is met').and.to.contain('Being judged with all tolerances');
    expect(judged).to.have.length(1);
    expect(judged[0].variables![1].value).to.equal(button(element, 'tcap =').textContent!.replace('tcap = ', ''));
    // Ncap is known to 10 %: at its lower end there are fewer carriers than are asked for.
    tellVerdict({ kind: 'done', value: judge(judged[0], { samples: 0 }) });
    await until('the verdict', () => element.shadowRoot!.querySelector('[role="status"] .not-met') !== null);
    expect(text()).to.match(/Judged with all tolerances, as under Requirements: not met at [\d.]+ nm\..*carrier density of cap at least 4\.9e19 cm\^-3: missed by a factor [\d.]+ at .*Ncap -10 %/);
    await expectAccessible(element);
  });

  it('judges nothing more where all tolerances counted', async () => {
    await put({ view: { variable: 'tcap' } });
    button(element, 'Find the values').click();
    await answered();
    expect(judged).to.have.length(0);
    expect(text()).to.not.contain('all tolerances:').and.to.not.contain('Being judged');
  });

  it('says next to the best value what is to be cautioned of there', async () => {
    await put({ design: design((d) => { d.requirements = [{ quantity: 'sheetResistance', of: 'cap', max: '300 ohm' }]; }), view: { variable: 'Ncap' } });
    button(element, 'Find the values').click();
    await answered();
    expect(text()).to.match(/cautions? at 5e20 cm\^-3:.*cap: P at 5\.0e\+20 cm\^-3 lies above the \S+ cm\^-3 that was published as reachable/);
    await expectAccessible(element);
  });

  it('writes the picture and the margins as files', async () => {
    await put({ view: { variable: 'tcap' } });
    button(element, 'Find the values').click();
    await answered();
    const files: { name: string; blob: Blob }[] = [];
    const picker = async ({ suggestedName }: { suggestedName: string }) => ({ createWritable: async () => ({ write: async (blob: Blob) => void files.push({ name: suggestedName, blob }), close: async () => {} }) });
    Object.defineProperty(window, 'showSaveFilePicker', { configurable: true, value: picker });
    const said = heard(element, 'hm-say');
    try {
      for (const [i, ending] of ['SVG', 'PNG', 'CSV'].entries()) {
        button(element, ending).click();
        await until(`a ${ending} file`, () => said.length > i, 8000);
      }
    } finally {
      delete (window as { showSaveFilePicker?: unknown }).showSaveFilePicker;
    }
    expect(files.map(({ name }) => name)).to.deep.equal(['svg', 'png', 'csv'].map((ending) => `metal-on-silicon-margins-against-tcap.${ending}`));
    expect(await files[0].blob.text()).to.contain('<svg').and.to.contain('margin');
    expect(files[1].blob.type).to.equal('image/png');
    const [heading, first] = (await files[2].blob.text()).split('\r\n');
    expect(heading).to.equal('tcap (cm),"sheet resistance of cap, at most 250 ohm, margin (times)","carrier density of cap, at least 1e19 cm^-3, margin (times)"');
    expect(first.split(',').map(Number).every(Number.isFinite)).to.equal(true);
  });

  it('tells the margins as a table', async () => {
    await put({ view: { variable: 'tcap' } });
    button(element, 'Find the values').click();
    await answered();
    const table = element.shadowRoot!.querySelector('table')!;
    expect([...table.querySelectorAll('thead th')].map((cell) => cell.textContent)).to.deep.equal(['tcap', 'sheet resistance of cap, at most 250 ohm', 'carrier density of cap, at least 1e19 cm^-3']);
    const rows = [...table.querySelectorAll('tbody tr')].map((row) => [...row.children].map((cell) => cell.textContent!));
    expect(rows[0][0]).to.equal('20 nm');
    expect(rows.at(-1)![0]).to.equal('200 nm');
    // Sheet resistance goes as one over the thickness.
    expect(Number(rows.at(-1)![1].slice(1)) / Number(rows[0][1].slice(1))).to.be.closeTo(10, 0.1);
  });

  it('puts the best value, or another one, into the design; what was found stays good', async () => {
    await put({ view: { variable: 'tcap' } });
    button(element, 'Find the values').click();
    await answered();
    const edits = heard(element, 'hm-edit');
    button(element, 'tcap =').click();
    const best = edits[0].next.variables![1].value;
    expect(Number.parseFloat(best)).to.be.within(20, 200);
    element.design = edits[0].next;
    await settled(element);
    expect(element.shadowRoot!.querySelector('.stale')).to.equal(null);
    type('or another value', '77');
    await element.updateComplete;
    button(element, 'Put it in').click();
    expect(edits[1].next.variables![1].value).to.equal('77 nm');
  });

  it('keeps the range that was searched when a value is put in, where the variable has none of its own', async () => {
    const bare = design((d) => { delete d.variables![1].range; });
    await put({ design: bare, view: { variable: 'tcap' } });
    const ends = (): string[] => [field('from').value, field('to').value];
    const searched = ends();
    expect(Number.parseFloat(searched[0])).to.be.greaterThan(0);
    button(element, 'Find the values').click();
    await answered();
    const edits = heard(element, 'hm-edit');
    type('or another value', '150 nm');
    await element.updateComplete;
    button(element, 'Put it in').click();
    element.design = edits[0].next;
    await settled(element);
    expect(element.design.variables![1].value).to.equal('150 nm');
    expect(ends()).to.deep.equal(searched);
  });

  it('says that what it found is of an earlier design once something else changed', async () => {
    await put({ view: { variable: 'tcap' } });
    button(element, 'Find the values').click();
    await answered();
    element.design = design((d) => { d.layers[1].thickness = '500 nm'; });
    await element.updateComplete;
    expect(text()).to.contain('Found for the design before the last change');
    expect([...element.shadowRoot!.querySelectorAll('button')].some((candidate) => candidate.textContent!.includes('tcap ='))).to.equal(false);
    await expectAccessible(element);
  });

  it('tells the nearest miss, what blocks it and by how much, where nothing meets everything', async () => {
    await put({ design: design((d) => { d.requirements![0].max = '1 ohm'; }), view: { variable: 'tcap' } });
    button(element, 'Find the values').click();
    await answered();
    expect(text()).to.contain('No value of tcap in this range meets everything').and.to.match(/It lacks a factor of \d+/).and.to.contain('No value in the range meets it');
    expect(element.shadowRoot!.querySelectorAll('[data-role="margin-best"]')).to.have.length(1);
    await expectAccessible(element);
  });

  it('makes a variable of a value of the stack and sizes it, in one step', async () => {
    await put();
    const edits = heard(element, 'hm-edit');
    choose('p 1 0');
    await element.updateComplete;
    expect([field('from').value, field('to').value]).to.deep.equal(['1e16 cm^-3', '1e18 cm^-3']);
    type('to', '2e18');
    await element.updateComplete;
    button(element, 'Make it a variable').click();
    expect(edits).to.have.length(1);
    expect(edits[0].next.variables!.at(-1)).to.deep.equal({ name: 'N_base', value: '1e17 cm^-3', range: ['1e16 cm^-3', '2e18 cm^-3'] });
    expect(edits[0].next.layers[1].dopants![0].concentration).to.equal('N_base');
    expect(asked[0].options).to.deep.equal({ variable: 'N_base', from: '1e16 cm^-3', to: '2e18 cm^-3' });
    element.design = edits[0].next;
    await element.updateComplete;
    expect(menu().value).to.equal('v N_base');
  });

  it('writes another range into the variable, so that it can be undone', async () => {
    await put();
    const edits = heard(element, 'hm-edit');
    type('from', '2e18');
    expect(edits[0].next.variables![0].range).to.deep.equal(['2e18 cm^-3', '5e20 cm^-3']);
  });

  it('says at its field what is wrong with an end of the range, and above all what is wrong with the design', async () => {
    await put({ design: design((d) => { d.variables![1].range = ['0 nm', '200 nm']; }), view: { variable: 'tcap', scale: 'log' } });
    button(element, 'Find the values').click();
    expect(asked[0].options.scale).to.equal('log');
    end({ kind: 'done', value: quick(asked[0]) } as unknown as JobOutcome<never>);
    await until('the complaint', () => (field('from').complaint ?? '').includes('not above zero'));
    await expectAccessible(element);
    element.design = { ...design(), variables: design().variables!.map((row) => ({ ...row, range: ['200 nm', '20 nm'] })) };
    await element.updateComplete;
    button(element, 'Find the values').click();
    end({ kind: 'done', value: quick(asked[1]) } as unknown as JobOutcome<never>);
    await until('the alert', () => element.shadowRoot!.querySelector('[role=alert]')?.textContent!.includes('put the lower end first') === true);
    await expectAccessible(element);
  });

  it('underlines the requirement that is asked about', async () => {
    await put({ wish: { requirement: 1, wish: 1 } });
    expect(text()).to.contain('For requirement 2, carrier density of cap, at least 1e19 cm^-3; the others are kept as well.');
    button(element, 'Find the values').click();
    await answered();
    const curves = [...element.shadowRoot!.querySelectorAll('[data-role="margin-curve"]')].map((curve) => Number(curve.getAttribute('stroke-width')));
    expect(curves[1]).to.be.greaterThan(curves[0]);
    expect(element.shadowRoot!.querySelectorAll('ol li')[1].className).to.equal('asked');
  });

  it('is usable from 360 px', async () => {
    await put({ view: { variable: 'tcap' } });
    element.style.width = '344px';
    await settled(element);
    button(element, 'Find the values').click();
    await answered();
    expect(element.scrollWidth).to.be.at.most(345);
    for (const target of element.shadowRoot!.querySelectorAll('button, select, summary')) expect(target.getBoundingClientRect().height).to.be.at.least(24);
  });
});
