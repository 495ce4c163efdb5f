import { sendKeys, setViewport } from '@web/test-runner-commands';
import { expect } from 'chai';
import '../../components/hm-ledger/hm-ledger.ts';
import '../../components/hm-workings/hm-workings.ts';
import type { HmLedger } from '../../components/hm-ledger/hm-ledger.ts';
import type { HmWorkings } from '../../components/hm-workings/hm-workings.ts';
import { judge } from '../../src/requirements/judge.ts';
import { requirementFigures } from '../../src/workings/panel-figures.ts';
import { expectAccessible } from './accessible.ts';
import { heard, mounted, sample, settled } from './sample.ts';

const { design, result } = sample('modulation-doped');

async function panel(table: 'layers' | 'junctions' | 'contacts', index: number, column: string): Promise<HmWorkings> {
  const p = await mounted<HmWorkings>('hm-workings', { design, result, asked: { table, index, column } });
  await settled(p);
  return p;
}
const dialog = (p: HmWorkings): HTMLDialogElement => p.renderRoot.querySelector('dialog')!;

/** A ledger with the panel beside it, wired as the page wires them. */
async function pair(): Promise<{ ledger: HmLedger; workings: HmWorkings }> {
  const ledger = await mounted<HmLedger>('hm-ledger', { result, workings: true });
  const workings = Object.assign(document.createElement('hm-workings'), { design, result });
  document.body.append(workings);
  ledger.addEventListener('hm-view', (event) => {
    const asked = (event as CustomEvent).detail.change.workings;
    if (asked) workings.asked = asked;
  });
  await settled(workings);
  return { ledger, workings };
}

describe('hm-workings', () => {
  before(() => setViewport({ width: 1440, height: 900 }));

  it('shows the figure, its formula as MathML, and each value with its source', async () => {
    const p = await panel('layers', 1, 'ecMinusEf');
    expect(dialog(p).open).to.equal(true);
    expect(p.renderRoot.querySelector('h2')!.textContent).to.equal('Ec − EF of supply');
    expect(p.renderRoot.querySelector('.value')!.textContent).to.contain(result.layers[1].ec_minus_ef_eV.toFixed(3).replace('-', '−'));
    const math = p.renderRoot.querySelectorAll('math');
    expect(math.length).to.be.greaterThan(10);
    expect(math[0].namespaceURI).to.equal('http://www.w3.org/1998/Math/MathML');
    expect(math[0].querySelector('msubsup')!.namespaceURI).to.equal('http://www.w3.org/1998/Math/MathML');
    expect([...p.renderRoot.querySelectorAll('.source')].map((s) => s.textContent).join()).to.contain('Vurgaftman').and.contain('this design').and.contain('solved');
  });

  it('tells what the simpler formula would give', async () => {
    const p = await panel('layers', 1, 'ecMinusEf');
    expect(p.renderRoot.querySelector('summary')!.textContent).to.match(/^The simpler way: [+−]?[\d.]+(e−?\d+)? meV$/);
  });

  it('sets other published values beside the one in force', async () => {
    const p = await panel('junctions', 2, 'deltaEc');
    const text = p.renderRoot.querySelector('.sheet')!.textContent!;
    expect(text).to.contain('Other values').and.contain('electron affinity rule');
  });

  it('opens from a figure by Enter, closes by Escape, and gives the focus back', async () => {
    const { ledger, workings } = await pair();
    const cell = ledger.renderRoot.querySelector<HTMLElement>('td[data-cell="layers 0 2"]')!;
    cell.focus();
    await sendKeys({ press: 'Enter' });
    await settled(workings);
    expect(dialog(workings).open).to.equal(true);
    expect(workings.shadowRoot!.activeElement).to.equal(workings.renderRoot.querySelector('h2'));
    const closed = heard(workings, 'hm-closed');
    await sendKeys({ press: 'Escape' });
    await settled(workings);
    expect(dialog(workings).open).to.equal(false);
    expect(closed.length).to.equal(1);
    expect(ledger.shadowRoot!.activeElement).to.equal(cell);
  });

  it('turns to another figure while it is open', async () => {
    const { ledger, workings } = await pair();
    const cells = ledger.renderRoot.querySelectorAll<HTMLElement>('td[data-cell^="layers"]');
    cells[1].click();
    await settled(workings);
    const first = workings.renderRoot.querySelector('h2')!.textContent;
    cells[2].click();
    await settled(workings);
    expect(workings.renderRoot.querySelector('h2')!.textContent).to.not.equal(first);
    expect(dialog(workings).open).to.equal(true);
  });

  it('stands away from the figure, so that both are seen', async () => {
    const { ledger, workings } = await pair();
    for (const column of [0, 9]) {
      const cell = ledger.renderRoot.querySelector<HTMLElement>(`td[data-cell="layers 0 ${column}"]`)!;
      cell.focus();
      cell.click();
      await settled(workings);
      const [figure, box] = [cell.getBoundingClientRect(), dialog(workings).getBoundingClientRect()];
      expect(figure.right <= box.left || figure.left >= box.right, `column ${column}`).to.equal(true);
    }
  });

  it('shows the workings of a figure of a panel, of the design that the panel had', async () => {
    const { requirements: rows } = judge(design, { samples: 0 }) as Extract<ReturnType<typeof judge>, { kind: 'judged' }>;
    const figure = requirementFigures(design, rows[0], 0)[0];
    const p = await mounted<HmWorkings>('hm-workings', { design, result, stale: true, asked: figure });
    await settled(p);
    expect(p.renderRoot.querySelector('h2')!.textContent).to.match(/^Worst of /);
    expect(p.renderRoot.querySelector('.value')!.textContent!.trim()).to.equal(figure.text);
    expect(p.renderRoot.querySelector('.sheet')!.textContent).to.contain('Worst at ').and.not.to.contain('before the last change');
    await expectAccessible(p);
  });

  it('copies itself as text', async () => {
    const p = await panel('layers', 1, 'gap');
    const said = heard(p, 'hm-say');
    let copied = '';
    const clipboard = navigator.clipboard;
    Object.defineProperty(navigator, 'clipboard', { configurable: true, value: { writeText: async (text: string) => void (copied = text) } });
    p.renderRoot.querySelector<HTMLButtonElement>('header button')!.click();
    await settled(p);
    Object.defineProperty(navigator, 'clipboard', { configurable: true, value: clipboard });
    expect(copied).to.contain('Gap of supply').and.contain('(1 − x) EA + x EB');
    expect(said[0].detail.text).to.equal('Workings copied as text.');
  });

  it('keeps what it showed, marked, while the stack is being solved anew', async () => {
    const p = await panel('layers', 1, 'gap');
    p.stale = true;
    await settled(p);
    expect(p.renderRoot.querySelector('h2')!.textContent).to.equal('Gap of supply');
    expect(p.renderRoot.querySelector('.sheet')!.textContent).to.contain('before the last change');
  });

  it('follows the figure when the stack changes, and says so where it is gone', async () => {
    const p = await panel('layers', 1, 'gap');
    p.asked = { table: 'layers', index: 99, column: 'gap' };
    await settled(p);
    expect(p.renderRoot.querySelector('.sheet')!.textContent).to.contain('once the stack on the page is solved');
  });

  for (const [name, width, height] of [['beside the page', 1440, 900], ['over a phone', 390, 844]] as const) {
    it(`is accessible ${name}, and nothing sticks out`, async () => {
      await setViewport({ width, height });
      const p = await panel('layers', 1, 'ecMinusEf');
      p.renderRoot.querySelector('details')!.open = true;
      await settled(p);
      await expectAccessible(p);
      expect(dialog(p).scrollWidth).to.be.at.most(dialog(p).clientWidth);
      expect(dialog(p).matches(':modal')).to.equal(width < 896);
      await setViewport({ width: 1440, height: 900 });
    });
  }

  it('is accessible as a ledger whose figures can be asked', async () => {
    const { ledger } = await pair();
    await expectAccessible(ledger);
  });
});
