import assert from 'node:assert/strict';
import { scenario } from './harness.ts';

scenario('the page opens under its name, with its element drawn and no errors', async ({ page, open }) => {
  await open();
  assert.match(await page.title(), /Halfmark/);
  // An element that failed to load has no content of its own.
  await page.waitForFunction(() => (document.querySelector('hm-app')?.shadowRoot?.childElementCount ?? 0) > 0, { timeout: 10_000 });
});
