import assert from 'node:assert/strict';
import type { Page } from 'puppeteer-core';
import { scenario } from './harness.ts';
import { at, catchFiles, designText, press, said, until, untilSolved } from './inside.ts';

const saving = async (page: Page): Promise<string> => (await at(page, ['hm-app', 'hm-conditions', '.saving'], (element) => element.textContent!)) ?? '';
const saved = (page: Page) => until('all saved', async () => /^All changes saved/.test(await saving(page)));

/** An edit as the strip tells it. */
async function setThickness(page: Page, thickness: string): Promise<void> {
  await at(
    page,
    ['hm-app', 'hm-strip'],
    (strip, given) => {
      const { design } = strip as unknown as { design: { layers: object[] } };
      const layers = design.layers.map((layer, i) => (i === 0 ? { ...layer, thickness: given } : layer));
      strip.dispatchEvent(new CustomEvent('hm-edit', { bubbles: true, composed: true, detail: { next: { ...design, layers }, label: 'thickness' } }));
    },
    thickness,
  );
}
const thickness = async (page: Page): Promise<string> => (JSON.parse(await designText(page)) as { layers: { thickness: string }[] }).layers[0].thickness;

scenario('A tab that dies right after an edit has lost nothing, undo included', async ({ page, open, url }) => {
  const tab = await page.browserContext().newPage();
  await tab.goto(url, { waitUntil: 'networkidle0' });
  await untilSolved(tab);
  await setThickness(tab, '111 nm');
  await saved(tab);
  await setThickness(tab, '222 nm');
  // Long before the save, which waits until it is quiet.
  await new Promise((done) => setTimeout(done, 150));
  // A tab that is killed gets no word of its end: nothing of the page may run any more.
  await tab.evaluate(() => {
    for (const name of ['pagehide', 'visibilitychange', 'beforeunload']) addEventListener(name, (event) => event.stopImmediatePropagation(), { capture: true });
  });
  await tab.close();
  await open();
  await untilSolved(page);
  assert.equal(await thickness(page), '222 nm');
  await at(page, ['hm-app', 'hm-conditions'], (head) => void head.dispatchEvent(new CustomEvent('hm-act', { bubbles: true, composed: true, detail: { act: 'undo' } })));
  await until('the edit before it after undo', async () => (await thickness(page)) === '111 nm');
});

scenario('A reload in the middle of a drag keeps what the drag had come to', async ({ page, open }) => {
  await open();
  await untilSolved(page);
  const before = await thickness(page);
  const edge = await at(page, ['hm-app', 'hm-strip'], (strip) => {
    const handle = [...strip.shadowRoot!.querySelectorAll<HTMLElement>('*')].find((element) => getComputedStyle(element).cursor === 'ew-resize' || getComputedStyle(element).cursor === 'col-resize');
    const box = handle?.getBoundingClientRect();
    return box === undefined ? null : [box.left + box.width / 2, box.top + box.height / 2];
  });
  assert.ok(edge !== null, 'an edge to drag');
  await page.mouse.move(edge![0], edge![1]);
  await page.mouse.down();
  for (let i = 1; i <= 8; i++) await page.mouse.move(edge![0] + 6 * i, edge![1]);
  await until('a drag that does something', async () => (await thickness(page)) !== before);
  const shown = await thickness(page);
  await page.reload({ waitUntil: 'networkidle0' });
  await untilSolved(page);
  assert.equal(await thickness(page), shown);
});

scenario('With no room left in the browser the work stays on the page, is offered as a file, and is there at the next visit', async ({ page, open, url }) => {
  const session = await page.createCDPSession();
  const { origin } = new URL(url);
  await session.send('Storage.overrideQuotaForOrigin', { origin, quotaSize: 1 });
  await open();
  await untilSolved(page);
  await setThickness(page, '333 nm');
  await until('word of the full disk', async () => /no room left|did not save|Not saved/.test(`${await saving(page)} ${await said(page)}`));
  assert.equal(await thickness(page), '333 nm');
  const files = await catchFiles(page);
  await press(page, ['hm-app', 'hm-conditions'], 'Take away');
  await press(page, ['hm-app', 'hm-leave'], 'Design file');
  await until('the file', async () => (await files()).length === 1);
  assert.match((await files())[0].text, /333 nm/);
  await session.send('Storage.overrideQuotaForOrigin', { origin });
  // The browser asks whether to leave; the person does.
  page.on('dialog', (dialog) => void dialog.accept());
  await page.reload({ waitUntil: 'networkidle0' });
  await untilSolved(page);
  assert.equal(await thickness(page), '333 nm');
});

scenario('A database that the browser throws away under the page takes nothing from it: the work is offered as a copy', async ({ page, open, url }) => {
  await open();
  await untilSolved(page);
  await setThickness(page, '444 nm');
  await saved(page);
  const session = await page.createCDPSession();
  await session.send('IndexedDB.deleteDatabase', { securityOrigin: new URL(url).origin, databaseName: 'halfmark' });
  await setThickness(page, '445 nm');
  await until('the question', async () => (await said(page)).includes('deleted in another tab') || (await saving(page)).includes('deleted in another tab'));
  assert.equal(await thickness(page), '445 nm');
  await at(page, ['hm-app', 'hm-messages'], (messages) => void messages.dispatchEvent(new CustomEvent('hm-act', { bubbles: true, composed: true, detail: { act: 'keep-mine' } })));
  await saved(page);
  await page.reload({ waitUntil: 'networkidle0' });
  await untilSolved(page);
  assert.equal(await thickness(page), '445 nm');
});

scenario('Two tabs with one project: neither overwrites the other, and both states are kept', async ({ page, open, url }) => {
  await open();
  await untilSolved(page);
  await saved(page);
  const other = await page.browserContext().newPage();
  await other.goto(url, { waitUntil: 'networkidle0' });
  await untilSolved(other);
  await Promise.all([setThickness(page, '555 nm'), setThickness(other, '666 nm')]);
  const conflict = async (tab: Page) => (await saving(tab)).includes('changed in another tab');
  await until('one of them asks', async () => (await conflict(page)) || (await conflict(other)));
  const loser = (await conflict(page)) ? page : other;
  await loser.bringToFront();
  await at(loser, ['hm-app', 'hm-messages'], (messages) => void messages.dispatchEvent(new CustomEvent('hm-act', { bubbles: true, composed: true, detail: { act: 'keep-mine' } })));
  await saved(loser);
  const texts = await page.evaluate(
    () =>
      new Promise<string[]>((done, fail) => {
        const opening = indexedDB.open('halfmark');
        opening.onerror = () => fail(opening.error);
        opening.onsuccess = () => {
          const asking = opening.result.transaction('projects').objectStore('projects').getAll();
          asking.onsuccess = () => {
            opening.result.close();
            done((asking.result as { designText: string }[]).map(({ designText }) => designText));
          };
        };
      }),
  );
  assert.equal(texts.length, 2);
  for (const kept of ['555 nm', '666 nm']) assert.equal(texts.filter((text) => text.includes(kept)).length, 1, kept);
});
