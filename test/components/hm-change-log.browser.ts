import { expect } from 'chai';
import '../../components/hm-variants/hm-change-log.ts';
import type { HmChangeLog } from '../../components/hm-variants/hm-change-log.ts';
import type { VariantsShown } from '../../components/hm-variants/variants-shown.ts';
import { setTemperature, setThickness } from '../../src/state/commands/index.ts';
import { History } from '../../src/state/history.ts';
import { addVariant, loneVariant, openVariant, parked, type VariantList } from '../../src/state/variants.ts';
import { expectAccessible } from './accessible.ts';
import { button } from './heard.ts';
import { mounted, sample, settled } from './sample.ts';

const { design } = sample('pn-diode');
const thin = setThickness(design, 0, '100 nm');
const thick = setThickness(thin, 0, '900 nm');
const hot = setTemperature(thick, '350 K');
const history = new History();
history.record(design, thin, 'thickness of anode');
history.record(thin, thick, 'thickness of anode');
history.record(thick, hot, 'temperature');

const lone: VariantList = parked(loneVariant(design), { design: hot, history: history.toRecord() });
const two: VariantList = parked(addVariant(lone, 'cold', 'b'), { design: setTemperature(hot, '77 K'), history: { past: [], future: [] } });
const shown = (change: Partial<VariantsShown> = {}): VariantsShown => ({ all: two, over: [], against: null, solved: new Map(), ...change });
const put = (change: Partial<VariantsShown> = {}) => mounted<HmChangeLog>('hm-change-log', { shown: shown(change) });
const sentences = (element: Element) => [...element.shadowRoot!.querySelectorAll('.log li')].map((li) => li.textContent);

/** Chooses as a person does: the menu is changed and left. */
async function choose(element: HmChangeLog, id: string, value: string): Promise<void> {
  const menu = element.shadowRoot!.querySelector<HTMLSelectElement>(`#${id}`)!;
  menu.value = value;
  menu.dispatchEvent(new Event('change'));
  menu.dispatchEvent(new Event('blur'));
  await settled(element);
}

describe('what was changed between two states of a project', () => {
  it('leads from the other variant to the one on the page, until something is chosen', async () => {
    const element = await put();
    expect(sentences(element)).to.deep.equal(['Temperature: 77 K, was 350 K.']);
    await expectAccessible(element);
    element.shown = shown({ all: openVariant(two, 'base') });
    await settled(element);
    expect(sentences(element)).to.deep.equal(['Temperature: 350 K, was 77 K.']);
  });

  it('leads in a lone variant from the earliest revision to the present', async () => {
    const element = await put({ all: lone });
    expect(sentences(element)).to.deep.equal(['Thickness of anode: 900 nm, was 300 nm.', 'Temperature: 350 K, was 300 K.']);
  });

  it('is told between any two revisions, of one variant or of two', async () => {
    const element = await put({ all: lone });
    await choose(element, 'from-revision', '1');
    await choose(element, 'to-revision', '2');
    expect(sentences(element)).to.deep.equal(['Thickness of anode: 900 nm, was 100 nm.']);
    button(element, 'The other way round').click();
    await settled(element);
    expect(sentences(element)).to.deep.equal(['Thickness of anode: 100 nm, was 900 nm.']);
    element.shown = shown();
    await settled(element);
    await choose(element, 'from-variant', 'b');
    await choose(element, 'to-revision', '1');
    expect(sentences(element)).to.deep.equal(['Thickness of anode: 100 nm, was 900 nm.', 'Temperature: 300 K, was 77 K.']);
  });

  it('says so where a stored revision cannot be reached', async () => {
    const foreign = { past: [{ label: 'of another design', changes: [{ path: ['title'], before: 'x', after: 'y' }] }], future: [] };
    const element = await put({ all: parked(loneVariant(design), { design, history: foreign }) });
    expect(element.shadowRoot!.querySelector('.wrong')!.textContent).to.contain('choose another one');
  });

  it('is usable from 360 px, with labels that are as long as they like', async () => {
    const long = new History();
    long.record(design, thin, 'thickness of '.repeat(20));
    const element = await put({ all: parked(loneVariant(design), { design: thin, history: long.toRecord() }) });
    element.style.width = '344px';
    element.style.display = 'block';
    await settled(element);
    expect(element.scrollWidth).to.be.at.most(345);
  });
});
