import { expect } from 'chai';
import '../../components/hm-sheet/hm-sheet.ts';
import type { HmSheet } from '../../components/hm-sheet/hm-sheet.ts';
import { printPages } from '../../components/hm-sheet/print-pages.ts';
import { JobClient, type RunJob } from '../../src/workers/job-client.ts';
import { startJobWorker } from '../../src/workers/job-start.ts';
import { expectAccessible } from './accessible.ts';
import { button, heard, until } from './heard.ts';
import { sample } from './sample.ts';

const of = sample('pn-diode');
const jobs = new JobClient(startJobWorker);
let element: HmSheet;
/** Files that would have been downloaded. */
let files: { name: string; blob: Promise<Blob> }[];
const click = HTMLAnchorElement.prototype.click;
const picker = Object.getOwnPropertyDescriptor(window, 'showSaveFilePicker');
const inside = <E extends Element>(selector: string): E | null => element.shadowRoot!.querySelector<E>(selector);
const field = (name: string): HTMLInputElement => inside<HTMLInputElement>(`label.${name} input`)!;
const picture = (): string => decodeURIComponent(inside<HTMLImageElement>('img')?.src ?? '');

function type(name: string, text: string): void {
  field(name).value = text;
  field(name).dispatchEvent(new Event('input', { bubbles: true }));
}

async function bytesOf(words: string): Promise<{ name: string; bytes: Uint8Array }> {
  button(element, words).click();
  await until('a file', () => files.length > 0, 20_000);
  const { name, blob } = files.pop()!;
  return { name, bytes: new Uint8Array(await (await blob).arrayBuffer()) };
}

describe('the review sheet in its dialog', () => {
  beforeEach(async () => {
    localStorage.removeItem('halfmark:author');
    files = [];
    HTMLAnchorElement.prototype.click = function () {
      files.push({ name: this.download, blob: fetch(this.href).then((response) => response.blob()) });
    };
    Object.defineProperty(window, 'showSaveFilePicker', { value: undefined, configurable: true, writable: true });
    element = document.createElement('hm-sheet');
    Object.assign(element, { ...of, plateLook: { depth: 'true' }, run: jobs.run });
    document.body.append(element);
    await element.updateComplete;
    element.show();
    await until('a picture of the first page', () => inside<HTMLImageElement>('img') !== null, 10_000);
  });
  afterEach(() => {
    HTMLAnchorElement.prototype.click = click;
    if (picker) Object.defineProperty(window, 'showSaveFilePicker', picker);
    else delete (window as { showSaveFilePicker?: unknown }).showSaveFilePicker;
    element.remove();
  });

  it('is accessible', async () => {
    await expectAccessible(element);
  });

  it('shows the sheet as it will be, with the title block as typed', async () => {
    await until('a picture that the browser can draw', () => inside<HTMLImageElement>('img')!.naturalWidth > 0);
    type('author', 'Q. Drafter <b>');
    type('revision', 'rev 7');
    await until('the author on the sheet', () => picture().includes('Q. Drafter &lt;b&gt;'));
    expect(picture()).to.include('rev 7').and.to.include(of.design.title);
    expect(field('date').value).to.equal('');
  });

  it('puts a date on it only when asked, and keeps the author for the next time', async () => {
    button(element, 'Today').click();
    await element.updateComplete;
    expect(field('date').value).to.match(/^\d{4}-\d\d-\d\d$/);
    type('author', 'K. Keeper');
    const next = document.createElement('hm-sheet');
    Object.assign(next, of);
    document.body.append(next);
    await next.updateComplete;
    next.show();
    await until('an open dialog', () => next.shadowRoot!.querySelector('hm-dialog')!.open);
    await next.updateComplete;
    await until('a page in it', () => next.shadowRoot!.querySelector('img') !== null);
    expect(next.shadowRoot!.querySelector<HTMLInputElement>('label.author input')!.value).to.equal('K. Keeper');
    next.remove();
  });

  it('turns pages, and stops at both ends', async () => {
    expect(button(element, 'Page before').disabled).to.equal(true);
    const first = picture();
    button(element, 'Next page').click();
    await until('another page', () => picture() !== first);
    expect(inside<HTMLElement>('[role=group] span')!.textContent).to.match(/Page 2 of \d/);
  });

  it('gives a PDF away, whose letters are loaded for it', async () => {
    const said = heard(element, 'hm-say');
    const { name, bytes } = await bytesOf('PDF');
    expect(name).to.match(/-sheet\.pdf$/);
    expect(new TextDecoder('latin1').decode(bytes.slice(0, 8))).to.equal('%PDF-1.7');
    expect(bytes.length).to.be.greaterThan(20_000);
    await until('a word about it', () => said.length > 0);
    expect(said[0].text).to.include('downloads');
  });

  it('gives SVG and PNG away as an archive with a file a page', async () => {
    for (const words of ['SVG', 'PNG']) {
      const { name, bytes } = await bytesOf(words);
      expect(name).to.match(/-sheet\.zip$/);
      const text = new TextDecoder('latin1').decode(bytes);
      expect(text.startsWith('PK')).to.equal(true);
      expect(text).to.include(`sheet-1.${words.toLowerCase()}`).and.to.include(`sheet-2.${words.toLowerCase()}`);
      await until('an end of the work', () => !button(element, words).disabled);
    }
  });

  it('adds the sections that are switched on: others laid over, contacts from near, workings', async function () {
    this.timeout(40_000);
    const other = structuredClone(of.design);
    other.layers[1].thickness = '3 um';
    element.others = [{ id: 'b', name: 'thinner drift', design: other }];
    element.ownName = 'base';
    await element.updateComplete;
    const sections = inside<HTMLElementTagNameMap['hm-sheet-sections']>('hm-sheet-sections')!;
    await sections.updateComplete;
    const pages = (): number => Number(/of (\d+)/.exec(inside<HTMLElement>('[role=group] span')!.textContent!)![1]);
    const before = pages();
    sections.shadowRoot!.querySelector('details')!.open = true;
    // One after another, faster than the page is drawn.
    for (const box of sections.shadowRoot!.querySelectorAll<HTMLInputElement>('input:not(:disabled)')) box.click();
    button(sections, 'Add').click();
    await until('more pages', () => pages() >= before + 2, 10_000);
    await expectAccessible(element);
    const { bytes } = await bytesOf('PDF');
    expect(bytes.length).to.be.greaterThan(20_000);
    expect(sections.chosen.over).to.deep.equal(['b']);
    expect(sections.chosen.contacts).to.equal(true);
    expect(sections.chosen.workings).to.have.length(1);
    button(sections, 'Leave out').click();
    await element.updateComplete;
    await sections.updateComplete;
    expect(sections.chosen.workings).to.have.length(0);
  });

  it('solves nothing on the page: it asks a worker, says so while that takes long, and asks anew after a worker that failed', async () => {
    const asked: string[] = [];
    let fail!: () => void;
    element.run = ((kind: string) => {
      asked.push(kind);
      return asked.length === 1 ? { outcome: new Promise((end) => (fail = () => end({ kind: 'fault', message: 'out of memory' }))), cancel: () => undefined } : jobs.run(kind as 'result', { design: of.design });
    }) as unknown as RunJob;
    const other = structuredClone(of.design);
    element.others = [{ id: 'b', name: 'another', design: other }];
    await element.updateComplete;
    const sections = inside<HTMLElementTagNameMap['hm-sheet-sections']>('hm-sheet-sections')!;
    await sections.updateComplete;
    const remark = (): string => inside<HTMLElement>('.remark')!.textContent!;
    sections.shadowRoot!.querySelector('input')!.click();
    await until('a word while it takes long', () => remark().includes('Working out'));
    expect(asked).to.deep.equal(['result']);
    fail();
    await until('the reason', () => remark().includes('another has no result: out of memory'));
    type('revision', 'rev 8');
    await until('no reason any more', () => remark() === '' && asked.length === 2);
    await until('a page of the other', () => / of [4-9]/.test(inside<HTMLElement>('[role=group] span')!.textContent!));
  });

  it('says why another design has no place on the sheet, and draws the rest', async () => {
    const broken = structuredClone(of.design);
    broken.layers[0].thickness = '-1 nm';
    element.others = [{ id: 'b', name: 'broken', design: broken }];
    await element.updateComplete;
    const sections = inside<HTMLElementTagNameMap['hm-sheet-sections']>('hm-sheet-sections')!;
    await sections.updateComplete;
    sections.shadowRoot!.querySelector('input')!.click();
    await until('the reason', () => inside<HTMLElement>('.remark')!.textContent!.includes('broken has no result'));
    expect(inside('img')).not.to.equal(null);
  });

  it('gives nothing away while the result belongs to an earlier design, and says why', async () => {
    element.stale = true;
    await element.updateComplete;
    expect(button(element, 'PDF').disabled).to.equal(true);
    expect(button(element, 'Print').disabled).to.equal(true);
    expect(inside<HTMLElement>('.caution')!.textContent).to.include('no result yet');
  });

  it('says that requirements are not judged while they are not', async () => {
    element.requirements = null;
    await element.updateComplete;
    expect([...element.shadowRoot!.querySelectorAll('.caution')].some((p) => p.textContent!.includes('not judged yet'))).to.equal((of.design.requirements ?? []).length > 0);
  });

  it('prints each page on a sheet of its own and clears up behind itself', () => {
    const print = window.print;
    let pages = 0;
    const sheets = document.adoptedStyleSheets.length;
    window.print = () => {
      pages = document.querySelectorAll('.hm-printed > div > svg').length;
    };
    try {
      printPages(['<svg xmlns="http://www.w3.org/2000/svg"><text>a &lt;script&gt;</text></svg>', '<svg xmlns="http://www.w3.org/2000/svg"/>'], 'A4');
      expect(pages).to.equal(2);
      window.dispatchEvent(new Event('afterprint'));
      expect(document.querySelector('.hm-printed')).to.equal(null);
      expect(document.adoptedStyleSheets.length).to.equal(sheets);
    } finally {
      window.print = print;
    }
  });
});
