import { expect } from 'chai';
import { deleteDB } from 'idb';
import '../../components/hm-app/hm-app.ts';
import type { HmApp } from '../../components/hm-app/hm-app.ts';
import type { HmStrip } from '../../components/hm-strip/hm-strip.ts';
import { tell } from '../../components/shared/events.ts';
import { writeDesign } from '../../src/design/write.ts';
import { addRequirement, moveLayer, setConcentration, setThickness } from '../../src/state/commands/index.ts';
import { ProjectStore } from '../../src/storage/project-store.ts';
import { expectAccessible } from './accessible.ts';
import { button, until } from './heard.ts';

/** Longest that the worker may take to start and solve here, ms. */
const PATIENCE = 8000;
let name: string;
let count = 0;
let apps: HmApp[];

function part<K extends keyof HTMLElementTagNameMap>(app: HmApp, tag: K): HTMLElementTagNameMap[K] {
  return app.shadowRoot!.querySelector(tag)!;
}
const strip = (app: HmApp): HmStrip => part(app, 'hm-strip');
const said = (app: HmApp): string => part(app, 'hm-messages').shadowRoot!.textContent!.replace(/\s+/g, ' ');
const ec = (app: HmApp): number => part(app, 'hm-plate').result!.layers[0].ec_minus_ef_eV;
const solved = (app: HmApp): boolean => part(app, 'hm-messages').findings.status === 'complete';

async function open(): Promise<HmApp> {
  const app = document.createElement('hm-app');
  app.database = name;
  apps.push(app);
  document.body.append(app);
  await until('a solved design', () => part(app, 'hm-plate')?.result != null && solved(app), PATIENCE);
  return app;
}
function close(app: HmApp): void {
  apps.splice(apps.indexOf(app), 1);
  app.remove();
}
function key(init: KeyboardEventInit): void {
  document.body.dispatchEvent(new KeyboardEvent('keydown', { bubbles: true, composed: true, cancelable: true, ...init }));
}
function drop(file: File): void {
  const dataTransfer = new DataTransfer();
  dataTransfer.items.add(file);
  document.body.dispatchEvent(new DragEvent('drop', { dataTransfer, bubbles: true, cancelable: true }));
}

describe('the page', () => {
  beforeEach(() => {
    name = `app-${Date.now()}-${count++}`;
    apps = [];
  });
  afterEach(async () => {
    for (const app of [...apps]) close(app);
    await new Promise((done) => setTimeout(done, 20));
    await deleteDB(name);
  });

  it('opens a worked design at a first visit, solved by the worker, and is accessible', async () => {
    const app = await open();
    expect(strip(app).design!.title).not.to.equal('');
    expect(part(app, 'hm-plate').result!.quality.converged).to.equal(true);
    await until('menus', () => strip(app).materials.length > 10);
    await expectAccessible(app, ['hm-strip']);
  });

  it('answers an edit, takes it back, and says what it took back', async () => {
    const app = await open();
    const before = ec(app);
    tell(strip(app), 'hm-edit', { next: setConcentration(strip(app).design!, 0, 0, '1e15 cm^-3'), label: 'doping of the first layer' });
    await until('another picture', () => solved(app) && Math.abs(ec(app) - before) > 0.01, PATIENCE);
    key({ key: 'z', ctrlKey: true });
    await until('the first picture', () => solved(app) && Math.abs(ec(app) - before) < 1e-6, PATIENCE);
    expect(said(app)).to.contain('Taken back: doping of the first layer');
    key({ key: 'z', ctrlKey: true, shiftKey: true });
    await until('the other picture again', () => solved(app) && Math.abs(ec(app) - before) > 0.01, PATIENCE);
  });

  it('keeps the last good picture, marked, and the reason in words, when an input cannot be solved', async () => {
    const app = await open();
    const good = part(app, 'hm-plate').result;
    tell(strip(app), 'hm-edit', { next: setThickness(strip(app).design!, 0, '200 mn'), label: 'thickness' });
    await until('a complaint', () => said(app).includes('to mend'), PATIENCE);
    expect(said(app)).to.contain('200 mn');
    expect(part(app, 'hm-plate').result).to.equal(good);
    expect(part(app, 'hm-plate').stale).to.equal(true);
    expect(part(app, 'hm-leave').stale).to.equal(true);
    await expectAccessible(part(app, 'hm-messages'));
    tell(strip(app), 'hm-edit', { next: setThickness(strip(app).design!, 0, '200 nm'), label: 'thickness' });
    await until('a new picture', () => solved(app), PATIENCE);
    expect(part(app, 'hm-plate').stale).to.equal(false);
    expect(said(app)).to.contain('Solved.');
  });

  it('keeps the moved layer chosen when undo brings it back', async () => {
    const app = await open();
    const { name: moved } = strip(app).design!.layers[1];
    tell(strip(app), 'hm-choose', { kind: 'layer', index: 0 });
    tell(strip(app), 'hm-edit', { next: moveLayer(strip(app).design!, 1, 0), label: 'layer moved' });
    await until('the move', () => strip(app).design!.layers[0].name === moved);
    key({ key: 'z', ctrlKey: true });
    await until('the move taken back', () => strip(app).design!.layers[1].name === moved);
    await strip(app).updateComplete;
    expect(strip(app).chosen).to.deep.equal({ kind: 'layer', index: 1 });
  });

  it('leaves undo to the browser while a field holds text that is not accepted yet', async () => {
    const app = await open();
    tell(strip(app), 'hm-edit', { next: setThickness(strip(app).design!, 0, '250 nm'), label: 'thickness' });
    const field = part(app, 'hm-conditions').shadowRoot!.querySelectorAll('hm-field')[1];
    await field.edit();
    const box = field.shadowRoot!.querySelector('input')!;
    box.value = '77';
    const press = () => box.dispatchEvent(new KeyboardEvent('keydown', { key: 'z', ctrlKey: true, bubbles: true, composed: true, cancelable: true }));
    expect(press()).to.equal(true);
    expect(strip(app).design!.layers[0].thickness).to.equal('250 nm');
    box.value = field.value;
    expect(press()).to.equal(false);
    await app.updateComplete;
    expect(strip(app).design!.layers[0].thickness).not.to.equal('250 nm');
  });

  it('goes on after a reload where it was, undo included', async () => {
    const first = await open();
    const before = strip(first).design!.layers[0].thickness;
    tell(strip(first), 'hm-edit', { next: setThickness(strip(first).design!, 0, '123 nm'), label: 'thickness' });
    tell(strip(first), 'hm-view', { change: { depth: 'true' } });
    close(first);
    const second = await open();
    expect(strip(second).design!.layers[0].thickness).to.equal('123 nm');
    expect(part(second, 'hm-plate').view.depth).to.equal('true');
    key({ key: 'z', metaKey: true });
    await second.updateComplete;
    expect(strip(second).design!.layers[0].thickness).to.equal(before);
  });

  it('opens a dropped design as a project of its own, with its mistake if it has one', async () => {
    const app = await open();
    const own = { ...setThickness(strip(app).design!, 0, '1 parsec'), title: 'dropped' };
    drop(new File([writeDesign(own)], 'x.json'));
    await until('the design', () => strip(app).design!.title === 'dropped', PATIENCE);
    await until('the complaint', () => said(app).includes('1 parsec'), PATIENCE);
    const store = new ProjectStore(() => {}, name);
    expect((await store.list()).map((entry) => entry.name)).to.include('dropped').and.to.have.length(2);
    await store.close();
  });

  it('says why a dropped or pasted text is no design, and leaves the page as it was', async () => {
    const app = await open();
    const title = strip(app).design!.title;
    drop(new File(['{"format":"halfmark-design/1","layers":7}'], 'bad.json'));
    await until('the reason', () => said(app).includes('bad.json was not opened'));
    const clipboardData = new DataTransfer();
    clipboardData.setData('text/plain', '{"a": ');
    document.body.dispatchEvent(new ClipboardEvent('paste', { clipboardData, bubbles: true }));
    await until('the other reason', () => said(app).includes('The pasted text was not opened'));
    expect(strip(app).design!.title).to.equal(title);
  });

  it('opens a starter from the shelf, and the former project from the list', async () => {
    const app = await open();
    const first = strip(app).design!.title;
    button(part(app, 'hm-conditions'), 'Starters').click();
    await until('the shelf', () => (part(app, 'hm-starters').starters?.length ?? 0) > 5, PATIENCE);
    await part(app, 'hm-starters').updateComplete;
    part(app, 'hm-starters').shadowRoot!.querySelectorAll('li button')[1].dispatchEvent(new MouseEvent('click', { bubbles: true }));
    await until('the starter', () => strip(app).design!.title !== first, PATIENCE);
    button(part(app, 'hm-conditions'), 'Projects').click();
    await until('two projects', () => part(app, 'hm-projects').entries.length === 2);
    const projects = part(app, 'hm-projects');
    await projects.updateComplete;
    expect(projects.openId).not.to.equal(null);
    [...projects.shadowRoot!.querySelectorAll<HTMLButtonElement>('li .row button')].find((candidate) => !candidate.disabled && candidate.textContent!.startsWith('Open'))!.click();
    await until('the first project', () => strip(app).design!.title === first, PATIENCE);
  });

  it('puts the open project into the bin and shows another, so that a page is never empty', async () => {
    const app = await open();
    const id = part(app, 'hm-projects').openId!;
    tell(part(app, 'hm-projects'), 'hm-project', { act: 'bin', id });
    await until('another project', () => part(app, 'hm-projects').openId !== id && part(app, 'hm-projects').openId !== null, PATIENCE);
    expect(strip(app).design!.title).to.equal('untitled');
    await until('the bin', () => part(app, 'hm-projects').entries.some((entry) => entry.id === id && entry.binned !== null));
  });

  it('adds what a dropped backup holds and replaces nothing', async () => {
    const app = await open();
    const store = new ProjectStore(() => {}, name);
    const { writeBackup } = await import('../../src/storage/backup.ts');
    const text = writeBackup(await store.all(), 0);
    drop(new File([text], 'backup.json'));
    await until('the remark', () => said(app).includes('One project added from the backup'), PATIENCE);
    const names = (await store.list()).map((entry) => entry.name);
    expect(new Set(names).size).to.equal(2);
    await store.close();
  });

  it('has requirements judged by a worker of their own once the design rests', async () => {
    const app = await open();
    const [{ name: first }] = strip(app).design!.layers;
    const requirement = { quantity: 'builtIn', of: first, min: '0.1 V' };
    tell(strip(app), 'hm-edit', { next: addRequirement({ ...strip(app).design!, requirements: [] }, requirement), label: 'new requirement' });
    const verdicts = () => part(app, 'hm-desk').verdicts;
    await until('a verdict', () => verdicts().status === 'complete' && verdicts().rows.length === 1, 3 * PATIENCE);
    expect(verdicts().rows[0]).to.include({ quantity: 'builtIn', of: first, met: true });
    tell(strip(app), 'hm-edit', { next: setThickness(strip(app).design!, 0, '200 mn'), label: 'thickness' });
    await until('a stale verdict', () => verdicts().status === 'error' && verdicts().stale, PATIENCE);
  }).timeout(30_000);

  it('renames the project and the title of its drawing together', async () => {
    const app = await open();
    tell(part(app, 'hm-conditions'), 'hm-rename', { name: 'my stack' });
    await until('the name', () => part(app, 'hm-conditions').project === 'my stack' && strip(app).design!.title === 'my stack');
  });

  it('asks before it lets go of what it could not save', async () => {
    const app = await open();
    const put = IDBObjectStore.prototype.put;
    IDBObjectStore.prototype.put = () => {
      throw new DOMException('full', 'QuotaExceededError');
    };
    try {
      tell(strip(app), 'hm-edit', { next: setThickness(strip(app).design!, 0, '321 nm'), label: 'thickness' });
      await until('trouble', () => said(app).includes('no room left'));
      tell(part(app, 'hm-starters'), 'hm-starter', { id: 'schottky' });
      const dialog = app.shadowRoot!.querySelector<HTMLElementTagNameMap['hm-dialog']>('#unsaved')!;
      await until('the question', () => dialog.open);
      expect(strip(app).design!.layers[0].thickness).to.equal('321 nm');
      [...dialog.querySelectorAll('button')].find((candidate) => candidate.textContent!.startsWith('Open the other'))!.click();
      await until('the starter', () => strip(app).design!.layers[0].thickness !== '321 nm', PATIENCE);
    } finally {
      IDBObjectStore.prototype.put = put;
    }
  });

  it('lets the rail and the strip stand in line with the plate', async () => {
    const app = await open();
    await until('the axes', () => part(app, 'hm-rail').energy !== null && strip(app).axis !== null);
    const plate = part(app, 'hm-plate').axes!;
    expect(part(app, 'hm-rail').energy!.range).to.deep.equal(plate.energy.range);
    expect(strip(app).axis!.edges).to.deep.equal(plate.depth.edges);
    await until('pictures that begin at one height', () => {
      const top = (element: Element) => element.shadowRoot!.querySelector('svg')?.getBoundingClientRect().top ?? Number.NaN;
      // On a page too narrow for two columns the rail stands below.
      return innerWidth <= 900 || Math.abs(top(part(app, 'hm-plate')) - top(part(app, 'hm-rail'))) < 1;
    });
  });
});
