import { expect } from 'chai';
import { deleteDB } from 'idb';
import '../../components/hm-app/hm-app.ts';
import type { HmApp } from '../../components/hm-app/hm-app.ts';
import { tell } from '../../components/shared/events.ts';
import { starters } from '../../src/design/starters/index.ts';
import type { Design } from '../../src/design/types.ts';
import { writeDesign } from '../../src/design/write.ts';
import { setThickness } from '../../src/state/commands/index.ts';
import { fakeFile } from './fake-file.ts';
import { until } from './heard.ts';

const PATIENCE = 8000;
let app: HmApp;
let name: string;
const part = <K extends keyof HTMLElementTagNameMap>(tag: K): HTMLElementTagNameMap[K] => app.shadowRoot!.querySelector(tag)!;
const said = (): string => part('hm-messages').shadowRoot!.textContent!.replace(/\s+/g, ' ');
const save = (): boolean => document.body.dispatchEvent(new KeyboardEvent('keydown', { key: 's', ctrlKey: true, bubbles: true, composed: true, cancelable: true }));
const asked = DataTransferItem.prototype as unknown as { getAsFileSystemHandle?: unknown };
const real = asked.getAsFileSystemHandle;
const own: Design = { ...structuredClone(starters[0].design), title: 'from a file' };

describe('a design that was opened from a file', () => {
  beforeEach(async () => {
    name = `app-file-${Date.now()}`;
    app = document.createElement('hm-app');
    app.database = name;
    document.body.append(app);
    await until('a design', () => part('hm-plate')?.result != null, PATIENCE);
  });
  afterEach(async () => {
    asked.getAsFileSystemHandle = real;
    delete (window as { showOpenFilePicker?: unknown }).showOpenFilePicker;
    app.remove();
    await new Promise((done) => setTimeout(done, 20));
    await deleteDB(name);
  });

  it('is written back by Ctrl S after it was dropped, and its project alone', async () => {
    const disk = fakeFile('own.json', writeDesign(own));
    asked.getAsFileSystemHandle = async () => disk.handle;
    const dataTransfer = new DataTransfer();
    dataTransfer.items.add(await disk.handle.getFile());
    document.body.dispatchEvent(new DragEvent('drop', { dataTransfer, bubbles: true, cancelable: true }));
    await until('the design', () => part('hm-strip').design!.title === 'from a file', PATIENCE);
    await until('the file at the dialog', () => part('hm-leave').file?.name === 'own.json');
    tell(part('hm-strip'), 'hm-edit', { next: setThickness(part('hm-strip').design!, 0, '444 nm'), label: 'thickness' });
    await until('the edit', () => part('hm-leave').design!.layers[0].thickness === '444 nm');
    save();
    await until('the file', () => disk.text.includes('444 nm'));
    await until('the word', () => said().includes('Saved to own.json.'));
    tell(app.shadowRoot!.querySelector('.page')!, 'hm-starter', { id: starters[1].id });
    await until('another project', () => part('hm-strip').design!.title === starters[1].design.title, PATIENCE);
    await until('no file', () => part('hm-leave').file === null);
  });

  it('is written back after it was picked; a picker that is left opens nothing', async () => {
    const disk = fakeFile('picked.json', writeDesign(own));
    const picker = window as { showOpenFilePicker?: unknown };
    let calls = 0;
    picker.showOpenFilePicker = async () => {
      if (calls++ === 0) throw new DOMException('no', 'AbortError');
      return [disk.handle];
    };
    const open = (): void => tell(app.shadowRoot!.querySelector('.page')!, 'hm-act', { act: 'open-file' });
    open();
    await until('the first picker', () => calls === 1);
    open();
    await until('the design', () => part('hm-strip').design!.title === 'from a file', PATIENCE);
    await until('the file at the dialog', () => part('hm-leave').file?.name === 'picked.json');
    disk.change('{}');
    save();
    await until('the dialog', () => part('hm-leave').shadowRoot!.querySelector('hm-dialog')!.open);
    expect(disk.text).to.equal('{}');
    expect(part('hm-leave').shadowRoot!.textContent).to.include('changed by something else');
  });
});
