import { emulateMedia } from '@web/test-runner-commands';
import { expect } from 'chai';
import '../../components/hm-sweeps/hm-sweeps.ts';
import type { HmSweeps } from '../../components/hm-sweeps/hm-sweeps.ts';
import type { HmFilm } from '../../components/hm-sweeps/hm-film.ts';
import type { Pool } from '../../components/hm-sweeps/batch-controller.ts';
import type { SweepsView } from '../../components/hm-sweeps/sweeps-view.ts';
import { runHere } from '../../src/batch/job.ts';
import { openJob } from '../../src/batch/spec.ts';
import { starters } from '../../src/design/starters/index.ts';
import type { Design } from '../../src/design/types.ts';
import { expectAccessible } from './accessible.ts';
import { button, heard, until } from './heard.ts';
import { settled } from './sample.ts';

const design = (): Design => structuredClone(starters.find(({ id }) => id === 'schottky')!.design);
/** The real computation in this very thread, which can be held up before its chunks. */
let gate: Promise<void> = Promise.resolve();
const pool = {
  run: async (spec: Parameters<typeof openJob>[0], _job: unknown, options: object) => {
    await gate;
    return runHere(openJob(spec), options);
  },
  close: () => {},
} as unknown as Pool;

const temperature = { variable: 'temperature', from: '250 K', to: '350 K', points: '21', log: false };
const few: SweepsView = { first: temperature, figures: ['layers.drift.ec_minus_ef_eV', 'layers.drift.n_cm3'] };

let element: HmSweeps;
const shadow = () => element.shadowRoot!;
const text = () => shadow().textContent!.replace(/\s+/g, ' ');
const film = () => shadow().querySelector<HmFilm>('hm-film')!;
const surface = () => shadow().querySelector<HTMLElement>('.surface')!;
const press = (on: HTMLElement, key: string) => on.dispatchEvent(new KeyboardEvent('keydown', { key, bubbles: true, cancelable: true }));

async function put(change: Partial<HmSweeps> = {}): Promise<void> {
  gate = Promise.resolve();
  element = Object.assign(document.createElement('hm-sweeps'), { design: design(), pool, view: few, ...change });
  document.body.append(element);
  await settled(element);
}
async function ran(): Promise<void> {
  const said = heard(element, 'hm-say');
  button(element, 'Run the sweep').click();
  await until('the sweep', () => said.some(({ text: words }) => words.startsWith('Sweep ready')), 8000);
  await settled(element);
}

describe('sweeps', function () {
  this.timeout(20_000);
  afterEach(() => element.remove());

  it('draws a curve for each figure, named, with a summary and a table; all of it accessible', async () => {
    await put();
    await expectAccessible(element);
    await ran();
    expect(shadow().querySelectorAll('[data-role="sweep-curve"]')).to.have.length(2);
    expect(shadow().querySelectorAll('ol.key li')).to.have.length(2);
    expect(text()).to.match(/1 drift: Ec - EF: from [\d.]+ eV to [\d.]+ eV/);
    shadow().querySelector('details')!.open = true;
    expect(shadow().querySelectorAll('tbody tr')).to.have.length(21);
    await expectAccessible(element);
  });

  it('says what a mobility leaves out where a figure rests on one and the temperature is swept', async () => {
    await put({ view: { first: { ...temperature, points: '3' }, figures: ['layers.drift.n_cm3'] } });
    await ran();
    expect(text()).not.to.contain('Mobilities are those of 300 K');
    element.view = { first: { ...temperature, points: '3' }, figures: ['layers.drift.sheet_ohm'] };
    await settled(element);
    await ran();
    expect(text()).to.contain('Mobilities are those of 300 K');
  });

  it('reads a point by arrow keys and puts it into the design with Enter, as one undoable edit', async () => {
    await put();
    await ran();
    const edits = heard(element, 'hm-edit');
    press(surface(), 'ArrowRight');
    await element.updateComplete;
    expect(surface().getAttribute('aria-valuetext')).to.contain('temperature 300 K: drift: Ec - EF');
    press(surface(), 'ArrowRight');
    press(surface(), 'Enter');
    expect(edits).to.have.length(1);
    expect(edits[0].next.conditions.temperature).to.equal('305 K');
    expect(edits[0].label).to.contain('temperature 305 K');
    // What was swept may change: the sweep is still of this design.
    element.design = edits[0].next;
    await settled(element);
    expect(shadow().querySelector('.stale-mark')).to.equal(null);
    press(surface(), 'Home');
    await element.updateComplete;
    expect(surface().getAttribute('aria-valuenow')).to.equal('0');
    press(surface(), 'Escape');
    await element.updateComplete;
    expect(shadow().querySelector('[data-role=crosshair]')).to.equal(null);
  });

  it('reads by the pointer, and a click puts the variable there', async () => {
    await put({ view: { first: { variable: 'Ndrift', from: '1e15 cm^-3', to: '1e17 cm^-3', points: '5', log: true }, figures: ['layers.drift.n_cm3'] } });
    await ran();
    const edits = heard(element, 'hm-edit');
    const box = surface().getBoundingClientRect();
    const at = { bubbles: true, button: 0, pointerType: 'mouse', clientX: box.left + box.width - 1, clientY: box.top + 50 };
    surface().dispatchEvent(new PointerEvent('pointermove', at));
    await element.updateComplete;
    expect(shadow().querySelectorAll('[data-role=crosshair] circle')).to.have.length(1);
    surface().dispatchEvent(new PointerEvent('pointerdown', { ...at, pointerType: 'touch' }));
    // A lifted finger leaves its reading, with the button under it; the mouse takes it along.
    shadow().querySelector('.picture')!.dispatchEvent(new PointerEvent('pointerleave', { pointerType: 'touch' }));
    await settled(element);
    expect(shadow().querySelector('.reading button')).to.not.equal(null);
    shadow().querySelector('.picture')!.dispatchEvent(new PointerEvent('pointerleave', { pointerType: 'mouse' }));
    await settled(element);
    expect(shadow().querySelector('.reading button')).to.equal(null);
    expect(edits).to.have.length(0);
    surface().dispatchEvent(new PointerEvent('pointerdown', at));
    expect(edits[0].next.variables!.find(({ name }) => name === 'Ndrift')!.value).to.equal('1e17 cm^-3');
  });

  it('says at its field why a sweep is refused', async () => {
    await put({ view: { ...few, first: { ...temperature, from: '400 K', to: '300 K', points: '1' } } });
    button(element, 'Run the sweep').click();
    await settled(element);
    const complaints = [...shadow().querySelectorAll('hm-field')].map(({ label, complaint }) => `${label}: ${complaint}`);
    expect(complaints.find((line) => line.startsWith('from'))).to.contain('put the lower end first');
    expect(complaints.find((line) => line.startsWith('points'))).to.contain('2 points or more');
    expect(shadow().querySelector('[role=alert]')!.textContent).to.contain('The sweep was not run');
    await expectAccessible(element);
    element.view = { ...few, first: { ...temperature, to: '250 K' } };
    await settled(element);
    button(element, 'Run the sweep').click();
    await settled(element);
    expect([...shadow().querySelectorAll('hm-field')].map(({ complaint }) => complaint).join(' ')).to.contain('an empty sweep');
  });

  it('shows progress with a way to stop, keeps what was reached, and dims what is of an earlier design', async () => {
    await put({ view: { ...few, first: { ...temperature, points: '200' } } });
    button(element, 'Run the sweep').click();
    await until('some points', () => Number(shadow().querySelector('progress')?.value ?? 0) > 10, 8000);
    expect(shadow().querySelectorAll('[data-role="sweep-curve"]')).to.have.length(2);
    button(element, 'Stop').click();
    await until('the stop', () => text().includes('Stopped:'), 8000);
    expect(text()).to.match(/Stopped: \d+ of 200 points are there/);
    const other = design();
    other.layers[0].thickness = '7 um';
    element.design = other;
    await settled(element);
    expect(text()).to.contain('Of the design before the last change');
    await expectAccessible(element);
  });

  it('maps two quantities, walked in both directions, both put into the design', async () => {
    await put({ view: { ...few, first: { ...temperature, points: '5' }, second: { variable: 'Ndrift', from: '1e15 cm^-3', to: '1e17 cm^-3', points: '4', log: true } } });
    await ran();
    expect(shadow().querySelectorAll('[data-role="contour-line"]').length).to.be.greaterThan(2);
    const edits = heard(element, 'hm-edit');
    for (const key of ['End', 'ArrowUp', 'ArrowUp', 'ArrowUp', 'Enter']) {
      press(surface(), key);
      await element.updateComplete;
    }
    expect(edits[0].next.conditions.temperature).to.equal('350 K');
    expect(edits[0].next.variables!.find(({ name }) => name === 'Ndrift')!.value).to.equal('1e17 cm^-3');
    await expectAccessible(element);
  });

  it('begins anew where what is remembered is of another version, or of a variable that is gone', async () => {
    const menu = () => shadow().querySelector('select')!.value;
    await put({ view: { first: { variable: 'gone', from: '1', to: '2', points: '3', log: false }, second: 7, figures: 'all', film: {} } as unknown as SweepsView });
    expect(menu()).to.equal('temperature');
    expect(shadow().querySelectorAll('.ask')).to.have.length(1);
    await ran();
    expect(shadow().querySelectorAll('[data-role="sweep-curve"]').length).to.be.greaterThan(0);
  });

  it('is usable from 360 px', async () => {
    await put();
    element.style.width = '344px';
    await settled(element);
    await ran();
    expect(element.scrollWidth).to.be.at.most(345);
    for (const target of shadow().querySelectorAll('button, select, summary')) expect(target.getBoundingClientRect().height).to.be.at.least(24);
  });
});

describe('the temperature film', function () {
  this.timeout(20_000);
  afterEach(() => element.remove());

  async function made(): Promise<void> {
    await put({ view: { film: { from: '100 K', to: '400 K', frames: '7', log: false } } });
    const said = heard(element, 'hm-say');
    button(film(), 'Make the film').click();
    await until('the film', () => said.some(({ text: words }) => words.startsWith('Film ready')), 8000);
    // Its regimes are there as a table too: a row a temperature, a column a layer.
    const cells = [...film().shadowRoot!.querySelectorAll('tbody tr')].map((row) => [...row.children].map((cell) => cell.textContent!));
    expect(cells.length).to.be.greaterThan(3);
    for (const [kelvin, ...regimes] of cells) {
      expect(Number(kelvin)).to.be.greaterThan(0);
      for (const regime of regimes) expect(regime).to.match(/^(degenerate|freeze-out|extrinsic|intrinsic|insulator|[a-z-]+)$/);
    }
    await settled(film());
  }
  const slider = () => film().shadowRoot!.querySelector<HTMLElement>('.surface')!;

  it('hands the page a frame at each step, with its temperature, and at the end gives the plate back', async () => {
    await made();
    const frames = heard(element, 'hm-frame');
    expect(film().shadowRoot!.querySelectorAll('[data-role="film-stretch"]').length).to.be.at.least(2);
    // A word that the regime map uses for less is explained where it stands.
    const degenerate = [...film().shadowRoot!.querySelectorAll('tbody td')].some((cell) => cell.textContent === 'degenerate');
    expect(film().shadowRoot!.textContent!.includes('within 3 kT')).to.equal(degenerate);
    press(slider(), 'ArrowRight');
    press(slider(), 'ArrowRight');
    await film().updateComplete;
    expect(frames.map((frame) => frame?.words)).to.deep.equal(['frame at 100 K', 'frame at 150 K']);
    expect(frames[1]!.result.layers[0].regime).to.be.a('string');
    expect(slider().getAttribute('aria-valuetext')).to.contain('150 K: drift ');
    await expectAccessible(film());
    press(slider(), 'End');
    await film().updateComplete;
    button(film(), 'Back to the design').click();
    expect(frames.at(-1)).to.equal(null);
  });

  it('plays and pauses, unless less motion is asked for: then it is stepped', async () => {
    await made();
    const frames = heard(element, 'hm-frame');
    button(film(), 'Play').click();
    await until('frames', () => frames.length >= 3, 4000);
    button(film(), 'Pause').click();
    const count = frames.length;
    await new Promise((done) => setTimeout(done, 500));
    expect(frames).to.have.length(count);
    button(film(), 'Play').click();
    await emulateMedia({ reducedMotion: 'reduce' });
    await settled(film());
    expect([...film().shadowRoot!.querySelectorAll('button')].some(({ textContent }) => textContent === 'Play' || textContent === 'Pause')).to.equal(false);
    const still = frames.length;
    await new Promise((done) => setTimeout(done, 400));
    expect(frames).to.have.length(still);
    press(slider(), ' ');
    expect(frames).to.have.length(still + 1);
    await emulateMedia({ reducedMotion: 'no-preference' });
  });

  it('gives the plate back when the design changes', async () => {
    await made();
    press(slider(), 'Home');
    const frames = heard(element, 'hm-frame');
    // Its own temperature is what the film goes through: that may change.
    const warmer = design();
    warmer.conditions.temperature = '310 K';
    element.design = warmer;
    await settled(element);
    expect(frames).to.deep.equal([]);
    const other = design();
    other.layers[0].thickness = '7 um';
    element.design = other;
    await settled(element);
    expect(frames).to.deep.equal([null]);
    expect(film().shadowRoot!.textContent).to.contain('make the film again');
  });

  it('says at its field why there is no film', async () => {
    await put({ view: { film: { from: '0 K', to: '400 K', frames: '7', log: false } } });
    button(film(), 'Make the film').click();
    await settled(film());
    expect([...film().shadowRoot!.querySelectorAll('hm-field')].some(({ complaint }) => complaint !== null)).to.equal(true);
    await expectAccessible(film());
  });
});
