import { expect } from 'chai';
import { sendKeys } from '@web/test-runner-commands';
import '../../components/hm-help/help-door.ts';
import type { HmHelpDoor } from '../../components/hm-help/help-door.ts';
import type { HmHelp } from '../../components/hm-help/hm-help.ts';
import { tell } from '../../components/shared/events.ts';
import { HELP_PAGES, HELP_PICTURES } from '../../src/help/pages.ts';
import { expectAccessible } from './accessible.ts';
import { until } from './heard.ts';

let door: HmHelpDoor;
const help = (): HmHelp => door.shadowRoot!.querySelector('hm-help')!;
const heading = (): string => help()?.shadowRoot?.querySelector('h3')?.textContent ?? '';
const isOpen = (): boolean => help()?.shadowRoot?.querySelector('hm-dialog')?.open ?? false;

describe('the help', () => {
  beforeEach(async () => {
    door = document.createElement('hm-help-door');
    document.body.append(door);
    await door.updateComplete;
  });
  afterEach(() => door.remove());

  it('is not there before it is asked for, and opens with the first five minutes by F1, from within a field too', async () => {
    expect(help()).to.equal(null);
    const field = document.createElement('input');
    field.addEventListener('keydown', (event) => event.stopPropagation());
    document.body.append(field);
    field.focus();
    await sendKeys({ press: 'F1' });
    await until('the first page', () => heading() === 'The first five minutes', 8000);
    expect(isOpen()).to.equal(true);
    await sendKeys({ press: 'Escape' });
    await until('it shuts', () => !isOpen());
    expect(document.activeElement).to.equal(field);
    field.remove();
  }).timeout(15_000);

  it('opens by the act of a button, and shows every page with nothing that axe finds wrong', async () => {
    tell(document.body, 'hm-act', { act: 'help' });
    await until('the first page', () => heading() !== '', 8000);
    const tabs = [...help().shadowRoot!.querySelectorAll<HTMLButtonElement>('nav button')];
    expect(tabs).to.have.length(HELP_PAGES.length);
    const seen = new Set<string>();
    for (const tab of tabs) {
      const before = heading();
      tab.click();
      await until(tab.textContent!, () => tab.getAttribute('aria-current') === 'page' && (tab === tabs[0] || (heading() !== before && heading() !== '')), 5000);
      seen.add(heading());
      await expectAccessible(help());
    }
    expect(seen.size).to.equal(HELP_PAGES.length);
  }).timeout(30_000);

  it('has every picture, and links between pages lead there and take the focus along', async () => {
    await door.show();
    await until('the first page', () => heading() !== '', 8000);
    for (const address of Object.values(HELP_PICTURES)) expect((await fetch(address)).ok, address).to.equal(true);
    [...help().shadowRoot!.querySelectorAll<HTMLButtonElement>('.go')].find((link) => link.textContent === 'Keys')!.click();
    await until('the keys', () => heading() === 'Keys', 5000);
    await until('the focus', () => help().shadowRoot!.activeElement?.localName === 'h3');
    expect(help().shadowRoot!.querySelectorAll('tbody tr').length).to.be.greaterThan(15);
  }).timeout(15_000);
});
