// `npm run pictures`: the README's pictures, taken of the built page.
import { mkdirSync } from 'node:fs';
import { join } from 'node:path';
import { buildIfStale } from './build.mjs';
import { openBrowser } from './browser.mjs';
import { ROOT } from './root.mjs';
import { serve } from './serve.mjs';

const FOLDER = join(ROOT, 'src/help/pictures');
const PICTURES = [
  { name: 'plate', width: 1440, height: 900, scheme: 'light' },
  { name: 'narrow', width: 390, height: 844, scheme: 'light' },
  { name: 'dark', width: 1440, height: 900, scheme: 'dark' },
];

await buildIfStale();
mkdirSync(FOLDER, { recursive: true });
const { url, close } = await serve(0);
const browser = await openBrowser();
try {
  for (const { name, width, height, scheme } of PICTURES) {
    // A fresh profile each: nothing of the last picture's design or settings is left.
    const context = await browser.createBrowserContext();
    const page = await context.newPage();
    await page.setViewport({ width, height });
    await page.emulateMediaFeatures([
      { name: 'prefers-color-scheme', value: scheme },
      { name: 'prefers-reduced-motion', value: 'reduce' },
    ]);
    await page.goto(url, { waitUntil: 'networkidle0' });
    // The diagram comes from a worker, after the page is quiet on a slow machine.
    await page.waitForFunction(() => document.querySelector('hm-app')?.shadowRoot?.querySelector('hm-plate')?.shadowRoot?.querySelector('svg path'));
    await page.evaluate(async () => {
      await document.fonts.ready;
      await new Promise((done) => requestAnimationFrame(() => requestAnimationFrame(done)));
    });
    await page.screenshot({ path: join(FOLDER, `${name}.png`) });
    console.log(`src/help/pictures/${name}.png  ${width} x ${height}`);
    await context.close();
  }
} finally {
  await browser.close();
  await close();
}
