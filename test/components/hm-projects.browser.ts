import { expect } from 'chai';
import '../../components/hm-projects/hm-projects.ts';
import type { HmProjects } from '../../components/hm-projects/hm-projects.ts';
import { expectAccessible } from './accessible.ts';
import { button, heard, until } from './heard.ts';

const entry = (id: string, binned: number | null = null) => ({ id, name: `name of ${id}`, created: 1e12, changed: 1.7e12, binned });
let element: HmProjects;

describe('the list of projects', () => {
  beforeEach(async () => {
    element = document.createElement('hm-projects');
    element.entries = [entry('a'), entry('b'), entry('c', 1.7e12)];
    element.damaged = [{ key: 7, found: 1.7e12, why: 'its design is cut short or garbled', text: '{' }];
    element.openId = 'a';
    document.body.append(element);
    await element.updateComplete;
    element.show();
    await until('an open dialog', () => element.shadowRoot!.querySelector('hm-dialog')!.open);
  });
  afterEach(() => element.remove());

  it('is accessible', async () => {
    await expectAccessible(element);
  });

  it('marks the project on the page, which cannot be opened twice', () => {
    const [a, b] = element.shadowRoot!.querySelectorAll('li');
    expect(a.getAttribute('aria-current')).to.equal('true');
    expect(a.querySelector('button')!.disabled).to.equal(true);
    expect(b.querySelector('button')!.disabled).to.equal(false);
  });

  it('tells of each act with its project', () => {
    const acts = heard(element, 'hm-project');
    const [a, b] = element.shadowRoot!.querySelectorAll('li');
    b.querySelectorAll('button')[0].click();
    a.querySelectorAll('button')[1].click();
    b.querySelectorAll('button')[2].click();
    button(element, 'Take out').click();
    button(element, 'New project').click();
    button(element, 'Back up all').click();
    button(element, 'Take the text away').click();
    button(element, 'Forget it').click();
    expect(acts).to.deep.equal([
      { act: 'open', id: 'b' }, { act: 'copy', id: 'a' }, { act: 'bin', id: 'b' }, { act: 'restore', id: 'c' }, { act: 'new' }, { act: 'backup' }, { act: 'rescue', key: 7 }, { act: 'forget', key: 7 },
    ]);
  });

  it('deletes for good only at the second press', async () => {
    const acts = heard(element, 'hm-project');
    button(element, 'Delete for good').click();
    await element.updateComplete;
    expect(acts).to.deep.equal([]);
    button(element, 'Delete for good: press again').click();
    expect(acts).to.deep.equal([{ act: 'delete', id: 'c' }]);
  });

  it('renames where the name stands', () => {
    const acts = heard(element, 'hm-project');
    const box = element.shadowRoot!.querySelector('hm-field')!.shadowRoot!.querySelector('input')!;
    box.value = 'better';
    box.dispatchEvent(new KeyboardEvent('keydown', { key: 'Enter', bubbles: true }));
    expect(acts).to.deep.equal([{ act: 'rename', id: 'a', name: 'better' }]);
  });

  it('does not even read a file that is too large, and says so', async () => {
    const acts = heard(element, 'hm-project');
    const words = heard(element, 'hm-say');
    const input = element.shadowRoot!.querySelector<HTMLInputElement>('[type=file]')!;
    const file = new File(['{}'], 'film.json');
    let read = 0;
    Object.defineProperties(file, { size: { value: 60e6 }, text: { value: async () => (read++, '{}') } });
    Object.defineProperty(input, 'files', { value: [file] });
    input.dispatchEvent(new Event('change'));
    await until('words', () => words.length > 0);
    expect(words).to.deep.equal([{ text: 'film.json has 60 MB: that is no design and no backup.', urgent: true }]);
    expect([acts.length, read]).to.deep.equal([0, 0]);
  });

  it('reads a backup file that is chosen', async () => {
    const acts = heard(element, 'hm-project');
    const input = element.shadowRoot!.querySelector<HTMLInputElement>('[type=file]')!;
    const transfer = new DataTransfer();
    transfer.items.add(new File(['{}'], 'backup.json'));
    input.files = transfer.files;
    input.dispatchEvent(new Event('change'));
    await until('the act', () => acts.length > 0);
    expect(acts).to.deep.equal([{ act: 'restore-backup', text: '{}' }]);
  });
});
