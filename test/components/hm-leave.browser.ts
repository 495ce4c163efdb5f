import { expect } from 'chai';
import '../../components/hm-leave/hm-leave.ts';
import type { HmLeave } from '../../components/hm-leave/hm-leave.ts';
import { OpenedFile } from '../../components/shared/opened-file.ts';
import { fileName, saveFile } from '../../components/shared/save-file.ts';
import { starters } from '../../src/design/starters/index.ts';
import { textOfLink } from '../../src/export/link.ts';
import { solveDesign } from '../../src/result/solve-design.ts';
import type { Result } from '../../src/result/types.ts';
import { expectAccessible } from './accessible.ts';
import { fakeFile } from './fake-file.ts';
import { button, until } from './heard.ts';

const { design } = starters[0];
const answer = solveDesign(design);
const result = answer.kind === 'result' ? answer.result : (null as unknown as Result);

let element: HmLeave;
/** Files that would have been downloaded. */
let files: { name: string; blob: Promise<Blob> }[];
const click = HTMLAnchorElement.prototype.click;
const picker = Object.getOwnPropertyDescriptor(window, 'showSaveFilePicker');
const remark = () => element.shadowRoot!.querySelector('.remark')!.textContent!;

async function taken(words: string): Promise<{ name: string; text: string; type: string }> {
  button(element, words).click();
  await until('a file', () => files.length > 0);
  const { name, blob } = files.pop()!;
  return { name, text: await (await blob).text(), type: (await blob).type };
}

describe('taking something away', () => {
  beforeEach(async () => {
    files = [];
    HTMLAnchorElement.prototype.click = function () {
      files.push({ name: this.download, blob: fetch(this.href).then((response) => response.blob()) });
    };
    Object.defineProperty(window, 'showSaveFilePicker', { value: undefined, configurable: true, writable: true });
    element = document.createElement('hm-leave');
    Object.assign(element, { design, result, plateLook: { depth: 'true' } });
    document.body.append(element);
    await element.updateComplete;
    element.show();
    await until('an open dialog', () => element.shadowRoot!.querySelector('hm-dialog')!.open);
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

  it('gives the plate as an SVG document of its own', async () => {
    const { name, text, type } = await taken('SVG');
    expect(name).to.match(/\.svg$/);
    expect(type).to.equal('image/svg+xml');
    const svg = new DOMParser().parseFromString(text, 'image/svg+xml');
    expect(svg.querySelector('parsererror')).to.equal(null);
    expect(svg.documentElement.textContent).to.contain(design.title);
    await until('the remark', () => remark().includes('downloads'));
  });

  it('gives the plate as a PNG of twice its size', async () => {
    button(element, 'PNG').click();
    await until('a file', () => files.length > 0, 8000);
    const bitmap = await createImageBitmap(await files[0].blob);
    expect([bitmap.width, bitmap.height]).to.deep.equal([2560, 1440]);
  });

  it('gives the profiles and the ledger as tables with units', async () => {
    expect((await taken('Profiles')).text).to.match(/^depth \(nm\),Ec \(eV\)/);
    const ledger = await taken('Ledger');
    expect(ledger.name).to.match(/-ledger\.tsv$/);
    expect(ledger.text).to.match(/^layer\t.*\(eV\)/);
  });

  it('gives the design as the file that is read again', async () => {
    const { text, name } = await taken('Design file');
    expect(name).to.match(/\.halfmark\.json$/);
    expect(JSON.parse(text)).to.deep.equal(JSON.parse(JSON.stringify(design)));
  });

  it('puts a link on the clipboard that holds the whole design', async () => {
    const written: string[] = [];
    const clipboard = Object.getOwnPropertyDescriptor(Navigator.prototype, 'clipboard')!;
    Object.defineProperty(navigator, 'clipboard', { value: { writeText: async (text: string) => void written.push(text) }, configurable: true });
    try {
      button(element, 'Copy a link').click();
      await until('the link', () => written.length > 0);
      expect(JSON.parse(await textOfLink(written[0]))).to.deep.equal(JSON.parse(JSON.stringify(design)));
      await until('the remark', () => remark().includes('clipboard'));
    } finally {
      delete (navigator as unknown as { clipboard?: unknown }).clipboard;
      expect(Object.getOwnPropertyDescriptor(Navigator.prototype, 'clipboard')).to.deep.equal(clipboard);
    }
  });

  it('puts the plate on the clipboard in one press, as PNG and as SVG', async () => {
    const items: ClipboardItem[] = [];
    Object.defineProperty(navigator, 'clipboard', { value: { write: async (list: ClipboardItem[]) => void items.push(...list) }, configurable: true });
    try {
      button(element, 'Copy as PNG').click();
      await until('the picture', () => items.length === 1);
      const bitmap = await createImageBitmap(await items[0].getType('image/png'));
      expect([bitmap.width, bitmap.height]).to.deep.equal([2560, 1440]);
      button(element, 'Copy as SVG').click();
      await until('the drawing', () => items.length === 2);
      const text = await (await items[1].getType('text/plain')).text();
      expect(new DOMParser().parseFromString(text, 'image/svg+xml').documentElement.textContent).to.contain(design.title);
      const picture = items[1].types.includes('image/svg+xml');
      if (picture) expect(await (await items[1].getType('image/svg+xml')).text()).to.equal(text);
      await until('the remark', () => remark().includes('clipboard as'));
    } finally {
      delete (navigator as unknown as { clipboard?: unknown }).clipboard;
    }
  });

  it('says so where the clipboard refuses or there is none', async () => {
    Object.defineProperty(navigator, 'clipboard', { value: { write: async () => Promise.reject(new DOMException('no leave', 'NotAllowedError')) }, configurable: true });
    try {
      button(element, 'Copy as PNG').click();
      await until('the reason', () => remark().includes('no leave'));
      Object.defineProperty(navigator, 'clipboard', { value: undefined, configurable: true });
      button(element, 'Copy as SVG').click();
      await until('another way', () => remark().includes('take the SVG as a file'));
    } finally {
      delete (navigator as unknown as { clipboard?: unknown }).clipboard;
    }
  });

  it('gives no figures of an earlier design away, but always the design', async () => {
    element.stale = true;
    await element.updateComplete;
    expect(['SVG', 'PNG', 'Copy as PNG', 'Copy as SVG', 'Profiles', 'Ledger'].every((words) => button(element, words).disabled)).to.equal(true);
    expect(button(element, 'Design file').disabled).to.equal(false);
    expect(element.shadowRoot!.textContent).to.contain('only its file can be taken');
  });

  it('says so when the browser does not let it', async () => {
    Object.defineProperty(window, 'showSaveFilePicker', {
      value: async () => ({ createWritable: async () => ({ write: async () => Promise.reject(new Error('the disk is full')), close: async () => {} }) }), configurable: true,
    });
    button(element, 'Design file').click();
    await until('the remark', () => remark().includes('the disk is full'));
  });
});

describe('saving back to the file that a design was opened from', () => {
  const named = (name: string) => (): never => {
    throw new DOMException('no', name);
  };

  it('writes the design there, and again after that', async () => {
    const disk = fakeFile('cap.json', 'old');
    const file = new OpenedFile(disk.handle, await disk.handle.getFile());
    for (const text of ['one', 'two']) expect(await file.write(Promise.resolve(new Blob([text])))).to.deep.equal({ kind: 'written', said: 'Saved to cap.json.' });
    expect(disk.text).to.equal('two');
  });

  it('asks for leave once, and writes nothing without it', async () => {
    const disk = fakeFile('cap.json', 'old');
    disk.handle.queryPermission = async () => 'prompt';
    disk.handle.requestPermission = async () => 'denied';
    const file = new OpenedFile(disk.handle, await disk.handle.getFile());
    const outcome = await file.write(Promise.resolve(new Blob(['new'])));
    expect(outcome.kind).to.equal('refused');
    expect(outcome.said).to.include('not allowed to write cap.json');
    expect(disk.text).to.equal('old');
    disk.handle.requestPermission = async () => 'granted';
    expect((await file.write(Promise.resolve(new Blob(['new'])))).kind).to.equal('written');
  });

  it('does not write over what another program changed, unless told to', async () => {
    const disk = fakeFile('cap.json', 'old');
    const file = new OpenedFile(disk.handle, await disk.handle.getFile());
    disk.change('of another program');
    const outcome = await file.write(Promise.resolve(new Blob(['new'])));
    expect(outcome.kind).to.equal('changed');
    expect(disk.text).to.equal('of another program');
    expect((await file.write(Promise.resolve(new Blob(['new'])), true)).kind).to.equal('written');
    expect(disk.text).to.equal('new');
    expect((await file.write(Promise.resolve(new Blob(['newer'])))).kind).to.equal('written');
  });

  it('says so where the file is gone, write-protected, or the disk fails, and leaves the file as it was', async () => {
    const gone = fakeFile('cap.json', 'old');
    const away = new OpenedFile(gone.handle, await gone.handle.getFile());
    gone.handle.getFile = async () => named('NotFoundError')();
    expect(await away.write(Promise.resolve(new Blob(['new'])))).to.include({ kind: 'gone' });
    const locked = fakeFile('cap.json', 'old');
    locked.handle.createWritable = async () => named('NoModificationAllowedError')();
    expect(await new OpenedFile(locked.handle, await locked.handle.getFile()).write(Promise.resolve(new Blob(['new'])))).to.include({ kind: 'refused' });
    const full = fakeFile('cap.json', 'old');
    full.fails = new DOMException('the disk is full', 'QuotaExceededError');
    const outcome = await new OpenedFile(full.handle, await full.handle.getFile()).write(Promise.resolve(new Blob(['new'])));
    expect(outcome.kind).to.equal('failed');
    expect(outcome.said).to.include('the disk is full');
    expect([full.text, full.aborted]).to.deep.equal(['old', 1]);
    const unmade = fakeFile('cap.json', 'old');
    expect((await new OpenedFile(unmade.handle, await unmade.handle.getFile()).write(Promise.reject(new Error('no design')))).kind).to.equal('failed');
    expect(unmade.text).to.equal('old');
  });

  it('is one press, and where it fails the dialog offers a new file and, of a changed one, to write over it', async () => {
    const disk = fakeFile('cap.halfmark.json', 'old');
    const page = document.createElement('hm-leave');
    Object.assign(page, { design, result, plateLook: {}, file: new OpenedFile(disk.handle, await disk.handle.getFile()) });
    document.body.append(page);
    await page.updateComplete;
    try {
      expect(await page.saveDesign()).to.equal('Saved to cap.halfmark.json.');
      expect(JSON.parse(disk.text)).to.deep.equal(JSON.parse(JSON.stringify(design)));
      expect(page.shadowRoot!.querySelector('hm-dialog')!.open).to.equal(false);
      disk.change('of another program');
      expect(await page.saveDesign()).to.include('changed by something else');
      await until('an open dialog', () => page.shadowRoot!.querySelector('hm-dialog')!.open);
      await page.updateComplete;
      expect(page.shadowRoot!.querySelector('.remark')!.textContent).to.include('changed by something else');
      expect(button(page, 'Design file').disabled).to.equal(false);
      await expectAccessible(page);
      button(page, 'Write over cap.halfmark.json').click();
      await until('the file', () => disk.text.startsWith('{'));
      await until('the word', () => page.shadowRoot!.querySelector('.remark')!.textContent === 'Saved to cap.halfmark.json.');
      expect([...page.shadowRoot!.querySelectorAll('button')].some((b) => b.textContent!.includes('Write over'))).to.equal(false);
    } finally {
      page.remove();
    }
  });
});

describe('saving a file', () => {
  const given = (value: unknown) => Object.defineProperty(window, 'showSaveFilePicker', { value, configurable: true, writable: true });
  afterEach(() => void delete (window as { showSaveFilePicker?: unknown }).showSaveFilePicker);

  it('writes where the person picked', async () => {
    const written: Blob[] = [];
    given(async () => ({ createWritable: async () => ({ write: async (data: Blob) => void written.push(data), close: async () => {} }) }));
    expect(await saveFile('a.svg', 'image/svg+xml', Promise.resolve(new Blob(['x'])))).to.equal('written');
    expect(await written[0].text()).to.equal('x');
  });

  it('writes nothing when the person thinks better of it', async () => {
    given(async () => {
      throw new DOMException('no', 'AbortError');
    });
    expect(await saveFile('a.svg', 'image/svg+xml', new Blob(['x']))).to.equal('given up');
  });

  it('makes any title a name that every system takes', () => {
    expect(fileName('n contact on GaAs: 2/3 "Å"', '.svg')).to.equal('n-contact-on-GaAs-2-3-A.svg');
    expect(fileName('../../etc', '.svg')).to.equal('etc.svg');
    expect(fileName(' ', '.csv')).to.equal('design.csv');
    expect(fileName('x'.repeat(300), '.csv')).to.have.length(64);
  });
});
