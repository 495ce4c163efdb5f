import { expect } from 'chai';
import { deleteDB } from 'idb';
import '../../components/hm-app/hm-app.ts';
import type { HmApp } from '../../components/hm-app/hm-app.ts';
import { tell, type VariantAct } from '../../components/shared/events.ts';
import { setTemperature } from '../../src/state/commands/index.ts';
import { button, until } from './heard.ts';

const PATIENCE = 8000;
const name = `app-variants-${Date.now()}`;
let app: HmApp;
function part<K extends keyof HTMLElementTagNameMap>(tag: K): HTMLElementTagNameMap[K] {
  return app.shadowRoot!.querySelector(tag)!;
}
async function open(): Promise<void> {
  app = document.createElement('hm-app');
  app.database = name;
  document.body.append(app);
  await until('a solved design', solvedNow, PATIENCE);
}
const solvedNow = () => part('hm-plate')?.result != null && part('hm-messages').findings.status === 'complete';
const act = (what: VariantAct) => tell(part('hm-desk'), 'hm-variant', what);
const design = () => part('hm-strip').design!;
const list = () => part('hm-desk').variants.all;

describe('variants on the page', function () {
  this.timeout(30_000);
  after(async () => {
    app.remove();
    await new Promise((done) => setTimeout(done, 20));
    await deleteDB(name);
  });

  it('are copied, edited, laid over the plate, compared in the ledger, and there again after a reload', async () => {
    await open();
    act({ act: 'add', name: 'cold' });
    await until('the copy', () => list().list.length === 2);
    const before = design().conditions.temperature;
    tell(part('hm-desk'), 'hm-edit', { next: setTemperature(design(), '250 K'), label: 'temperature' });
    const [base] = list().list;
    tell(part('hm-desk'), 'hm-view', { change: { variants: { over: [base.id], against: base.id } } });
    await until('the other one over the plate', () => part('hm-plate').variants.length === 1 && solvedNow(), PATIENCE);
    await until('the difference in the ledger', () => (part('hm-desk').shadowRoot!.querySelector('hm-ledger')?.shadowRoot!.querySelectorAll('.change').length ?? 0) > 0, PATIENCE);
    expect(part('hm-plate').shadowRoot!.querySelectorAll('[data-role="variant-conduction-edge"]')).to.have.length(1);

    expect([...part('hm-plate').shadowRoot!.querySelectorAll('[data-role="variant-name"]')].map((e) => e.textContent!.trim())).to.deep.equal(['cold', 'base']);

    act({ act: 'open', id: base.id });
    await until('the first one', () => design().conditions.temperature === before && solvedNow(), PATIENCE);
    // What was laid over is the one on the page now: it is not laid over itself.
    expect(part('hm-plate').variants).to.have.length(0);
    expect(part('hm-messages').shadowRoot!.textContent).to.contain('base is on the page now.');
    await until('the save', () => part('hm-conditions').saving.kind === 'saved');
    app.remove();
    await new Promise((done) => setTimeout(done, 50));
    await open();
    expect(list().list.map((variant) => [variant.name, variant.design.conditions.temperature])).to.deep.equal([['base', before], ['cold', '250 K']]);
    act({ act: 'open', id: list().list[1].id });
    await until('the copy again', () => design().conditions.temperature === '250 K' && solvedNow(), PATIENCE);
    expect(part('hm-conditions').undoLabel).to.equal('temperature');
  });

  it('have a tab of their own, which says how many there are', async () => {
    const desk = part('hm-desk');
    button(desk, 'Variants').click();
    await until('the panel', () => desk.shadowRoot!.querySelector('hm-variants')?.shadowRoot!.querySelectorAll('.list li').length === 2, PATIENCE);
    expect(button(desk, 'Variants').textContent).to.contain('cold');
    act({ act: 'remove', id: list().open });
    await until('the neighbour', () => list().list.find(({ id }) => id === list().open)!.name === 'base' && solvedNow(), PATIENCE);
  });
});
