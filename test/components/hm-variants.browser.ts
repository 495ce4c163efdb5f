import { expect } from 'chai';
import '../../components/hm-variants/hm-variants.ts';
import '../../components/hm-ledger/hm-ledger.ts';
import '../../components/hm-plate/hm-plate.ts';
import type { HmLedger } from '../../components/hm-ledger/hm-ledger.ts';
import type { HmPlate } from '../../components/hm-plate/hm-plate.ts';
import type { HmVariants } from '../../components/hm-variants/hm-variants.ts';
import { heldVariants, type VariantsShown } from '../../components/hm-variants/variants-shown.ts';
import { setTemperature, setThickness } from '../../src/state/commands/index.ts';
import { addVariant, loneVariant, parked, removeVariant, type VariantList } from '../../src/state/variants.ts';
import { expectAccessible } from './accessible.ts';
import { button, heard } from './heard.ts';
import { mounted, sample, settled, solved } from './sample.ts';

const { design, result } = sample('pn-diode');
const thick = setThickness(design, 0, '900 nm');
const three: VariantList = parked(addVariant(addVariant(loneVariant(design), 'cold', 'b'), 'thick', 'c'), { design: thick, history: { past: [], future: [] } });
const shown = (change: Partial<VariantsShown> = {}): VariantsShown => ({ all: three, over: [], against: null, solved: new Map(), ...change });
const put = (change: Partial<VariantsShown> = {}) => mounted<HmVariants>('hm-variants', { shown: shown(change) });
const text = (element: Element) => element.shadowRoot!.textContent!.replace(/\s+/g, ' ');

describe('the variants of a project', () => {
  it('are listed with the one on the page marked, and the panel is accessible', async () => {
    const element = await put();
    const rows = [...element.shadowRoot!.querySelectorAll('.list li')];
    expect(rows.map((row) => row.querySelector('hm-field')!.value)).to.deep.equal(['base', 'cold', 'thick']);
    expect(rows.map((row) => row.getAttribute('aria-current'))).to.deep.equal([null, null, 'true']);
    await expectAccessible(element);
  });

  it('are opened, copied, renamed and put away by what the panel tells', async () => {
    const element = await put();
    const acts = heard(element, 'hm-variant');
    button(element, 'Open base').click();
    const [name] = element.shadowRoot!.querySelectorAll('.list hm-field');
    name.dispatchEvent(new CustomEvent('field-accept', { detail: 'as grown' }));
    element.shadowRoot!.querySelector('.new hm-field')!.dispatchEvent(new CustomEvent('field-accept', { detail: 'next' }));
    button(element, 'Copy what is on the page').click();
    button(element, 'Put away cold').click();
    expect(acts).to.deep.equal([{ act: 'open', id: 'base' }, { act: 'rename', id: 'base', name: 'as grown' }, { act: 'add', name: 'next' }, { act: 'remove', id: 'b' }]);
  });

  it('are taken back or deleted for good once put away', async () => {
    const element = await put({ all: removeVariant(three, 'b') });
    element.shadowRoot!.querySelector('details')!.open = true;
    await expectAccessible(element);
    const acts = heard(element, 'hm-variant');
    button(element, 'Take back cold').click();
    button(element, 'Delete for good').click();
    expect(acts).to.deep.equal([{ act: 'take-back', id: 'b' }, { act: 'delete', id: 'b' }]);
  });

  it('are laid over the plate, three at most, and one is compared with', async () => {
    const element = await put({ over: ['b'], solved: new Map([['b', { status: 'refused' as const, result: null, reason: 'it is too cold' }]]) });
    const views = heard(element, 'hm-view');
    const boxes = [...element.shadowRoot!.querySelectorAll<HTMLInputElement>('.list input')];
    boxes[0].click();
    boxes[1].click();
    expect(views.map(({ change }) => change.variants)).to.deep.equal([{ over: ['b', 'base'], against: null }, { over: ['b'], against: 'base' }]);
    expect(text(element)).to.contain('no result: it is too cold');
    expect(heldVariants({ over: ['b', 'b', 'c', 'gone', 7], against: 'c' }, three)).to.deep.equal({ over: ['b'], against: null });
    expect(heldVariants('nonsense', three)).to.deep.equal({ over: [], against: null });
  });

  it('are usable from 360 px', async () => {
    const element = await put();
    element.style.width = '344px';
    await settled(element);
    expect(element.scrollWidth).to.be.at.most(345);
    for (const target of element.shadowRoot!.querySelectorAll('button, label')) expect(target.getBoundingClientRect().height).to.be.at.least(24);
  });
});

describe('a result beside another variant', () => {
  const other = solved(setTemperature(design, '350 K'));

  it('shows in the ledger value, change and per cent under each figure that differs, accessibly', async () => {
    const ledger = await mounted<HmLedger>('hm-ledger', { result, against: { name: 'hot', result: other } });
    const changes = [...ledger.shadowRoot!.querySelectorAll('.change')].map((span) => span.textContent!.trim());
    expect(changes.filter((line) => line.startsWith('was ')).length).to.be.greaterThan(5);
    expect(changes.some((line) => /^[+−][\d.e−]+ \([+−][\d.]+ %\)$/.test(line))).to.equal(true);
    await expectAccessible(ledger);
    ledger.against = { name: 'same', result };
    await settled(ledger);
    expect(ledger.shadowRoot!.querySelectorAll('.change')).to.have.length(0);
    ledger.against = null;
    await settled(ledger);
    expect(ledger.shadowRoot!.querySelector('.against')).to.equal(null);
  });

  it('shows on the plate the band edges of both, with the other one\'s name', async () => {
    const plate = await mounted<HmPlate>('hm-plate', { result, variants: [{ name: 'hot', result: other }] });
    const roles = (role: string) => plate.shadowRoot!.querySelectorAll(`[data-role="${role}"]`).length;
    expect([roles('variant-conduction-edge'), roles('variant-valence-edge'), roles('variant-name')]).to.deep.equal([1, 1, 1]);
    plate.variants = [];
    await settled(plate);
    expect(roles('variant-conduction-edge')).to.equal(0);
  });
});
