import assert from 'node:assert/strict';
import { scenario } from './harness.ts';

scenario('the review sheet is asked for from the page and shows its first page', async ({ page, open }) => {
  await open();
  const press = async (words: string): Promise<void> => {
    const button = await page.waitForFunction(
      (text) => {
        const found: HTMLButtonElement[] = [];
        const walk = (root: ParentNode): void => {
          for (const e of root.querySelectorAll('*')) {
            if (e instanceof HTMLButtonElement && e.textContent?.trim() === text && !e.disabled && e.getClientRects().length > 0) found.push(e);
            if (e.shadowRoot) walk(e.shadowRoot);
          }
        };
        walk(document);
        return found[0] ?? null;
      },
      { timeout: 20_000 },
      words,
    );
    await (button as import('puppeteer-core').ElementHandle<HTMLButtonElement>).click();
  };
  await press('Take away');
  await press('Fill in and take away');
  const texts = await page.waitForFunction(
    () => {
      const picture = document.querySelector('hm-app')?.shadowRoot?.querySelector('hm-sheet')?.shadowRoot?.querySelector('img');
      return picture?.complete && picture.naturalWidth > 0 ? decodeURIComponent(picture.src) : null;
    },
    { timeout: 20_000 },
  );
  const words = String(await texts.jsonValue());
  for (const part of ['Clamp diode, silicon', 'anode', 'drift', 'substrate']) assert.ok(words.includes(part), part);
});
