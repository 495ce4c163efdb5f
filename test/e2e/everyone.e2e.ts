import assert from 'node:assert/strict';
import type { Page } from 'puppeteer-core';
import { APPEARANCES, bring, breaches, overflow, show, smallTargets, type Tools } from './accessible.ts';
import { scenario } from './harness.ts';
import { at, press, until, untilSolved } from './inside.ts';

/** The tabs of the desk under the plate. */
const tabCount = async (page: Page): Promise<number> => (await at(page, ['hm-app', 'hm-desk'], (desk) => desk.shadowRoot!.querySelectorAll('[role=tab]').length)) ?? 0;

for (const [name, appearance] of APPEARANCES) {
  scenario(`The page, every panel of the desk and every dialog are accessible ${name}, with targets of 24 px`, async ({ page, open }) => {
    await show(page, appearance);
    await open();
    await untilSolved(page);
    await bring(page);
    const found: string[] = [];
    const look = async (where: string): Promise<void> => {
      found.push(...(await breaches(page, where)), ...(await smallTargets(page, where)));
      const wide = await overflow(page);
      if (wide > 0) found.push(`${where}: the page is ${wide} px wider than its window`);
    };
    await look('page');
    for (let i = 0; i < (await tabCount(page)); i++) {
      const words = await at(page, ['hm-app', 'hm-desk'], (desk, index) => {
        const tab = desk.shadowRoot!.querySelectorAll<HTMLElement>('[role=tab]')[index];
        tab.click();
        return tab.textContent!.trim();
      }, i);
      await until(`the panel of ${words}`, async () => (await at(page, ['hm-app', 'hm-desk'], (desk, index) => desk.shadowRoot!.querySelectorAll('[role=tab]')[index].getAttribute('aria-selected') === 'true', i)) === true);
      await until(`what stands in the panel of ${words}`, async () => (await at(page, ['hm-app', 'hm-desk', '[role=tabpanel]:not([hidden])'], (panel) => [...panel.children].some((child) => (child.shadowRoot?.childElementCount ?? 0) > 0))) === true);
      await new Promise((done) => setTimeout(done, 100));
      if (i > 0) await look(`panel ${words}`);
    }
    // Two dialogs are filled when they are asked for.
    for (const words of ['Starters', 'Projects']) {
      await press(page, ['hm-app', 'hm-conditions'], words);
      await until(`the dialog of ${words}`, () => page.evaluate(() => (window as unknown as Tools).everyone.all('dialog').some((dialog) => (dialog as HTMLDialogElement).open)));
      await page.keyboard.press('Escape');
    }
    const dialogs = await page.evaluate(() => (window as unknown as Tools).everyone.all('hm-dialog').length);
    assert.ok(dialogs >= 5, `${dialogs} dialogs`);
    for (let i = 0; i < dialogs; i++) {
      const heading = await page.evaluate(async (index) => {
        const dialog = (window as unknown as Tools).everyone.all('hm-dialog')[index] as HTMLElement & { show(): Promise<void>; heading: string };
        await dialog.show();
        return dialog.heading;
      }, i);
      await look(`dialog ${heading}`);
      await page.evaluate((index) => ((window as unknown as Tools).everyone.all('hm-dialog')[index] as HTMLElement & { close(): void }).close(), i);
    }
    assert.deepEqual(found, []);
  });
}

scenario('What is not accessible is found: pale words, a nameless button, targets too small and too close, a page too wide', async ({ page, open }) => {
  await open();
  await untilSolved(page);
  await bring(page);
  await at(page, ['hm-app'], (app) => {
    const planted = document.createElement('div');
    planted.innerHTML = '<p>pale</p><button></button><button class="small">a</button><button class="small">b</button><div class="wide">wide</div>';
    const sheet = new CSSStyleSheet();
    sheet.replaceSync('p { color: #ddd; background: #fff } .small { all: unset; display: inline-block; width: 10px; height: 10px } .wide { width: 3000px }');
    app.shadowRoot!.adoptedStyleSheets.push(sheet);
    app.shadowRoot!.append(planted);
  });
  const found = await breaches(page, 'planted');
  for (const id of ['color-contrast', 'button-name']) assert.ok(found.some((line) => line.includes(id)), id);
  assert.ok((await smallTargets(page, 'planted')).filter((line) => line.includes('small')).length === 2);
  assert.ok((await overflow(page)) > 1000);
});
